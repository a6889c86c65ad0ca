/** One stripe of marks: ions that need at least `fromEv` to be made. */
export interface Lane {
  readonly label: string;
  /** eV, included. */
  readonly fromEv: number;
}

/** Low excitation at the bottom; the limits are the ionisation energies of He+ (54.4 eV), O+ (35.1), He (24.6, taken as 25) and N (14.5): common practice, no source. */
export const LANES: readonly Lane[] = [
  { label: '0–14', fromEv: Number.NEGATIVE_INFINITY },
  { label: '14–25', fromEv: 14 },
  { label: '25–35', fromEv: 25 },
  { label: '35–54', fromEv: 35 },
  { label: '> 54', fromEv: 54 },
];

/** Lane of features without a name, below all others. */
export const UNNAMED_LANE = -1;

/** Position in `LANES` of an ion made by `excitationEv`. */
export function laneOf(excitationEv: number | undefined): number {
  if (excitationEv === undefined || !Number.isFinite(excitationEv)) return 0;
  let lane = 0;
  LANES.forEach(({ fromEv }, k) => {
    if (excitationEv >= fromEv) lane = k;
  });
  return lane;
}

import type { NamedLine } from './namedLine.ts';

/** Flux of one transition, or of a blend, from all features that bear its name. */
export interface LineFlux {
  readonly label: string;
  /** Indices into the line list. */
  readonly lines: readonly number[];
  /** Positions in the named lines. */
  readonly from: readonly number[];
  readonly flux: number;
  readonly fluxErr: number;
  readonly restVac: number;
  readonly ew?: number;
  readonly fwhmA?: number;
  readonly doubt?: string;
}

/** A flux without an error is given this share of itself: common practice, no source. */
const UNKNOWN_ERR = 0.05;

/** One sigma of a flux with that of the calibration, share `calibrationErr`. */
export function fullErr(flux: number, fluxErr: number, calibrationErr: number): number {
  const own = Number.isFinite(fluxErr) && fluxErr > 0 ? fluxErr : UNKNOWN_ERR * Math.abs(flux);
  return Math.hypot(own, calibrationErr * flux);
}

/**
 * Gathers named lines by their transitions: several features of one name (velocity components) are added up.
 *
 * @param named          lines of the object
 * @param calibrationErr share of each flux, added in quadrature
 * @returns one entry a name, in the order of first appearance
 */
export function lineFluxes(named: readonly NamedLine[], calibrationErr: number): LineFlux[] {
  const groups = new Map<string, number[]>();
  named.forEach((line, k) => {
    if (line.lines.length === 0 || !(line.flux > 0)) return;
    const key = [...line.lines].sort((a, b) => a - b).join(' ');
    const group = groups.get(key);
    if (group) group.push(k);
    else groups.set(key, [k]);
  });
  return [...groups.values()].map((from) => {
    const members = from.map((k) => named[k]);
    const [main] = members.toSorted((a, b) => b.flux - a.flux);
    const flux = sum(members.map((line) => line.flux));
    const ews = members.map((line) => line.ew ?? Number.NaN);
    const doubt = members.find((line) => line.doubt !== undefined)?.doubt;
    return {
      label: main.label,
      lines: main.lines,
      from,
      flux,
      fluxErr: Math.hypot(...members.map((line) => fullErr(line.flux, line.fluxErr, 0)), calibrationErr * flux),
      restVac: main.restVac,
      ...(ews.every(Number.isFinite) ? { ew: sum(ews) } : {}),
      ...(main.fwhmA === undefined ? {} : { fwhmA: main.fwhmA }),
      ...(doubt === undefined ? {} : { doubt }),
    };
  });
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

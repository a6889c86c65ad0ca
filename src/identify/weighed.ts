/** One name weighed for one mark: a line, or a blend of up to three. */
export interface Weighed {
  readonly lines: readonly number[];
  readonly shares: readonly number[];
  readonly off: number;
  readonly sigma: number;
  /** log10 flux predicted from what the rest of the spectrum says of the ion, and its one sigma. */
  readonly logPredicted: number;
  readonly logPredictedErr: number;
  readonly wavelengthNats: number;
  readonly strengthNats: number;
  /** The part of `strengthNats` that comes from the excitation other ions show. */
  readonly excitationNats: number;
  readonly widthNats: number;
  /** How rare strangers and blends are. */
  readonly priorNats: number;
  /** Other marks claim its lines too. */
  readonly claimNats: number;
  /** What the place owes: a line that the rest of the spectrum predicts here, that no other feature can be, is missing if this name is wrong. */
  readonly owedNats: number;
  /** An ion that shows nothing else here may not be here at all. */
  readonly familyNats: number;
  /** Weighted number of other lines of the (main) ion that were seen. */
  readonly ionSeen: number;
  readonly probability: number;
  /** Logarithm of the density of strangers of this flux, per dex; `strengthNats` holds it already. */
  readonly logStrangers: number;
}

/** Log odds of a name against "none of these". */
export const logOddsOf = (w: Weighed): number =>
  w.wavelengthNats + w.strengthNats + w.widthNats + w.priorNats + w.claimNats + w.owedNats + w.familyNats;

export interface Weighing {
  readonly candidates: readonly Weighed[];
  readonly noneProbability: number;
}

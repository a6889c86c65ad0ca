/** How a list leaves lines out: an observer's selection, gaps, a limit that varies. */
export interface LeftOut {
  /** Chance that a line just above the limit is not among the marks all the same. */
  readonly share: number;
  /** That chance falls by ten for every so many dex that the line should stand above the limit. */
  readonly dex: number;
}

/** Before anything is counted. Common practice, no source. */
export const USUAL_LEFT_OUT: LeftOut = { share: 0.05, dex: 0.7 };

/** Chance that a line `above` dex over the limit is left out. */
export const chanceLeftOut = ({ share, dex }: LeftOut, above: number): number => share * Math.exp((-Math.LN10 * Math.max(0, above)) / dex);

import type { Peak } from './peaks.ts';

/** The peaks fitted together and their window of samples [first, last]. */
export interface Window<P extends Peak> {
  readonly peaks: readonly P[];
  readonly first: number;
  readonly last: number;
}

/** Peaks nearer than this, in FWHM, are fitted together. */
const JOIN_FWHM = 5;
/** A window reaches this far beyond its outermost peaks ... */
const REACH_FWHM = 4;
/** ... but not nearer than this to a peak of the next group. */
const AWAY_FWHM = 2.5;
/** A broad line is fitted this far beyond its centre, in its own FWHM, beside what a usual line needs. */
const BROAD_REACH_FWHM = 1;
/** A chain of more peaks is cut at its widest gap: the cost of a fit grows with the cube. */
const MOST_PEAKS = 14;

/**
 * @param peaks ascending
 * @param fwhm  n, in samples
 * @param n     samples of the spectrum
 */
export function groupPeaks<P extends Peak>(peaks: readonly P[], fwhm: (sample: number) => number, n: number): Window<P>[] {
  const chains: P[][] = [];
  for (const peak of peaks) {
    const chain = chains.at(-1);
    const previous = chain?.at(-1);
    if (chain && previous && peak.at - endOf(chain) < JOIN_FWHM * fwhm(peak.at)) chain.push(peak);
    else chains.push([peak]);
  }
  const cut = chains.flatMap(cutChain);
  return cut.map((chain, k) => {
    const left = Math.min(...chain.map((peak) => peak.at - BROAD_REACH_FWHM * (peak.fwhm ?? 0)));
    const right = endOf(chain);
    const before = cut[k - 1]?.at(-1)?.at ?? Number.NEGATIVE_INFINITY;
    const after = cut[k + 1]?.[0].at ?? Number.POSITIVE_INFINITY;
    const width = fwhm(chain[0].at);
    const first = Math.max(
      0,
      Math.ceil(left - REACH_FWHM * width),
      Math.min(Math.ceil(before + AWAY_FWHM * width), Math.ceil((before + left) / 2)),
    );
    const last = Math.min(
      n - 1,
      Math.floor(right + REACH_FWHM * width),
      Math.max(Math.floor(after - AWAY_FWHM * width), Math.floor((right + after) / 2)),
    );
    return { peaks: chain, first, last };
  });
}

/** How far the peaks of a chain reach: a broad line is wider than its place. */
const endOf = (chain: readonly Peak[]) => Math.max(...chain.map((peak) => peak.at + BROAD_REACH_FWHM * (peak.fwhm ?? 0)));

function cutChain<P extends Peak>(chain: P[]): P[][] {
  if (chain.length <= MOST_PEAKS) return [chain];
  let widest = 1;
  for (let k = 2; k < chain.length; k++) if (chain[k].at - chain[k - 1].at > chain[widest].at - chain[widest - 1].at) widest = k;
  return [...cutChain(chain.slice(0, widest)), ...cutChain(chain.slice(widest))];
}

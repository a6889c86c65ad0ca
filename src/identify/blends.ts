import type { Option } from './options.ts';

/** An option with the flux that the rest of the spectrum predicts for it. */
export interface Single extends Option {
  readonly logPredicted: number;
  /** One sigma of `logPredicted`, dex: over all, upwards, downwards. */
  readonly err: number;
  readonly errUp: number;
  readonly errDown: number;
  /** How much the excitation of the gas moves the prediction of an ion that is not seen elsewhere, dex. */
  readonly excited: number;
  /** Weighted number of other lines of the ion that were seen. */
  readonly seen: number;
  /** Nats against every name of the mark that leaves this line out. */
  readonly owed: number;
}

/** A part of a blend carries at least this share. */
const LEAST_SHARE = 0.07;
/** Parts of a blend stand within this many FWHM of each other. */
const BLEND_REACH_FWHM = 1.1;

/**
 * Pairs and triples of lines near enough to be measured as one, each carrying a share that matters.
 *
 * @param width FWHM of the feature, or what is unresolved, Angstrom
 */
export function blendsOf(width: number, singles: readonly Single[]): Single[][] {
  const reach = BLEND_REACH_FWHM * width;
  const strong = [...singles].sort((a, b) => b.logPredicted - a.logPredicted).slice(0, 6);
  const blends: Single[][] = [];
  for (let a = 0; a < strong.length; a++) {
    for (let b = a + 1; b < strong.length; b++) {
      const pair = [strong[a], strong[b]];
      if (!fitsTogether(pair, reach)) continue;
      blends.push(pair);
      for (let c = b + 1; c < strong.length; c++) {
        const triple = [...pair, strong[c]];
        if (fitsTogether(triple, reach)) blends.push(triple);
      }
    }
  }
  return blends;
}

function fitsTogether(parts: readonly Single[], reach: number): boolean {
  const offs = parts.map((p) => p.off);
  if (Math.max(...offs) - Math.min(...offs) > reach) return false;
  const shares = sharesOf(parts);
  return Math.min(...shares) >= LEAST_SHARE;
}

/** Shares of the predicted flux, summing to 1. */
export function sharesOf(parts: readonly Single[]): number[] {
  const top = Math.max(...parts.map((p) => p.logPredicted));
  const fluxes = parts.map((p) => 10 ** (p.logPredicted - top));
  const total = fluxes.reduce((a, b) => a + b, 0);
  return fluxes.map((f) => f / total);
}

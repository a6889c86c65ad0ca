import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { Mark } from './naming.ts';
import type { Option } from './options.ts';

/** An option with the flux that the rest of the spectrum predicts for it. */
export interface Single extends Option {
  readonly logPredicted: number;
  readonly err: number;
  /** Weighted number of other lines of the ion that were seen. */
  readonly seen: number;
  /** Nats against every name of the mark that leaves this line out. */
  readonly owed: number;
}

/** A part of a blend carries at least this share. */
const LEAST_SHARE = 0.07;
/** Parts of a blend stand within this many FWHM of each other. */
const BLEND_REACH_FWHM = 1.1;
/** Width of a mark whose width is unknown, in units of its error times this, and at least this many km/s. */
const UNKNOWN_FWHM_SIGMAS = 3;
const UNKNOWN_FWHM_KMS = 25;

/** Pairs and triples of lines near enough to be measured as one, each carrying a share that matters. */
export function blendsOf(mark: Mark, singles: readonly Single[]): Single[][] {
  const reach =
    BLEND_REACH_FWHM *
    (mark.fwhm ?? Math.max(UNKNOWN_FWHM_SIGMAS * mark.wavelengthErr, (UNKNOWN_FWHM_KMS / SPEED_OF_LIGHT_KMS) * mark.wavelength));
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

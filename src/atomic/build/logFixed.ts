import { UNKNOWN_16 } from '../bundleFormat.ts';

/** log10 of a positive value as a 16-bit fixed-point number of `scale` steps a dex; `UNKNOWN_16` for anything else. */
export function logFixed(value: number, scale: number): number {
  return value > 0 ? Math.max(-32_767, Math.min(32_767, Math.round(Math.log10(value) * scale))) : UNKNOWN_16;
}

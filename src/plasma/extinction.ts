import { fitzpatrick99 } from './fitzpatrick99.ts';

/** Published laws of A(lambda)/A(V); `ccm89` throughout, `ccm89-odonnell94` with O'Donnell's optical polynomials in it. */
export type ExtinctionCurve = 'ccm89' | 'ccm89-odonnell94' | 'fitzpatrick99';

/** Optical polynomials in x - 1.82, rising powers. Cardelli, Clayton & Mathis 1989, ApJ 345, 245, equations 3a, 3b. */
const CCM_A = [1, 0.17699, -0.50447, -0.02427, 0.72085, 0.01979, -0.7753, 0.32999];
const CCM_B = [0, 1.41338, 2.28305, 1.07233, -5.38434, -0.62251, 5.3026, -2.09002];
/** O'Donnell 1994, ApJ 422, 158. */
const ODONNELL_A = [1, 0.104, -0.609, 0.701, 1.137, -1.718, -0.827, 1.647, -0.505];
const ODONNELL_B = [0, 1.952, 2.908, -3.989, -7.985, 11.102, 5.491, -10.805, 3.347];

const ANGSTROM_PER_MICRON = 1e4;
/** Shortest wavelength of the laws, Angstrom: 10 per micron. */
const SHORTEST_A = 1_000;

/**
 * Extinction at a wavelength over that in the V band, A(lambda)/A(V).
 *
 * @param rV         A(V)/E(B-V); 3.1 on the average of the Milky Way
 * @param wavelength Angstrom (air or vacuum: the laws do not tell them apart), 1000 and more; beyond 3.3 micron the infrared power law is continued
 * @returns NaN below 1000 Angstrom, where no law is published
 * Cardelli, Clayton & Mathis 1989, ApJ 345, 245; O'Donnell 1994, ApJ 422, 158; Fitzpatrick 1999, PASP 111, 63. Checked in tests/reference/plasmaExtinction.test.ts.
 */
export function extinctionRatio(curve: ExtinctionCurve, rV: number, wavelength: number): number {
  if (!(wavelength >= SHORTEST_A)) return Number.NaN;
  const x = ANGSTROM_PER_MICRON / wavelength;
  if (curve === 'fitzpatrick99') return fitzpatrick99(x, rV);
  const [a, b] = cardelli(x, curve === 'ccm89' ? [CCM_A, CCM_B] : [ODONNELL_A, ODONNELL_B]);
  return a + b / rV;
}

const polynomial = (coefficients: readonly number[], y: number) => coefficients.reduceRight((sum, c) => sum * y + c, 0);

/** a(x) and b(x) of the law; x per micron, 0 ... 10. */
function cardelli(x: number, optical: readonly (readonly number[])[]): readonly [number, number] {
  if (x < 1.1) return [0.574 * x ** 1.61, -0.527 * x ** 1.61];
  if (x < 3.3) return [polynomial(optical[0], x - 1.82), polynomial(optical[1], x - 1.82)];
  if (x < 8) {
    const y = Math.max(0, x - 5.9);
    const farA = -0.04473 * y ** 2 - 0.009779 * y ** 3;
    const farB = 0.213 * y ** 2 + 0.1207 * y ** 3;
    return [1.752 - 0.316 * x - 0.104 / ((x - 4.67) ** 2 + 0.341) + farA, -3.09 + 1.825 * x + 1.206 / ((x - 4.62) ** 2 + 0.263) + farB];
  }
  return [polynomial([-1.073, -0.628, 0.137, -0.07], x - 8), polynomial([13.67, 4.257, -0.42, 0.374], x - 8)];
}

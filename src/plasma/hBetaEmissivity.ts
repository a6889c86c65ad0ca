/** 4 pi j(H beta) / (ne n(H+)), 10^-25 erg cm^3 s^-1, at 5000, 10000 and 20000 K and 10^2 cm^-3. Storey & Hummer 1995, MNRAS 272, 41, as in table 4.4 of Osterbrock & Ferland 2006; from memory. */
const NODES = [2.2, 1.235, 0.658].map((value) => Math.log(value * 1e-25));
const MIDDLE_TE = 10_000;

/**
 * Emission of H beta per electron and proton in case B, erg cm^3 s^-1.
 *
 * @param te K; a parabola in the logarithms through 5000, 10000 and 20000 K, continued outside
 * The density changes it by less than 1 % from 10^2 to 10^4 cm^-3.
 */
export function hBetaEmissivity(te: number): number {
  const x = Math.log2(te / MIDDLE_TE);
  const [cool, warm, hot] = NODES;
  return Math.exp(warm + (x * (hot - cool)) / 2 + (x ** 2 * (hot + cool - 2 * warm)) / 2);
}

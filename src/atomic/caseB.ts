/** Case-B intensities of one hydrogenic ion at the nodes of the table. */
export interface CaseBTable {
  /** `H I` or `He II` per row. */
  readonly ion: readonly string[];
  readonly nLower: Uint8Array;
  readonly nUpper: Uint8Array;
  /** Four values a row: (5000 K, 10^4 cm^-3), (10^4 K, 10^2), (10^4 K, 10^4), (2 x 10^4 K, 10^4); H beta or He II 4686 = 100. */
  readonly intensity: Float32Array;
}

const NODE_TE = [5_000, 10_000, 20_000] as const;
const LOWEST_NE = 100;
const HIGHEST_NE = 10_000;
/** The density effect grows towards low temperature as Te^-1.1: H alpha in table 4.4 of Osterbrock & Ferland 2006, 5000 to 20000 K. */
const DENSITY_EFFECT_POWER = -1.1;

/**
 * Case-B intensity of a line of H I (H beta = 100) or He II (4686 = 100).
 *
 * @param te K, 5000 ... 20000; held at the ends outside
 * @param ne cm^-3, 10^2 ... 10^4; held at the ends outside (the ratios move by less than 2 % up to 10^6)
 * @returns NaN when the line is not tabulated
 * Storey & Hummer 1995, MNRAS 272, 41; between their nodes: parabola in ln Te, line in ln ne. Checked in tests/reference/caseB.test.ts.
 */
export function caseBIntensity(table: CaseBTable, ion: string, nLower: number, nUpper: number, te: number, ne: number): number {
  const row = table.ion.findIndex((name, k) => name === ion && table.nLower[k] === nLower && table.nUpper[k] === nUpper);
  if (row < 0) return Number.NaN;
  const [cool, thin, warm, hot] = Array.from(table.intensity.subarray(4 * row, 4 * row + 4), Math.log);
  const t = Math.min(Math.max(te, NODE_TE[0]), NODE_TE[2]);
  // nodes at -1, 0, 1
  const x = Math.log(t / NODE_TE[1]) / Math.LN2;
  const parabola = warm + (x * (hot - cool)) / 2 + (x * x * (hot + cool - 2 * warm)) / 2;
  const toThin = Math.log(HIGHEST_NE / Math.min(Math.max(ne, LOWEST_NE), HIGHEST_NE)) / Math.log(HIGHEST_NE / LOWEST_NE);
  return Math.exp(parabola + (thin - warm) * toThin * (t / NODE_TE[1]) ** DENSITY_EFFECT_POWER);
}

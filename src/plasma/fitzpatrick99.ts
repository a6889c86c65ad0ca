import { solveLinear } from '../numeric/index.ts';

/** Places of the spline's anchors, per micron: infinity, 26500, 12200, 6000, 5470, 4670, 4110, 2700, 2600 Angstrom. Fitzpatrick 1999, PASP 111, 63, table 3. */
const ANCHORS_X = [0, 26_500, 12_200, 6_000, 5_470, 4_670, 4_110, 2_700, 2_600].map((w) => (w === 0 ? 0 : 1e4 / w));

/** A(lambda)/E(B-V) at the anchors of the infrared and the optical; his table 4. */
const anchorsOf = (rV: number) => [
  0,
  (0.265 * rV) / 3.1,
  (0.829 * rV) / 3.1,
  -0.426 + 1.0044 * rV,
  -0.05 + 1.0016 * rV,
  0.701 + 1.0016 * rV,
  1.208 + 1.0032 * rV - 0.00033 * rV ** 2,
  ultraviolet(ANCHORS_X[7], rV),
  ultraviolet(ANCHORS_X[8], rV),
];

let kept: { readonly rV: number; readonly y: readonly number[]; readonly bend: ArrayLike<number> } | undefined;

/** A(lambda)/A(V) of Fitzpatrick 1999; x per micron, 0 ... 10. */
export function fitzpatrick99(x: number, rV: number): number {
  if (x >= ANCHORS_X[8]) return ultraviolet(x, rV) / rV;
  if (kept?.rV !== rV) {
    const y = anchorsOf(rV);
    kept = { rV, y, bend: bends(ANCHORS_X, y) };
  }
  return spline(ANCHORS_X, kept.y, kept.bend, x) / rV;
}

/** Parametrisation of Fitzpatrick & Massa 1990, ApJS 72, 163, with the mean coefficients of Fitzpatrick 1999; A(lambda)/E(B-V). */
function ultraviolet(x: number, rV: number): number {
  const c2 = -0.824 + 4.717 / rV;
  const c1 = 2.03 - 3.007 * c2;
  const bump = x ** 2 / ((x ** 2 - 4.596 ** 2) ** 2 + (x * 0.99) ** 2);
  const y = Math.max(0, x - 5.9);
  return rV + c1 + c2 * x + 3.23 * bump + 0.41 * (0.5392 * y ** 2 + 0.05644 * y ** 3);
}

/** Second derivatives of the natural cubic spline through (x, y). */
function bends(x: readonly number[], y: readonly number[]): ArrayLike<number> {
  const n = x.length;
  const matrix = new Float64Array(n * n);
  const right = new Float64Array(n);
  matrix[0] = 1;
  matrix[n * n - 1] = 1;
  for (let i = 1; i < n - 1; i++) {
    const [before, after] = [x[i] - x[i - 1], x[i + 1] - x[i]];
    matrix[i * n + i - 1] = before / 6;
    matrix[i * n + i] = (before + after) / 3;
    matrix[i * n + i + 1] = after / 6;
    right[i] = (y[i + 1] - y[i]) / after - (y[i] - y[i - 1]) / before;
  }
  solveLinear(matrix, right);
  return right;
}

function spline(x: readonly number[], y: readonly number[], bend: ArrayLike<number>, at: number): number {
  let i = 0;
  while (i < x.length - 2 && at > x[i + 1]) i++;
  const h = x[i + 1] - x[i];
  const a = (x[i + 1] - at) / h;
  const b = 1 - a;
  return a * y[i] + b * y[i + 1] + (((a ** 3 - a) * bend[i] + (b ** 3 - b) * bend[i + 1]) * h ** 2) / 6;
}

/**
 * Value of a spline of `pieces` equal pieces at share `t` of its range (0 = first, 1 = last pixel).
 *
 * @param kind 3 = cubic B-spline with pieces + 3 coefficients, 4 = linear with pieces + 1
 */
export function splineValue(kind: number, c: readonly number[], pieces: number, t: number): number {
  const s = Math.min(Math.max(t, 0), 1) * pieces;
  const j = Math.min(Math.floor(s), pieces - 1);
  const b = s - j;
  const a = 1 - b;
  if (kind === 4) return c[j] * a + c[j + 1] * b;
  return c[j] * a ** 3 + c[j + 1] * (1 + 3 * a * (1 + a * b)) + c[j + 2] * (1 + 3 * b * (1 + a * b)) + c[j + 3] * b ** 3;
}

/** Steps of the table in one unit of the argument. */
const STEPS = 64;
/** exp(-40) is 4e-18: beneath the last digit of anything it is added to. */
const REACH = 40;
const table = Float64Array.from({ length: REACH * STEPS + 2 }, (_, k) => Math.exp(-k / STEPS));

/**
 * exp(-t) for t >= 0 to 3e-13 relative, several times faster than `Math.exp`: the nearest tabulated value times a polynomial in the rest. 0 beyond t = 40.
 */
export function expOfNegative(t: number): number {
  if (t >= REACH) return 0;
  const k = (t * STEPS + 0.5) | 0;
  const d = k / STEPS - t;
  return table[k] * (1 + d * (1 + d * (0.5 + d * (1 / 6 + d * (1 / 24)))));
}

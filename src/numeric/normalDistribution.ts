/**
 * Complementary error function to 1e-12 absolute.
 *
 * Series for |x| < 2.5, Lentz continued fraction beyond (Abramowitz & Stegun 7.1.5 and 7.1.14).
 */
export function erfc(x: number): number {
  if (x < 0) return 2 - erfc(-x);
  if (x < 2.5) {
    let term = x;
    let sum = x;
    for (let k = 1; Math.abs(term) > 1e-17 * Math.abs(sum); k++) {
      term *= (-x * x) / k;
      sum += term / (2 * k + 1);
      if (k > 200) break;
    }
    return 1 - (2 / Math.sqrt(Math.PI)) * sum;
  }
  if (x > 27) return 0;
  let fraction = 0;
  for (let k = 60; k >= 1; k--) fraction = k / 2 / (x + fraction);
  return Math.exp(-x * x) / (Math.sqrt(Math.PI) * (x + fraction));
}

/** Probability that a standard normal deviate exceeds `x`. */
export const normalTail = (x: number) => 0.5 * erfc(x / Math.SQRT2);

/** A source of random numbers that was seeded by its owner: the same seed gives the same numbers everywhere. */
export interface SeededRandom {
  /** Uniform in [0, 1). */
  uniform(): number;
  /** Standard normal deviate. */
  normal(): number;
}

/**
 * Seeded generator: the 32-bit "small fast counting" generator (Doty-Humphrey, PractRand), normal deviates by the polar method (Marsaglia & Bray 1964).
 *
 * @param seed any integer
 */
export function seededRandom(seed: number): SeededRandom {
  let a = seed | 0;
  let b = 0x9e3779b9 | 0;
  let c = 0x243f6a88 | 0;
  let counter = 1;
  let spare: number | undefined;
  const next = () => {
    const t = (((a + b) | 0) + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + t) | 0;
    return (t >>> 0) / 4_294_967_296;
  };
  for (let k = 0; k < 15; k++) next();
  const normal = () => {
    if (spare !== undefined) {
      const kept = spare;
      spare = undefined;
      return kept;
    }
    for (;;) {
      const x = 2 * next() - 1;
      const y = 2 * next() - 1;
      const r2 = x * x + y * y;
      if (r2 > 0 && r2 < 1) {
        const scale = Math.sqrt((-2 * Math.log(r2)) / r2);
        spare = y * scale;
        return x * scale;
      }
    }
  };
  return { uniform: next, normal };
}

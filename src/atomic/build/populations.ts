/** Rates of one ion at one temperature; arrays are parallel, one value a pair of levels. */
export interface AtomAtTe {
  readonly g: readonly number[];
  readonly energyCm1: readonly number[];
  readonly radiative: readonly { readonly lower: number; readonly upper: number; readonly a: number }[];
  readonly collisions: readonly { readonly lower: number; readonly upper: number; readonly upsilon: number }[];
}

/** k in cm^-1 per K: 1 / 1.438776877 cm K (CODATA 2018). */
const BOLTZMANN_CM1 = 1 / 1.438_776_877;
/** cm^3 s^-1 K^1/2: h^2 / ((2 pi m)^3/2 k^1/2), Osterbrock & Ferland 2006, equation 3.20. */
const COLLISION_CONSTANT = 8.629e-6;

/** Level populations (sum 1) in statistical equilibrium at te (K), ne (cm^-3): rate equations with the sum in the row of the ground level. */
export function equilibrium(atom: AtomAtTe, te: number, ne: number): number[] {
  const n = atom.g.length;
  const m = Array.from({ length: n }, () => new Array<number>(n + 1).fill(0));
  const rate = (from: number, to: number, value: number): void => {
    m[to][from] += value;
    m[from][from] -= value;
  };
  for (const { lower, upper, a } of atom.radiative) rate(upper, lower, a);
  for (const { lower, upper, upsilon } of atom.collisions) {
    const down = (ne * COLLISION_CONSTANT * upsilon) / (atom.g[upper] * Math.sqrt(te));
    rate(upper, lower, down);
    rate(
      lower,
      upper,
      ((down * atom.g[upper]) / atom.g[lower]) * Math.exp(-(atom.energyCm1[upper] - atom.energyCm1[lower]) / (BOLTZMANN_CM1 * te)),
    );
  }
  m[0].fill(1);
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(m[i][k]) > Math.abs(m[pivot][k])) pivot = i;
    [m[k], m[pivot]] = [m[pivot], m[k]];
    // a level nothing reaches: no population
    if (m[k][k] === 0) m[k][k] = 1;
    for (let i = k + 1; i < n; i++) {
      const f = m[i][k] / m[k][k];
      if (f !== 0) for (let j = k; j <= n; j++) m[i][j] -= f * m[k][j];
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let k = n - 1; k >= 0; k--) {
    let sum = m[k][n];
    for (let j = k + 1; j < n; j++) sum -= m[k][j] * x[j];
    x[k] = Math.max(0, sum / m[k][k]);
  }
  return x;
}

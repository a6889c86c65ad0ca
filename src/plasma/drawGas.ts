import { normalTail, type SeededRandom, seededRandom } from '../numeric/index.ts';
import { abundanceOf, type CollisionalIon, zonePlace } from './ionAbundances.ts';
import type { LineFlux } from './lineFluxes.ts';
import type { MeasuredRatio } from './measuredRatios.ts';
import { NE_RANGE, type Solution, TE_RANGE } from './populationGrid.ts';
import { type LnRatio, solveZones, type ZoneSettings, type ZoneStates, type ZonesSolved } from './solveZones.ts';
import { ZONES, type Zone } from './zones.ts';

/** What one draw of the noise starts from. */
export interface DrawInput {
  readonly fluxes: readonly LineFlux[];
  /** A(lambda)/A(H beta) - 1, one a flux. */
  readonly f: Float64Array;
  /** c(H beta) used, and how it follows ln of each flux. */
  readonly c: number;
  readonly cSlopes: Float64Array;
  /** Place of H beta among the fluxes; absent = abundances are not drawn. */
  readonly hBeta?: number;
  readonly ratios: readonly MeasuredRatio[];
  readonly ions: readonly CollisionalIon[];
  readonly solved: ZonesSolved;
  readonly settings: ZoneSettings;
  readonly seed: number;
  readonly draws: number;
}

/** Values of all draws: one array of `draws` numbers a quantity. */
export interface Drawn {
  readonly te: Readonly<Record<Zone, Float64Array>>;
  readonly ne: Readonly<Record<Zone, Float64Array>>;
  /** One a diagnostic; beyond the table its end. */
  readonly diagnostics: readonly Float64Array[];
  /** One an ion. */
  readonly abundances: readonly Float64Array[];
}

/** A draw never makes a flux smaller than this share of what was measured: a line that was found is there. */
const LEAST_SHARE = 1e-3;

/** ln of corrected intensities over those of H beta, apart from a constant. */
export const lnIntensity = (flux: number, c: number, f: number) => Math.log(flux) + Math.LN10 * c * f;

/** ln of the ratio of two sums of intensities. */
export function lnRatioOf({ over, under }: Pick<MeasuredRatio, 'over' | 'under'>, lnI: ArrayLike<number>): number {
  const total = (indices: readonly number[]) => indices.reduce((sum, index) => sum + Math.exp(lnI[index]), 0);
  return Math.log(total(over) / total(under));
}

/** Repeats reddening, diagnostics and abundances with fluxes that noise has moved: one common draw for all, so that what hangs together moves together. */
export function drawGas(input: DrawInput): Drawn {
  const { fluxes, f, ratios, ions, solved, draws } = input;
  const random = seededRandom(input.seed);
  const fresh = () => new Float64Array(draws);
  const zonal = () => ({ neutral: fresh(), low: fresh(), medium: fresh(), high: fresh() });
  const drawn = { te: zonal(), ne: zonal(), diagnostics: ratios.map(fresh), abundances: ions.map(fresh) };
  const lnI = new Float64Array(fluxes.length);
  const spread = spreadNormals(draws);
  // only what hangs on a flux is drawn: lines of ratios first, so that they are made independent of each other
  const used = [
    ...new Set([
      ...ratios.flatMap(({ over, under }) => [...over, ...under]),
      ...fluxes.flatMap((_, k) => (input.cSlopes[k] !== 0 || k === input.hBeta ? [k] : [])),
      ...ions.flatMap(({ parts }) => parts.map(({ index }) => index)),
    ]),
  ];
  const normals = independent(used.map(() => shuffled(spread.slice(), random)));
  const lnFlux = fluxes.map(({ flux }) => Math.log(flux));
  const relative = fluxes.map(({ flux, fluxErr }) => fluxErr / flux);
  for (let draw = 0; draw < draws; draw++) {
    let c = input.c;
    for (let u = 0; u < used.length; u++) {
      const k = used[u];
      const moved = Math.log(Math.max(LEAST_SHARE, 1 + relative[k] * normals[u][draw]));
      c += input.cSlopes[k] * moved;
      lnI[k] = lnFlux[k] + moved;
    }
    for (const k of used) lnI[k] += Math.LN10 * c * f[k];
    const lnRatios = ratios.map((ratio): LnRatio => ({ value: lnRatioOf(ratio, lnI), err: 1 }));
    const { zones, solutions } = solveZones(ratios, lnRatios, input.settings, solved);
    for (const zone of ZONES) {
      drawn.te[zone][draw] = zones[zone].te;
      drawn.ne[zone][draw] = zones[zone].ne;
    }
    ratios.forEach((ratio, k) => {
      drawn.diagnostics[k][draw] = placeOf(solutions[k], ratio.diagnostic.tells === 'density' ? NE_RANGE : TE_RANGE);
    });
    drawAbundances(ions, lnI, input.hBeta, zones, drawn.abundances, draw);
  }
  return drawn;
}

const BISECTIONS = 40;
const FAR_SIGMA = 6;
/** Columns made independent of each other at once. */
const MOST_TOGETHER = 60;

/**
 * Normal deviates spread evenly over probability, ascending: their mean and width are those of the distribution for any number of draws. Shuffled anew for each flux they
 * make a Latin hypercube (McKay, Beckman & Conover 1979, Technometrics 21, 239), which needs far fewer draws than chance alone.
 */
function spreadNormals(draws: number): Float64Array {
  if (spreads.has(draws)) return spreads.get(draws) as Float64Array;
  const values = Float64Array.from({ length: draws }, (_, k) => {
    const tail = 1 - (k + 0.5) / draws;
    let [low, high] = [-FAR_SIGMA, FAR_SIGMA];
    for (let step = 0; step < BISECTIONS; step++) {
      const middle = (low + high) / 2;
      if (normalTail(middle) > tail) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  });
  spreads.set(draws, values);
  return values;
}

const spreads = new Map<number, Float64Array>();

/** In another order; Fisher & Yates. */
function shuffled(values: Float64Array, random: SeededRandom): Float64Array {
  for (let k = values.length - 1; k > 0; k--) {
    const other = Math.floor(random.uniform() * (k + 1));
    [values[k], values[other]] = [values[other], values[k]];
  }
  return values;
}

/**
 * Takes out of each column what it has in common by chance with the ones before (Gram & Schmidt), then makes its width 1 again: two lines whose draws hang together would
 * make the error of their ratio too small or too large. They go in groups.
 */
function independent(columns: Float64Array[]): Float64Array[] {
  const n = columns[0]?.length ?? 0;
  const dot = (p: Float64Array, q: Float64Array) => {
    let sum = 0;
    for (let k = 0; k < n; k++) sum += p[k] * q[k];
    return sum / n;
  };
  const group = Math.max(1, Math.min(MOST_TOGETHER, n >> 1));
  columns.forEach((column, c) => {
    for (let before = c - (c % group); before < c; before++) {
      const common = dot(column, columns[before]);
      for (let k = 0; k < n; k++) column[k] -= common * columns[before][k];
    }
    const width = Math.sqrt(dot(column, column));
    for (let k = 0; k < n; k++) column[k] /= width;
  });
  return columns;
}

function drawAbundances(
  ions: readonly CollisionalIon[],
  lnI: Float64Array,
  hBeta: number | undefined,
  zones: ZoneStates,
  into: readonly Float64Array[],
  draw: number,
): void {
  if (hBeta === undefined) return;
  const places = {
    neutral: zonePlace(zones.neutral),
    low: zonePlace(zones.low),
    medium: zonePlace(zones.medium),
    high: zonePlace(zones.high),
  };
  ions.forEach((ion, k) => {
    into[k][draw] = abundanceOf(ion, (index) => Math.exp(lnI[index] - lnI[hBeta]), places[ion.zone]);
  });
}

const placeOf = (solution: Solution, [first, last]: readonly [number, number]) =>
  solution.ended === 'value' ? solution.x : solution.ended === 'below' ? first : last;

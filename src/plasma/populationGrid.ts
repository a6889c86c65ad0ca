import { collisionRates, decayRate, type LevelModel, populationsFromRates } from '../atomic/index.ts';

/** Nodes of the grid: even steps in ln Te (3000 ... 30000 K) and ln ne (1 ... 10^8 cm^-3). */
const LOWEST_TE = 3_000;
const HIGHEST_TE = 30_000;
const LOWEST_NE = 1;
const HIGHEST_NE = 1e8;
const TE_NODES = 25;
const NE_NODES = 41;
const LN_TE_STEP = Math.log(HIGHEST_TE / LOWEST_TE) / (TE_NODES - 1);
const LN_NE_STEP = Math.log(HIGHEST_NE / LOWEST_NE) / (NE_NODES - 1);

export const TE_RANGE = [LOWEST_TE, HIGHEST_TE] as const;
export const NE_RANGE = [LOWEST_NE, HIGHEST_NE] as const;
export const TE_GRID: readonly number[] = Array.from({ length: TE_NODES }, (_, i) => LOWEST_TE * Math.exp(i * LN_TE_STEP));
export const NE_GRID: readonly number[] = Array.from({ length: NE_NODES }, (_, j) => LOWEST_NE * Math.exp(j * LN_NE_STEP));

/** Upper and lower level of a transition. */
export type Transition = readonly [number, number];

/** A function of Te and ne tabulated at the nodes: `values[i * NE_NODES + j]`, i along Te, j along ne. */
export interface PlasmaGrid {
  readonly values: Float64Array;
}

const populations = new WeakMap<LevelModel, Float64Array>();

/** Level populations at all nodes, `(i * NE_NODES + j) * n + level`; solved once an atom. */
function populationsOf(model: LevelModel): Float64Array {
  const known = populations.get(model);
  if (known) return known;
  const n = model.levels.length;
  const all = new Float64Array(TE_NODES * NE_NODES * n);
  for (let i = 0; i < TE_NODES; i++) {
    const q = collisionRates(model, TE_GRID[i]);
    for (let j = 0; j < NE_NODES; j++) all.set(populationsFromRates(model, q, NE_GRID[j]), (i * NE_NODES + j) * n);
  }
  populations.set(model, all);
  return all;
}

/**
 * ln of the emission of a sum of lines per ion and electron, in units of h c cm^2 s^-1 (A times cm^-1 times population over ne), at all nodes.
 * Interpolation is good to 0.3 % (tests/plasma/populationGrid.test.ts).
 */
export function emissionGrid(model: LevelModel, transitions: readonly Transition[]): PlasmaGrid {
  const known = emissions.get(model) ?? new Map<string, PlasmaGrid>();
  emissions.set(model, known);
  const key = transitions.join(' ');
  const grid = known.get(key) ?? newEmissionGrid(model, transitions);
  known.set(key, grid);
  return grid;
}

/** Grids at hand: the same sums are asked for at every verdict. */
const emissions = new WeakMap<LevelModel, Map<string, PlasmaGrid>>();

function newEmissionGrid(model: LevelModel, transitions: readonly Transition[]): PlasmaGrid {
  const all = populationsOf(model);
  const n = model.levels.length;
  const values = new Float64Array(TE_NODES * NE_NODES);
  const parts = transitions.map(([upper, lower]) => ({
    upper,
    rate: decayRate(model, upper, lower) * (model.levels[upper].energyCm1 - model.levels[lower].energyCm1),
  }));
  for (let k = 0; k < values.length; k++) {
    let sum = 0;
    for (const { upper, rate } of parts) sum += all[k * n + upper] * rate;
    values[k] = Math.log(sum / NE_GRID[k % NE_NODES]);
  }
  return { values };
}

/** Difference of two grids: ln of a ratio. */
export function ratioGrid(over: PlasmaGrid, under: PlasmaGrid): PlasmaGrid {
  return { values: over.values.map((value, k) => value - under.values[k]) };
}

/** Catmull & Rom 1974: value between p1 (t = 0) and p2 (t = 1). */
const cubic = (p0: number, p1: number, p2: number, p3: number, t: number) =>
  p1 + 0.5 * t * (p2 - p0 + t * (2 * p0 - 5 * p1 + 4 * p2 - p3 + t * (3 * (p1 - p2) + p3 - p0)));

/** Value between nodes of `values[start + k * stride]`, k below `nodes`: cubic through the four nearest, the outer one continued straight at the ends. */
function between(values: Float64Array, start: number, stride: number, nodes: number, at: number): number {
  const cell = Math.min(Math.floor(at), nodes - 2);
  const first = start + cell * stride;
  const p1 = values[first];
  const p2 = values[first + stride];
  const p0 = cell > 0 ? values[first - stride] : 2 * p1 - p2;
  const p3 = cell < nodes - 2 ? values[first + 2 * stride] : 2 * p2 - p1;
  return cubic(p0, p1, p2, p3, at - cell);
}

const held = (at: number, nodes: number) => Math.min(Math.max(at, 0), nodes - 1);
/** Places among the nodes, fractions between them; held at the ends. */
const placeOfTe = (te: number) => held(Math.log(te / LOWEST_TE) / LN_TE_STEP, TE_NODES);
const placeOfNe = (ne: number) => held(Math.log(ne / LOWEST_NE) / LN_NE_STEP, NE_NODES);

/** Weights of the nodes about one (Te, ne), for many grids. */
export interface Stencil {
  /** Places of 16 nodes in `values`, and their weights. */
  readonly nodes: Int32Array;
  readonly weights: Float64Array;
}

/** The nodes and weights of the cubic at a fraction among `count` nodes: the four nearest, the outer one continued straight at the ends. */
function weightsAt(at: number, count: number): { readonly nodes: readonly number[]; readonly weights: readonly number[] } {
  const cell = Math.min(Math.floor(at), count - 2);
  const t = at - cell;
  let [w0, w1, w2, w3] = [
    (-t + 2 * t ** 2 - t ** 3) / 2,
    (2 - 5 * t ** 2 + 3 * t ** 3) / 2,
    (t + 4 * t ** 2 - 3 * t ** 3) / 2,
    (t ** 3 - t ** 2) / 2,
  ];
  if (cell === 0) [w0, w1, w2] = [0, w1 + 2 * w0, w2 - w0];
  if (cell === count - 2) [w1, w2, w3] = [w1 - w3, w2 + 2 * w3, 0];
  return { nodes: [Math.max(0, cell - 1), cell, cell + 1, Math.min(count - 1, cell + 2)], weights: [w0, w1, w2, w3] };
}

/** @param te K; @param ne cm^-3; both held at the ends of the grid */
export function stencilAt(te: number, ne: number): Stencil {
  const rows = weightsAt(placeOfTe(te), TE_NODES);
  const columns = weightsAt(placeOfNe(ne), NE_NODES);
  const nodes = new Int32Array(16);
  const weights = new Float64Array(16);
  for (let i = 0; i < 4; i++)
    for (let j = 0; j < 4; j++) {
      nodes[4 * i + j] = rows.nodes[i] * NE_NODES + columns.nodes[j];
      weights[4 * i + j] = rows.weights[i] * columns.weights[j];
    }
  return { nodes, weights };
}

/** Value of a grid at the place of a stencil. */
export function valueAt({ values }: PlasmaGrid, { nodes, weights }: Stencil): number {
  let sum = 0;
  for (let k = 0; k < nodes.length; k++) sum += weights[k] * values[nodes[k]];
  return sum;
}

/** A grid along ln ne at one temperature, or along ln Te at one density. */
export interface Profile {
  readonly along: 'te' | 'ne';
  readonly values: Float64Array;
}

/** @param into takes the values when given, one a node */
export function profileAlong({ values }: PlasmaGrid, along: 'te' | 'ne', other: number, into?: Float64Array): Profile {
  const nodes = along === 'ne' ? NE_NODES : TE_NODES;
  const at = along === 'ne' ? placeOfTe(other) : placeOfNe(other);
  const found = into ?? new Float64Array(nodes);
  for (let k = 0; k < nodes; k++)
    found[k] = along === 'ne' ? between(values, k, NE_NODES, TE_NODES, at) : between(values, k * NE_NODES, 1, NE_NODES, at);
  return { along, values: found };
}

const xOf = (profile: Profile, at: number) =>
  profile.along === 'ne' ? LOWEST_NE * Math.exp(at * LN_NE_STEP) : LOWEST_TE * Math.exp(at * LN_TE_STEP);

/** Where a profile takes a value, or on which side of the table it would. */
export type Solution = { readonly ended: 'value'; readonly x: number } | { readonly ended: 'below' } | { readonly ended: 'above' };

const BISECTIONS = 24;

/**
 * Temperature or density at which a ratio has its value, found by bracketing on the stretch where the profile is monotone.
 *
 * @param lnRatio natural logarithm
 * @returns 'below' or 'above': the value lies beyond that end of the stretch
 * The stretch is the longest rise or fall in ln ratio: nothing is read off a flat end or off the way back after a turn.
 */
export function solveProfile(profile: Profile, lnRatio: number): Solution {
  const { values } = profile;
  const [start, end] = steepStretch(values);
  const rises = values[end] > values[start];
  const [low, high] = rises ? [values[start], values[end]] : [values[end], values[start]];
  if (!(lnRatio >= low)) return { ended: rises ? 'below' : 'above' };
  if (!(lnRatio <= high)) return { ended: rises ? 'above' : 'below' };
  let cell = start;
  while (cell < end - 1 && (rises ? values[cell + 1] < lnRatio : values[cell + 1] > lnRatio)) cell++;
  let a = cell;
  let b = cell + 1;
  for (let k = 0; k < BISECTIONS; k++) {
    const middle = (a + b) / 2;
    if (between(values, 0, 1, values.length, middle) < lnRatio === rises) a = middle;
    else b = middle;
  }
  return { ended: 'value', x: xOf(profile, (a + b) / 2) };
}

/** Slope d ln ratio / d ln x of a profile at x, over a twentieth of a step. */
export function slopeAt({ along, values }: Profile, x: number): number {
  const at = along === 'ne' ? placeOfNe(x) : placeOfTe(x);
  const [low, high] = [held(at - HALF_STEP, values.length), held(at + HALF_STEP, values.length)];
  const rise = between(values, 0, 1, values.length, high) - between(values, 0, 1, values.length, low);
  return rise / ((high - low) * (along === 'ne' ? LN_NE_STEP : LN_TE_STEP));
}

const HALF_STEP = 0.025;

/** First and last node of the longest rise or fall. */
function steepStretch(values: Float64Array): readonly [number, number] {
  let best: readonly [number, number] = [0, values.length - 1];
  let most = 0;
  let start = 0;
  for (let k = 1; k < values.length; k++) {
    const turns = k > start + 1 && (values[k] - values[k - 1]) * (values[k - 1] - values[k - 2]) < 0;
    if (turns) start = k - 1;
    const change = Math.abs(values[k] - values[start]);
    if (change > most) {
      most = change;
      best = [start, k];
    }
  }
  return best;
}

import type { MeasuredRatio } from './measuredRatios.ts';
import { NE_GRID, NE_RANGE, profileAlong, type Solution, slopeAt, solveProfile, TE_GRID, TE_RANGE } from './populationGrid.ts';
import { nearestZones, ZONES, type Zone } from './zones.ts';

/** Temperature and density of one zone. */
export interface ZoneState {
  readonly te: number;
  readonly ne: number;
}

export type ZoneStates = Readonly<Record<Zone, ZoneState>>;

/** A ratio of intensities with its error, both natural logarithms. */
export interface LnRatio {
  readonly value: number;
  readonly err: number;
}

/** What is given, and where nothing is known to begin with. */
export interface ZoneSettings {
  readonly te?: number;
  readonly ne?: number;
  readonly startTe: number;
  readonly startNe: number;
}

/** Weight of each ratio in the mean of its zone: 0 = not taken. */
export type Weights = readonly number[];

export interface ZonesSolved {
  readonly zones: ZoneStates;
  /** One a ratio, at the other quantity of its zone. */
  readonly solutions: readonly Solution[];
  readonly weights: Weights;
  readonly members: Members;
}

/** Which ratios make up the mean of a zone: the primary ones, else the secondary ones that weigh something. */
type Members = Readonly<Record<'temperature' | 'density', Readonly<Record<Zone, readonly number[]>>>>;

const MOST_ROUNDS = 12;
const SETTLED = 3e-4;
/** A draw of the noise need not be known better. */
const SETTLED_DRAW = 1e-3;
/** A ratio where it moves this little with what it tells (d ln ratio / d ln x) is flat: it only sets a limit. */
const FLAT_SLOPE = 0.02;

/**
 * Temperature and density of every zone, each diagnostic solved at the other quantity of its zone until nothing moves.
 * A zone takes the weighted mean (in the logarithm) of its own diagnostics; without any, the nearest zone's; without all, what is given or the start.
 *
 * @param ratios   measured diagnostics
 * @param ln       their ratios, in the same order
 * @param settings given values hold in all zones
 * @param fixed    weights and start of an earlier solution, for one more draw of the noise
 */
export function solveZones(
  ratios: readonly MeasuredRatio[],
  ln: readonly LnRatio[],
  settings: ZoneSettings,
  fixed?: Pick<ZonesSolved, 'weights' | 'zones' | 'members'>,
): ZonesSolved {
  let zones: ZoneStates = fixed?.zones ?? everywhere({ te: settings.te ?? settings.startTe, ne: settings.ne ?? settings.startNe });
  const enough = fixed ? SETTLED_DRAW : SETTLED;
  let solved: ZonesSolved | undefined;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const solutions = ratios.map((ratio, k) => solveOne(ratio, zones[ratio.zone], ln[k].value));
    const weights = fixed?.weights ?? ratios.map((ratio, k) => weightOf(ratio, zones[ratio.zone], solutions[k], ln[k].err));
    const members = fixed?.members ?? membersOf(ratios, weights);
    const next = statesOf(ratios, solutions, weights, members, settings, zones);
    solved = { zones: next, solutions, weights, members };
    let moved = 0;
    for (const zone of ZONES)
      moved = Math.max(moved, Math.abs(next[zone].te / zones[zone].te - 1), Math.abs(next[zone].ne / zones[zone].ne - 1));
    zones = next;
    if (moved < enough) break;
  }
  return solved as ZonesSolved;
}

const everywhere = (state: ZoneState): ZoneStates => ({ neutral: state, low: state, medium: state, high: state });

/** Room for a profile that is read and forgotten: draws solve thousands. */
const SCRATCH = { te: new Float64Array(TE_GRID.length), ne: new Float64Array(NE_GRID.length) };

/** Solves one ratio at the other quantity of its zone. */
function solveOne({ diagnostic, grid }: MeasuredRatio, state: ZoneState, lnRatio: number): Solution {
  const along = diagnostic.tells === 'density' ? 'ne' : 'te';
  return solveProfile(profileAlong(grid, along, along === 'ne' ? state.te : state.ne, SCRATCH[along]), lnRatio);
}

/** Inverse square of the error of ln x; a flat or unsolved ratio weighs nothing. */
function weightOf({ diagnostic, grid }: MeasuredRatio, state: ZoneState, solution: Solution, err: number): number {
  if (solution.ended !== 'value') return 0;
  const along = diagnostic.tells === 'density' ? 'ne' : 'te';
  const slope = slopeAt(profileAlong(grid, along, along === 'ne' ? state.te : state.ne), solution.x);
  return Math.abs(slope) < FLAT_SLOPE ? 0 : (slope / err) ** 2;
}

function membersOf(ratios: readonly MeasuredRatio[], weights: Weights): Members {
  const of = (tells: 'temperature' | 'density', zone: Zone): readonly number[] => {
    const all = ratios.flatMap((ratio, k) => (ratio.zone === zone && ratio.diagnostic.tells === tells && weights[k] > 0 ? [k] : []));
    const primary = all.filter((k) => !ratios[k].diagnostic.secondary);
    return primary.length > 0 ? primary : all;
  };
  const zonal = (tells: 'temperature' | 'density') => ({
    neutral: of(tells, 'neutral'),
    low: of(tells, 'low'),
    medium: of(tells, 'medium'),
    high: of(tells, 'high'),
  });
  return { temperature: zonal('temperature'), density: zonal('density') };
}

const NEAREST = { neutral: nearestZones('neutral'), low: nearestZones('low'), medium: nearestZones('medium'), high: nearestZones('high') };

function statesOf(
  ratios: readonly MeasuredRatio[],
  solutions: readonly Solution[],
  weights: Weights,
  members: Members,
  settings: ZoneSettings,
  before: ZoneStates,
): ZoneStates {
  const found = (tells: 'temperature' | 'density', zone: Zone): number | undefined => {
    const source = NEAREST[zone].find((near) => members[tells][near].length > 0);
    return source && weightedMean(members[tells][source], solutions, weights, tells);
  };
  const state = (zone: Zone): ZoneState => ({
    te: settings.te ?? found('temperature', zone) ?? settings.startTe,
    ne: settings.ne ?? found('density', zone) ?? limitOf(ratios, solutions, zone) ?? before[zone].ne,
  });
  return { neutral: state('neutral'), low: state('low'), medium: state('medium'), high: state('high') };
}

/** Where the density ratios of a zone are all at their thin end, the thin end. */
function limitOf(ratios: readonly MeasuredRatio[], solutions: readonly Solution[], zone: Zone): number | undefined {
  const ends = ratios.flatMap((ratio, k) => (ratio.zone === zone && ratio.diagnostic.tells === 'density' ? [solutions[k].ended] : []));
  if (ends.length === 0) return undefined;
  if (ends.every((end) => end === 'below')) return THIN_NE;
  return undefined;
}

/** Stands for a density that a ratio only bounds from above, cm^-3. */
const THIN_NE = 10;

/** A draw that leaves the table counts with the end of the table: it happened, and it was low or high. */
function weightedMean(
  members: readonly number[],
  solutions: readonly Solution[],
  weights: Weights,
  tells: 'temperature' | 'density',
): number {
  const [low, high] = tells === 'density' ? NE_RANGE : TE_RANGE;
  let sum = 0;
  let total = 0;
  for (const k of members) {
    const solution = solutions[k];
    const x = solution.ended === 'value' ? solution.x : solution.ended === 'below' ? low : high;
    sum += weights[k] * Math.log(x);
    total += weights[k];
  }
  return Math.exp(sum / total);
}

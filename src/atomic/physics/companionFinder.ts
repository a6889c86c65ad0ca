import type { AtomicData } from '../atomicData.ts';
import { caseBIntensity } from '../caseB.ts';
import type { LevelModel } from '../levelModel.ts';
import { decayRate } from './emissivity.ts';
import { levelPopulations } from './levelPopulations.ts';
import { relativesOf } from './relatives.ts';

/** How a companion's ratio is known, best first. */
export type RatioBasis = 'common-upper-level' | 'case-b' | 'level-populations' | 'reference-strength';

/** Another line that must be there too if a line is what it is taken for. */
export interface Companion {
  /** Index into `data.lines`. */
  readonly line: number;
  readonly relation: 'same-upper-level' | 'same-multiplet' | 'same-ion';
  /** Flux of the companion over that of the line, energy units, no reddening; absent when nothing is known of one of them. */
  readonly predicted?: {
    readonly ratio: number;
    readonly basis: RatioBasis;
    /** One sigma, dex; the gas's own temperature and density are taken as given. */
    readonly errDex: number;
  };
}

/** Finds companions. `te` K, `ne` cm^-3. */
export type CompanionFinder = (line: number, te: number, ne: number) => readonly Companion[];

/** The ion's strongest lines that are given besides the closer relatives. */
const MOST_OF_ION = 8;
const CASE_B_ERR_DEX = 0.01;
/** Scatter of published collision strengths and A values; the same as in the strengths of the list. */
const POPULATIONS_ERR_DEX = 0.1;
/** Lines of one multiplet, whose upper levels are fed about by statistical weight: their strengths err together. Our estimate. */
const MULTIPLET_ERR_DEX = 0.16;
/** Added where one of the lines is a resonance line: its photons are scattered, absorbed by dust or turned into others. Our estimate. */
const TRAPPED_ERR_DEX = 0.3;

/**
 * Prepares the companions of all lines: first those of the same upper level (their ratio is fixed), then of the same multiplet, then the ion's strongest fed by the
 * same mechanism; within each the strongest first.
 *
 * Ratios: A times photon energy from a common upper level, unless one of the lines is easily trapped (`data.isResonance`) or holds several J;
 * case B for H I and He II; statistical equilibrium of the n-level atom at (te, ne) where both lines belong to it; else the strengths of the reference nebula.
 * A question costs some microseconds; the populations of the last gas asked for are kept. Speed: tests/bench/physicsBench.ts.
 */
export function companionFinder(data: AtomicData): CompanionFinder {
  const { lines } = data;
  const relatives = relativesOf(lines);
  let gas = gasAt(0, 0);
  return (line, te, ne) => {
    if (te !== gas.te || ne !== gas.ne) gas = gasAt(te, ne);
    const found = new Map<number, Companion>();
    const add = (others: Uint32Array, relation: Companion['relation']) => {
      for (const other of others) {
        if (other === line || found.has(other)) continue;
        const predicted = predict(data, line, other, relation, gas);
        found.set(other, { line: other, relation, ...(predicted ? { predicted } : {}) });
      }
    };
    add(relatives.sharingUpperLevel(line), 'same-upper-level');
    add(relatives.sharingMultiplet(line), 'same-multiplet');
    add(relatives.sharingIon(line).subarray(0, MOST_OF_ION), 'same-ion');
    return [...found.values()];
  };
}

/** The gas asked about, with the populations solved for it so far. */
interface Gas {
  readonly te: number;
  readonly ne: number;
  readonly populations: (model: LevelModel) => Float64Array;
}

function gasAt(te: number, ne: number): Gas {
  const solved = new Map<string, Float64Array>();
  return {
    te,
    ne,
    populations: (model) => {
      const shares = solved.get(model.ion) ?? levelPopulations(model, te, ne);
      solved.set(model.ion, shares);
      return shares;
    },
  };
}

/** Ratio of two lines from the best basis there is; wider when one of them is easily trapped. */
function predict(data: AtomicData, line: number, other: number, relation: Companion['relation'], gas: Gas): Companion['predicted'] {
  const free = ratioInTheClear(data, line, other, relation, gas);
  const trapped = data.isResonance(line) || data.isResonance(other);
  return free && trapped ? { ...free, errDex: Math.hypot(free.errDex, TRAPPED_ERR_DEX) } : free;
}

function ratioInTheClear(data: AtomicData, line: number, other: number, relation: Companion['relation'], gas: Gas): Companion['predicted'] {
  const caseB = caseBRatio(data, line, other, gas);
  if (caseB > 0) return { ratio: caseB, basis: 'case-b', errDex: CASE_B_ERR_DEX };
  if (relation === 'same-upper-level' && [line, other].every((l) => isSingleAndFree(data, l))) {
    const ratio = photonFlux(data, other) / photonFlux(data, line);
    const errDex = Math.hypot(aErrDex(data.aNote(line)), aErrDex(data.aNote(other)));
    if (ratio > 0) return { ratio, basis: 'common-upper-level', errDex };
  }
  const solved = populationRatio(data, line, other, gas);
  if (solved > 0) return { ratio: solved, basis: 'level-populations', errDex: POPULATIONS_ERR_DEX };
  const { logStrength, strengthErrDex } = data.lines;
  const log = logStrength[other] - logStrength[line];
  if (!Number.isFinite(log)) return undefined;
  const scatter = Math.hypot(strengthErrDex[line], strengthErrDex[other]);
  return {
    ratio: 10 ** log,
    basis: 'reference-strength',
    errDex: relation === 'same-ion' ? scatter : Math.min(scatter, MULTIPLET_ERR_DEX),
  };
}

/** Neither trapped nor a blend of several J, so that A alone says how the level's photons are shared out. */
const isSingleAndFree = (data: AtomicData, line: number) => !data.isResonance(line) && !data.upperLabel(line).includes(',');

const photonFlux = (data: AtomicData, line: number) => data.lines.aValue[line] / data.lines.wavelengthVac[line];

const PERCENT = /([\d.]+) %/;
/** Of A values by the words of `data.aNote`, dex; our reading of the accuracy classes. */
const A_ERR_DEX: readonly (readonly [RegExp, number])[] = [
  [/more than|times as large/, 0.3],
  [/agree/, 0.02],
  [/Coulomb/, 0.2],
  [/calculated/, 0.15],
];
const A_ERR_DEX_UNSAID = 0.1;

function aErrDex(note: string): number {
  const worded = A_ERR_DEX.find(([words]) => words.test(note));
  if (worded) return worded[1];
  const percent = PERCENT.exec(note);
  return percent ? Math.log10(1 + Number(percent[1]) / 100) : A_ERR_DEX_UNSAID;
}

/** NaN unless both lines are tabulated in case B. */
function caseBRatio(data: AtomicData, line: number, other: number, { te, ne }: Gas): number {
  const { name } = data.lines.ions[data.lines.ion[line]];
  if (name !== 'H I' && name !== 'He II') return Number.NaN;
  const [one, two] = [line, other].map((l) => {
    const [lower, upper] = [data.lowerLabel(l), data.upperLabel(l)].map((label) => Number(/^n=(\d+)$/.exec(label)?.[1]));
    return caseBIntensity(data.caseB, name, lower, upper, te, ne);
  });
  return two / one;
}

/** NaN unless both lines are collisional and belong to the ion's n-level atom. */
function populationRatio(data: AtomicData, line: number, other: number, { populations }: Gas): number {
  const { lines } = data;
  const model = data.levelModel(lines.ions[lines.ion[line]].name);
  if (model === undefined) return Number.NaN;
  const [one, two] = [line, other].map((l) => {
    const [upper, lower] = [lines.upperLevel[l], lines.lowerLevel[l]];
    if (upper < 0 || lower < 0 || lines.mechanism(l) !== 'collisional') return Number.NaN;
    return (populations(model)[upper] * decayRate(model, upper, lower)) / lines.wavelengthVac[l];
  });
  return two / one;
}

import type { LevelModel } from '../levelModel.ts';
import { isInsideRange } from './collisionRates.ts';
import { criticalDensity, radiativeLifetime, totalDecayRate } from './criticalDensity.ts';

/** What a metastable level means for the gas. */
export interface ThinGasFacts {
  /** No electric-dipole-allowed decay: the level waits for a forbidden or intercombination one. */
  readonly metastable: boolean;
  readonly lifetimeS: number;
  /** cm^-3 at the temperature asked; Infinity = no collisions known. */
  readonly criticalDensityCm3: number;
  /** One or two sentences a referee can read. */
  readonly why: string;
}

/** A spin-allowed electric-dipole decay empties a level faster than this, s^-1; metastable levels are all slower (the fastest, of iron at high charge, reach some 10^4). */
const FAST_DECAY_S1 = 1e6;

/** Multiplicity 2S+1 that a term begins with, undefined for terms in other couplings. */
const multiplicity = (term: string): number | undefined => {
  const digits = /^\s*(\d+)/.exec(term);
  return digits ? Number(digits[1]) : undefined;
};

/** Whether a level has no electric-dipole-allowed decay: every lower level has its parity, another spin, or a J that forbids it; or all its decays together are slow. */
export function isMetastable(model: LevelModel, level: number): boolean {
  const upper = model.levels[level];
  const { radiative } = model;
  for (let k = 0; k < radiative.a.length; k++) {
    if (radiative.upper[k] !== level) continue;
    const lower = model.levels[radiative.lower[k]];
    const dipole = lower.parity !== upper.parity && Math.abs(lower.j - upper.j) <= 1 && lower.j + upper.j > 0;
    if (dipole && multiplicity(lower.term) === multiplicity(upper.term) && radiative.a[k] >= FAST_DECAY_S1) return false;
  }
  return totalDecayRate(model, level) < FAST_DECAY_S1;
}

/** @param te K */
export function thinGasFacts(model: LevelModel, level: number, te: number): ThinGasFacts {
  const metastable = isMetastable(model, level);
  const lifetimeS = radiativeLifetime(model, level);
  const criticalDensityCm3 = criticalDensity(model, level, te);
  return { metastable, lifetimeS, criticalDensityCm3, why: sentence(model, level, te, metastable, lifetimeS, criticalDensityCm3) };
}

function sentence(model: LevelModel, level: number, te: number, metastable: boolean, lifetimeS: number, nCrit: number): string {
  const name = `${model.ion} in ${model.levels[level].term.replace(/o$/, '°')} (J = ${fraction(model.levels[level].j)})`;
  if (!metastable) return `${name} decays by an allowed transition in ${duration(lifetimeS)}: the line does not need thin gas.`;
  const waits = `${name} has no allowed way down and waits ${duration(lifetimeS)} before it radiates`;
  if (!Number.isFinite(nCrit)) return `${waits}; collision rates are not known, so no critical density can be given.`;
  const held = isInsideRange(model, level, te) ? '' : ' (collision strengths held at the end of their tabulated temperatures)';
  return `${waits}. Above ${powerOfTen(nCrit)} electrons per cm³ (at ${te.toFixed(0)} K) collisions empty the level first${held}: in denser gas the line fades, far above that density it cannot be seen.`;
}

const fraction = (j: number) => (Number.isInteger(j) ? String(j) : `${2 * j}/2`);

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** 71000 -> "7.1 × 10⁴"; plain below 1000. */
export function powerOfTen(value: number): string {
  if (value >= 0.01 && value < 1000) return String(Number(value.toPrecision(2)));
  const [mantissa, exponent] = value.toExponential(1).split('e');
  const digits = String(Math.abs(Number(exponent)));
  return `${mantissa} × 10${Number(exponent) < 0 ? '⁻' : ''}${Array.from(digits, (d) => SUPERSCRIPTS[Number(d)]).join('')}`;
}

const UNITS: readonly (readonly [number, string])[] = [
  [31_557_600, 'years'],
  [86_400, 'days'],
  [3600, 'hours'],
  [60, 'minutes'],
  [1, 'seconds'],
  [1e-3, 'milliseconds'],
  [1e-6, 'microseconds'],
  [1e-9, 'nanoseconds'],
];

/** 36.9 -> "37 seconds", 15000 -> "4.2 hours". */
export function duration(seconds: number): string {
  if (!Number.isFinite(seconds)) return 'for ever';
  const [unit, word] = UNITS.find(([size]) => seconds >= 1.5 * size) ?? UNITS[UNITS.length - 1];
  const count = seconds / unit;
  return `${count >= 1e4 ? powerOfTen(count) : String(Number(count.toPrecision(2)))} ${word}`;
}

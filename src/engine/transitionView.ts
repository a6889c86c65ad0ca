import { type AtomicData, type LevelModel, thinGasFacts } from '../atomic/index.ts';
import { fromVacuum, type Medium } from '../spectrum/index.ts';
import type { ThinGasView, TransitionView } from './analysis.ts';
import { ionLabel, lineKey } from './lineNames.ts';

/** What views of transitions depend on. */
export interface ViewContext {
  readonly data: AtomicData;
  readonly medium: Medium;
  /** K */
  readonly te: number;
}

/** One line of the list as it is shown. */
export function transitionView(context: ViewContext, line: number): TransitionView {
  const { data, medium } = context;
  const { lines } = data;
  const ion = lines.ions[lines.ion[line]];
  const thinGas = thinGasOf(context, line);
  return {
    key: lineKey(data, line),
    ion: ionLabel(data, line),
    wavelengthLab: fromVacuum(lines.wavelengthVac[line], medium),
    wavelengthLabErr: lines.wavelengthErr[line],
    lower: data.lowerLabel(line),
    upper: data.upperLabel(line),
    nature: lines.nature(line),
    excitationEv: lines.mechanism(line) === 'recombination' ? ion.ionizationEv : ion.creationEv,
    ...(thinGas ? { thinGas } : {}),
    sources: data.lineSources(line),
  };
}

/**
 * Why the line needs thin gas; undefined for lines that do not: permitted ones and those from a level that decays fast.
 * A forbidden line of an ion without a level model is flagged from its A value alone.
 */
export function thinGasOf(context: ViewContext, line: number): ThinGasView | undefined {
  const { data, te } = context;
  const nature = data.lines.nature(line);
  if (nature !== 'forbidden' && nature !== 'intercombination') return undefined;
  const upper = data.lines.upperLevel[line];
  const model = data.levelModel(data.lines.ions[data.lines.ion[line]].name);
  if (model && upper > 0) return thinGasOfLevel(model, upper, te);
  // the n-level atoms hold every metastable level of their ion: an intercombination line from any other level comes from one that decays fast
  return model && nature === 'intercombination' ? undefined : thinGasOfA(data, line, nature);
}

function thinGasOfLevel(model: LevelModel, upper: number, te: number): ThinGasView | undefined {
  const facts = thinGasFacts(model, upper, te);
  if (!facts.metastable) return undefined;
  return {
    lifetimeS: facts.lifetimeS,
    ...(Number.isFinite(facts.criticalDensityCm3) ? { nCrit: facts.criticalDensityCm3 } : {}),
    sentence: facts.why,
  };
}

function thinGasOfA(data: AtomicData, line: number, nature: 'forbidden' | 'intercombination'): ThinGasView | undefined {
  const a = data.lines.aValue[line];
  const lifetimeS = a > 0 ? 1 / a : Number.NaN;
  const wait = a > 0 ? `at most ${lifetimeS.toPrecision(2)} s (this line's A value alone)` : 'an unknown time, long for an atom';
  return {
    lifetimeS,
    sentence: `The upper level of this ${nature} line waits ${wait} before it radiates; the list holds no collision rates for it, so its critical density is not known.`,
  };
}

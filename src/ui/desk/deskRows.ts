import type { Analysis, CandidateView, FeatureView } from '../../engine/index.ts';
import type { LineRow } from '../../report/index.ts';
import { type Decision, matchVerdicts, sameKeys, type Verdict } from '../../session/index.ts';
import { words } from '../words.ts';

export type Standing = Decision | 'open';

/** A feature with what the user has decided by now: verdicts show at once, the weighing anew follows when it is done. */
export interface DeskRow {
  /** Position in `Analysis.features`. */
  readonly index: number;
  readonly feature: FeatureView;
  readonly printed: LineRow;
  readonly standing: Standing;
  readonly note: string;
  /** Candidates not turned down, best first. */
  readonly candidates: readonly CandidateView[];
  readonly turnedDown: readonly CandidateView[];
  /** The name in force. */
  readonly name?: CandidateView;
}

/** Features and the document's verdicts, joined. */
export function deskRows(analysis: Pick<Analysis, 'features' | 'table'>, verdicts: readonly Verdict[]): DeskRow[] {
  const { byFeature } = matchVerdicts(verdicts, analysis.features);
  return analysis.features.map((feature, index) => rowOf(feature, index, analysis.table.rows[index], byFeature[index]));
}

function rowOf(feature: FeatureView, index: number, printed: LineRow, verdict: Verdict | undefined): DeskRow {
  const isDown = (candidate: CandidateView) => (verdict?.turnedDown ?? []).some((keys) => sameKeys(keys, candidate.keys));
  const candidates = feature.candidates.filter((candidate) => !isDown(candidate));
  const standing = verdict?.decision ?? 'open';
  const name = nameInForce(feature, standing, candidates, verdict);
  return {
    index,
    feature,
    printed,
    standing,
    note: verdict?.note ?? '',
    candidates,
    turnedDown: feature.candidates.filter(isDown),
    ...(name ? { name } : {}),
  };
}

function nameInForce(feature: FeatureView, standing: Standing, candidates: readonly CandidateView[], verdict: Verdict | undefined) {
  if (standing === 'accepted') {
    return feature.candidates.find((candidate) => sameKeys(candidate.keys, verdict?.accepted ?? [])) ?? feature.name;
  }
  if (standing !== 'open' || feature.measured.artefact !== undefined) return undefined;
  const best = candidates[0];
  return best && best.probability > feature.noneProbability ? best : undefined;
}

/** "[O III] + O II" short names with rounded wavelengths, as figures print them: "[O III] 5007". */
export function shortName(name: CandidateView): string {
  const ions = [...new Set(name.transitions.map((t) => t.ion))];
  const more = `${name.transitions.length > 1 ? '+' : ''}${isOfTheAir(name) ? ` ${words.sky}` : ''}`;
  return `${ions.join(' + ')} ${Math.round(name.transitions[0].wavelengthLab)}${more}`;
}

/** Light or absorption of the Earth's atmosphere, not of the object. */
export const isOfTheAir = (name: CandidateView) => name.transitions.every((t) => t.nature === 'sky' || t.nature === 'telluric');

/** Thin-gas facts of the first part of a name that has them. */
export const thinGasOf = (name: CandidateView | undefined) => name?.transitions.find((t) => t.thinGas)?.thinGas;

/** How much a feature wants to be labelled: the strongest first. */
export const prominence = (row: DeskRow) => Math.abs(row.feature.measured.flux) || 0;

/** Position of the next row after `index` (wavelength order, around the end) that is still open; undefined when none is. */
export function nextOpen(rows: readonly DeskRow[], index: number): number | undefined {
  for (let step = 1; step <= rows.length; step++) {
    const row = rows[(index + step) % rows.length];
    if (row.standing === 'open' && row.feature.measured.artefact === undefined) return row.index;
  }
  return undefined;
}

import type { LineKey, SessionDocument, Settings, Verdict } from './document.ts';
import { findVerdict, matchVerdicts, type Place } from './matchVerdicts.ts';

/** A feature on which two sessions differ; `at` in vacuum Angstrom. */
export interface VerdictDifference {
  readonly at: number;
  readonly kind: 'only-first' | 'only-second' | 'other-decision' | 'other-name' | 'other-note';
  readonly first?: Verdict;
  readonly second?: Verdict;
  /** A sentence that says what differs and, as far as notes and rejected names tell, why. */
  readonly sentence: string;
}

/** A setting that differs. */
export interface SettingDifference {
  readonly key: string;
  readonly first: string;
  readonly second: string;
}

export interface SessionComparison {
  /** Both are about the same bytes, as far as their hashes tell. */
  readonly sameSource: boolean;
  readonly agreeing: number;
  readonly verdicts: readonly VerdictDifference[];
  readonly settings: readonly SettingDifference[];
}

/** A feature with the probabilities of its names, as the analysis of either session gives them; `at` in vacuum Angstrom. */
export interface WeighedFeature extends Place {
  readonly noneProbability: number;
  readonly candidates: readonly { readonly keys: readonly LineKey[]; readonly probability: number }[];
}

/**
 * Differences between two sessions on one spectrum: a second opinion. Verdicts are brought together by their places, as after a refit.
 *
 * @param weighed features of an analysis of the spectrum: with them every difference says how probable the names are
 */
export function compareSessions(
  first: SessionDocument,
  second: SessionDocument,
  weighed: readonly WeighedFeature[] = [],
): SessionComparison {
  const places = first.verdicts.map(({ at, atErr }) => ({ at, atErr }));
  const { byFeature, lost } = matchVerdicts(second.verdicts, places);
  const verdicts: VerdictDifference[] = [];
  let agreeing = 0;
  first.verdicts.forEach((verdict, k) => {
    const other = byFeature[k];
    const difference = other ? differenceOf(verdict, other) : alone(verdict, 'only-first');
    if (difference) verdicts.push(difference);
    else agreeing++;
  });
  for (const verdict of lost) verdicts.push(alone(verdict, 'only-second'));
  const [a, b] = [first.source, second.source];
  return {
    sameSource: a?.sha256 !== undefined && a.sha256 === b?.sha256 ? true : a?.size === b?.size && a?.sha256 === undefined,
    agreeing,
    verdicts: verdicts
      .sort((p, q) => p.at - q.at)
      .map((difference) => ({ ...difference, sentence: `${difference.sentence}${odds(difference, weighed)}` })),
    settings: settingDifferences(first.settings, second.settings),
  };
}

function alone(verdict: Verdict, kind: 'only-first' | 'only-second'): VerdictDifference {
  const who = kind === 'only-first' ? 'first' : 'second';
  return {
    at: verdict.at,
    kind,
    ...(kind === 'only-first' ? { first: verdict } : { second: verdict }),
    sentence: `Only the ${who} session decided: ${said(verdict)}.`,
  };
}

function differenceOf(first: Verdict, second: Verdict): VerdictDifference | undefined {
  const base = { at: first.at, first, second };
  const both = `First: ${said(first)}; second: ${said(second)}.`;
  if (first.decision !== second.decision) return { ...base, kind: 'other-decision', sentence: `${both}${why(first, second)}` };
  if (first.decision === 'accepted' && names(first.accepted) !== names(second.accepted))
    return { ...base, kind: 'other-name', sentence: `${both}${why(first, second)}` };
  return (first.note ?? '') === (second.note ?? '') ? undefined : { ...base, kind: 'other-note', sentence: both };
}

/** Where one session turned down what the other accepted, that is the reason. */
function why(first: Verdict, second: Verdict): string {
  const turned = (a: Verdict, b: Verdict) => a.accepted && b.turnedDown?.some((keys) => names(keys) === names(a.accepted));
  if (turned(first, second)) return ` The second turned ${names(first.accepted)} down.`;
  return turned(second, first) ? ` The first turned ${names(second.accepted)} down.` : '';
}

/** ` The weighing gives He II 4686.991 0.93, Ar IV 4686.9 0.02, no name 0.01.`; empty where no feature is near. */
function odds({ first, second }: VerdictDifference, weighed: readonly WeighedFeature[]): string {
  const verdict = first ?? second;
  if (!verdict) return '';
  const near = weighed.filter((each) => findVerdict([verdict], each));
  const [feature] = near.sort((a, b) => Math.abs(a.at - verdict.at) - Math.abs(b.at - verdict.at));
  if (!feature) return '';
  const asked = [first?.accepted, second?.accepted].filter((keys) => keys !== undefined);
  const distinct = asked.filter((keys, k) => asked.findIndex((other) => names(other) === names(keys)) === k);
  const said = distinct.map((keys) => {
    const found = feature.candidates.find((candidate) => names(candidate.keys) === names(keys));
    return `${names(keys)} ${found ? found.probability.toFixed(3) : 'no place among the candidates'}`;
  });
  return ` The weighing gives ${[...said, `no name ${feature.noneProbability.toFixed(3)}`].join(', ')}.`;
}

const names = (keys: readonly LineKey[] | undefined) => [...(keys ?? [])].sort().join(' + ');

function said({ decision, accepted, note }: Verdict): string {
  const what = decision === 'accepted' ? `accepted ${names(accepted)}` : (decision ?? 'open');
  return note ? `${what} ("${note}")` : what;
}

function settingDifferences(first: Settings, second: Settings): SettingDifference[] {
  const flat = (settings: Settings) =>
    new Map(
      Object.entries(settings).flatMap(([group, value]) =>
        typeof value === 'object' && value !== null
          ? Object.entries(value).map(([key, each]) => [`${group}.${key}`, JSON.stringify(each)] as const)
          : [],
      ),
    );
  const [a, b] = [flat(first), flat(second)];
  return [...new Set([...a.keys(), ...b.keys()])]
    .filter((key) => a.get(key) !== b.get(key))
    .sort()
    .map((key) => ({ key, first: a.get(key) ?? 'as the program', second: b.get(key) ?? 'as the program' }));
}

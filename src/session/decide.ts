import type { Change, Step } from './change.ts';
import { type LineKey, type SessionDocument, type Settings, type Source, sameSource, type Verdict } from './document.ts';
import { findVerdict, type Place } from './matchVerdicts.ts';

/** A feature as the user points at it: its place, and how the history calls it. */
export interface PointedFeature extends Place {
  /** "feature 41". */
  readonly label: string;
}

/** A name as the user sees it and as the document keeps it. */
export interface PointedName {
  /** "[O III] 5006.84". */
  readonly label: string;
  readonly keys: readonly LineKey[];
}

/** Accepts `name` for `feature`; a note stays, what was turned down stays turned down save for this name. */
export function accept(document: SessionDocument, feature: PointedFeature, name: PointedName): Change {
  const old = findVerdict(document.verdicts, feature);
  const turnedDown = old?.turnedDown?.filter((keys) => !sameKeys(keys, name.keys));
  return changeVerdict(`accepted ${name.label} for ${feature.label}`, old, {
    ...placeOf(old, feature),
    decision: 'accepted',
    accepted: name.keys,
    turnedDown,
    note: old?.note,
  });
}

/** Turns `name` down for `feature`: the next candidate comes up; an acceptance of another name is not touched. */
export function reject(document: SessionDocument, feature: PointedFeature, name: PointedName): Change {
  const old = findVerdict(document.verdicts, feature);
  const keepsAccepted = old?.decision === 'accepted' && old.accepted !== undefined && !sameKeys(old.accepted, name.keys);
  const turnedDown = [...(old?.turnedDown ?? []).filter((keys) => !sameKeys(keys, name.keys)), name.keys];
  return changeVerdict(`rejected ${name.label} for ${feature.label}`, old, {
    ...placeOf(old, feature),
    decision: keepsAccepted ? 'accepted' : 'rejected',
    accepted: keepsAccepted ? old?.accepted : undefined,
    turnedDown,
    note: old?.note,
  });
}

/** Marks `feature` as a real line without a name, or as a fault of the data. */
export function declare(document: SessionDocument, feature: PointedFeature, decision: 'unidentified' | 'artefact'): Change {
  const old = findVerdict(document.verdicts, feature);
  const as = decision === 'artefact' ? 'an artefact' : 'unidentified';
  return changeVerdict(`called ${feature.label} ${as}`, old, {
    ...placeOf(old, feature),
    decision,
    turnedDown: old?.turnedDown,
    note: old?.note,
  });
}

/** Forgets the verdict on `feature`; its note stays. */
export function reopen(document: SessionDocument, feature: PointedFeature): Change {
  const old = findVerdict(document.verdicts, feature);
  return changeVerdict(`reopened ${feature.label}`, old, old?.note ? { ...placeOf(old, feature), note: old.note } : undefined);
}

/** Writes the note of `feature`; an empty text removes it. */
export function writeNote(document: SessionDocument, feature: PointedFeature, text: string): Change {
  const old = findVerdict(document.verdicts, feature);
  const note = text.trim() || undefined;
  const after = note || old?.decision ? { ...(old ?? placeOf(old, feature)), note } : undefined;
  return changeVerdict(note ? `noted on ${feature.label}: ${note}` : `removed the note on ${feature.label}`, old, after);
}

/** Accepts many names at once, as one change. */
export function acceptMany(
  document: SessionDocument,
  pairs: readonly { readonly feature: PointedFeature; readonly name: PointedName }[],
  sentence: string,
): Change {
  return { sentence, steps: pairs.flatMap(({ feature, name }) => accept(document, feature, name).steps) };
}

/** Replaces the settings; `sentence` says which one changed. */
export function changeSettings(document: SessionDocument, after: Settings, sentence: string): Change {
  if (JSON.stringify(after) === JSON.stringify(document.settings)) return { sentence, steps: [] };
  return { sentence, steps: [{ on: 'settings', before: document.settings, after }] };
}

/**
 * Puts `source` on the desk. What was there goes onto the shelf with its settings and verdicts; a source that was on the shelf comes back as it was left, a new
 * one starts with the settings of the desk but its own way of reading, its own redshift and its own resolving power. Opening what is already on the desk changes nothing.
 */
export function openSource(document: SessionDocument, source: Source): Change {
  const shelf = document.shelf ?? [];
  const left = document.source;
  if (left && sameSource(left, source)) return { sentence: `opened ${source.name} again`, steps: [] };
  const returning = shelf.find((s) => sameSource(s.source, source));
  const staying = shelf.filter((s) => !sameSource(s.source, source));
  const gone = left ? [{ source: left, settings: document.settings, verdicts: document.verdicts }] : [];
  const after = [...staying, ...gone];
  const settings = returning?.settings ?? forAnotherSource(document.settings);
  const steps: Step[] = [
    ...document.verdicts.map((before) => ({ on: 'verdict', before }) as const),
    { on: 'settings', before: document.settings, after: settings },
    { on: 'source', before: left, after: source },
    ...(after.length > 0 || document.shelf
      ? [{ on: 'shelf', before: document.shelf, after: after.length > 0 ? after : undefined } as const]
      : []),
    ...(returning?.verdicts ?? []).map((verdict) => ({ on: 'verdict', after: verdict }) as const),
  ];
  return { sentence: `${returning ? 'went back to' : 'opened'} ${source.name}`, steps };
}

/** Settings without what belongs to one source alone. */
function forAnotherSource({ measure, naming, gas, paper, ...rest }: Settings): Settings {
  const {
    resolvingPower: _power,
    instrumentFwhmA: _width,
    instrumentFwhmSlope: _slope,
    continuum: _continuum,
    edits: _edits,
    ...measureKept
  } = measure;
  const { z: _z, ...namingKept } = naming;
  const { cHbeta: _c, stellarEwA: _stellar, te: _te, ne: _ne, ...gasKept } = gas ?? {};
  const { caption: _caption, ...design } = paper?.design ?? {};
  return {
    ...rest,
    reading: {},
    measure: measureKept,
    naming: namingKept,
    ...(gas ? { gas: gasKept } : {}),
    ...(paper?.design ? { paper: { design: design as typeof paper.design } } : {}),
  };
}

/** Takes a source off the shelf; its verdicts go with it, undo brings both back. */
export function dropShelved(document: SessionDocument, source: Source): Change {
  const after = (document.shelf ?? []).filter((s) => !sameSource(s.source, source));
  return {
    sentence: `closed ${source.name}`,
    steps: [{ on: 'shelf', before: document.shelf, after: after.length > 0 ? after : undefined }],
  };
}

function changeVerdict(sentence: string, before: Verdict | undefined, after: Verdict | undefined): Change {
  const tidy = after && (JSON.parse(JSON.stringify(after)) as Verdict);
  if (JSON.stringify(before) === JSON.stringify(tidy)) return { sentence, steps: [] };
  return { sentence, steps: [{ on: 'verdict', before, after: tidy }] };
}

const placeOf = (old: Verdict | undefined, feature: Place): Place => ({ at: old?.at ?? feature.at, atErr: old?.atErr ?? feature.atErr });

export const sameKeys = (a: readonly LineKey[], b: readonly LineKey[]) => a.length === b.length && a.every((key) => b.includes(key));

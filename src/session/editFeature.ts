import type { FeatureEdit } from '../measure/index.ts';
import type { Change } from './change.ts';
import { changeSettings } from './decide.ts';
import type { SessionDocument } from './document.ts';

/** Does one more thing by hand to the features of the spectrum on the desk. */
export const editFeature = (document: SessionDocument, edit: FeatureEdit, sentence: string): Change =>
  withEdits(document, [...(document.settings.measure.edits ?? []), edit], sentence);

/** Takes the edit at a place of the list out again; those after it stay. */
export const dropEdit = (document: SessionDocument, place: number, sentence: string): Change =>
  withEdits(
    document,
    (document.settings.measure.edits ?? []).filter((_, k) => k !== place),
    sentence,
  );

function withEdits(document: SessionDocument, edits: readonly FeatureEdit[], sentence: string): Change {
  const { edits: _, ...measure } = document.settings.measure;
  const after = { ...document.settings, measure: edits.length > 0 ? { ...measure, edits } : measure };
  return changeSettings(document, after, sentence);
}

// The document - source, settings, verdicts - and everything that may be done to it: described, reversible changes, undo and redo, the session file.
// Deliberately not here: anything derived (features, candidates, tables), and where the file is kept (the screen's storage).

export type { FeatureEdit } from '../measure/index.ts';
export { applyChange, type Change, inverseOf, type Step } from './change.ts';
export { compareSessions, type SessionComparison, type SettingDifference, type VerdictDifference } from './compareSessions.ts';
export {
  accept,
  acceptMany,
  changeSettings,
  declare,
  dropShelved,
  openSource,
  type PointedFeature,
  type PointedName,
  reject,
  reopen,
  sameKeys,
  writeNote,
} from './decide.ts';
export {
  type Decision,
  EMPTY_DOCUMENT,
  type LineKey,
  type OwnLines,
  type PaperSettings,
  type SessionDocument,
  type Settings,
  type Source,
  sameBytes,
  type Verdict,
} from './document.ts';
export { dropEdit, editFeature } from './editFeature.ts';
export { readSession, readSessionRecord, sessionRecord, writeSession } from './file.ts';
export { type History, make, redo, startHistory, undo } from './history.ts';
export { matchVerdicts, type Place } from './matchVerdicts.ts';

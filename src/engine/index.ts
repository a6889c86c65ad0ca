// The one door to computing: opens a source, runs reading, measuring and naming, keeps what did not change, puts the result together for desk and terminal.
// Deliberately not here: storage, screens, files. worker.ts is its second entry, for the browser.
export { type AtomicData, loadAtomicData } from '../atomic/index.ts';
export type { FeatureShape, FluxLimit } from '../measure/index.ts';
export { readSpectrum } from '../readers/index.ts';
export type {
  Analysis,
  CandidateView,
  CompanionView,
  FeatureView,
  NameChange,
  Progress,
  ReadingView,
  SamplesView,
  SkyView,
  ThinGasView,
  TransitionView,
} from './analysis.ts';
export { createEngine, type Engine, type RunControl } from './engine.ts';
export { type LimitRow, limitsOf } from './limits.ts';
export { type LineRecord, type LineSearchResult, type ListedCompanion, type ListedLine, lineRecord, searchLines } from './lineSearch.ts';
export type { SourceKind } from './material.ts';
export type { WorkerAnswer, WorkerRequest } from './protocol.ts';

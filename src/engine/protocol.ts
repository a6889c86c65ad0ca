import type { FeatureShape, FluxLimit } from '../measure/index.ts';
import type { Gas } from '../plasma/index.ts';
import type { Problem, Remark } from '../problems/index.ts';
import type { OwnLines, Settings, Verdict } from '../session/index.ts';
import type { Analysis, Progress, SamplesView } from './analysis.ts';
import type { LineRecord, LineSearchResult } from './lineSearch.ts';

/** What the screen asks of the worker. One request runs at a time; `id` comes back with the answer. To cancel, end the worker and start another. */
export type WorkerRequest =
  /** First message: where the atomic bundle is. */
  | { readonly ask: 'start'; readonly id: number; readonly bundleUrl: string }
  /** Takes the file as the source of all following analyses. */
  | {
      readonly ask: 'open';
      readonly id: number;
      readonly file: Blob;
      readonly name: string;
      readonly kind: 'spectrum' | 'line-list' | 'guess';
    }
  /** Analyses the open source; stages whose inputs did not change are not run again. `samplesKnown`: stamp of the samples the screen already holds. */
  | {
      readonly ask: 'analyse';
      readonly id: number;
      readonly settings: Settings;
      readonly verdicts: readonly Verdict[];
      readonly samplesKnown?: number;
    }
  /** Looks into the line list; `query` as in `searchLines`. */
  | { readonly ask: 'lines'; readonly id: number; readonly query: string; readonly own?: OwnLines }
  /** All the list holds of one line; `te` in K, `ne` in cm^-3. */
  | {
      readonly ask: 'record';
      readonly id: number;
      readonly line: number;
      readonly te: number;
      readonly ne: number;
      readonly own?: OwnLines;
    }
  /** The feature nearest to `at` (Angstrom, medium of the reading) in other shapes. */
  | { readonly ask: 'shapes'; readonly id: number; readonly at: number }
  /** Three-sigma limit of an unseen line at `at`. */
  | { readonly ask: 'limit'; readonly id: number; readonly at: number }
  /** Reads the user's own lines without taking them: a problem for every bad row. */
  | { readonly ask: 'check-lines'; readonly id: number; readonly own: OwnLines };

export type WorkerAnswer =
  | { readonly say: 'lines'; readonly id: number; readonly result: LineSearchResult }
  | { readonly say: 'shapes'; readonly id: number; readonly shapes: readonly FeatureShape[] }
  | { readonly say: 'limit'; readonly id: number; readonly limit?: FluxLimit }
  | { readonly say: 'record'; readonly id: number; readonly record: LineRecord }
  | {
      readonly say: 'checked';
      readonly id: number;
      readonly count: number;
      readonly problems: readonly Problem[];
      readonly remarks: readonly Remark[];
    }
  | { readonly say: 'started'; readonly id: number; readonly atomicVersion: string; readonly lineCount: number }
  /** `sha256`: of the file's bytes, hex. */
  | { readonly say: 'opened'; readonly id: number; readonly kind: 'spectrum' | 'line-list'; readonly sha256: string }
  | { readonly say: 'progress'; readonly id: number; readonly progress: Progress }
  /** While an analysis is going: the gas under its verdicts, by the names of before. */
  | { readonly say: 'gas'; readonly id: number; readonly gas: Gas }
  /** `samples` is absent when the screen already holds those of `samplesStamp`. */
  | {
      readonly say: 'analysed';
      readonly id: number;
      readonly analysis: Omit<Analysis, 'samples'>;
      readonly samples?: SamplesView;
      readonly samplesStamp: number;
    }
  | { readonly say: 'problem'; readonly id: number; readonly problem: Problem };

import type {
  FeatureShape,
  FluxLimit,
  LineRecord,
  LineSearchResult,
  Progress,
  SamplesView,
  WorkerAnswer,
  WorkerRequest,
} from '../engine/index.ts';
import type { Gas } from '../plasma/index.ts';
import type { Problem } from '../problems/index.ts';
import type { OwnLines, Settings, Verdict } from '../session/index.ts';

/** The run was stopped by the user: nothing went wrong. */
export class Cancelled extends Error {}

/** The worker answered with a problem. */
export class AnsweredProblem extends Error {
  readonly problem: Problem;
  constructor(problem: Problem) {
    super(problem.found);
    this.problem = problem;
  }
}

export type Analysed = Omit<Extract<WorkerAnswer, { say: 'analysed' }>, 'say' | 'id'>;

/** What was found out about a file that was opened. */
export type Opened = Pick<Extract<WorkerAnswer, { say: 'opened' }>, 'kind' | 'sha256'>;

/** The one thread that computes: started when first needed, ended to cancel. */
export interface WorkerClient {
  open(file: Blob, name: string, kind: 'spectrum' | 'line-list' | 'guess'): Promise<Opened>;
  analyse(settings: Settings, verdicts: readonly Verdict[]): Promise<Analysed>;
  /** Looks into the line list: ion, wavelength in air, words of the multiplet, in any order. */
  searchLines(query: string, own: OwnLines | undefined): Promise<LineSearchResult>;
  /** All the list holds of one line; critical density and companions at `te` (K) and `ne` (cm^-3). */
  lineRecord(line: number, te: number, ne: number, own: OwnLines | undefined): Promise<LineRecord>;
  /** Reads the user's own lines without taking them: a problem for every bad row. */
  checkLines(own: OwnLines): Promise<Extract<WorkerAnswer, { say: 'checked' }>>;
  /** The feature nearest to `at` (Angstrom of the file) in other shapes, best first. */
  shapesAt(at: number): Promise<readonly FeatureShape[]>;
  /** Three-sigma limit of an unseen line; undefined outside the spectrum. */
  limitAt(at: number): Promise<FluxLimit | undefined>;
  /** Ends the thread: what is pending rejects with `Cancelled`; whoever calls next has to open the file again. */
  cancel(): void;
}

type Question = WorkerRequest extends infer Each ? (Each extends WorkerRequest ? Omit<Each, 'id'> : never) : never;

interface Pending {
  readonly resolve: (answer: WorkerAnswer) => void;
  readonly reject: (reason: Error) => void;
}

/**
 * @param bundleUrl where the line list is
 * @param progress  told how far a run is
 * @param gas       told what the verdicts of a run mean for the gas, before its names are weighed
 * @param fault     words for a thread that ended by itself
 */
export function workerClient(bundleUrl: string, progress: (p: Progress) => void, gas: (gas: Gas) => void, fault: string): WorkerClient {
  let worker: Worker | undefined;
  let pending = new Map<number, Pending>();
  let samples: { readonly samples?: SamplesView; readonly stamp?: number } = {};
  let count = 0;

  const end = (reason: Error) => {
    worker?.terminate();
    worker = undefined;
    samples = {};
    const left = pending;
    pending = new Map();
    for (const { reject } of left.values()) reject(reason);
  };

  const post = (to: Worker, question: Question): Promise<WorkerAnswer> =>
    new Promise((resolve, reject) => {
      const id = ++count;
      pending.set(id, { resolve, reject });
      to.postMessage({ ...question, id });
    });

  const hear = (answer: WorkerAnswer) => {
    if (answer.say === 'progress') return progress(answer.progress);
    if (answer.say === 'gas') return gas(answer.gas);
    const waiting = pending.get(answer.id);
    pending.delete(answer.id);
    if (answer.say === 'problem') waiting?.reject(new AnsweredProblem(answer.problem));
    else waiting?.resolve(answer);
  };

  const running = async (): Promise<Worker> => {
    if (worker) return worker;
    const started = new Worker(new URL('../engine/worker.ts', import.meta.url), { type: 'module' });
    worker = started;
    started.onmessage = (event: MessageEvent<WorkerAnswer>) => hear(event.data);
    started.onerror = (event) => end(new AnsweredProblem({ code: 'worker-ended', where: {}, found: `${fault} ${event.message ?? ''}` }));
    try {
      await post(started, { ask: 'start', bundleUrl });
    } catch (error) {
      end(new Cancelled());
      throw error;
    }
    return started;
  };

  return {
    async open(file, name, kind) {
      const answer = await post(await running(), { ask: 'open', file, name, kind });
      if (answer.say !== 'opened') throw new TypeError(`open was answered by ${answer.say}`);
      return { kind: answer.kind, sha256: answer.sha256 };
    },
    async analyse(settings, verdicts) {
      const answer = await post(await running(), { ask: 'analyse', settings, verdicts, samplesKnown: samples.stamp });
      if (answer.say !== 'analysed') throw new TypeError(`analyse was answered by ${answer.say}`);
      if (answer.samples || answer.samplesStamp !== samples.stamp) samples = { samples: answer.samples, stamp: answer.samplesStamp };
      return { analysis: answer.analysis, samples: samples.samples, samplesStamp: answer.samplesStamp };
    },
    async searchLines(query, own) {
      const answer = await post(await running(), { ask: 'lines', query, own });
      if (answer.say !== 'lines') throw new TypeError(`lines was answered by ${answer.say}`);
      return answer.result;
    },
    async lineRecord(line, te, ne, own) {
      const answer = await post(await running(), { ask: 'record', line, te, ne, own });
      if (answer.say !== 'record') throw new TypeError(`record was answered by ${answer.say}`);
      return answer.record;
    },
    async checkLines(own) {
      const answer = await post(await running(), { ask: 'check-lines', own });
      if (answer.say !== 'checked') throw new TypeError(`check-lines was answered by ${answer.say}`);
      return answer;
    },
    async shapesAt(at) {
      const answer = await post(await running(), { ask: 'shapes', at });
      if (answer.say !== 'shapes') throw new TypeError(`shapes was answered by ${answer.say}`);
      return answer.shapes;
    },
    async limitAt(at) {
      const answer = await post(await running(), { ask: 'limit', at });
      if (answer.say !== 'limit') throw new TypeError(`limit was answered by ${answer.say}`);
      return answer.limit;
    },
    cancel: () => end(new Cancelled()),
  };
}

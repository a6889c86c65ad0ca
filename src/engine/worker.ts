/// <reference lib="webworker" />
import { type AtomicData, type CompanionFinder, companionFinder, loadAtomicData } from '../atomic/index.ts';
import { prepareNaming } from '../identify/index.ts';
import { type Problem, ProblemError } from '../problems/index.ts';
import type { ByteSource } from '../readers/index.ts';
import type { SamplesView } from './analysis.ts';
import { checkOwnLines } from './checkOwnLines.ts';
import { createEngine, type Engine } from './engine.ts';
import { type LineRecord, lineRecord, searchLines } from './lineSearch.ts';
import type { WorkerAnswer, WorkerRequest } from './protocol.ts';

// The worker's entry: turns messages into calls of the engine and errors into data. One request runs at a time.

declare const self: DedicatedWorkerGlobalScope;

let engine: Engine | undefined;
let lastSamples: { readonly samples: SamplesView | undefined; readonly stamp: number } = { samples: undefined, stamp: 0 };
let queue: Promise<void> = Promise.resolve();

self.onmessage = (event: MessageEvent<WorkerRequest>) => {
  queue = queue.then(() => answer(event.data));
};

const say = (message: WorkerAnswer) => self.postMessage(message);

async function answer(request: WorkerRequest): Promise<void> {
  try {
    if (request.ask === 'start') await start(request.id, request.bundleUrl);
    else if (!engine) throw new RangeError('the worker was asked before it was started');
    else if (request.ask === 'open') {
      const kind = await engine.open(blobSource(request.file, request.name), request.kind);
      const { id } = request;
      const sha256 = await engine.sha256({ progress: (progress) => say({ say: 'progress', id, progress }) });
      say({ say: 'opened', id, kind, sha256 });
    } else if (request.ask === 'shapes') say({ say: 'shapes', id: request.id, shapes: engine.shapesAt(request.at) });
    else if (request.ask === 'limit') say({ say: 'limit', id: request.id, limit: engine.limitAt(request.at) });
    else if (request.ask === 'lines')
      say({ say: 'lines', id: request.id, result: searchLines(engine.dataWith(request.own), request.query) });
    else if (request.ask === 'check-lines')
      say({ say: 'checked', id: request.id, ...checkOwnLines(engine.dataWith(undefined), request.own) });
    else if (request.ask === 'record') say({ say: 'record', id: request.id, record: recordOf(engine.dataWith(request.own), request) });
    else await analyse(engine, request);
  } catch (error) {
    say({ say: 'problem', id: request.id, problem: problemOf(error) });
  }
}

let lastFinder: { readonly data: AtomicData; readonly find: CompanionFinder } | undefined;

function recordOf(data: AtomicData, { line, te, ne }: Extract<WorkerRequest, { ask: 'record' }>): LineRecord {
  if (lastFinder?.data !== data) lastFinder = { data, find: companionFinder(data) };
  return lineRecord(data, line, te, ne, lastFinder.find);
}

async function start(id: number, bundleUrl: string): Promise<void> {
  const response = await fetch(bundleUrl);
  if (!response.ok) {
    throw new ProblemError({
      code: 'no-line-list',
      where: { file: bundleUrl },
      found: `the line list could not be loaded (status ${response.status})`,
      doThis: 'Reload the page.',
    });
  }
  const data = loadAtomicData(new Uint8Array(await response.arrayBuffer()));
  engine = createEngine(data, () => performance.now() / 1000);
  say({ say: 'started', id, atomicVersion: data.version, lineCount: data.lines.count });
  prepareNaming(data);
}

async function analyse(running: Engine, request: Extract<WorkerRequest, { ask: 'analyse' }>): Promise<void> {
  const { samples, ...analysis } = await running.analyse(request.settings, request.verdicts, {
    progress: (progress) => say({ say: 'progress', id: request.id, progress }),
    gas: (gas) => say({ say: 'gas', id: request.id, gas }),
  });
  if (samples?.model !== lastSamples.samples?.model) lastSamples = { samples, stamp: lastSamples.stamp + 1 };
  const known = request.samplesKnown === lastSamples.stamp;
  say({ say: 'analysed', id: request.id, analysis, ...(samples && !known ? { samples } : {}), samplesStamp: lastSamples.stamp });
}

const blobSource = (file: Blob, name: string): ByteSource => ({
  name,
  size: file.size,
  read: async (start, end) => new Uint8Array(await file.slice(start, end).arrayBuffer()),
});

/** Any error as plain data; what is not about the user's material is a fault of the program and says so. */
function problemOf(error: unknown): Problem {
  if (error instanceof ProblemError) return error.problem;
  return {
    code: 'program-fault',
    where: {},
    found: `a fault of the program: ${error instanceof Error ? error.message : String(error)}`,
    doThis: 'Nothing you did is lost; please report this sentence with the file that led to it.',
  };
}

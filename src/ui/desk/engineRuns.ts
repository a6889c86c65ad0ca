import { wordProblem } from '../../problems/index.ts';
import { make, openSource, type Source, sameBytes } from '../../session/index.ts';
import { keepFile, keptFile, sourceKey } from '../storage.ts';
import { words } from '../words.ts';
import { type Analysed, AnsweredProblem, Cancelled, type WorkerClient, workerClient } from '../workerClient.ts';
import { nearestRow } from './chosen.ts';
import { type DeskRow, deskRows, prominence } from './deskRows.ts';
import { desk, raiseAlert, setDesk } from './deskStore.ts';
import { offerGuide } from './guide.ts';

let made: WorkerClient | undefined;

/** Made when first needed, so that the command table can be read without a page. */
function client(): WorkerClient {
  made ??= workerClient(
    new URL('atomic.bin', document.baseURI).href,
    ({ stage, share }) => {
      const { run } = desk();
      if (run) setDesk({ run: { ...run, stage, share } });
    },
    (gas) => {
      const { analysis } = desk();
      if (analysis) setDesk({ analysis: { ...analysis, gas } });
    },
    words.run.failed,
  );
  return made;
}

/** The thread for questions about the line list. */
export const listClient = (): Pick<WorkerClient, 'searchLines' | 'lineRecord' | 'checkLines'> => client();

/** The thread for questions about the spectrum that is open. */
export const measuringClient = (): Pick<WorkerClient, 'shapesAt' | 'limitAt'> => client();

/** Bytes at hand, by `sourceKey`. */
const files = new Map<string, Blob>();
/** Key of the source the worker holds. */
let held: string | undefined;
let wanted = false;
let going: Promise<void> | undefined;

/** Jobs for the worker run one after the other: an opening must not come between another's opening and its analysis. */
let line: Promise<void> = Promise.resolve();
const inLine = (job: () => Promise<void>): Promise<void> => {
  line = line.then(job, job);
  return line;
};

/** Opens a file as a new source; on a problem everything stays as it was and the problem is shown. */
export function openFile(file: Blob, name: string): Promise<void> {
  stop();
  return inLine(async () => {
    held = undefined;
    setDesk({ run: { what: 'opening', name, stage: 'starting', share: 0 } });
    try {
      await openNow(file, name);
    } catch (error) {
      tell(error);
    } finally {
      setDesk({ run: undefined });
    }
  });
}

async function openNow(file: Blob, name: string): Promise<void> {
  const { history, stage } = desk();
  const awaited = stage === 'awaiting' ? history.document.source : undefined;
  const found = await client().open(file, name, awaited?.name === name ? awaited.kind : 'guess');
  const opened: Source = { ...found, name, size: file.size };
  const isAwaited = awaited !== undefined && awaited.kind === found.kind && sameBytes(awaited, opened);
  const source = isAwaited ? awaited : opened;
  // a spectrum that is still waited for goes onto the shelf with all that was decided on it
  const after = () => (isAwaited ? desk().history : make(desk().history, openSource(desk().history.document, source)));
  const { settings, verdicts } = after().document;
  const answer = await client().analyse(settings, verdicts);
  const key = sourceKey(source);
  held = key;
  files.set(key, file);
  await keepFile(source, file).catch(() => raiseAlert(words.status.storageFailed));
  setDesk({ history: after(), status: `opened ${name}` });
  if (awaited && !isAwaited) raiseAlert(words.notAwaited(name, awaited.name));
  arrive(answer, true);
  offerGuide();
}

/** Analyses the document as it stands now; calls while a run is going are joined into one more run. */
export function analyse(): Promise<void> {
  wanted = true;
  going ??= inLine(rounds).finally(() => {
    going = undefined;
  });
  return going;
}

async function rounds(): Promise<void> {
  while (wanted) {
    wanted = false;
    try {
      await round();
    } catch (error) {
      setDesk({ outOfDate: desk().analysis !== undefined });
      tell(error);
    } finally {
      setDesk({ run: undefined });
    }
  }
}

async function round(): Promise<void> {
  const { source, settings, verdicts } = desk().history.document;
  if (!source) {
    setDesk({ stage: 'empty', analysis: undefined, samples: undefined, rows: [], chosenAt: undefined, range: undefined });
    return;
  }
  const key = sourceKey(source);
  setDesk({ run: { what: 'analysing', name: source.name, stage: 'starting', share: 0 } });
  const isOther = held !== key;
  if (isOther) {
    const file = files.get(key) ?? (await keptFile(source).catch(() => undefined));
    if (!file) {
      setDesk({ stage: 'awaiting', analysis: undefined, samples: undefined, rows: [] });
      return;
    }
    files.set(key, file);
    held = undefined;
    await client().open(file, source.name, source.kind);
    held = key;
  }
  arrive(await client().analyse(settings, verdicts), false);
}

/** Puts an answer on the desk. */
function arrive(answer: Analysed, isNew: boolean): void {
  const { verdicts } = desk().history.document;
  const rows = deskRows(answer.analysis, verdicts);
  const { changes } = answer.analysis;
  const kept = isNew ? undefined : nearestRow(rows, desk().chosenAt);
  setDesk({
    stage: 'desk',
    analysis: answer.analysis,
    samples: answer.samples,
    rows,
    outOfDate: false,
    // numbers mean other features when measuring has found more or fewer
    ...(rows.length === desk().rows.length ? {} : { picked: [], pickedFrom: undefined }),
    ...(changes.length > 0 && !isNew ? { status: `${desk().status}; ${words.changes.status(changes.length)}` } : {}),
    chosenAt: (kept ?? mostProminent(rows))?.feature.at,
    ...(isNew ? { range: undefined, gain: 1, filter: {}, tab: 'case' } : {}),
  });
}

const mostProminent = (rows: readonly DeskRow[]) =>
  rows.reduce<DeskRow | undefined>((best, row) => (!best || prominence(row) > prominence(best) ? row : best), undefined);

/** Ends what is running; the file and the last result stay. */
export function stop(): void {
  if (!desk().run) return;
  wanted = false;
  held = undefined;
  client().cancel();
}

/** Resolves when the analysis on the desk belongs to the document on the desk. */
export async function settled(): Promise<void> {
  while (going) await going;
  if (desk().outOfDate) await analyse();
}

/** Shows what went wrong; a run that the user stopped is no error. */
export function tell(error: unknown): void {
  if (error instanceof Cancelled) setDesk({ status: words.run.cancelled });
  else if (error instanceof AnsweredProblem) raiseAlert(wordProblem(error.problem));
  else throw error;
}

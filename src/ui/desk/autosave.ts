import { ProblemError, wordProblem } from '../../problems/index.ts';
import { keepDesk, keptDesk, pruneFiles } from '../storage.ts';
import { words } from '../words.ts';
import { type DeskFields, desk, raiseAlert, setDesk, useDesk } from './deskStore.ts';
import { analyse } from './engineRuns.ts';
import { KEPT_FIELDS, keptOf } from './fates.ts';

let isWriting = false;
let dirty = false;

/** Brings back what was kept, then keeps every change of what is to be kept. */
export async function startKeeping(): Promise<void> {
  void watchTabs();
  const kept = await keptDesk().catch(sayBroken);
  if (kept?.history.document.source) {
    setDesk({ ...kept.view, history: kept.history });
    await pruneFiles(kept.history).catch(() => undefined);
    useDesk.subscribe(keepIfChanged);
    await analyse();
    if (desk().stage === 'starting') setDesk({ stage: 'awaiting' });
    if (desk().stage === 'desk') setDesk({ status: words.status.restored });
  } else {
    if (kept)
      setDesk({
        theme: kept.view.theme,
        singleKeys: kept.view.singleKeys,
        guideSeen: kept.view.guideSeen ?? false,
        goOn: kept.view.goOn ?? true,
      });
    useDesk.subscribe(keepIfChanged);
    setDesk({ stage: 'empty' });
  }
}

/** A browser that forbids its storage says so at the first writing; what is broken is said at once. */
function sayBroken(error: unknown): undefined {
  if (error instanceof ProblemError) raiseAlert(`${wordProblem(error.problem)} ${words.keptAside}`);
}

/** How long another tab may take to close, as it does while a page is loaded anew. */
const CLOSING_MS = 2000;

/** Two tabs would write over each other: the second one says so. */
async function watchTabs(): Promise<void> {
  if (!navigator.locks) return;
  const late = setTimeout(() => raiseAlert(words.twoTabs), CLOSING_MS);
  // held as long as the page lives
  await navigator.locks.request('linewright desk', () => {
    clearTimeout(late);
    return new Promise(() => {});
  });
}

function keepIfChanged(after: DeskFields, before: DeskFields): void {
  if (after.history === before.history && KEPT_FIELDS.every((field) => after[field] === before[field])) return;
  dirty = true;
  if (!isWriting) void write();
}

/** Writes the latest state; what changes meanwhile is written in one more round. */
async function write(): Promise<void> {
  isWriting = true;
  while (dirty) {
    dirty = false;
    const state = desk();
    const view = keptOf(state);
    try {
      await keepDesk({ history: state.history, view });
    } catch {
      raiseAlert(words.status.storageFailed);
    }
  }
  isWriting = false;
}

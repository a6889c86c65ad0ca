import { applyChange, type Change, inverseOf } from './change.ts';
import type { SessionDocument } from './document.ts';

/** The document with all that led to it: undo and redo are unlimited. Plain data, so that it can be kept across a reload. */
export interface History {
  readonly document: SessionDocument;
  /** Oldest first. */
  readonly past: readonly Change[];
  /** What was undone, the next to be redone last. */
  readonly future: readonly Change[];
}

export const startHistory = (document: SessionDocument): History => ({ document, past: [], future: [] });

/** Makes a change; what had been undone before is forgotten. A change without steps leaves everything as it is. */
export function make(history: History, change: Change): History {
  if (change.steps.length === 0) return history;
  return { document: applyChange(history.document, change), past: [...history.past, change], future: [] };
}

/** Takes the last change back; unchanged when there is none. */
export function undo(history: History): History {
  const last = history.past.at(-1);
  if (!last) return history;
  return { document: applyChange(history.document, inverseOf(last)), past: history.past.slice(0, -1), future: [...history.future, last] };
}

/** Makes the change that was undone last once more; unchanged when there is none. */
export function redo(history: History): History {
  const next = history.future.at(-1);
  if (!next) return history;
  return { document: applyChange(history.document, next), past: [...history.past, next], future: history.future.slice(0, -1) };
}

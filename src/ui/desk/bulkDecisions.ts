import { accept, applyChange, type Change, declare, reject, reopen, type SessionDocument, writeNote } from '../../session/index.ts';
import { words } from '../words.ts';
import { commitChange, pointed } from './decisions.ts';
import type { DeskRow } from './deskRows.ts';
import { desk } from './deskStore.ts';

const { bulk } = words;

/** One change for many rows, taken back by one undo; rows that it does not concern are left out. */
function forAll(
  rows: readonly DeskRow[],
  changeOf: (document: SessionDocument, row: DeskRow) => Change | undefined,
  say: (n: number) => string,
): void {
  let { document } = desk().history;
  const steps: Change['steps'][number][] = [];
  let count = 0;
  for (const row of rows) {
    const change = changeOf(document, row);
    if (!change || change.steps.length === 0) continue;
    document = applyChange(document, change);
    steps.push(...change.steps);
    count++;
  }
  commitChange({ sentence: say(count), steps });
}

export const acceptAll = (rows: readonly DeskRow[]) =>
  forAll(
    rows,
    (document, row) => {
      const name = row.name ?? row.candidates[0];
      return name && accept(document, pointed(row), name);
    },
    bulk.accepted,
  );

export const rejectAll = (rows: readonly DeskRow[]) =>
  forAll(
    rows,
    (document, row) => {
      const name = row.name ?? row.candidates[0];
      return name && reject(document, pointed(row), name);
    },
    bulk.rejected,
  );

export const declareAll = (rows: readonly DeskRow[], decision: 'unidentified' | 'artefact') =>
  forAll(rows, (document, row) => declare(document, pointed(row), decision), bulk[decision]);

export const reopenAll = (rows: readonly DeskRow[]) =>
  forAll(rows, (document, row) => (row.standing === 'open' ? undefined : reopen(document, pointed(row))), bulk.reopened);

export const noteOnAll = (rows: readonly DeskRow[], text: string) =>
  forAll(
    rows,
    (document, row) => writeNote(document, pointed(row), text),
    (n) => bulk.noted(n, text),
  );

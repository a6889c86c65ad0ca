import type { CandidateView } from '../../engine/index.ts';
import {
  accept,
  acceptMany,
  type Change,
  changeSettings,
  declare,
  dropShelved,
  type History,
  make,
  openSource,
  type PointedFeature,
  redo,
  reject,
  reopen,
  type Settings,
  type Source,
  undo,
  writeNote,
} from '../../session/index.ts';
import { words } from '../words.ts';
import { chooseNextOpen, chosenRow } from './chosen.ts';
import { type DeskRow, deskRows } from './deskRows.ts';
import { desk, setDesk } from './deskStore.ts';
import { analyse } from './engineRuns.ts';

/** What a verdict does besides: one on the chosen feature brings up the next open one, unless the user does not want that; one on another row stays. */
export type Then = 'stay' | 'go-on';

/** A row as the document points at it. */
export const pointed = ({ feature }: DeskRow): PointedFeature => ({
  at: feature.at,
  atErr: feature.atErr,
  label: `feature ${feature.number}`,
});
const present = () => desk().history.document;

export function acceptCandidate(row: DeskRow, candidate: CandidateView | undefined, then: Then): void {
  if (!candidate) return;
  commit(accept(present(), pointed(row), candidate));
  if (then === 'go-on') goOn();
}

export function rejectCandidate(row: DeskRow, candidate: CandidateView | undefined): void {
  if (!candidate) return;
  commit(reject(present(), pointed(row), candidate));
  // the next candidate comes up by itself; after the last one there is nothing left to weigh
  if (row.candidates.length === 1 && row === chosenRow()) goOn();
}

export function declareRow(row: DeskRow, decision: 'unidentified' | 'artefact', then: Then): void {
  commit(declare(present(), pointed(row), decision));
  if (then === 'go-on') goOn();
}

function goOn(): void {
  if (!desk().goOn) return;
  if (!chooseNextOpen()) setDesk({ status: `${desk().status}; ${words.case.allDecided}` });
}

export const reopenRow = (row: DeskRow) => commit(reopen(present(), pointed(row)));
export const noteOn = (row: DeskRow, text: string) => commit(writeNote(present(), pointed(row), text));

/** Accepts the name in force of many open features as one change. */
export function acceptNames(rows: readonly DeskRow[]): void {
  const pairs = rows.flatMap((row) => (row.name ? [{ feature: pointed(row), name: row.name }] : []));
  commit(acceptMany(present(), pairs, words.table.acceptedMany(pairs.length)));
}

/** Changes some settings; `sentence` goes into the history. */
export function set(change: (settings: Settings) => Settings, sentence: string): void {
  const document = present();
  const { reading, measure, naming, ...rest } = change(document.settings);
  const settings = { reading: chosenOnly(reading), measure: chosenOnly(measure), naming: chosenOnly(naming), ...chosenOnly(rest) };
  commit(changeSettings(document, settings, sentence));
}

/** Without the fields that are left to the program: an undefined one would hide the engine's default. */
function chosenOnly<T extends object>(choices: T): T {
  const kept = { ...choices };
  for (const key of Object.keys(kept) as (keyof T)[]) if (kept[key] === undefined) delete kept[key];
  return kept;
}

/** Puts a spectrum of the shelf back on the desk. */
export const goToSpectrum = (source: Source) => commit(openSource(present(), source));
/** Closes a spectrum of the shelf. */
export const closeSpectrum = (source: Source) => commit(dropShelved(present(), source));

export const undoLast = () => step(undo, desk().history.past.at(-1), (sentence) => `took back: ${sentence}`);
export const redoNext = () => step(redo, desk().history.future.at(-1), (sentence) => `did again: ${sentence}`);

/** Takes back or does again until `count` changes stand: one analysis for all. */
export function goBackTo(count: number): void {
  let { history } = desk();
  while (history.past.length > count) history = undo(history);
  while (history.past.length < count && history.future.length > 0) history = redo(history);
  follow(history, `went back to: ${history.past.at(-1)?.sentence ?? 'the beginning'}`);
}

/** Makes a change that is described elsewhere. */
export const commitChange = (change: Change) => commit(change);

function commit(change: Change): void {
  if (change.steps.length === 0) return;
  follow(make(desk().history, change), change.sentence);
}

function step(move: (history: History) => History, change: Change | undefined, say: (sentence: string) => string): void {
  if (change) follow(move(desk().history), say(change.sentence));
}

/** Shows the new document at once as far as that needs no computing, then has it analysed. */
function follow(history: History, status: string): void {
  const { analysis, history: before } = desk();
  const sameSource = history.document.source === before.document.source;
  const rows = analysis && sameSource ? deskRows(analysis, history.document.verdicts) : desk().rows;
  setDesk({ history, rows, status });
  void analyse();
}

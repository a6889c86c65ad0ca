import type { Place, Remark } from '../problems/index.ts';
import type { Fact, Offer } from './reading.ts';

/** What is noted down while a file is read; the reading carries it on. */
export interface Notes {
  readonly file: string;
  readonly how: Fact[];
  readonly remarks: Remark[];
  readonly offers: NotedOffer[];
}

/** An offer; `adds` = its choices come on top of those of the reading, otherwise they stand alone. */
export interface NotedOffer extends Offer {
  readonly adds?: boolean;
}

export const newNotes = (file: string): Notes => ({ file, how: [], remarks: [], offers: [] });

/** Adds a fact of how the file was read. */
export function noteFact(notes: Notes, fact: string, value: string, reason: string): void {
  notes.how.push({ fact, value, reason });
}

interface Aside {
  readonly expected?: string;
  readonly doThis?: string;
  readonly where?: Place;
}

/** A small thing the user may want to know. */
export function note(notes: Notes, code: string, found: string, aside: Aside = {}): void {
  notes.remarks.push(remark(notes, code, found, 'note', aside));
}

/** An assumption or repair that may change results. */
export function warn(notes: Notes, code: string, found: string, aside: Aside = {}): void {
  notes.remarks.push(remark(notes, code, found, 'warning', aside));
}

function remark(notes: Notes, code: string, found: string, weight: Remark['weight'], aside: Aside): Remark {
  const { expected, doThis, where } = aside;
  return { code, where: { file: notes.file, ...where }, found, weight, ...(expected ? { expected } : {}), ...(doThis ? { doThis } : {}) };
}

/** "1 sample", "12 samples". */
export const count = (n: number, noun: string): string => `${n} ${noun}${n === 1 ? '' : 's'}`;

/** At most 120 printable characters of the user's material, for a place. */
export const excerpt = (text: string): string => printable(text).slice(0, 120);

// control characters would garble a terminal or a table
const printable = (text: string) =>
  Array.from(text, (c) => (c < ' ' || c === '\u007f' ? ' ' : c))
    .join('')
    .trim();

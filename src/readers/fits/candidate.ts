import type { Notes } from '../notes.ts';
import type { ByteSource, Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import type { Hdu } from './hdus.ts';

/** All units of an open file. */
export interface FitsFile {
  readonly source: ByteSource;
  readonly hdus: readonly Hdu[];
  readonly notes: Notes;
}

/** A unit that can be read as a spectrum. */
export interface Candidate {
  readonly hdu: Hdu;
  /** "HDU 4 (B1-00003238): table, 2014 samples". */
  readonly label: string;
  /** Higher = likelier what the user wants; below 0 = only on request. */
  readonly merit: number;
  /** Why it would be taken. */
  readonly reason: string;
  read(choices: ReadingChoices, control: ReadingControl): Promise<Reading>;
}

/** Either a candidate, or why the unit is none. */
export type Judged = { readonly candidate: Candidate } | { readonly whyNot: string };

import type { NamingSettings } from '../identify/index.ts';
import type { MeasureSettings } from '../measure/index.ts';
import type { GasSettings } from '../plasma/index.ts';
import type { ReadingChoices } from '../readers/index.ts';
import type { TableDesign } from '../report/index.ts';

/** Choices of the user; what is absent is left to the engine's defaults and to what the file says. */
export interface Settings {
  readonly reading: ReadingChoices;
  readonly measure: Partial<MeasureSettings>;
  readonly naming: Partial<NamingSettings>;
  /** Absent = all left to the program. */
  readonly gas?: Partial<GasSettings>;
  /** How the paper's table is printed and what its methods paragraph says. */
  readonly paper?: PaperSettings;
  /** Lines the user adds to the bundled list: the CSV as it was read, so that it can be read again by another release. */
  readonly ownLines?: OwnLines;
}

/** Choices for the paper; what is absent is left to the program. */
export interface PaperSettings {
  readonly design?: TableDesign;
  /** The methods paragraph as its authors edited it. */
  readonly methods?: string;
}

export interface OwnLines {
  /** File name, for the table's sources. */
  readonly name: string;
  readonly text: string;
}

/** The file the document is about: its bytes are not part of the document. */
export interface Source {
  readonly kind: 'spectrum' | 'line-list';
  readonly name: string;
  /** Bytes. */
  readonly size: number;
  /** SHA-256 of the bytes, hex; absent in documents of the first version, which knew a source by its name and size. */
  readonly sha256?: string;
}

/** A transition in a form that survives a new edition of the line list: ion and vacuum wavelength, `O III 5008.240`. */
export type LineKey = string;

export type Decision = 'accepted' | 'rejected' | 'unidentified' | 'artefact';

/** What the user decided on a feature; a feature without one is open. */
export interface Verdict {
  /** Where the feature stood when the verdict was given, vacuum Angstrom, and how well it was known (one sigma): this finds it again after a refit. */
  readonly at: number;
  readonly atErr: number;
  /** Absent while there is only a note. */
  readonly decision?: Decision;
  /** The accepted transition, or the parts of an accepted blend. */
  readonly accepted?: readonly LineKey[];
  /** Names turned down so far, each a transition or the parts of a blend. */
  readonly turnedDown?: readonly (readonly LineKey[])[];
  readonly note?: string;
}

/** All that is stored: where the light came from, what was set, what was decided. Everything else is derived. */
export interface SessionDocument {
  readonly source?: Source;
  readonly settings: Settings;
  /** Ascending `at`. */
  readonly verdicts: readonly Verdict[];
  /** Other spectra of the session, each as it was left; absent when there is none. */
  readonly shelf?: readonly Shelved[];
}

/** A source that is not on the desk now, with its own settings and verdicts. */
export interface Shelved {
  readonly source: Source;
  readonly settings: Settings;
  readonly verdicts: readonly Verdict[];
}

/** Whether two sources are the same file under the same name: by their hashes where both are known, else by size. */
export const sameSource = (a: Source, b: Source) => a.kind === b.kind && a.name === b.name && sameBytes(a, b);

/** Whether two sources hold the same bytes, whatever their names: by their hashes where both are known, else as far as the size tells. */
export const sameBytes = (a: Pick<Source, 'size' | 'sha256'>, b: Pick<Source, 'size' | 'sha256'>) =>
  a.sha256 !== undefined && b.sha256 !== undefined ? a.sha256 === b.sha256 : a.size === b.size;

export const EMPTY_DOCUMENT: SessionDocument = { settings: { reading: {}, measure: {}, naming: {} }, verdicts: [] };

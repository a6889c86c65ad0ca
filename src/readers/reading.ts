import type { Remark } from '../problems/index.ts';
import type { Medium, Spectrum } from '../spectrum/index.ts';

/** Bytes read by slices, so that a huge file costs only what is looked at: a Blob in the browser, a file handle in the terminal. */
export interface ByteSource {
  readonly name: string;
  /** Bytes. */
  readonly size: number;
  /** Bytes [start, end), shorter only at the end of the file. */
  read(start: number, end: number): Promise<Uint8Array>;
}

/** A readable fact of how a file was read: `fact` names it, `value` says it, `reason` where it comes from. */
export interface Fact {
  readonly fact: string;
  readonly value: string;
  readonly reason: string;
}

/** What the user chose about how a file is to be read; absent = the reader proposes. All of it can be stored and undone. */
export interface ReadingChoices {
  /** FITS header-data unit, 0 = primary. */
  readonly hdu?: number;
  /** Row of a table of spectra, or of an image with one spectrum a row, from 1. */
  readonly row?: number;
  /** Order of a multi-order spectrum, or band of a stack, from 1. */
  readonly order?: number;
  /** Names of columns, or their numbers from 1 as text. */
  readonly wavelengthColumn?: string;
  readonly fluxColumn?: string;
  /** A column name, or 'none'. */
  readonly errorColumn?: string;
  /** What `errorColumn` holds, where its name does not tell. */
  readonly errorMeaning?: 'sigma' | 'variance' | 'ivar' | 'relative';
  /** A column name, or 'none'. */
  readonly maskColumn?: string;
  /** Which values of `maskColumn` mark samples that must not be used. */
  readonly maskMeaning?: 'nonzero-bad' | 'zero-bad';
  /** Of the stored numbers; the longer names serve frequencies, energies, wavenumbers and logarithms. */
  readonly wavelengthUnit?: 'Angstrom' | 'nm' | 'um' | 'mm' | 'cm' | 'm' | 'Hz' | 'GHz' | 'THz' | 'eV' | 'keV' | 'cm-1' | 'log10 Angstrom';
  readonly medium?: Medium;
  /** Band of a stack that also has orders, from 1. */
  readonly band?: number;
  /** All rows or orders in one spectrum, cut at the middle of each overlap. */
  readonly merge?: boolean;
  /** A flux that stands for "no measurement", e.g. -999. */
  readonly missingValue?: number;
  /** Velocity in km/s to correct the wavelengths by: each is multiplied by 1 + v/c. Absent = wavelengths as stored. */
  readonly velocityCorrectionKms?: number;
}

/** A choice the file offers besides the one taken: another HDU, row, order or column. */
export interface Offer {
  /** Readable: "HDU 4: exposure B1, 2014 samples". */
  readonly label: string;
  readonly choices: ReadingChoices;
}

/** A spectrum and how it came about. */
export interface Reading {
  readonly spectrum: Spectrum;
  /** False when neither file nor user says air or vacuum: `spectrum.medium` is then an assumption (a remark says which and why) and the user is asked. */
  readonly mediumStated: boolean;
  /** Readable facts in order: format, HDU, columns, units, medium, frame; `fact` names it, `value` says it, `reason` where it comes from. */
  readonly how: readonly Fact[];
  readonly offers: readonly Offer[];
  readonly remarks: readonly Remark[];
  /** Columns the user can choose from; absent when the file has none. */
  readonly columns?: readonly { readonly name: string; readonly unit: string; readonly role: string }[];
  /** Frame the wavelengths are in, where the file says it: FITS SPECSYS or words like "rest frame". */
  readonly frame?: string;
  /** The choices that would give this reading again. */
  readonly choices: ReadingChoices;
}

/** Progress of a long read: share done in [0, 1]. */
export interface ReadingControl {
  readonly progress?: (share: number) => void;
  readonly signal?: AbortSignal;
}

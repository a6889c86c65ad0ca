import type { MECHANISMS, NATURES, StrengthBasis } from '../bundleFormat.ts';

/** An ion row of the tables with what its strengths assume. */
export interface IonEntry {
  readonly name: string;
  readonly element: string;
  readonly charge: number;
  readonly creationEv: number;
  readonly ionizationEv: number;
  /** N(ion)/N(H) of the reference nebula; 0 for carriers of sky lines. */
  readonly abundance: number;
}

/** A level of any family; the levels of the n-level atoms come first, ion by ion, ground first. */
export interface LevelEntry {
  /** Index into the ions. */
  readonly ion: number;
  readonly configuration: string;
  readonly term: string;
  /** `2`, `3/2`, or `0 1 2` where unresolved components are one row; empty for whole shells. */
  readonly j: string;
  /** cm^-1; NaN when only the label is known. */
  readonly energyCm1: number;
  readonly energyErrCm1: number;
  /** Index in the ion's n-level atom, -1 outside. */
  readonly modelLevel: number;
  /** Index of the level row this one is the same level as (itself, or the n-level atom's). */
  readonly canonical: number;
  readonly source: string;
}

export interface LineEntry {
  readonly ion: number;
  /** Indices into the levels; -1 for lines without level labels. */
  readonly lower: number;
  readonly upper: number;
  /** Vacuum Angstrom where it differs from the Ritz value; NaN = Ritz. */
  readonly givenVac: number;
  readonly wavelengthErr: number;
  readonly wavelengthSource: string;
  readonly a: number;
  /** Accuracy of the A value in words, empty when nothing is known of it. */
  readonly aNote: string;
  /** Multiplet number of Moore's tables, empty when unknown. */
  readonly moore: string;
  readonly nature: (typeof NATURES)[number];
  /** H beta = 100; NaN = unknown. */
  readonly strength: number;
  readonly strengthErrDex: number;
  readonly mechanism: (typeof MECHANISMS)[number];
  readonly basis: StrengthBasis;
  readonly strengthSource: string;
  readonly source: string;
  /** Trade name or sky transition, empty when none. */
  readonly name: string;
}

export interface Assembly {
  readonly ions: IonEntry[];
  readonly levels: LevelEntry[];
  readonly lines: LineEntry[];
}

/** Vacuum wavelength by the Ritz principle, Angstrom; NaN where a level's energy is unknown. */
export function ritzWavelength(lower: LevelEntry, upper: LevelEntry): number {
  return 1e8 / (upper.energyCm1 - lower.energyCm1);
}

/** J as a number from `3/2`. */
export function jOf(level: LevelEntry): number {
  const [top, bottom] = level.j.split('/').map(Number);
  return top / (bottom ?? 1);
}

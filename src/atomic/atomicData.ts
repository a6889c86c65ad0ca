import type { StrengthBasis } from './bundleFormat.ts';
import type { CaseBTable } from './caseB.ts';
import type { LevelModel } from './levelModel.ts';
import type { LineList } from './lineList.ts';

/** A stretch of the observer's spectrum that the atmosphere absorbs or fills with a broad glow, or where lamps shine broadly. */
export interface SkyBand {
  readonly kind: 'telluric' | 'emission' | 'lamp';
  /** `O2`, `H2O`; `mixed` where a mask names no carrier. */
  readonly species: string;
  /** Vacuum Angstrom, observer's frame. */
  readonly lowVac: number;
  readonly highVac: number;
  readonly note: string;
}

/** The bundled atomic data, opened. Every `line` is an index into `lines`; unknown texts are empty. */
export interface AtomicData {
  /** Schema of the bundle and the first digits of `inputsHash`. */
  readonly version: string;
  /** SHA-256 of the tables the bundle was compiled from, hex. */
  readonly inputsHash: string;
  readonly lines: LineList;
  /** Ions with an n-level atom, in order of atomic number and charge. */
  readonly modelIons: readonly string[];
  /** n-level atom of an ion (`O III`), undefined when there is none; built at the first call. */
  readonly levelModel: (ion: string) => LevelModel | undefined;
  /** N(ion)/N(H) assumed in the strengths, per ion of `lines.ions`: solar (Asplund et al. 2009) x depletion x ion fraction; 0 for sky carriers. */
  readonly referenceAbundance: Float32Array;
  /** Lower - upper term as text, with the multiplet number of Moore's tables where remembered: `3s 4P - 3p 4Do (1)`. */
  readonly multipletName: (line: number) => string;
  /** Configuration, term and J: `2p2 1D 2`. */
  readonly lowerLabel: (line: number) => string;
  readonly upperLabel: (line: number) => string;
  /** cm^-1; NaN when unknown. */
  readonly lowerEnergyCm1: (line: number) => number;
  readonly upperEnergyCm1: (line: number) => number;
  /** Permitted and down to the ground term (lower level below 1100 cm^-1): its photons are easily trapped, and cold gas absorbs it. */
  readonly isResonance: (line: number) => boolean;
  /** Trade name (`Lyman alpha`) or sky transition. */
  readonly lineName: (line: number) => string;
  /** Vacuum Angstrom from the level energies alone; NaN where a level's energy is unknown. */
  readonly ritzVac: (line: number) => number;
  /** How `lines.wavelengthVac` was made: the Ritz principle or a citation. */
  readonly wavelengthNote: (line: number) => string;
  readonly strengthBasis: (line: number) => StrengthBasis;
  /** How the strength was made, with its citation. */
  readonly strengthNote: (line: number) => string;
  /** What is known of the accuracy of `lines.aValue`; empty when nothing. */
  readonly aNote: (line: number) => string;
  /** Citations of the line's levels and A value. */
  readonly lineSources: (line: number) => readonly string[];
  /** Case-B intensities of H I and He II, for `caseBIntensity`. */
  readonly caseB: CaseBTable;
  /** Line of H I or He II by principal quantum numbers; -1 when the list has none. */
  readonly hydrogenicLine: (ion: string, nLower: number, nUpper: number) => number;
  /** Telluric bands and broad glows, ascending start. */
  readonly skyBands: readonly SkyBand[];
}

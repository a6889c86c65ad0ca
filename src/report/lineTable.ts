/** One feature of the finished table; every quantity in the unit its column states, absent = unknown (printed blank). */
export interface LineRow {
  /** Number of the feature, from 1, ascending wavelength; the same on screen and in every file. */
  readonly feature: number;
  /** Angstrom, in the medium of the table. */
  readonly wavelengthObs: number;
  readonly wavelengthObsErr?: number;
  /** Observed wavelength taken to the rest frame of the object, Angstrom, same medium. */
  readonly wavelengthRestObs?: number;
  /** Flux unit times Angstrom. */
  readonly flux: number;
  readonly fluxErr?: number;
  /** Observed, Angstrom. */
  readonly fwhm?: number;
  readonly fwhmErr?: number;
  readonly fwhmKms?: number;
  /** Angstrom, positive in emission. */
  readonly ew?: number;
  readonly ewErr?: number;
  readonly snr?: number;
  /** With the trade's brackets: `[O III]`; the parts of a blend joined by `+`. Absent = no name. */
  readonly ion?: string;
  /** Laboratory wavelength, Angstrom, in the medium of the table; parts of a blend in the order of `ion`. */
  readonly wavelengthLab?: readonly number[];
  readonly lower?: string;
  readonly upper?: string;
  readonly nature?: 'permitted' | 'intercombination' | 'forbidden' | 'sky';
  /** km/s, optical convention. */
  readonly velocity?: number;
  readonly velocityErr?: number;
  readonly probability?: number;
  /** True when the upper level is metastable: the line needs low density to exist. */
  readonly thinGas?: boolean;
  readonly lifetimeS?: number;
  /** cm^-3 at the table's electron temperature. */
  readonly nCrit?: number;
  /** H beta = 100. */
  readonly fluxHbeta100?: number;
  readonly fluxHbeta100Err?: number;
  /** Corrected for reddening, H beta = 100. */
  readonly intensityHbeta100?: number;
  readonly intensityHbeta100Err?: number;
  /** Best first, at most five. */
  readonly alternatives: readonly { readonly ion: string; readonly wavelengthLab: readonly number[]; readonly probability: number }[];
  readonly verdict: 'open' | 'accepted' | 'rejected' | 'unidentified' | 'artefact';
  /** The measuring took it for a fault of the data, not for light of the object. */
  readonly artefact: boolean;
  readonly note: string;
}

/** The finished line table: all that a writer may see. */
export interface LineTable {
  /** Name of the source file or object. */
  readonly title: string;
  readonly medium: 'air' | 'vacuum';
  readonly mediumStated: boolean;
  readonly fluxUnit: string;
  readonly z: number;
  readonly zErr: number;
  /** K; lifetimes do not depend on it, critical densities do. */
  readonly te: number;
  readonly resolvingPower?: number;
  /** Edition of the bundled line list. */
  readonly atomicVersion: string;
  /** SHA-256 of the source file's bytes, hex. */
  readonly sha256: string;
  readonly rows: readonly LineRow[];
}

/** The rows that belong into a paper: accepted names and, when asked, unidentified lines. */
export function acceptedRows(table: LineTable): LineTable {
  return { ...table, rows: table.rows.filter((row) => row.verdict === 'accepted' || row.verdict === 'unidentified') };
}

/** The table without what the measuring took for faults of the data, unless the user has accepted a name for it. */
export function withoutArtefacts(table: LineTable): LineTable {
  return { ...table, rows: table.rows.filter((row) => !row.artefact || row.verdict === 'accepted') };
}

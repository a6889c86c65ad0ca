import type { Problem, Remark } from '../../problems/index.ts';
import type { Nature } from '../lineList.ts';

/** A line that the user adds to the list. */
export interface UserLine {
  /** Trade notation without brackets: `O III`. */
  readonly ion: string;
  readonly element: string;
  readonly charge: number;
  /** Vacuum Angstrom. */
  readonly wavelengthVac: number;
  /** One sigma, Angstrom. */
  readonly wavelengthErr: number;
  readonly nature: Extract<Nature, 'permitted' | 'intercombination' | 'forbidden'>;
  /** Flux for H beta = 100 in a nebula like the reference one; absent = not given. */
  readonly strength?: number;
  /** Level labels as given, empty when not. */
  readonly lower: string;
  readonly upper: string;
  /** `lines.csv, row 3`: where it comes from. */
  readonly source: string;
}

/** A list of lines is taken as a whole or not at all: one bad row and none of it is loaded. */
export type UserLinesReading =
  | { readonly ended: 'read'; readonly lines: readonly UserLine[]; readonly remarks: readonly Remark[] }
  | { readonly ended: 'refused'; readonly problems: readonly Problem[] };

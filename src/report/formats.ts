import { csvTable } from './csv.ts';
import type { TableDesign } from './design.ts';
import { ecsvTable } from './ecsv.ts';
import { fitsTable } from './fitsTable.ts';
import { jsonTable } from './json.ts';
import { deluxeTable, latexTable } from './latex.ts';
import type { LineTable } from './lineTable.ts';
import { mrtTable } from './mrt.ts';
import { votableTable } from './votable.ts';

/** One way to write the table. */
export interface TableFormat {
  readonly label: string;
  /** File name ending without the dot. */
  readonly ending: string;
  readonly mediaType: string;
  /** Printed formats follow the design; machine-readable ones hold every column of the rows they are given. */
  readonly write: (table: LineTable, design?: TableDesign) => string | Uint8Array<ArrayBuffer>;
  readonly isPrinted: boolean;
}

/** Every format by the word that chooses it in the terminal. */
export const TABLE_FORMATS = {
  csv: { label: 'CSV', ending: 'csv', mediaType: 'text/csv', write: csvTable, isPrinted: false },
  latex: { label: 'LaTeX (longtable)', ending: 'tex', mediaType: 'application/x-tex', write: latexTable, isPrinted: true },
  deluxetable: {
    label: 'LaTeX (AASTeX deluxetable)',
    ending: 'aas.tex',
    mediaType: 'application/x-tex',
    write: deluxeTable,
    isPrinted: true,
  },
  mrt: { label: 'machine-readable table (CDS, AAS)', ending: 'mrt', mediaType: 'text/plain', write: mrtTable, isPrinted: false },
  votable: { label: 'VOTable', ending: 'vot', mediaType: 'application/x-votable+xml', write: votableTable, isPrinted: false },
  ecsv: { label: 'ECSV', ending: 'ecsv', mediaType: 'text/csv', write: ecsvTable, isPrinted: false },
  fits: { label: 'FITS table', ending: 'fits', mediaType: 'application/fits', write: fitsTable, isPrinted: false },
  json: { label: 'JSON', ending: 'json', mediaType: 'application/json', write: jsonTable, isPrinted: false },
} as const satisfies Record<string, TableFormat>;

export type TableFormatName = keyof typeof TABLE_FORMATS;

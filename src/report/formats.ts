import { csvTable } from './csv.ts';
import { ecsvTable } from './ecsv.ts';
import { jsonTable } from './json.ts';
import { latexTable } from './latex.ts';
import type { LineTable } from './lineTable.ts';
import { mrtTable } from './mrt.ts';
import { votableTable } from './votable.ts';

/** One way to write the table. */
export interface TableFormat {
  readonly label: string;
  /** File name ending without the dot. */
  readonly ending: string;
  readonly mediaType: string;
  readonly write: (table: LineTable) => string;
}

/** Every format by the word that chooses it in the terminal. */
export const TABLE_FORMATS = {
  csv: { label: 'CSV', ending: 'csv', mediaType: 'text/csv', write: csvTable },
  latex: { label: 'LaTeX', ending: 'tex', mediaType: 'application/x-tex', write: latexTable },
  mrt: { label: 'machine-readable table (CDS, AAS)', ending: 'mrt', mediaType: 'text/plain', write: mrtTable },
  votable: { label: 'VOTable', ending: 'vot', mediaType: 'application/x-votable+xml', write: votableTable },
  ecsv: { label: 'ECSV', ending: 'ecsv', mediaType: 'text/csv', write: ecsvTable },
  json: { label: 'JSON', ending: 'json', mediaType: 'application/json', write: jsonTable },
} as const satisfies Record<string, TableFormat>;

export type TableFormatName = keyof typeof TABLE_FORMATS;

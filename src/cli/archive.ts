import type { Analysis } from '../engine/index.ts';
import { paperFiles, type References, type TableDesign, zipArchive } from '../report/index.ts';
import { readShipped } from './files.ts';

/** Widest and tallest that a page of a journal holds. */
const FIGURES = { width: 'double', panels: 4 } as const;

/** Table in every format, figures, methods, references and provenance of one analysis as a ZIP. */
export function archiveOf(analysis: Analysis, design: TableDesign): Uint8Array {
  const { table, methods, samples, gas } = analysis;
  const references = JSON.parse(new TextDecoder().decode(readShipped('references.json'))) as References;
  return zipArchive(paperFiles({ table, design, methods, references, ...(samples ? { samples } : {}), gas, figures: FIGURES, fits: [] }));
}

import type { Analysis } from '../engine/index.ts';
import { paperFiles, type References, type TableDesign, zipArchive } from '../report/index.ts';
import { EMPTY_DOCUMENT, type Settings, startHistory, writeSession } from '../session/index.ts';
import { readShipped } from './files.ts';

/** Widest and tallest that a page of a journal holds. */
const FIGURES = { width: 'double', panels: 4 } as const;

/**
 * Table in every format, figures, methods, references, provenance and session of one analysis as a ZIP. It bears no date: the same spectrum and options give the same
 * bytes.
 *
 * @param size of the source, bytes
 */
export function archiveOf(analysis: Analysis, design: TableDesign, settings: Settings, size: number): Uint8Array {
  const { reading, table, methods, samples, gas } = analysis;
  const references = JSON.parse(new TextDecoder().decode(readShipped('references.json'))) as References;
  const source = { kind: reading.kind, name: reading.name, size, sha256: table.sha256 };
  const session = writeSession(startHistory({ ...EMPTY_DOCUMENT, source, settings: { ...settings, paper: { design } } }));
  return zipArchive(
    paperFiles({ table, design, methods, references, ...(samples ? { samples } : {}), gas, figures: FIGURES, fits: [], session }),
  );
}

import { ProblemError, wordProblem } from '../../problems/index.ts';
import { acceptedRows, DEFAULT_DESIGN, TABLE_FORMATS, type TableFormatName } from '../../report/index.ts';
import { readSession, writeSession } from '../../session/index.ts';
import { tsvTable } from '../table/tsvTable.ts';
import { words } from '../words.ts';
import type { DeskRow } from './deskRows.ts';
import { desk, raiseAlert, setDesk } from './deskStore.ts';
import { analyse, openFile, settled } from './engineRuns.ts';

const SESSION_ENDING = 'linewright.json';
/** The made-up objects that come with the program; each is fetched when it is asked for. */
export const SAMPLES = ['lantern-nebula.csv', 'heron-marsh.csv', 'kiln-nebula.csv', 'ember-veil.csv', 'dunlin-galaxy.csv'] as const;

export async function openSample(sample: (typeof SAMPLES)[number]): Promise<void> {
  const response = await fetch(new URL(`samples/${sample}`, document.baseURI));
  if (!response.ok) return raiseAlert(`${sample}: ${response.status} ${response.statusText}`);
  await openFile(await response.blob(), sample);
}

/** Opens files one after the other; the last one stays on the desk, the others stand on the shelf. */
export async function openAll(files: readonly File[]): Promise<void> {
  for (const file of files) await openAny(file);
}

/** Any file the user hands over: a session by its ending, else a spectrum or a list. */
async function openAny(file: File): Promise<void> {
  if (file.name.endsWith(`.${SESSION_ENDING}`)) await openSession(file);
  else await openFile(file, file.name);
}

async function openSession(file: File): Promise<void> {
  try {
    const history = readSession(await file.text(), file.name);
    setDesk({ history, chosenAt: undefined, range: undefined });
    await analyse();
  } catch (error) {
    if (!(error instanceof ProblemError)) throw error;
    raiseAlert(wordProblem(error.problem));
  }
}

export function saveSession(): void {
  download(`${stem()}.${SESSION_ENDING}`, writeSession(desk().history), 'application/json');
}

/** Saves the table of the analysis that belongs to the document; waits for a run that is going on. */
export async function saveTable(name: TableFormatName): Promise<void> {
  const table = await tableToExport();
  const format = TABLE_FORMATS[name];
  const design = desk().history.document.settings.paper?.design ?? DEFAULT_DESIGN;
  // the menu says which lines: the design chooses only how they are printed
  if (table) download(`${stem()}-lines.${format.ending}`, format.write(table, { ...design, rows: 'all' }), format.mediaType);
}

/** The rows that would be saved, as tab-separated text on the clipboard. */
export async function copyTable(): Promise<void> {
  const table = await tableToExport();
  if (!table) return;
  await navigator.clipboard.writeText(tsvTable(table));
  setDesk({ status: words.export.copied });
}

/** These rows, as tab-separated text on the clipboard. */
export async function copyRows(rows: readonly DeskRow[]): Promise<void> {
  await settled();
  const { analysis } = desk();
  const numbers = new Set(rows.map((row) => row.feature.number));
  if (!analysis || numbers.size === 0) return;
  const table = { ...analysis.table, rows: analysis.table.rows.filter((row) => numbers.has(row.feature)) };
  await navigator.clipboard.writeText(tsvTable(table));
  setDesk({ status: words.bulk.copied(table.rows.length) });
}

async function tableToExport() {
  await settled();
  const { analysis, exportAll } = desk();
  if (!analysis) return undefined;
  const table = exportAll ? analysis.table : acceptedRows(analysis.table);
  if (table.rows.length > 0) return table;
  raiseAlert(words.export.noneAccepted);
  return undefined;
}

export const stem = () => (desk().history.document.source?.name ?? 'lines').replace(/\.[^.]+$/, '');

/** Hands a file to the user. */
export function download(name: string, content: string | Uint8Array<ArrayBuffer> | Blob, mediaType: string): void {
  const link = document.createElement('a');
  link.href = URL.createObjectURL(new Blob([content], { type: mediaType }));
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
  setDesk({ status: words.export.saved(name) });
}

import {
  designedRows,
  type Figure,
  knownDesign,
  paperFigures,
  paperFiles,
  provenanceJson,
  TABLE_FORMATS,
  type TableFormatName,
  withResolution,
  zipArchive,
} from '../../report/index.ts';
import { desk, raiseAlert, setDesk } from '../desk/deskStore.ts';
import { settled } from '../desk/engineRuns.ts';
import { download, stem } from '../desk/files.ts';
import { words } from '../words.ts';
import { paperMaterial } from './paperMaterial.ts';

const DOTS_PER_MM = 300 / 25.4;

/** Saves the table by its design in one format. */
export async function saveDesigned(name: TableFormatName): Promise<void> {
  await settled();
  const { analysis, history } = desk();
  if (!analysis) return;
  const design = knownDesign(history.document.settings.paper?.design);
  const table = designedRows(analysis.table, design);
  if (table.rows.length === 0) return raiseAlert(words.paper.noRows);
  const format = TABLE_FORMATS[name];
  download(`${stem()}-lines.${format.ending}`, format.write(table, design), format.mediaType);
}

/** Saves a figure as SVG, or as PNG of 300 dots an inch at its printed size. */
export async function saveFigure(figure: Figure, as: 'svg' | 'png'): Promise<void> {
  if (as === 'svg') return download(`${stem()}-${figure.name}.svg`, figure.svg, 'image/svg+xml');
  download(`${stem()}-${figure.name}.png`, await pngOf(figure), 'image/png');
}

/** The figure as pixels, with its printed size. */
async function pngOf({ svg, widthMm, heightMm }: Figure): Promise<Uint8Array<ArrayBuffer>> {
  const image = new Image();
  image.src = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml' }));
  await image.decode();
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(widthMm * DOTS_PER_MM);
  canvas.height = Math.round(heightMm * DOTS_PER_MM);
  canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height);
  URL.revokeObjectURL(image.src);
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
  if (!blob) throw new Error(`the browser could not draw ${widthMm} x ${heightMm} mm`);
  return withResolution(new Uint8Array(await blob.arrayBuffer()), DOTS_PER_MM);
}

/** Saves everything for the paper as one ZIP archive, each figure as SVG and as PNG. */
export async function saveArchive(): Promise<void> {
  await settled();
  const material = await paperMaterial();
  if (!material) return;
  setDesk({ status: words.paper.making });
  const more: Record<string, Uint8Array> = {};
  for (const figure of paperFigures(material)) more[`figures/${figure.name}.png`] = await pngOf(figure);
  download(`${stem()}-paper.zip`, zipArchive(paperFiles({ ...material, more })), 'application/zip');
}

export async function saveProvenance(): Promise<void> {
  await settled();
  const { analysis } = desk();
  if (analysis) download(`${stem()}-provenance.json`, provenanceJson(analysis.methods, new Date().toISOString()), 'application/json');
}

import { gasCsv } from '../../report/index.ts';
import { desk } from '../desk/deskStore.ts';
import { download, stem } from '../desk/files.ts';
import type { Figure } from './figure.ts';
import { figureSvg } from './figureSvg.ts';

/** Pixels of the PNG a pixel of the page: fit for print at the width of a column. */
const PNG_SCALE = 4;

export function saveSvg(name: string, figure: Figure): void {
  download(`${stem()}-${name}.svg`, figureSvg(figure), 'image/svg+xml');
}

/** The same picture as pixels, by way of a canvas. */
export async function savePng(name: string, figure: Figure): Promise<void> {
  const image = new Image();
  image.src = URL.createObjectURL(new Blob([figureSvg(figure)], { type: 'image/svg+xml' }));
  await image.decode();
  const canvas = document.createElement('canvas');
  canvas.width = figure.width * PNG_SCALE;
  canvas.height = figure.height * PNG_SCALE;
  canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height);
  URL.revokeObjectURL(image.src);
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
  if (blob) download(`${stem()}-${name}.png`, blob, 'image/png');
}

/** All numbers about the gas. */
export function saveGasCsv(): void {
  const { analysis } = desk();
  if (analysis) download(`${stem()}-gas.csv`, gasCsv(analysis.gas), 'text/csv');
}

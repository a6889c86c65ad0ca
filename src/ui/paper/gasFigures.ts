import type { Gas } from '../../plasma/index.ts';
import { type ArchiveFiles, gasCsv, textAt } from '../../report/index.ts';
import { bandsFigure } from '../gas/bandsFigure.ts';
import type { Figure, InkName, Shape } from '../gas/figure.ts';
import { ladderFigure } from '../gas/ladderFigure.ts';
import { reddeningFigure } from '../gas/reddeningFigure.ts';

/** Greys of a printed figure. */
const GREYS: Record<InkName, string> = {
  ink: '#000',
  muted: '#333',
  faint: '#888',
  hairline: '#ddd',
  fit: '#000',
  accent: '#000',
  band: '#eee',
  surface: '#fff',
};
const TEXT_PX = 11;
/** Width of the drawing; a journal scales it to a column. */
const WIDTH_PX = 520;
const COLUMN_MM = 88;

/** Figures and numbers of the gas for the archive, in black and grey, their text as outlines. */
export function gasFigureFiles(gas: Gas): ArchiveFiles {
  const files: Record<string, string> = { 'tables/gas.csv': gasCsv(gas) };
  if (gas.ladder.rungs.length > 0) files['figures/density-ladder.svg'] = printed(ladderFigure(gas.ladder, WIDTH_PX, undefined));
  if (gas.bands.length > 0) files['figures/te-ne.svg'] = printed(bandsFigure(gas, WIDTH_PX));
  if (gas.reddening.lines.length > 0) files['figures/reddening.svg'] = printed(reddeningFigure(gas.reddening, WIDTH_PX));
  return files;
}

function printed({ width, height, title, shapes }: Figure): string {
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${COLUMN_MM}mm" height="${((COLUMN_MM * height) / width).toFixed(2)}mm" viewBox="0 0 ${width} ${height}">`,
    `<title>${title.replaceAll('&', '&amp;').replaceAll('<', '&lt;')}</title>`,
    `<rect width="${width}" height="${height}" fill="#fff"/>`,
    ...shapes.map(shapeSvg),
    '</svg>',
    '',
  ].join('\n');
}

function shapeSvg(shape: Shape): string {
  const colour = GREYS[shape.ink ?? 'muted'];
  switch (shape.draw) {
    case 'path':
      return `<path d="${shape.d}" fill="none" stroke="${colour}" stroke-width="${shape.width ?? 1}"${shape.dash ? ` stroke-dasharray="${shape.dash}"` : ''}/>`;
    case 'area':
      return `<path d="${shape.d}" fill="${colour}" fill-opacity="${shape.share}"/>`;
    case 'dot':
      return `<circle cx="${shape.x.toFixed(1)}" cy="${shape.y.toFixed(1)}" r="${shape.r}" fill="${shape.filled ? colour : '#fff'}" stroke="${colour}"/>`;
    case 'text':
      return `<g fill="${colour}">${textAt(plainPowers(shape.text), shape.x, shape.y, TEXT_PX, shape.anchor ?? 'start', shape.turned ? -90 : 0)}</g>`;
  }
}

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Raised digits of the page as raised pieces of the outlines. */
function plainPowers(text: string) {
  return text
    .split(/([⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+)/)
    .map((part, k) => (k % 2 === 1 ? { sup: [...part].map((c) => (c === '⁻' ? '−' : String(RAISED.indexOf(c)))).join('') } : part));
}

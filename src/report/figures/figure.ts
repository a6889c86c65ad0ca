import { fixed } from './svgText.ts';

/** A finished figure, as SVG whose text is outlines. */
export interface Figure {
  readonly name: string;
  readonly svg: string;
  readonly widthMm: number;
  readonly heightMm: number;
}

/** Widths that journals print, mm (common practice, no source). */
export const COLUMN_WIDTHS_MM = { single: 88, double: 180 } as const;
export type ColumnWidth = keyof typeof COLUMN_WIDTHS_MM;

/** An SVG document of a size in mm; the user unit is the point (1/72 inch), so that line widths and text sizes mean what journals ask for. */
export function figureOf(name: string, title: string, widthPt: number, heightPt: number, parts: readonly string[]): Figure {
  const [widthMm, heightMm] = [mmOf(widthPt), mmOf(heightPt)];
  const svg = [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${fixed(widthMm)}mm" height="${fixed(heightMm)}mm" viewBox="0 0 ${fixed(widthPt)} ${fixed(heightPt)}">`,
    `<title>${title.replaceAll('&', '&amp;').replaceAll('<', '&lt;')}</title>`,
    `<rect width="100%" height="100%" fill="#fff"/>`,
    ...parts,
    '</svg>',
    '',
  ].join('\n');
  return { name, svg, widthMm, heightMm };
}

const MM_PER_PT = 25.4 / 72;
export const ptOf = (mm: number) => mm / MM_PER_PT;
const mmOf = (pt: number) => pt * MM_PER_PT;

/** Round steps that divide a range into about `count` parts. */
export function roundTicks(low: number, high: number, count: number): number[] {
  const raw = (high - low) / Math.max(1, count);
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = [1, 2, 5, 10].map((k) => k * power).find((s) => s >= raw) ?? 10 * power;
  const ticks: number[] = [];
  for (let k = Math.ceil(low / step); k * step <= high * (1 + 1e-12); k++) ticks.push(Number((k * step).toPrecision(12)));
  return ticks;
}

/** A broken line through points, each in user units. */
export const pathOf = (points: readonly (readonly [number, number])[]) =>
  points.map(([x, y], k) => `${k === 0 ? 'M' : 'L'}${fixed(x)} ${fixed(y)}`).join('');

export const stroke = (d: string, width: number, colour = '#000', dash = '') =>
  `<path d="${d}" fill="none" stroke="${colour}" stroke-width="${width}" stroke-linejoin="round"${dash ? ` stroke-dasharray="${dash}"` : ''}/>`;

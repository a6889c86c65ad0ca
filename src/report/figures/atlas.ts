import type { InlineText } from '../inline.ts';
import { COLUMN_WIDTHS_MM, type ColumnWidth, type Figure, figureOf, pathOf, ptOf, roundTicks, stroke } from './figure.ts';
import { spreadLabels } from './spreadLabels.ts';
import { fixed, textAt } from './svgText.ts';

/** What an atlas shows; arrays are one value a sample, wavelengths in Angstrom. */
export interface AtlasInput {
  readonly title: string;
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly model: Float64Array;
  readonly masked: Uint8Array;
  /** One sigma of a sample. */
  readonly noise: Float64Array;
  readonly medium: 'air' | 'vacuum';
  readonly fluxUnit: string;
  readonly labels: readonly { readonly at: number; readonly text: InlineText; readonly weight: number }[];
}

export interface AtlasChoices {
  readonly width: ColumnWidth;
  readonly panels: number;
}

const TEXT_PT = 6.5;
const LABEL_PT = 5.5;
const LABEL_SPACING_PT = 6;
const LEFT_PT = 34;
const RIGHT_PT = 6;
const HEAD_PT = 56;
const BODY_PT = 82;
const FOOT_PT = 16;
const LAST_FOOT_PT = 12;
/** The scale is linear up to this many sigma of the noise, logarithmic beyond: faint lines and bright ones in one picture. */
const LINEAR_SIGMA = 12;
/** Columns of ink a point: 300 dots an inch. */
const COLUMNS_PER_PT = 300 / 72;
/** Panels on one page of a journal. */
export const MOST_PANELS = 5;

/** The whole spectrum in panels with the names of its lines, on as many pages as it needs. */
export function atlasFigures(input: AtlasInput, { width, panels }: AtlasChoices): Figure[] {
  const { wavelength } = input;
  const [from, to] = [wavelength[0], wavelength[wavelength.length - 1]];
  const step = (to - from) / panels;
  const ranges = Array.from({ length: panels }, (_, k) => [from + k * step, from + (k + 1) * step] as const);
  const pages: (readonly (readonly [number, number])[])[] = [];
  for (let k = 0; k < ranges.length; k += MOST_PANELS) pages.push(ranges.slice(k, k + MOST_PANELS));
  return pages.map((page, k) => atlasPage(input, page, width, pages.length > 1 ? `atlas-${k + 1}` : 'atlas'));
}

function atlasPage(input: AtlasInput, ranges: readonly (readonly [number, number])[], width: ColumnWidth, name: string): Figure {
  const widthPt = ptOf(COLUMN_WIDTHS_MM[width]);
  const panelPt = HEAD_PT + BODY_PT + FOOT_PT;
  const heightPt = panelPt * ranges.length + LAST_FOOT_PT;
  const parts = ranges.flatMap((range, k) => panel(input, range, k * panelPt, widthPt));
  const axis = `wavelength in ${input.medium === 'air' ? 'air' : 'vacuum'} (Å)`;
  parts.push(textAt(axis, LEFT_PT + (widthPt - LEFT_PT - RIGHT_PT) / 2, heightPt - 4, TEXT_PT, 'middle'));
  parts.push(textAt(`flux${input.fluxUnit ? ` (${input.fluxUnit})` : ''}`, 8, heightPt / 2, TEXT_PT, 'middle', -90));
  return figureOf(name, `${input.title}: atlas of the spectrum`, widthPt, heightPt, parts);
}

function panel(input: AtlasInput, [low, high]: readonly [number, number], top: number, widthPt: number): string[] {
  const right = widthPt - RIGHT_PT;
  const bodyTop = top + HEAD_PT;
  const bodyFoot = bodyTop + BODY_PT;
  const x = (w: number) => LEFT_PT + ((w - low) / (high - low)) * (right - LEFT_PT);
  const { wavelength, flux, model, masked, noise } = input;
  const first = Math.max(
    0,
    wavelength.findIndex((w) => w >= low),
  );
  let last = first;
  while (last + 1 < wavelength.length && wavelength[last + 1] <= high) last++;
  let [least, most] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (let i = first; i <= last; i++) {
    if (masked[i] || !Number.isFinite(flux[i])) continue;
    least = Math.min(least, flux[i]);
    most = Math.max(most, flux[i], model[i]);
  }
  if (!(most > least)) [least, most] = [0, 1];
  const linear = LINEAR_SIGMA * Math.max(noise[(first + last) >> 1] || 0, (most - least) * 1e-4);
  const bent = (f: number) => Math.asinh(f / linear);
  const [yLow, yHigh] = [bent(least) - 0.04 * (bent(most) - bent(least)), bent(most) + 0.03 * (bent(most) - bent(least))];
  const y = (f: number) => bodyFoot - ((bent(f) - yLow) / (yHigh - yLow)) * BODY_PT;
  const columns = (right - LEFT_PT) * COLUMNS_PER_PT;
  const parts = [
    `<rect x="${LEFT_PT}" y="${fixed(bodyTop)}" width="${fixed(right - LEFT_PT)}" height="${BODY_PT}" fill="none" stroke="#000" stroke-width="0.5"/>`,
    stroke(curve(wavelength, flux, masked, first, last, x, y, columns), 0.4),
    stroke(curve(wavelength, model, masked, first, last, x, y, columns), 0.5, '#777', '1.6 1'),
  ];
  for (const tick of roundTicks(low, high, 8)) {
    parts.push(stroke(`M${fixed(x(tick))} ${fixed(bodyFoot)}v-3`, 0.4), textAt(String(tick), x(tick), bodyFoot + 8, TEXT_PT, 'middle'));
  }
  for (const tick of fluxTicks(least, most, linear)) {
    const at = y(tick);
    parts.push(stroke(`M${LEFT_PT} ${fixed(at)}h3`, 0.4), textAt(powerText(tick), LEFT_PT - 3, at + 2.2, TEXT_PT, 'end'));
  }
  const wanted = input.labels
    .filter(({ at }) => at >= low && at <= high)
    .map(({ at, text, weight }) => ({ at: x(at), text, weight, wavelength: at }));
  for (const { label, place } of spreadLabels(wanted, LEFT_PT + LABEL_SPACING_PT / 2, right - 2, LABEL_SPACING_PT)) {
    const peak = y(modelAt(wavelength, model, label.wavelength, first, last));
    const foot = bodyTop - 10;
    parts.push(
      stroke(`M${fixed(place)} ${fixed(foot)}L${fixed(label.at)} ${fixed(bodyTop - 2)}V${fixed(Math.max(bodyTop, peak - 3))}`, 0.3, '#555'),
    );
    parts.push(textAt(label.text, place + LABEL_PT * 0.33, foot - 1.5, LABEL_PT, 'start', -90));
  }
  return parts;
}

/** Extremes of every column of ink: no peak is lost. Gaps stay gaps. */
function curve(
  wavelength: Float64Array,
  values: Float64Array,
  masked: Uint8Array,
  first: number,
  last: number,
  x: (w: number) => number,
  y: (f: number) => number,
  columns: number,
): string {
  const perColumn = Math.max(1, Math.floor((last - first + 1) / columns));
  const stretches: [number, number][][] = [[]];
  for (let i = first; i <= last; i += perColumn) {
    let [low, high] = [-1, -1];
    for (let k = i; k < Math.min(i + perColumn, last + 1); k++) {
      if (masked[k] || !Number.isFinite(values[k])) continue;
      if (low < 0 || values[k] < values[low]) low = k;
      if (high < 0 || values[k] > values[high]) high = k;
    }
    if (low < 0) {
      if (stretches[stretches.length - 1].length > 0) stretches.push([]);
      continue;
    }
    const both = low === high ? [low] : low < high ? [low, high] : [high, low];
    for (const k of both) stretches[stretches.length - 1].push([x(wavelength[k]), y(values[k])]);
  }
  return stretches.map(pathOf).join('');
}

function modelAt(wavelength: Float64Array, model: Float64Array, at: number, first: number, last: number): number {
  let [low, high] = [first, last];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (wavelength[middle] < at) low = middle + 1;
    else high = middle;
  }
  return Math.max(model[low], model[Math.max(first, low - 1)]);
}

/** 0 and the powers of ten that stand apart on the bent scale. */
function fluxTicks(least: number, most: number, linear: number): number[] {
  const ticks = least <= 0 && most >= 0 ? [0] : [];
  const first = Math.ceil(Math.log10(Math.max(linear / 4, 1e-300)));
  for (let power = first; 10 ** power <= most; power++) if (10 ** power >= least) ticks.push(10 ** power);
  return ticks.length > 1 ? ticks : roundTicks(least, most, 3);
}

function powerText(value: number): InlineText {
  if (value === 0 || (Math.abs(value) >= 0.01 && Math.abs(value) < 1e5)) return [String(Number(value.toPrecision(6))).replace('-', '−')];
  const [mantissa, exponent] = value.toExponential().split('e');
  return [mantissa === '1' ? '10' : `${mantissa.replace('-', '−')}×10`, { sup: String(Number(exponent)).replace('-', '−') }];
}

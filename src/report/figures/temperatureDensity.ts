import type { Band, Gas } from '../../plasma/index.ts';
import { COLUMN_WIDTHS_MM, type ColumnWidth, type Figure, figureOf, pathOf, ptOf, roundTicks, stroke } from './figure.ts';
import { fixed, textAt } from './svgText.ts';

const TEXT_PT = 7;
const LEFT_PT = 40;
const RIGHT_PT = 8;
const TOP_PT = 8;
const BODY_PT = 190;
const AXIS_PT = 28;
const LEGEND_PT = 10;
/** log10 cm^-3, and K. */
const LOW_LOG = 1;
const HIGH_LOG = 7;
const LOWEST_TE = 4_000;
const HIGHEST_TE = 26_000;
/** Strokes tell the bands apart in black and white, beside their letters. */
const DASHES = ['', '6 2', '2 2', '8 2 2 2', '4 4', '1 3'];
const LETTERS = 'abcdefghijklmnopqrstuvwxyz';
/** Letters are spread over so many places along their bands. */
const LETTER_PLACES = 7;

/** The plane of electron density and temperature for print: every measured ratio as a band one sigma wide, open circles where the zones lie. Undefined when no ratio was measured. */
export function temperatureDensityFigure({ bands, zones }: Pick<Gas, 'bands' | 'zones'>, width: ColumnWidth): Figure | undefined {
  if (bands.length === 0) return undefined;
  const widthPt = ptOf(COLUMN_WIDTHS_MM[width]);
  const right = widthPt - RIGHT_PT;
  const foot = TOP_PT + BODY_PT;
  const perRow = width === 'single' ? 2 : 4;
  const heightPt = foot + AXIS_PT + Math.ceil(bands.length / perRow) * LEGEND_PT + 4;
  const x = (ne: number) => LEFT_PT + ((Math.log10(ne) - LOW_LOG) / (HIGH_LOG - LOW_LOG)) * (right - LEFT_PT);
  const y = (te: number) => foot - ((te - LOWEST_TE) / (HIGHEST_TE - LOWEST_TE)) * BODY_PT;
  const isInside = (ne: number, te: number) =>
    ne >= 10 ** LOW_LOG && ne <= 10 ** HIGH_LOG && te >= LOWEST_TE && te <= HIGHEST_TE && Number.isFinite(ne) && Number.isFinite(te);
  const parts = [
    `<rect x="${LEFT_PT}" y="${TOP_PT}" width="${fixed(right - LEFT_PT)}" height="${BODY_PT}" fill="none" stroke="#000" stroke-width="0.5"/>`,
  ];
  bands.forEach((band, k) => {
    const point = (values: readonly number[], i: number) =>
      band.tells === 'density' ? ([values[i], band.at[i]] as const) : ([band.at[i], values[i]] as const);
    const stretch = band.at.map((_, i) => i).filter((i) => isInside(...point(band.middle, i)));
    const drawn = (of: readonly number[]) =>
      stretch.filter((i) => isInside(...point(of, i))).map((i) => [x(point(of, i)[0]), y(point(of, i)[1])] as const);
    const area = [...drawn(band.low), ...drawn(band.high).reverse()];
    if (area.length > 3) parts.push(`<path d="${pathOf(area)}Z" fill="#000" fill-opacity="0.12"/>`);
    parts.push(stroke(pathOf(drawn(band.middle)), 0.8, '#000', DASHES[k % DASHES.length]));
    const place = stretch[Math.floor((((k % LETTER_PLACES) + 0.5) / LETTER_PLACES) * stretch.length)];
    if (place !== undefined) {
      const [ne, te] = point(band.middle, place);
      parts.push(textAt(letterOf(k), x(ne) + 2, y(te) - 2, TEXT_PT));
    }
    parts.push(
      ...legendEntry(
        band,
        k,
        LEFT_PT + ((k % perRow) * (right - LEFT_PT)) / perRow,
        foot + AXIS_PT + 6 + Math.floor(k / perRow) * LEGEND_PT,
      ),
    );
  });
  // a zone without ratios of its own lies where another one does
  const own = zones.filter(({ te }) => !te.from.startsWith('taken'));
  own.forEach(({ zone, te, ne }, k) => {
    if (te.estimate.ended !== 'value' || ne.estimate.ended !== 'value') return;
    const [density, temperature] = [ne.estimate.value, te.estimate.value];
    if (!isInside(density, temperature)) return;
    const [cx, cy] = [x(density), y(temperature)];
    parts.push(
      `<circle cx="${fixed(cx)}" cy="${fixed(cy)}" r="3" fill="#fff" stroke="#000" stroke-width="1"/>`,
      textAt(zone, cx + 5, cy - 2 - 8 * k, TEXT_PT),
    );
  });
  for (let log = LOW_LOG; log <= HIGH_LOG; log++)
    parts.push(
      stroke(`M${fixed(x(10 ** log))} ${foot}v-3`, 0.4),
      textAt(['10', { sup: String(log) }], x(10 ** log), foot + 9, TEXT_PT, 'middle'),
    );
  for (const te of roundTicks(LOWEST_TE, HIGHEST_TE, 6))
    parts.push(stroke(`M${LEFT_PT} ${fixed(y(te))}h3`, 0.4), textAt(String(te), LEFT_PT - 3, y(te) + 2.4, TEXT_PT, 'end'));
  parts.push(textAt(['electrons per cm', { sup: '3' }], (LEFT_PT + right) / 2, foot + 20, TEXT_PT, 'middle'));
  parts.push(textAt('electron temperature (K)', 9, TOP_PT + BODY_PT / 2, TEXT_PT, 'middle', -90));
  return figureOf('temperature-density', `Temperature against density: ${bands.length} measured ratios`, widthPt, heightPt, parts);
}

const letterOf = (k: number) => LETTERS[k % LETTERS.length];

function legendEntry({ label }: Band, k: number, x: number, y: number): string[] {
  return [
    stroke(`M${fixed(x)} ${fixed(y - 2)}h14`, 0.8, '#000', DASHES[k % DASHES.length]),
    textAt(`${letterOf(k)}  ${label}`, x + 17, y, TEXT_PT - 1),
  ];
}

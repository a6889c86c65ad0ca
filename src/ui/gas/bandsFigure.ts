import type { Band, Gas } from '../../plasma/index.ts';
import { place, svgPath } from '../plot/svgPath.ts';
import { words } from '../words.ts';
import { axesShapes, type Figure, type Frame, frameOf, powerTicks, px, type Shape } from './figure.ts';

const { plasma: label } = words.gas;
const HEIGHT = 320;
const LOW_LOG = 1;
const HIGH_LOG = 7;
const LOWEST_TE = 4_000;
const HIGHEST_TE = 26_000;
/** Strokes tell the bands apart beside their names. */
const DASHES = [undefined, '6 2', '2 2', '8 2 2 2', '4 4', '1 3'];
const LETTERS = 'abcdefghijklmnopqrstuvwxyz';

/** Names of zones that lie on each other stand one above the other. */
const ZONE_NAME_PX = 13;
/** Letters of temperature bands are spread along them, those of density bands up them. */
const LETTER_PLACES = 7;

/** Letter of the band of that number in the picture and in the table beside it. */
export const letterOf = (index: number) => LETTERS[index % LETTERS.length];

/** The plane of density and temperature: each diagnostic as a band, one sigma wide; circles where the zones lie. */
export function bandsFigure({ bands, zones }: Pick<Gas, 'bands' | 'zones'>, width: number): Figure {
  const x = { low: LOW_LOG, high: HIGH_LOG, title: label.axisNe, ticks: powerTicks(LOW_LOG, HIGH_LOG) };
  const y = { low: LOWEST_TE, high: HIGHEST_TE, title: label.axisTe };
  const frame = frameOf(width, HEIGHT, x, y);
  return {
    width,
    height: HEIGHT,
    title: label.describe(bands.length),
    shapes: [
      ...axesShapes(frame, x, y),
      ...bands.flatMap((band, k) => bandShapes(frame, band, k)),
      ...zones.flatMap(({ te, ne, zone }, k): Shape[] => {
        if (te.estimate.ended !== 'value' || ne.estimate.ended !== 'value' || te.from.startsWith('taken')) return [];
        const [cx, cy] = [place(frame.x, Math.log10(ne.estimate.value)), place(frame.y, te.estimate.value)];
        if (!isInside(frame, cx, cy)) return [];
        return [
          { draw: 'dot', x: cx, y: cy, r: 5, ink: 'accent', filled: false },
          { draw: 'text', x: cx + 10, y: cy - 2 - ZONE_NAME_PX * k, text: label.zoneNames[zone], ink: 'accent', bold: true },
        ];
      }),
    ],
  };
}

const isInside = ({ x, y }: Frame, px: number, py: number) => px >= x.from && px <= x.to && py <= y.from && py >= y.to;

function bandShapes(frame: Frame, band: Band, index: number): Shape[] {
  const ink = band.tells === 'density' ? 'fit' : 'ink';
  const isDensity = band.tells === 'density';
  /** Points inside the frame; NaN breaks the stroke. */
  const curve = (values: readonly number[]) => {
    const xs = isDensity ? values.map(Math.log10) : band.at.map(Math.log10);
    const ys = isDensity ? band.at : values;
    const seen = ys.map((te, k) => (xs[k] >= LOW_LOG && xs[k] <= HIGH_LOG && te >= LOWEST_TE && te <= HIGHEST_TE ? te : Number.NaN));
    return { xs, ys: seen };
  };
  const middle = curve(band.middle);
  const shown = middle.ys.findIndex(Number.isFinite);
  const last = middle.ys.findLastIndex(Number.isFinite);
  const area = areaOf(frame, band);
  const share = ((index % LETTER_PLACES) + 0.5) / LETTER_PLACES;
  const label = shown < 0 ? -1 : Math.round(shown + share * (last - shown));
  return [
    ...(area ? [{ draw: 'area', d: area, ink, share: 0.14 } as const] : []),
    { draw: 'path', d: svgPath(middle.xs, middle.ys, frame.x, frame.y), ink, width: 1.25, dash: DASHES[index % DASHES.length] },
    ...(label >= 0
      ? [
          {
            draw: 'text',
            x: place(frame.x, middle.xs[label]) + 3,
            y: place(frame.y, middle.ys[label]) + (isDensity ? 4 : -4),
            text: letterOf(index),
            ink,
            bold: true,
          } as const,
        ]
      : []),
  ];
}

/** Outline between the two sides, cut at the frame; where both lie beyond one edge there is none. */
function areaOf({ x, y }: Frame, { tells, at, low, high }: Band): string {
  const isDensity = tells === 'density';
  const inside = isDensity
    ? { from: LOWEST_TE, to: HIGHEST_TE, least: 10 ** LOW_LOG, most: 10 ** HIGH_LOG }
    : { from: 10 ** LOW_LOG, to: 10 ** HIGH_LOG, least: LOWEST_TE, most: HIGHEST_TE };
  const cut = (value: number) => Math.min(Math.max(value, inside.least), inside.most);
  const kept = at.flatMap((other, k) => (other >= inside.from && other <= inside.to && cut(low[k]) < cut(high[k]) ? [k] : []));
  if (kept.length < 2) return '';
  const point = (value: number, k: number) => {
    const [ne, te] = isDensity ? [cut(value), at[k]] : [at[k], cut(value)];
    return `${px(place(x, Math.log10(ne)))} ${px(place(y, te))}`;
  };
  return `M${kept.map((k) => point(low[k], k)).join('L')}L${kept
    .toReversed()
    .map((k) => point(high[k], k))
    .join('L')}Z`;
}

import type { DensityLadder, Rung } from '../../plasma/index.ts';
import { type InlineText, ionInline } from '../inline.ts';
import { COLUMN_WIDTHS_MM, type ColumnWidth, type Figure, figureOf, pathOf, ptOf, stroke } from './figure.ts';
import { fixed, textAt } from './svgText.ts';

const TEXT_PT = 7;
const LEFT_PT = 34;
const RIGHT_PT = 8;
const TOP_PT = 34;
const CURVES_PT = 110;
const AXIS_PT = 30;
const RUNG_PT = 10;
const FOOT_PT = 6;
/** Axis of density, log10 cm^-3, and its ticks. */
const LOW_LOG = 0;
const HIGH_LOG = 20;
const TICK_LOG = 4;
/** Light left per ion and electron; collisions can add to it. */
const MOST_LEFT = 1.6;

/**
 * The density ladder for print: above, the light left of each upper level against electron density; below, a rung a line by rising critical density: whole up to where
 * half is left, broken up to a tenth, an open dot at the critical density. Undefined when no line has collision data.
 */
export function densityLadderFigure(ladder: DensityLadder, width: ColumnWidth): Figure | undefined {
  const rungs = ladder.rungs.filter((rung) => rung.survival !== undefined);
  if (rungs.length === 0) return undefined;
  const widthPt = ptOf(COLUMN_WIDTHS_MM[width]);
  const right = widthPt - RIGHT_PT;
  const foot = TOP_PT + CURVES_PT;
  const heightPt = foot + AXIS_PT + rungs.length * RUNG_PT + FOOT_PT;
  const x = (log: number) => LEFT_PT + ((Math.min(Math.max(log, LOW_LOG), HIGH_LOG) - LOW_LOG) / (HIGH_LOG - LOW_LOG)) * (right - LEFT_PT);
  const y = (left: number) => foot - (left / MOST_LEFT) * CURVES_PT;
  const parts = [
    `<rect x="${LEFT_PT}" y="${TOP_PT}" width="${fixed(right - LEFT_PT)}" height="${CURVES_PT}" fill="none" stroke="#000" stroke-width="0.5"/>`,
    ...curvesOf(rungs).map((curve) =>
      stroke(
        pathOf(
          curve.flatMap((left, k) =>
            ladder.logNe[k] >= LOW_LOG && ladder.logNe[k] <= HIGH_LOG ? [[x(ladder.logNe[k]), y(Math.min(left, MOST_LEFT))] as const] : [],
          ),
        ),
        0.5,
      ),
    ),
    ...ladder.gases.flatMap(({ name, densityCm3 }, k) => {
      const at = x(Math.log10(densityCm3));
      // three rows of names, so that neighbours stay apart
      const anchor = at > right - 40 ? 'end' : 'middle';
      return [
        stroke(`M${fixed(at)} ${TOP_PT}V${fixed(heightPt - FOOT_PT)}`, 0.3, '#999', '1.5 1.5'),
        textAt(name, anchor === 'end' ? right : at, TOP_PT - 4 - (k % 3) * 9, TEXT_PT - 1, anchor),
      ];
    }),
  ];
  for (let log = LOW_LOG; log <= HIGH_LOG; log += TICK_LOG)
    parts.push(stroke(`M${fixed(x(log))} ${foot}v-3`, 0.4), textAt(['10', { sup: String(log) }], x(log), foot + 9, TEXT_PT, 'middle'));
  for (const left of [0, 0.5, 1, 1.5])
    parts.push(stroke(`M${LEFT_PT} ${fixed(y(left))}h3`, 0.4), textAt(String(left), LEFT_PT - 3, y(left) + 2.4, TEXT_PT, 'end'));
  parts.push(textAt(['electrons per cm', { sup: '3' }], (LEFT_PT + right) / 2, foot + 20, TEXT_PT, 'middle'));
  parts.push(textAt('light left', 9, TOP_PT + CURVES_PT / 2, TEXT_PT, 'middle', -90));
  rungs.forEach((rung, k) => {
    parts.push(...rungParts(rung, foot + AXIS_PT + k * RUNG_PT, x, right));
  });
  return figureOf('density-ladder', `Density ladder of ${rungs.length} lines`, widthPt, heightPt, parts);
}

/** Lines of one upper level share their curve. */
function curvesOf(rungs: readonly Rung[]): number[][] {
  const seen = new Map<string, number[]>();
  for (const { ion, nCrit, survival } of rungs) if (survival) seen.set(`${ion} ${nCrit}`, Array.from(survival));
  return [...seen.values()];
}

function rungParts({ label, nCrit, halfAt, tenthAt }: Rung, y: number, x: (log: number) => number, right: number): string[] {
  const half = x(Math.log10(halfAt ?? 10 ** HIGH_LOG));
  const tenth = x(Math.log10(tenthAt ?? 10 ** HIGH_LOG));
  const atRight = tenth > right - 60;
  return [
    stroke(`M${LEFT_PT} ${fixed(y)}H${fixed(half)}`, 1),
    stroke(`M${fixed(half)} ${fixed(y)}H${fixed(tenth)}`, 1, '#000', '1.5 1.5'),
    ...(nCrit === undefined
      ? []
      : [`<circle cx="${fixed(x(Math.log10(nCrit)))}" cy="${fixed(y)}" r="1.8" fill="#fff" stroke="#000" stroke-width="0.6"/>`]),
    // a rung that reaches the edge bears its name above its end
    textAt(labelOf(label), atRight ? right - 1 : tenth + 4, atRight ? y - 1.5 : y + 2.2, TEXT_PT - 1, atRight ? 'end' : 'start'),
  ];
}

/** `[O III] 5006.84` with its numeral in small capitals; the parts of a blend joined by `+`. */
function labelOf(label: string): InlineText {
  return label.split(' + ').flatMap((part, k) => {
    const [, ion, rest] = /^(\[?[A-Z][a-z]?\s+[IVXL]+\]?)(.*)$/.exec(part) ?? [];
    const pieces: InlineText = ion === undefined ? [part] : [...ionInline(ion), rest];
    return k === 0 ? pieces : [' + ', ...pieces];
  });
}

import { type DeskRow, prominence, type Standing, shortName } from '../desk/deskRows.ts';
import { labelsThatFit } from './labelsThatFit.ts';
import { LANES, laneOf, UNNAMED_LANE } from './lanes.ts';
import type { Range } from './viewRange.ts';

/** Plotly's sign of each verdict: told apart by shape and fill, not by colour. */
export const SIGNS = {
  open: 'square-open',
  accepted: 'square',
  rejected: 'x-thin-open',
  unidentified: 'diamond-open',
  artefact: 'triangle-down-open',
} as const satisfies Record<Standing, string>;

/** All marks in view as one list. */
export interface Marks {
  readonly x: number[];
  readonly y: number[];
  /** Those that fit, above their marks. */
  readonly labels: { readonly x: number[]; readonly y: number[]; readonly text: string[] };
  readonly symbol: (typeof SIGNS)[Standing][];
  /** The thin-gas ones among them. */
  readonly rings: { readonly x: number[]; readonly y: number[] };
}

/** Middle of a label above its mark, in lanes. */
const LABEL_RISE = 0.44;
/** Widest text that a label may have, in pixels a letter; measured on the interface font at 11 px. */
const LETTER_PX = 6.1;

interface MarkView {
  readonly from: number;
  readonly to: number;
  /** The view at rest, observed Angstrom: labels are kept inside it. */
  readonly view: Range;
  readonly pixelsPerAngstrom: number;
  readonly mostLabels: number;
  readonly factor: number;
}

/** Lane of a row's mark. */
export const laneOfRow = (row: DeskRow) => (row.name ? laneOf(row.name.transitions[0].excitationEv) : UNNAMED_LANE);

/** Marks between `from` and `to` (observed Angstrom), with labels where they fit; `factor` takes observed to shown wavelengths. */
export function marksOf(rows: readonly DeskRow[], view: MarkView): Marks {
  const seen = rows.filter(({ feature }) => feature.centroid >= view.from && feature.centroid <= view.to);
  const wishes = seen.flatMap((row, k) => {
    if (!row.name) return [];
    const text = shortName(row.name);
    const importance = prominence(row);
    return [{ k, x: labelPlace(row.feature.centroid, text, view), lane: laneOfRow(row), text, importance }];
  });
  const fitting = labelsThatFit(wishes, widthOf, view.mostLabels);
  const labelled = [...fitting].map((w) => wishes[w]);
  const ringed = seen.filter((row) => row.name?.transitions.some((t) => t.thinGas));
  const x = (row: DeskRow) => row.feature.centroid * view.factor;
  return {
    x: seen.map(x),
    y: seen.map(laneOfRow),
    labels: {
      x: labelled.map((wish) => (wish.x / view.pixelsPerAngstrom) * view.factor),
      y: labelled.map(({ lane }) => lane + LABEL_RISE),
      text: labelled.map(({ text }) => text),
    },
    symbol: seen.map((row) => SIGNS[row.standing]),
    rings: { x: ringed.map(x), y: ringed.map(laneOfRow) },
  };
}

const widthOf = (text: string) => text.length * LETTER_PX;

/** Pixels from zero wavelength of a label: over its mark, moved in where it would be cut by an end of the view. */
function labelPlace(centroid: number, text: string, { view, pixelsPerAngstrom }: MarkView): number {
  const x = centroid * pixelsPerAngstrom;
  const [low, high] = [view[0] * pixelsPerAngstrom, view[1] * pixelsPerAngstrom];
  if (x < low || x > high) return x;
  const half = widthOf(text) / 2;
  return Math.min(Math.max(x, low + half), high - half);
}

/** Labels and places of the lanes on their axis. */
export const laneTicks = (unnamed: string) => ({
  values: [UNNAMED_LANE, ...LANES.map((_, k) => k)],
  texts: [unnamed, ...LANES.map((lane) => lane.label)],
});

import { type DeskRow, prominence, type Standing, shortName } from '../desk/deskRows.ts';
import { labelsThatFit } from './labelsThatFit.ts';
import { LANES, laneOf, UNNAMED_LANE } from './lanes.ts';
import { LANE_COUNT, LANE_FOOT, type PanelLayout } from './layoutOf.ts';
import type { Range } from './viewRange.ts';

/** One mark in pixels of the picture. */
export interface PlacedMark {
  readonly x: number;
  readonly y: number;
  readonly standing: Standing;
  /** The thin-gas ring about it: whole for a forbidden line, broken for an intercombination line. */
  readonly ring?: 'whole' | 'broken';
}

/** A label centred on (x, y), pixels. */
export interface PlacedLabel {
  readonly x: number;
  readonly y: number;
  readonly text: string;
  readonly isChosen: boolean;
}

/** Middle of a label above its mark, in lanes. */
const LABEL_RISE = 0.44;
/** A label wants at least so many pixels of the width. */
const LABEL_SHARE_PX = 24;

/** Lane of a row's mark. */
export const laneOfRow = (row: DeskRow) => (row.name ? laneOf(row.name.transitions[0].excitationEv) : UNNAMED_LANE);

/**
 * Marks and labels of the features in view, labels where they fit, those at the ends of the view moved in.
 *
 * @param widthOf width of a label in pixels
 * @param chosen  number of the feature whose label goes before all others
 */
export function marksOf(rows: readonly DeskRow[], view: Range, layout: PanelLayout, widthOf: (text: string) => number, chosen?: number) {
  const inner = layout.width - layout.left - layout.right;
  const laneHeight = layout.lanesHeight / LANE_COUNT;
  const yOf = (lane: number) => layout.top + layout.lanesHeight - (lane - UNNAMED_LANE + LANE_FOOT) * laneHeight;
  const seen = rows.filter(({ feature }) => feature.centroid >= view[0] && feature.centroid <= view[1]);
  const xOf = (row: DeskRow) => layout.left + ((row.feature.centroid - view[0]) / (view[1] - view[0])) * inner;
  const marks = seen.map(
    (row): PlacedMark => ({
      x: xOf(row),
      y: yOf(laneOfRow(row)),
      standing: row.standing,
      ...ringOf(row),
    }),
  );
  const wishes = seen.flatMap((row) => {
    if (!row.name) return [];
    const text = shortName(row.name);
    const half = widthOf(text) / 2;
    const x = Math.min(Math.max(xOf(row), layout.left + half), layout.width - layout.right - half);
    const isChosen = row.feature.number === chosen;
    return [{ x, lane: laneOfRow(row), text, isChosen, importance: isChosen ? Number.POSITIVE_INFINITY : prominence(row) }];
  });
  const labels = [...labelsThatFit(wishes, widthOf, inner / LABEL_SHARE_PX)].map((k): PlacedLabel => {
    const { x, lane, text, isChosen } = wishes[k];
    return { x, y: yOf(lane) - LABEL_RISE * laneHeight, text, isChosen };
  });
  return { marks, labels };
}

function ringOf({ name }: DeskRow): Pick<PlacedMark, 'ring'> {
  const thin = name?.transitions.find((t) => t.thinGas);
  return thin ? { ring: thin.nature === 'intercombination' ? 'broken' : 'whole' } : {};
}

/** Labels and places of the lanes on their axis. */
export const laneTicks = (unnamed: string) => ({
  values: [UNNAMED_LANE, ...LANES.map((_, k) => k)],
  texts: [unnamed, ...LANES.map((lane) => lane.label)],
});

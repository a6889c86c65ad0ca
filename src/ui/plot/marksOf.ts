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
  /** The thin-gas ring is drawn about it. */
  readonly ring: boolean;
}

/** A label centred on (x, y), pixels. */
export interface PlacedLabel {
  readonly x: number;
  readonly y: number;
  readonly text: string;
}

/** Middle of a label above its mark, in lanes. */
const LABEL_RISE = 0.44;
/** Labels in a view. */
const MOST_LABELS = 40;

/** Lane of a row's mark. */
export const laneOfRow = (row: DeskRow) => (row.name ? laneOf(row.name.transitions[0].excitationEv) : UNNAMED_LANE);

/**
 * Marks and labels of the features in view, labels where they fit, those at the ends of the view moved in.
 *
 * @param widthOf width of a label in pixels
 */
export function marksOf(rows: readonly DeskRow[], view: Range, layout: PanelLayout, widthOf: (text: string) => number) {
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
      ring: row.name?.transitions.some((t) => t.thinGas) ?? false,
    }),
  );
  const wishes = seen.flatMap((row) => {
    if (!row.name) return [];
    const text = shortName(row.name);
    const half = widthOf(text) / 2;
    const x = Math.min(Math.max(xOf(row), layout.left + half), layout.width - layout.right - half);
    return [{ x, lane: laneOfRow(row), text, importance: prominence(row) }];
  });
  const labels = [...labelsThatFit(wishes, widthOf, MOST_LABELS)].map((k): PlacedLabel => {
    const { x, lane, text } = wishes[k];
    return { x, y: yOf(lane) - LABEL_RISE * laneHeight, text };
  });
  return { marks, labels };
}

/** Labels and places of the lanes on their axis. */
export const laneTicks = (unnamed: string) => ({
  values: [UNNAMED_LANE, ...LANES.map((_, k) => k)],
  texts: [unnamed, ...LANES.map((lane) => lane.label)],
});

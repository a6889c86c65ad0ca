/** A label that would like to be drawn, centred on `x` (pixels) in its lane. */
export interface Wish {
  readonly x: number;
  readonly lane: number;
  readonly text: string;
  /** The greater goes first. */
  readonly importance: number;
}

/** Free pixels left and right of every label. */
const GAP_PX = 5;

/**
 * Which labels can be drawn without touching another one of the same lane, most important first.
 *
 * @param widthOf width of a text in pixels
 * @param most    at most so many are taken
 * @returns positions in `wishes`
 */
export function labelsThatFit(wishes: readonly Wish[], widthOf: (text: string) => number, most: number): Set<number> {
  const order = wishes.map((_, k) => k).sort((a, b) => wishes[b].importance - wishes[a].importance || a - b);
  const taken = new Map<number, [number, number][]>();
  const chosen = new Set<number>();
  for (const k of order) {
    if (chosen.size >= most) break;
    const { x, lane, text } = wishes[k];
    const half = widthOf(text) / 2 + GAP_PX;
    const there = taken.get(lane) ?? [];
    if (there.some(([left, right]) => x + half > left && x - half < right)) continue;
    there.push([x - half, x + half]);
    taken.set(lane, there);
    chosen.add(k);
  }
  return chosen;
}

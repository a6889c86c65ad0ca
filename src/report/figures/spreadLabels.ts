/** A label that wants to stand at `at`; heavier ones are kept when there is no room for all. */
export interface WantedLabel {
  readonly at: number;
  readonly weight: number;
}

/** A label with the place it got. */
export interface PlacedLabel<T extends WantedLabel> {
  readonly label: T;
  readonly place: number;
}

/**
 * Spreads labels along a line so that neighbours are at least `spacing` apart, each as near to its wish as that allows (pool of adjacent violators:
 * Ayer et al. 1955, Ann. Math. Stat. 26, 641); the lightest are left out when there is no room.
 */
export function spreadLabels<T extends WantedLabel>(labels: readonly T[], low: number, high: number, spacing: number): PlacedLabel<T>[] {
  const room = Math.max(0, Math.floor((high - low) / spacing) + 1);
  const kept = [...labels]
    .sort((a, b) => b.weight - a.weight)
    .slice(0, room)
    .sort((a, b) => a.at - b.at);
  // in the frame that shrinks every gap by the spacing, places may not fall
  const blocks: { sum: number; count: number }[] = [];
  kept.forEach((label, k) => {
    let block = { sum: label.at - k * spacing, count: 1 };
    for (let last = blocks.at(-1); last && last.sum / last.count > block.sum / block.count; last = blocks.at(-1)) {
      blocks.pop();
      block = { sum: block.sum + last.sum, count: block.count + last.count };
    }
    blocks.push(block);
  });
  const shrunkHigh = high - (kept.length - 1) * spacing;
  const places = blocks.flatMap(({ sum, count }) => Array<number>(count).fill(Math.min(shrunkHigh, Math.max(low, sum / count))));
  return kept.map((label, k) => ({ label, place: places[k] + k * spacing }));
}

/**
 * The word of `known` nearest to `word` by edit distance (case ignored), for "did you mean"; undefined when none is near enough
 * (more than a third of the letters, at least 1, would have to change).
 */
export function nearestWord(word: string, known: readonly string[]): string | undefined {
  const allowed = Math.max(1, Math.floor(word.length / 3));
  let best: string | undefined;
  let bestDistance = allowed + 1;
  for (const candidate of known) {
    const distance = editDistance(word.toLowerCase(), candidate.toLowerCase());
    if (distance < bestDistance) {
      bestDistance = distance;
      best = candidate;
    }
  }
  return best;
}

/** Levenshtein distance: insertions, deletions and replacements. */
function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) next[j] = Math.min(row[j] + 1, next[j - 1] + 1, row[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1));
    row = next;
  }
  return row[b.length];
}

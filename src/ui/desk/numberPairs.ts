type Pair = readonly [number, number];

/**
 * Pairs of numbers typed in a row, `4000-4100, 6860-6880` or `5000 3.2; 6000 2.9`.
 *
 * @param order `rising`: the second number of a pair must be larger
 * @returns undefined when the text is anything else
 */
export function numberPairs(text: string, order: 'rising' | 'any'): Pair[] | undefined {
  const pairs: Pair[] = [];
  for (const part of text.split(/[;,]/)) {
    if (part.trim() === '') continue;
    const found = /^\s*([\d.]+(?:e[+-]?\d+)?)(?:\s+(?=[-−]?\d)|\s*(?:-|–|to|:)\s*)([-−]?[\d.]+(?:e[+-]?\d+)?)\s*$/i.exec(part);
    if (!found) return undefined;
    const pair: Pair = [Number(found[1]), Number(found[2].replace('−', '-'))];
    if (!pair.every(Number.isFinite) || (order === 'rising' && !(pair[1] > pair[0]))) return undefined;
    pairs.push(pair);
  }
  return pairs;
}

/** The same pairs as text. */
export const pairsText = (pairs: readonly Pair[], between: string) => pairs.map(([a, b]) => `${a}${between}${b}`).join(', ');

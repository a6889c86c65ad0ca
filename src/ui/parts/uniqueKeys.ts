/**
 * A key for each member of a list in which two may say the same (a line of the object and the same line of the sky): the second, third ... of a kind are counted.
 * Members with one key would be left on the page when the list changes.
 */
export function uniqueKeys<Item>(items: readonly Item[], keyOf: (item: Item) => string): { readonly key: string; readonly item: Item }[] {
  const counts = new Map<string, number>();
  return items.map((item) => {
    const base = keyOf(item);
    const count = (counts.get(base) ?? 0) + 1;
    counts.set(base, count);
    return { key: count === 1 ? base : `${base} (${count})`, item };
  });
}

/** Round numbers between `low` and `high`, at most about `count` of them, ascending: multiples of 1, 2 or 5 times a power of ten. */
export function evenTicks(low: number, high: number, count: number): number[] {
  const rough = (high - low) / count;
  if (!(rough > 0)) return [];
  const size = 10 ** Math.floor(Math.log10(rough));
  const step = size * ([1, 2, 5, 10].find((k) => k * size >= rough) ?? 10);
  const ticks: number[] = [];
  for (let k = Math.ceil(low / step); k * step <= high; k++) ticks.push(Number((k * step).toPrecision(12)));
  return ticks;
}

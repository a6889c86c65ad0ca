import { readFileSync } from 'node:fs';
import { companionFinder, type LevelModel, levelPopulations, loadAtomicData, survival, thinGasFacts } from '../../src/atomic/index.ts';

/** Microseconds a call: best of 5 rounds. */
function microseconds(calls: number, run: (k: number) => unknown): number {
  let best = Number.POSITIVE_INFINITY;
  for (let round = 0; round < 5; round++) {
    const start = performance.now();
    for (let k = 0; k < calls; k++) run(k);
    best = Math.min(best, ((performance.now() - start) / calls) * 1000);
  }
  return best;
}

/** Speed of the level solver, one sentence a figure. */
export function physicsBench(): string[] {
  const data = loadAtomicData(new Uint8Array(readFileSync(new URL('../../public/atomic.bin', import.meta.url))));
  const sentences: string[] = [];
  const solve = (model: LevelModel, calls: number) => microseconds(calls, (k) => levelPopulations(model, 8000 + k, 100 + k));
  for (const [ion, calls, budget] of [
    ['O III', 5000, ' (budget 200)'],
    ['S II', 5000, ''],
    ['Fe VII', 2000, ''],
    ['Fe II', 100, ''],
  ] as const) {
    const model = data.levelModel(ion);
    if (model === undefined) throw new Error(`${ion} has no n-level atom`);
    sentences.push(
      `level populations of ${ion}, ${model.levels.length} levels, ${model.collisions.lower.length} collisions: ${solve(model, calls).toFixed(1)} us${budget}`,
    );
  }
  const oxygen = data.levelModel('O III');
  if (oxygen === undefined) throw new Error('O III has no n-level atom');
  const densities = Array.from({ length: 100 }, (_, k) => 10 ** (k / 10));
  sentences.push(`survival of O III at 100 densities: ${microseconds(50, (k) => survival(oxygen, 3, 9000 + k, densities)).toFixed(0)} us`);
  sentences.push(`facts and sentence of a thin-gas line: ${microseconds(500, (k) => thinGasFacts(oxygen, 3, 9000 + k)).toFixed(0)} us`);
  const start = performance.now();
  const companionsOf = companionFinder(data);
  const prepared = performance.now() - start;
  const perLine = microseconds(data.lines.count, (line) => companionsOf(line, 10_000, 1000));
  sentences.push(`companions with ratios: prepared in ${prepared.toFixed(0)} ms, ${perLine.toFixed(1)} us a line on average`);
  return sentences;
}

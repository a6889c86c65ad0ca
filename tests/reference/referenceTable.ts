import { readFileSync } from 'node:fs';
import type { LevelModel } from '../../src/atomic/index.ts';
import { bundled } from '../atomic/bundledData.ts';

/** Rows of a table of this folder, by column name. Lines that begin with # are its header; fields with commas stand in quotes. */
export function referenceTable(name: string): Record<string, string>[] {
  const [head, ...rows] = readFileSync(new URL(`./${name}`, import.meta.url), 'utf8')
    .split('\n')
    .filter((line) => line !== '' && !line.startsWith('#'))
    .map((line) => Array.from(line.matchAll(/(?:^|,)(?:"([^"]*)"|([^,]*))/g), (m) => m[1] ?? m[2]));
  return rows.map((row) => Object.fromEntries(head.map((column, k) => [column, row[k]])));
}

/** n-level atom of an ion. @throws when there is none */
export function atomOf(ion: string): LevelModel {
  const model = bundled.levelModel(ion);
  if (model === undefined) throw new Error(`${ion} has no n-level atom`);
  return model;
}

/** Pair [upper, lower] whose Ritz wavelength is nearest to a vacuum wavelength. @throws when it is off by more than 1 part in 3000 */
export function pairAt(model: LevelModel, vacuum: number): readonly [number, number] {
  const { lower, upper } = model.radiative;
  const off = (k: number) => Math.abs(1e8 / (model.levels[upper[k]].energyCm1 - model.levels[lower[k]].energyCm1) - vacuum);
  let best = 0;
  for (let k = 1; k < lower.length; k++) if (off(k) < off(best)) best = k;
  if (off(best) > vacuum / 3000) throw new Error(`${model.ion} has no decay at ${vacuum} A`);
  return [upper[best], lower[best]];
}

/** How far values agree with a reference, in per cent: median and worst, with the worst one's name. */
export function agreement(checked: readonly { readonly name: string; readonly ours: number; readonly theirs: number }[]): {
  medianPercent: number;
  worstPercent: number;
  sentence: string;
} {
  const off = checked
    .map(({ name, ours, theirs }) => ({ name, percent: 100 * Math.abs(ours / theirs - 1) }))
    .sort((p, q) => (p.percent <= q.percent ? -1 : 1));
  const medianPercent = off[off.length >> 1].percent;
  const worst = off[off.length - 1];
  const sentence = `${checked.length} values: median ${medianPercent.toPrecision(2)} %, worst ${worst.percent.toPrecision(2)} % (${worst.name})`;
  return { medianPercent, worstPercent: worst.percent, sentence };
}

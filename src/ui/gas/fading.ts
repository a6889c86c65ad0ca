import type { Gas } from '../../plasma/index.ts';
import { survivalLeft } from './survivalLeft.ts';

/** What is left of each thin-gas feature, by its number, if its gas had the density `log` (log10 cm^-3) instead of its own; per ion and electron. */
export function fadingOf({ ladder, zones }: Gas, log: number): Map<number, number> {
  const left = new Map<number, number>();
  for (const rung of ladder.rungs) {
    const estimate = zones.find(({ zone }) => zone === rung.zone)?.ne.estimate;
    const own = estimate?.ended === 'value' ? Math.log10(estimate.value) : ladder.logNe[0];
    const [then, now] = [survivalLeft(ladder, rung, log), survivalLeft(ladder, rung, own)];
    if (then === undefined || now === undefined || !(now > 0)) continue;
    for (const feature of rung.features) left.set(feature, then / now);
  }
  return left;
}

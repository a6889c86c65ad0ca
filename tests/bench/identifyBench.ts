import { readFileSync } from 'node:fs';
import { loadAtomicData } from '../../src/atomic/index.ts';
import { DEFAULT_NAMING_SETTINGS, nameMarks, prepareNaming } from '../../src/identify/index.ts';
import { simulateNebula } from '../identify/simulatedNebula.ts';

/** Speed of naming 800 features against the whole list, redshift unknown; one sentence a figure. */
export function identifyBench(): string[] {
  const data = loadAtomicData(new Uint8Array(readFileSync(new URL('../../public/atomic.bin', import.meta.url))));
  const marks = simulateNebula(data, {
    seed: 3,
    kind: 'high',
    count: 776,
    resolvingPower: 10_000,
    z: 1e-4,
    low: 3500,
    high: 9800,
    strangers: 0.03,
  });
  const opened = performance.now();
  prepareNaming(data);
  const prepared = performance.now() - opened;
  const times = Array.from({ length: 9 }, () => {
    const start = performance.now();
    nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []);
    return performance.now() - start;
  });
  const [first] = times;
  times.sort((a, b) => a - b);
  return [
    `naming ${marks.length} features against ${data.lines.count} lines: ${first.toFixed(0)} ms at first (after ${prepared.toFixed(0)} ms of preparing when the list is opened), ${times[4].toFixed(0)} ms median (budget 300)`,
  ];
}

import { readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import { linesBetween, loadAtomicData } from '../../src/atomic/index.ts';

/** Size and speed of the bundle, one sentence a figure: opening (best and median of 20, first call included), a window of the list, an n-level atom. */
export function atomicBench(): string[] {
  const file = readFileSync(new URL('../../public/atomic.bin', import.meta.url));
  const opened: number[] = [];
  for (let k = 0; k < 20; k++) {
    const bytes = new Uint8Array(file);
    const start = performance.now();
    loadAtomicData(bytes);
    opened.push(performance.now() - start);
  }
  const first = opened[0];
  opened.sort((p, q) => p - q);
  const data = loadAtomicData(new Uint8Array(file));
  const windows = 200_000;
  let seen = 0;
  const start = performance.now();
  for (let k = 0; k < windows; k++) {
    const low = 3000 + ((k * 7919) % 7000);
    const [from, to] = linesBetween(data.lines, low, low + 2);
    seen += to - from;
  }
  const perWindowUs = ((performance.now() - start) / windows) * 1000;
  const modelStart = performance.now();
  for (const ion of data.modelIons) data.levelModel(ion);
  const models = performance.now() - modelStart;
  return [
    `atomic bundle: ${data.lines.count} lines, ${data.modelIons.length} n-level atoms, ${file.length} bytes, ${gzipSync(file, { level: 9 }).length} compressed (budget 700000)`,
    `atomic bundle: opened in ${first.toFixed(1)} ms at first, ${opened[10].toFixed(1)} ms median (budget 150)`,
    `lines of a 2 A window: ${perWindowUs.toFixed(2)} us (budget 2), ${(seen / windows).toFixed(1)} lines on average`,
    `all n-level atoms: ${models.toFixed(1)} ms`,
  ];
}

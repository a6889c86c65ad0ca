import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { DEFAULT_MEASURE_SETTINGS, measure } from '../../src/measure/index.ts';

const PYTHON = '/usr/bin/python3';
const KINDS = [
  ['S', '2000'],
  ['M', '8000'],
  ['L', '40000'],
] as const;
const SEED = '11';

/** Seeded spectra with known truth, measured by us and by the script: seconds after reading, and the scorer's line for each. */
export function seededBench(): string[] {
  const folder = join(process.env.SHARED ?? '', 'yardstick');
  if (!process.env.SHARED || !existsSync(folder)) return ['skipped: SHARED names no folder with seeded spectra'];
  if (spawnSync(PYTHON, ['-c', 'import numpy, scipy']).status !== 0) return ['skipped: no python3 with numpy and scipy'];
  const out = mkdtempSync(join(tmpdir(), 'linewright-bench-'));
  const python = (script: string, ...args: string[]) =>
    spawnSync(PYTHON, [join(folder, script), ...args], { encoding: 'utf8' }).stdout.trim();
  return KINDS.flatMap(([kind, resolution]) => {
    python('make_spectra.py', out, kind, SEED);
    const path = join(out, `${kind}${SEED}.csv`);
    const truth = join(out, `${kind}${SEED}.truth.csv`);
    const theirs = join(out, 'theirs.csv');
    const rival = python('peer.py', path, theirs, resolution);
    const mine = join(out, 'mine.csv');
    const seconds = measureInto(path, mine);
    const rivalSeconds = Number(/total_after_read ([\d.]+)/.exec(rival)?.[1]);
    return [
      `${kind}: ${seconds.toFixed(2)} s, the script ${rivalSeconds.toFixed(2)} s: ${(rivalSeconds / seconds).toFixed(1)} times`,
      `   ours   ${python('score.py', mine, truth)}`,
      `   script ${python('score.py', theirs, truth)}`,
    ];
  });
}

const RUNS = 6;

/** Seconds of the best of some runs: the first ones warm the compiler. */
function measureInto(path: string, target: string): number {
  const rows = readFileSync(path, 'utf8')
    .split('\n')
    .filter((line) => /^\d/.test(line))
    .map((line) => line.split(',').map(Number));
  const column = (k: number) => Float64Array.from(rows, (row) => row[k]);
  const flux = column(1);
  const spectrum = {
    name: path,
    wavelength: column(0),
    flux,
    fluxErr: column(2),
    masked: Uint8Array.from(flux, (f) => (Number.isFinite(f) ? 0 : 1)),
    medium: 'air' as const,
    fluxUnit: '',
  };
  let seconds = Number.POSITIVE_INFINITY;
  for (let run = 1; run < RUNS; run++) {
    const began = performance.now();
    measure(spectrum, DEFAULT_MEASURE_SETTINGS);
    seconds = Math.min(seconds, (performance.now() - began) / 1000);
  }
  const { features } = measure(spectrum, DEFAULT_MEASURE_SETTINGS);
  const lines = features.filter((f) => !f.artefact).map((f) => [f.centroid, f.centroidErr, f.flux, f.fluxErr, f.snr].join(','));
  writeFileSync(target, `wavelength_obs,wavelength_obs_err,flux,flux_err,snr\n${lines.join('\n')}\n`);
  return seconds;
}

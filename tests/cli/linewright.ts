import { spawnSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** Runs the terminal from source and returns what it said. */
export function linewright(...args: string[]): { code: number | null; out: string; err: string } {
  const run = spawnSync(process.execPath, ['--import', 'tsx', 'src/cli/main.ts', ...args], { encoding: 'utf8', maxBuffer: 1 << 28 });
  return { code: run.status, out: run.stdout, err: run.stderr };
}

/** A file with this text in a folder of its own. */
export function fileWith(name: string, text: string): string {
  const path = join(mkdtempSync(join(tmpdir(), 'linewright-')), name);
  writeFileSync(path, text);
  return path;
}

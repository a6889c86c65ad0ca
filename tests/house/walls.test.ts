import { spawnSync } from 'node:child_process';
import { cpSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

// The walls are only as good as their bite: breaks are planted in a copy of the house, and each must be found.

const house = resolve(import.meta.dirname, '../..');
let copy = '';

beforeAll(() => {
  copy = mkdtempSync(join(tmpdir(), 'linewright-walls-'));
  for (const name of ['src', '.dependency-cruiser.mjs', 'tsconfig.json', 'tsconfig.base.json', 'tsconfig.core.json', 'package.json']) {
    cpSync(join(house, name), join(copy, name), { recursive: true, filter: (path) => !path.endsWith('.csv') });
  }
  symlinkSync(join(house, 'node_modules'), join(copy, 'node_modules'));
});

afterAll(() => rmSync(copy, { recursive: true, force: true }));

const npx = (args: string[]) => spawnSync('npx', ['--no-install', ...args], { cwd: copy, encoding: 'utf8', maxBuffer: 1 << 28 });

/** Names of the rules that are broken after `text` was put into a new file. */
function brokenBy(file: string, text: string): string[] {
  const path = join(copy, file);
  writeFileSync(path, text);
  const run = npx(['depcruise', 'src', '--config', '.dependency-cruiser.mjs', '--output-type', 'json']);
  rmSync(path);
  const { summary }: { summary: { violations: { from: string; rule: { name: string } }[] } } = JSON.parse(run.stdout);
  return summary.violations.filter((v) => v.from === file).map((v) => v.rule.name);
}

describe('import rules bite', () => {
  const planted: [string, string, string, string][] = [
    [
      'a screen that computes',
      'src/ui/planted.ts',
      "import { median } from '../numeric/index.ts';\nexport const m = median([1]);\n",
      'the-screen-computes-nothing',
    ],
    [
      'a writer that measures',
      'src/report/planted.ts',
      "import { measure } from '../measure/index.ts';\nexport const m = measure;\n",
      'writers-read-only-the-table',
    ],
    [
      'a type from a room that is out of reach',
      'src/numeric/planted.ts',
      "import type { Spectrum } from '../spectrum/index.ts';\nexport type S = Spectrum;\n",
      'numeric-knows-no-light',
    ],
    [
      'a core that reads files',
      'src/measure/planted.ts',
      "import { readFileSync } from 'node:fs';\nexport const r = readFileSync;\n",
      'core-has-no-node',
    ],
    [
      'a way round a door',
      'src/engine/planted.ts',
      "import { fitContinuum } from '../measure/continuum.ts';\nexport const f = fitContinuum;\n",
      'one-door-a-room',
    ],
    [
      'a knot',
      'src/units/planted.ts',
      "import { loop } from './planted.ts';\nexport const loop2 = loop;\nexport const loop = 1;\n",
      'no-cycles',
    ],
    [
      'a development tool in what ships',
      'src/report/planted.ts',
      "import { test } from 'vitest';\nexport const t = test;\n",
      'no-dev-dependency-in-src',
    ],
  ];
  test.each(planted)('%s is found', (_, file, text, rule) => {
    expect(brokenBy(file, text).some((name) => name.startsWith(rule))).toBe(true);
  });

  test('types may cross where values may not', () => {
    expect(
      brokenBy('src/report/planted.ts', "import type { Feature } from '../measure/index.ts';\nexport type F = Feature;\n").filter((n) =>
        n.startsWith('writers'),
      ),
    ).toEqual([]);
  });
});

test.each([
  ['the network', 'export const f = () => fetch("x");\n'],
  ['the page', 'export const d = () => document.title;\n'],
  ['Node', 'export const p = () => process.cwd();\n'],
])('%s does not compile in the core', (_, text) => {
  const path = join(copy, 'src/numeric/planted.ts');
  writeFileSync(path, text);
  const run = npx(['tsc', '-p', 'tsconfig.core.json']);
  rmSync(path);
  expect(run.status).not.toBe(0);
  expect(run.stdout).toContain('planted.ts');
});

test('the core asks no clock and no random source of its own', () => {
  const rooms = [
    'units',
    'problems',
    'numeric',
    'atomic',
    'spectrum',
    'readers',
    'measure',
    'identify',
    'plasma',
    'report',
    'session',
    'engine',
  ];
  const files = rooms
    .filter((room) => existsSync(join(house, 'src', room)))
    .flatMap((room) => sourcesBelow(join(house, 'src', room)))
    .filter((path) => !path.includes('/atomic/build/') && !path.endsWith('worker.ts'));
  expect(files.length).toBeGreaterThan(50);
  const guilty = files.filter((path) =>
    /Math\.random|Date\.now|new Date\(\)|performance\.now/.test(readFileSync(path, 'utf8').replace(/\/\*[\s\S]*?\*\/|\/\/.*/g, '')),
  );
  expect(guilty).toEqual([]);
});

function sourcesBelow(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) =>
    entry.isDirectory() ? sourcesBelow(join(folder, entry.name)) : entry.name.endsWith('.ts') ? [join(folder, entry.name)] : [],
  );
}

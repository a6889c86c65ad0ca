import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';

// `npm test`: every gate in order, fast to slow, each saying what it saw. A gate that looked at nothing is red. The last line counts them all.

interface Counts {
  passed: number;
  failed: number;
  skipped: number;
}

const scratch = mkdtempSync(join(tmpdir(), 'linewright-test-'));
const sum: Counts = { passed: 0, failed: 0, skipped: 0 };

function gate(name: string, look: () => { ok: boolean; saw: string }): void {
  const began = performance.now();
  const { ok, saw } = look();
  sum[ok ? 'passed' : 'failed']++;
  process.stdout.write(`${ok ? 'ok  ' : 'FAIL'} ${name}: ${saw} (${((performance.now() - began) / 1000).toFixed(1)} s)\n`);
}

function run(command: string, args: string[], env: Record<string, string> = {}): { code: number; text: string } {
  const done = spawnSync('npx', ['--no-install', command, ...args], {
    encoding: 'utf8',
    maxBuffer: 1 << 28,
    env: { ...process.env, ...env },
  });
  return { code: done.status ?? 1, text: `${done.stdout}${done.stderr}` };
}

/** Runs a tool and prints what it said only when it failed. */
function tool(command: string, args: string[], saw: (text: string) => string): { ok: boolean; saw: string } {
  const { code, text } = run(command, args);
  if (code !== 0) process.stdout.write(`${text.trimEnd()}\n`);
  return { ok: code === 0, saw: saw(text) };
}

function filesBelow(folder: string, pattern: RegExp): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name);
    return entry.isDirectory() ? filesBelow(path, pattern) : pattern.test(path) ? [path] : [];
  });
}

const sources = filesBelow('src', /(?<!\.d)\.tsx?$/);

gate('types of the core', () => tool('tsc', ['-p', 'tsconfig.core.json'], () => 'no DOM, no network, no Node'));
gate('types of everything', () => tool('tsc', ['-p', 'tsconfig.json'], () => `${sources.length} source files`));
gate('format and lint', () =>
  tool('biome', ['check', '--error-on-warnings', '.'], (text) => /Checked \d+ files/.exec(text)?.[0] ?? 'nothing'),
);
gate('import rules', () => {
  const { code, text } = run('depcruise', ['src', '--config', '.dependency-cruiser.mjs', '--output-type', 'json']);
  const result: {
    modules: { source: string }[];
    summary: { violations: { from: string; to: string; rule: { name: string; severity: string } }[] };
  } = JSON.parse(text.slice(text.indexOf('{')));
  const seen = new Set(result.modules.map((m) => m.source).filter((s) => s.startsWith('src/')));
  const unseen = sources.filter((s) => !seen.has(s));
  const broken = result.summary.violations.filter((v) => v.rule.severity === 'error');
  for (const v of broken) process.stdout.write(`  ${v.rule.name}: ${v.from} -> ${v.to}\n`);
  for (const path of unseen) process.stdout.write(`  not looked at: ${path}\n`);
  return {
    ok: code === 0 && broken.length === 0 && unseen.length === 0 && seen.size > 0,
    saw: `${seen.size} of ${sources.length} modules`,
  };
});
gate('nothing unused', () => tool('knip', [], () => 'files, exports, dependencies'));

const unit = join(scratch, 'unit.json');
gate('unit, law, reference and house tests', () => {
  const { text } = run('vitest', ['run', '--reporter=json', `--outputFile=${unit}`, '--reporter=default']);
  const report:
    | {
        numPassedTests: number;
        numFailedTests: number;
        numPendingTests: number;
        numTotalTests: number;
        success: boolean;
        numFailedTestSuites: number;
      }
    | undefined = readJson(unit);
  if (!report?.success) process.stdout.write(`${text.slice(-12_000)}\n`);
  if (!report) return { ok: false, saw: 'no report' };
  sum.passed += report.numPassedTests;
  sum.failed += report.numFailedTests;
  sum.skipped += report.numPendingTests;
  if (report.numPendingTests > 0)
    process.stdout.write(`skipped: ${report.numPendingTests} tests, each says why (reference material named by SHARED, optional tools)\n`);
  const missing = process.env.SHARED !== undefined && report.numPendingTests > 0;
  return { ok: report.success && report.numTotalTests > 0 && !missing, saw: `${report.numTotalTests} tests` };
});

gate('build of the desk', () => tool('vite', ['build', '--logLevel', 'warn'], () => `${filesBelow('dist/web', /./).length} files`));
gate('build of the terminal', () => tool('vite', ['build', '--mode', 'cli', '--logLevel', 'warn'], () => 'dist/cli/linewright.js'));
gate('size of the first load', () => {
  const page = readFileSync('dist/web/index.html', 'utf8');
  const first = [...page.matchAll(/(?:src|href)="\.?\/?(assets\/[^"]+\.(?:js|css))"/g)].map((m) => join('dist/web', m[1]));
  const bytes = first.reduce((total, path) => total + gzipSync(readFileSync(path), { level: 9 }).length, 0);
  const bundle = gzipSync(readFileSync('dist/web/atomic.bin'), { level: 9 }).length;
  return {
    ok: first.length > 0 && bytes <= 250_000 && bundle <= 700_000,
    saw: `${first.length} files, ${(bytes / 1000).toFixed(0)} kB of 250 gzipped; line list ${(bundle / 1000).toFixed(0)} kB of 700`,
  };
});

const browser = join(scratch, 'browser.json');
gate('browser tests', () => {
  const { text } = run('playwright', ['test'], { LINEWRIGHT_JSON: browser });
  const report: { stats: { expected: number; unexpected: number; skipped: number; flaky: number } } | undefined = readJson(browser);
  if (!report) {
    process.stdout.write(`${text.slice(-4000)}\n`);
    return { ok: false, saw: 'no report' };
  }
  const { expected, unexpected, skipped, flaky } = report.stats;
  if (unexpected + flaky > 0) process.stdout.write(`${text.slice(-8000)}\n`);
  sum.passed += expected;
  sum.failed += unexpected + flaky;
  sum.skipped += skipped;
  return { ok: unexpected + flaky === 0 && expected > 0 && skipped === 0, saw: `${expected + unexpected + skipped + flaky} tests` };
});

function readJson<T>(path: string): T | undefined {
  return existsSync(path) && statSync(path).size > 0 ? (JSON.parse(readFileSync(path, 'utf8')) as T) : undefined;
}

process.stdout.write(`tests: ${sum.passed} passed, ${sum.failed} failed${sum.skipped > 0 ? `, ${sum.skipped} skipped` : ''}\n`);
process.exitCode = sum.failed > 0 ? 1 : 0;

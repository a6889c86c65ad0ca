import { mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type Browser, chromium, type Page } from '@playwright/test';
import { build, preview } from 'vite';
import { BROWSER_FLAGS, findBrowser } from '../browser/findBrowser.ts';

/** What is read of a trace: Chromium's trace event format. */
interface TraceEvent {
  readonly name: string;
  readonly pid: number;
  readonly tid: number;
  /** Microseconds, by the clock and on the processor. */
  readonly dur?: number;
  readonly tdur?: number;
  readonly args: { readonly name?: string };
}

/** The longest tasks of the page's own thread while a spectrum is opened, measured and named, and while verdicts are given: by the clock and on the processor. */
export async function blockingBench(): Promise<string[]> {
  const house = fileURLToPath(new URL('../..', import.meta.url));
  const outDir = mkdtempSync(join(tmpdir(), 'linewright-blocking-'));
  const config = { configFile: join(house, 'vite.config.ts'), root: house, logLevel: 'error' } as const;
  await build({ ...config, build: { outDir, emptyOutDir: true } });
  const server = await preview({ ...config, build: { outDir }, preview: { host: '127.0.0.1', port: 4396 } });
  const browser = await chromium.launch({ executablePath: findBrowser(), args: BROWSER_FLAGS });
  try {
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
    await page.goto(server.resolvedUrls?.local[0] ?? '');
    const trace = join(outDir, 'trace.json');
    const idle = async () => {
      await page.locator('.plot-canvas .scatterlayer').first().waitFor();
      await page.getByRole('progressbar').waitFor({ state: 'detached' });
      await page.waitForTimeout(500);
    };
    const opening = await longest(browser, page, trace, async () => {
      await page.getByRole('button', { name: /Try the sample/ }).click();
      await page.locator('.body-row').first().waitFor();
      await idle();
    });
    const deciding = await longest(browser, page, trace, async () => {
      for (let k = 0; k < 10; k++) {
        await page.keyboard.press('Enter');
        await page.waitForTimeout(100);
      }
      await idle();
    });
    return [`opening, measuring and naming the sample: ${opening}`, `ten verdicts, each weighed anew: ${deciding}`];
  } finally {
    await browser.close();
    await server.close();
  }
}

async function longest(browser: Browser, page: Page, path: string, act: () => Promise<void>): Promise<string> {
  await browser.startTracing(page, { path, categories: ['toplevel', 'devtools.timeline'] });
  await act();
  await browser.stopTracing();
  const { traceEvents }: { traceEvents: readonly TraceEvent[] } = JSON.parse(readFileSync(path, 'utf8'));
  const busiest = traceEvents.filter((e) => e.name === 'FunctionCall');
  const thread = traceEvents.find(
    (e) => e.name === 'thread_name' && e.args.name === 'CrRendererMain' && busiest.some((call) => call.pid === e.pid && call.tid === e.tid),
  );
  const tasks = traceEvents.filter((e) => /RunTask$/.test(e.name) && e.pid === thread?.pid && e.tid === thread.tid);
  const most = (times: readonly number[]) => (Math.max(...times) / 1000).toFixed(0);
  return `${tasks.length} tasks, the longest ${most(tasks.map((e) => e.tdur ?? 0))} ms on the processor, ${most(tasks.map((e) => e.dur ?? 0))} ms by the clock`;
}

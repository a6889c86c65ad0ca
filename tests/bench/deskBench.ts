import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium } from '@playwright/test';
import { build, preview } from 'vite';
import { BROWSER_FLAGS, findBrowser } from '../browser/findBrowser.ts';

const FEATURES = 800;
const LENGTHS = [300_000, 1_500_000] as const;

/** Script time of a frame of the whole desk while the spectrum is moved and zoomed, in a browser without a screen. */
export async function deskBench(): Promise<string[]> {
  const house = fileURLToPath(new URL('../..', import.meta.url));
  const outDir = mkdtempSync(join(tmpdir(), 'linewright-frames-'));
  const config = { configFile: join(house, 'vite.config.ts'), root: join(house, 'tests/bench/desk'), logLevel: 'error' } as const;
  await build({ ...config, publicDir: join(house, 'public'), build: { outDir, emptyOutDir: true } });
  const server = await preview({ ...config, build: { outDir }, preview: { host: '127.0.0.1', port: 4397 } });
  const browser = await chromium.launch({ executablePath: findBrowser(), args: BROWSER_FLAGS });
  try {
    const lines: string[] = [];
    for (const samples of LENGTHS) {
      const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
      await page.goto(server.resolvedUrls?.local[0] ?? '');
      const { mine, rival } = await page.evaluate(([n, count]) => window.measureFrames(n, count), [samples, FEATURES] as const);
      lines.push(
        `${samples.toLocaleString('en')} samples, ${FEATURES} features, ${mine.length} frames: median ${at(mine, 0.5)} ms, nine in ten below ${at(mine, 0.9)} ms` +
          ` (the library alone, curve and marks anew: ${at(rival, 0.5)} and ${at(rival, 0.9)} ms)`,
      );
      await page.close();
    }
    return lines;
  } finally {
    await browser.close();
    await server.close();
  }
}

/** A quantile, printed. */
function at(times: readonly number[], share: number): string {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.floor(share * (sorted.length - 1))].toFixed(1);
}

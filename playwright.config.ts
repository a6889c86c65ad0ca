import { defineConfig } from '@playwright/test';
import { BROWSER_FLAGS, findBrowser } from './tests/browser/findBrowser.ts';

const port = Number(process.env.LINEWRIGHT_TEST_PORT ?? 4391);

// The browser tests use the built page as a user would get it: run `npm run build` first.
export default defineConfig({
  testDir: 'tests/browser',
  testMatch: '*.spec.ts',
  timeout: 60_000,
  workers: 1,
  retries: 0,
  outputDir: 'test-results',
  reporter: process.env.LINEWRIGHT_JSON ? [['json', { outputFile: process.env.LINEWRIGHT_JSON }], ['line']] : 'line',
  use: {
    baseURL: `http://127.0.0.1:${port}/`,
    viewport: { width: 1440, height: 900 },
    launchOptions: { executablePath: findBrowser(), args: BROWSER_FLAGS },
  },
  webServer: {
    command: `npx vite preview --port ${port} --strictPort --host 127.0.0.1`,
    url: `http://127.0.0.1:${port}/`,
    reuseExistingServer: false,
    timeout: 60_000,
  },
});

import { gzipSync } from 'node:zlib';
import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

/** Bytes, gzipped, of everything the empty desk loads. */
const FIRST_LOAD = 250_000;

test('no request leaves the origin, and the page itself forbids it', async ({ page, context, baseURL }) => {
  const asked: string[] = [];
  context.on('request', (request) => asked.push(request.url()));
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await desk.isIdle();
  expect(asked.length).toBeGreaterThan(4);
  expect(asked.filter((url) => !url.startsWith(baseURL ?? '') && !url.startsWith('blob:') && !url.startsWith('data:'))).toEqual([]);
  const policy = await page.locator('meta[http-equiv="Content-Security-Policy"]').getAttribute('content');
  expect(policy).toContain("default-src 'none'");
  expect(policy).toContain("connect-src 'self'");
  expect(policy).not.toMatch(/unsafe-eval|https?:/);
});

test('the empty desk is light: the drawing library is loaded with the first spectrum', async ({ page }) => {
  let bytes = 0;
  const weighing: Promise<void>[] = [];
  page.on('response', (response) => {
    if (!/\.(js|css)$/.test(new URL(response.url()).pathname)) return;
    weighing.push(
      response.body().then((body) => {
        bytes += gzipSync(body).length;
      }),
    );
  });
  await page.goto('/');
  await page.getByRole('button', { name: /sample/ }).waitFor();
  await page.waitForLoadState('networkidle');
  await Promise.all(weighing);
  expect(bytes).toBeGreaterThan(50_000);
  expect(bytes).toBeLessThan(FIRST_LOAD);
});

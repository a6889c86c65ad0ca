import { readFile } from 'node:fs/promises';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { extname, join } from 'node:path';
import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

const TYPES: Record<string, string> = {
  '.html': 'text/html',
  '.js': 'text/javascript',
  '.css': 'text/css',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.webmanifest': 'application/manifest+json',
};

/** The plainest of hosts: files below a sub-path, nothing else; `index.html` is led to its folder, as some do. `build` puts another hash in place of the build's own. */
async function plainHost(
  path: string,
  build: () => string | undefined = () => undefined,
): Promise<{ server: Server; url: string; asked: string[] }> {
  const asked: string[] = [];
  const server = createServer((request, response) => {
    const { pathname } = new URL(request.url ?? '/', 'http://host');
    asked.push(pathname);
    const asks = pathname.startsWith(path) ? pathname.slice(path.length) : '?';
    if (asks === 'index.html') return response.writeHead(301, { location: path }).end();
    const file = asks || 'index.html';
    readFile(join('dist/web', file)).then(
      (bytes) => {
        const other = file === 'offline.js' ? build() : undefined;
        const body = other ? bytes.toString('utf8').replace(/(?<=[`"'])[0-9a-f]{16}(?=[`"'])/, other) : bytes;
        response.writeHead(200, { 'content-type': TYPES[extname(file)] ?? 'application/octet-stream' }).end(body);
      },
      () => response.writeHead(404).end(),
    );
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return { server, url: `http://127.0.0.1:${(server.address() as AddressInfo).port}${path}`, asked };
}

const isKept = () => navigator.serviceWorker.ready.then(() => navigator.serviceWorker.controller !== null);

test('the built page opens from a sub-path of a plain host, and after the first load without any network', async ({ page, context }) => {
  const { server, url, asked } = await plainHost('/tools/linewright/');
  const desk = new Desk(page);
  await page.goto(url);
  await expect(async () => expect(await page.evaluate(isKept)).toBe(true)).toPass({ timeout: 20_000 });
  expect(asked.filter((path) => !path.startsWith('/tools/linewright/'))).toEqual([]);

  await context.setOffline(true);
  await new Promise((resolve) => server.close(resolve));
  server.closeAllConnections();
  await page.reload();
  await page.getByRole('button', { name: /Lantern Nebula/ }).click();
  await desk.isReady();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await page.reload();
  await desk.isReady();
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await page.screenshot({ path: 'test-results/screens/offline.png' });
  expect(desk.faults).toEqual([]);
});

test('a newer build waits until it is asked for, and the work is still there under it', async ({ page }) => {
  let build: string | undefined;
  const { server, url } = await plainHost('/', () => build);
  const desk = new Desk(page);
  await page.goto(url);
  await expect(async () => expect(await page.evaluate(isKept)).toBe(true)).toPass({ timeout: 20_000 });
  await page.getByRole('button', { name: /Try the sample/ }).click();
  await desk.isReady();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await desk.isIdle();
  const stores = () => page.evaluate(() => caches.keys());
  const [old] = await stores();
  build = '0123456789abcdef';
  await page.reload();
  const offer = page.getByRole('button', { name: /A newer release is here/ });
  await expect(offer).toBeVisible({ timeout: 20_000 });
  await desk.isReady();
  await desk.picture('newer-build');
  expect(await stores()).toContain(old);
  await offer.click();
  await expect(offer).toHaveCount(0);
  await desk.isReady();
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await expect(async () => expect(await stores()).toEqual([expect.stringContaining('0123456789abcdef')])).toPass();
  expect(desk.faults).toEqual([]);
  server.closeAllConnections();
  server.close();
});

test('the page says what it is to be installed', async ({ page }) => {
  await page.goto('/');
  const link = await page.locator('link[rel=manifest]').getAttribute('href');
  const manifest: { name: string; display: string; start_url: string; icons: { src: string; sizes: string }[] } = await (
    await page.request.get(new URL(link ?? '', page.url()).href)
  ).json();
  expect(manifest).toMatchObject({ name: 'Linewright', display: 'standalone', start_url: './' });
  expect(manifest.icons.map((icon) => icon.sizes)).toEqual(expect.arrayContaining(['192x192', '512x512']));
  for (const icon of manifest.icons) expect((await page.request.get(new URL(icon.src, page.url()).href)).ok(), icon.src).toBe(true);
});

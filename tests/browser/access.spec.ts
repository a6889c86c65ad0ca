import AxeBuilder from '@axe-core/playwright';
import { expect, type Page, test } from '@playwright/test';
import { Desk } from './desk.ts';

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** Axe finds nothing to say; a picture is left to be looked at. */
async function check(page: Page, view: string, scheme: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(WCAG).analyze();
  expect(violations.map((v) => `${view}: ${v.id} ${v.nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([]);
  await page.screenshot({ path: `test-results/screens/${scheme}-${view.toLowerCase().replaceAll(' ', '-')}.png` });
}

for (const colorScheme of ['light', 'dark'] as const) {
  test(`every view passes WCAG 2.2 AA in ${colorScheme}`, async ({ page }) => {
    test.setTimeout(180_000);
    await page.emulateMedia({ colorScheme });
    const desk = new Desk(page);
    await page.goto('/');
    await page.getByRole('button', { name: /Try the sample/ }).waitFor();
    await check(page, 'empty desk', colorScheme);
    await page.keyboard.press('?');
    await check(page, 'keys on the empty desk', colorScheme);
    await desk.openSample();
    await check(page, 'tour', colorScheme);
    await page.getByRole('button', { name: 'End the tour' }).click();
    await desk.chooseRow('[O III] 5006.84');
    await page.keyboard.press('Enter');
    await desk.isIdle();
    for (const tab of await page.getByRole('tab').all()) {
      await tab.click();
      await desk.isIdle();
      await check(page, (await tab.textContent()) ?? '', colorScheme);
    }
    await page.keyboard.press('?');
    await check(page, 'keys', colorScheme);
    await desk.chooseRow('He I 5875');
    await page.keyboard.press('Shift+ArrowDown');
    await page.getByRole('region', { name: 'Picked rows' }).waitFor();
    await check(page, 'picked rows', colorScheme);
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Export and sessions' }).click();
    await check(page, 'menu', colorScheme);
    await page.keyboard.press('Escape');
    await desk.openText('notes.txt', 'dear diary\nthere are no numbers in here\n');
    await page.locator('.strip-problem').waitFor();
    await check(page, 'refused file', colorScheme);
  });
}

for (const [width, height] of [
  [1024, 768],
  [1440, 900],
  [1920, 1080],
  [3840, 2160],
]) {
  test(`nothing runs out of a window of ${width} x ${height}`, async ({ page }) => {
    await page.setViewportSize({ width, height });
    const desk = new Desk(page);
    await desk.openSample();
    await page.getByRole('button', { name: 'End the tour' }).click();
    const overflow = await page.evaluate(() => [document.documentElement.scrollWidth, document.documentElement.scrollHeight]);
    expect(overflow[0]).toBeLessThanOrEqual(width);
    expect(overflow[1]).toBeLessThanOrEqual(height);
    for (const part of ['.spectrum', '.side', '.table']) {
      const box = await page.locator(part).boundingBox();
      expect(box && box.x + box.width <= width && box.y + box.height <= height && box.width > 300 && box.height > 120).toBe(true);
    }
    await page.screenshot({ path: `test-results/screens/window-${width}.png` });
  });
}

test('at 200 % zoom of a 1440 x 900 window everything can still be reached, and nothing needs scrolling both ways', async ({ page }) => {
  // what a browser does at 200 %: half as many pixels of the page, each twice as large
  await page.setViewportSize({ width: 720, height: 450 });
  const desk = new Desk(page);
  await desk.openSample();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(720);
  await page.screenshot({ path: 'test-results/screens/zoom-200.png', fullPage: true });
  for (const name of ['Open a file', 'Export and sessions', 'Next feature']) {
    const button = page.getByRole('button', { name: new RegExp(`^${name}`) }).first();
    await button.scrollIntoViewIfNeeded();
    const box = await button.boundingBox();
    expect(box && box.x >= 0 && box.x + box.width <= 720, name).toBe(true);
  }
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await expect(desk.status()).toHaveText(/accepted \[O III\] 5006\.84/);
});

test('two fingers zoom the spectrum and every control is large enough for a finger', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL, hasTouch: true, viewport: { width: 1180, height: 820 } });
  const page = await context.newPage();
  const desk = new Desk(page);
  await desk.openSample();
  const area = await page.locator('.plot-area').boundingBox();
  if (!area) throw new Error('the spectrum is not drawn');
  const touch = await context.newCDPSession(page);
  const y = area.y + area.height * 0.6;
  const fingers = (a: number, b: number) => [
    { x: area.x + area.width * a, y, id: 1 },
    { x: area.x + area.width * b, y, id: 2 },
  ];
  const described = () => page.locator('.plot-area').getAttribute('aria-label');
  const whole = await described();
  await touch.send('Input.dispatchTouchEvent', { type: 'touchStart', touchPoints: fingers(0.45, 0.55) });
  for (let k = 1; k <= 10; k++)
    await touch.send('Input.dispatchTouchEvent', { type: 'touchMove', touchPoints: fingers(0.45 - 0.03 * k, 0.55 + 0.03 * k) });
  await touch.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] });
  await expect(page.locator('.plot-area')).not.toHaveAttribute('aria-label', whole ?? '');
  const [low, high] = [...((await described()) ?? '').matchAll(/\d{4}/g)].map(Number);
  expect(high - low).toBeLessThan(1200);

  const small = await page.evaluate(() =>
    [...document.querySelectorAll('button, select, input, summary, [role=tab]')]
      .map((element) => ({ element, box: element.getBoundingClientRect() }))
      .filter(
        ({ element, box }) => box.width > 0 && (box.width < 24 || box.height < 24) && !element.matches('[type=checkbox], [type=radio]'),
      )
      .map(({ element }) => element.outerHTML.slice(0, 120)),
  );
  expect(small).toEqual([]);
  expect(desk.faults).toEqual([]);
  await context.close();
});

test('who wants less motion gets none', async ({ page }) => {
  await page.emulateMedia({ reducedMotion: 'reduce' });
  await new Desk(page).openSample();
  const moving = await page.evaluate(
    () =>
      [...document.querySelectorAll('*')].filter((element) => {
        const { transitionDuration, animationName, scrollBehavior } = getComputedStyle(element);
        return (
          transitionDuration.split(', ').some((time) => Number.parseFloat(time) > 0) ||
          animationName !== 'none' ||
          scrollBehavior === 'smooth'
        );
      }).length,
  );
  expect(moving).toBe(0);
});

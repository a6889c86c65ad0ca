import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

for (const colorScheme of ['light', 'dark'] as const) {
  test(`every view passes WCAG 2.2 AA in ${colorScheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme });
    const desk = new Desk(page);
    const check = async (view: string) => {
      const { violations } = await new AxeBuilder({ page }).withTags(WCAG).analyze();
      expect(violations.map((v) => `${view}: ${v.id} ${v.nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([]);
    };
    await page.goto('/');
    await page.getByRole('button', { name: /sample/ }).waitFor();
    await check('empty desk');
    await desk.openSample();
    await desk.chooseRow('[O III] 5006.84');
    await page.keyboard.press('Enter');
    await desk.isIdle();
    for (const tab of await page.getByRole('tab').all()) {
      await tab.click();
      await check((await tab.textContent()) ?? '');
    }
    await page.getByRole('button', { name: 'Export and sessions' }).click();
    await check('menu');
  });
}

for (const [width, height] of [
  [1024, 768],
  [3840, 2160],
]) {
  test(`nothing runs out of a window of ${width} x ${height}`, async ({ page }) => {
    await page.setViewportSize({ width, height });
    const desk = new Desk(page);
    await desk.openSample();
    const overflow = await page.evaluate(() => [document.documentElement.scrollWidth, document.documentElement.scrollHeight]);
    expect(overflow[0]).toBeLessThanOrEqual(width);
    expect(overflow[1]).toBeLessThanOrEqual(height);
    for (const part of ['.spectrum', '.side', '.table']) {
      const box = await page.locator(part).boundingBox();
      expect(box && box.x + box.width <= width && box.y + box.height <= height && box.width > 300 && box.height > 120).toBe(true);
    }
  });
}

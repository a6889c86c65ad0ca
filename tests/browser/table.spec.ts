import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

test('rows are picked by Ctrl, Shift and keys, decided on at once, taken back at once and copied for a spreadsheet', async ({
  page,
  context,
}) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  const desk = new Desk(page);
  await desk.openSample();
  const bar = page.getByRole('region', { name: 'Picked rows' });

  await page.getByLabel('Ion', { exact: true }).selectOption('He I');
  const rows = page.locator('.body-row');
  await rows.nth(0).click();
  await rows.nth(1).click({ modifiers: ['ControlOrMeta'] });
  await rows.nth(3).click({ modifiers: ['ControlOrMeta'] });
  await expect(bar).toContainText('3 rows picked');
  await page.screenshot({ path: 'test-results/screens/picked.png' });
  await bar.getByRole('button', { name: 'Accept' }).click();
  await expect(desk.status()).toHaveText(/accepted 3 names/);
  await expect(page.locator('.facts')).toContainText('3 accepted');
  await page.keyboard.press('ControlOrMeta+z');
  await expect(page.locator('.facts')).toContainText('0 accepted');

  await rows.nth(1).click();
  await expect(bar).toHaveCount(0);
  await rows.nth(4).click({ modifiers: ['Shift'] });
  await expect(bar).toContainText('4 rows picked');
  await page.keyboard.press('Shift+ArrowDown');
  await expect(bar).toContainText('5 rows picked');
  await bar.getByRole('button', { name: 'Note' }).click();
  await page.keyboard.type('helium of the rim');
  await page.keyboard.press('Enter');
  await expect(desk.status()).toHaveText(/noted on 5 features: helium of the rim/);
  await page.keyboard.press('ControlOrMeta+c');
  await expect(desk.status()).toHaveText(/5 rows are on the clipboard/);
  const text = await page.evaluate(() => navigator.clipboard.readText());
  const lines = text.split('\n').map((line) => line.split('\t'));
  expect(lines).toHaveLength(6);
  expect(lines[0].slice(0, 2)).toEqual(['feature', 'wavelength_obs']);
  expect(lines.every((cells) => cells.length === lines[0].length)).toBe(true);
  expect(lines[1].at(-1)).toContain('helium of the rim');

  await page.keyboard.press('x');
  await expect(desk.status()).toHaveText(/called 5 features artefacts/);
  await page.keyboard.press('Escape');
  await expect(bar).toHaveCount(0);
  expect(desk.faults).toEqual([]);
});

test('of three thousand rows only those in sight are drawn, and the last is as near as the first', async ({ page }) => {
  test.setTimeout(120_000);
  const desk = new Desk(page);
  await page.goto('/');
  const lines = Array.from(
    { length: 3000 },
    (_, k) => `${(3600 + 2 * k + ((k * 37) % 11) / 10).toFixed(2)},0.05,${1 + ((k * 7919) % 97)},0.5`,
  );
  await desk.openText('many.csv', `# air wavelengths\nwavelength,wavelength_err,flux,flux_err\n${lines.join('\n')}\n`);
  await expect(page.locator('.body-row').first()).toBeVisible({ timeout: 90_000 });
  await expect(page.locator('.filter')).toContainText('3000 lines');
  expect(await page.locator('.body-row').count()).toBeLessThan(60);
  await page.locator('.table-scroll').evaluate((element) => element.scrollTo(0, element.scrollHeight));
  await page.locator('.body-row', { hasText: '3000' }).last().click();
  await expect(desk.chosen()).toContainText('Feature 3000');
  const head = await page.locator('.lines thead').boundingBox();
  const top = await page.locator('.table-scroll').boundingBox();
  expect(head && top && Math.abs(head.y - top.y)).toBeLessThan(3);
  expect(await page.locator('.body-row').count()).toBeLessThan(60);
  await desk.picture('three-thousand-rows');
  expect(desk.faults).toEqual([]);
});

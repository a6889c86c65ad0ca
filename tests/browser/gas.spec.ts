import { readFileSync } from 'node:fs';
import AxeBuilder from '@axe-core/playwright';
import { expect, type Page, test } from '@playwright/test';
import { csvRows, Desk } from './desk.ts';

const openGas = async (page: Page) => {
  const desk = new Desk(page);
  await desk.openSample();
  await page.keyboard.press('g');
  await expect(page.getByRole('region', { name: 'What the named lines say of the gas' })).toBeVisible();
  return desk;
};
const view = (page: Page, name: string) => page.getByRole('button', { name, exact: true });
const saved = async (page: Page, press: () => Promise<void>) => {
  const download = page.waitForEvent('download');
  await press();
  const file = await download;
  return { name: file.suggestedFilename(), bytes: readFileSync(await file.path()) };
};

test('the four views are reached by keyboard, each with a figure that says what it shows', async ({ page }) => {
  await openGas(page);
  for (const [name, title] of [
    ['Ladder', /Density ladder of \d+ thin-gas lines/],
    ['Reddening', /\d+ hydrogen lines, observed over case B/],
    ['Te, ne', /Temperature against density: \d+ measured ratios/],
    ['Motion', /\d+ lines: velocity, km\/s against/],
  ] as const) {
    await view(page, name).focus();
    await page.keyboard.press('Enter');
    await expect(page.getByRole('img', { name: title })).toBeVisible();
  }
});

for (const colorScheme of ['light', 'dark'] as const) {
  test(`every view of the gas passes WCAG 2.2 AA in ${colorScheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme });
    await openGas(page);
    for (const name of ['Ladder', 'Reddening', 'Te, ne', 'Motion']) {
      await view(page, name).click();
      const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']).analyze();
      expect(violations.map((v) => `${name}: ${v.id} ${v.nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([]);
    }
  });
}

test('a density tried with the arrow keys is drawn on the spectrum, and taken off again', async ({ page }) => {
  await openGas(page);
  const curves = page.locator('.plot-canvas .scatterlayer .trace');
  const before = await curves.count();
  await page.getByRole('slider', { name: 'Try a density' }).focus();
  await page.keyboard.press('ArrowRight');
  await expect(page.getByText(/\d+ of \d+ thin-gas lines would lose more than half/)).toBeVisible();
  await expect(curves).toHaveCount(before + 1);
  await page.getByRole('button', { name: 'Take it off the spectrum' }).click();
  await expect(curves).toHaveCount(before);
});

test('what is known follows a verdict: without its 4363 the ratio is gone, undo brings it back', async ({ page }) => {
  const desk = await openGas(page);
  await view(page, 'Te, ne').click();
  const ratio = page.getByRole('rowheader', { name: /\[O III\] 4363\/\(4959\+5007\)/ });
  await expect(ratio).toHaveCount(1);
  await desk.chooseRow('[O III] 4363.21');
  await page.keyboard.press('u');
  await desk.isIdle();
  await page.keyboard.press('g');
  await expect(ratio).toHaveCount(0);
  await page.keyboard.press('ControlOrMeta+z');
  await expect(ratio).toHaveCount(1);
});

test('the reddening law is a setting like any other: it changes the numbers, stands in the history and is undone', async ({ page }) => {
  const desk = await openGas(page);
  await view(page, 'Reddening').click();
  const assumed = page.getByText(/one screen of dust/);
  await expect(assumed).toContainText("O'Donnell");
  await page.getByRole('combobox', { name: 'Extinction law' }).selectOption('fitzpatrick99');
  await expect(assumed).toContainText('Fitzpatrick 1999');
  await expect(desk.status()).toContainText('set extinction law to Fitzpatrick 1999');
  await page.keyboard.press('ControlOrMeta+z');
  await expect(assumed).toContainText("O'Donnell");
});

test('a figure is saved as SVG and as PNG, all numbers as CSV', async ({ page }) => {
  await openGas(page);
  await view(page, 'Te, ne').click();
  const svg = await saved(page, () => page.getByRole('button', { name: 'Save as SVG' }).click());
  expect(svg.name).toBe('lantern-nebula-te-ne.svg');
  expect(svg.bytes.toString()).toContain('<svg xmlns');
  const png = await saved(page, () => page.getByRole('button', { name: 'Save as PNG' }).click());
  expect(png.name).toBe('lantern-nebula-te-ne.png');
  expect(png.bytes.subarray(1, 4).toString()).toBe('PNG');
  expect(png.bytes.length).toBeGreaterThan(10_000);
  const csv = await saved(page, () => page.getByRole('button', { name: 'Save all numbers as CSV' }).click());
  const rows = csvRows(csv.bytes.toString());
  const te = rows.find((row) => row.item === 'Te' && row.zone === 'medium');
  expect(Math.abs(Number(te?.value) / 11_400 - 1)).toBeLessThan(0.03);
});

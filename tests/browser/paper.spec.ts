import { readFileSync } from 'node:fs';
import AxeBuilder from '@axe-core/playwright';
import { expect, type Page, test } from '@playwright/test';
import { unzipSync } from 'fflate';
import { Desk } from './desk.ts';

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const sheet = (page: Page) => page.locator('.paper-sheet');
const show = (page: Page, name: string) => sheet(page).getByRole('button', { name, exact: true }).click();
const heads = (page: Page) => sheet(page).getByRole('columnheader').allTextContents();
const panel = (page: Page) => page.getByRole('region', { name: 'For the paper' }).last();

async function openPaper(page: Page): Promise<Desk> {
  const desk = new Desk(page);
  await desk.openSample();
  await page.getByRole('tab', { name: 'Paper' }).click();
  await page.getByRole('button', { name: 'Take all lines' }).click();
  await expect(sheet(page).getByRole('table', { name: /Emission lines of lantern-nebula/ })).toBeVisible();
  return desk;
}

async function saved(page: Page, name: string | RegExp): Promise<{ name: string; bytes: Buffer }> {
  const download = page.waitForEvent('download');
  await page.getByRole('button', { name }).first().click();
  const file = await download;
  return { name: file.suggestedFilename(), bytes: readFileSync(await file.path()) };
}

test('a table is laid out by keyboard: the moved column keeps the focus, every step is undone', async ({ page }) => {
  const desk = await openPaper(page);
  expect((await heads(page)).slice(0, 2)).toEqual(['λobs(Å)', 'Ion']);
  const later = page.getByRole('button', { name: 'Move observed wavelength to the right' });
  await later.focus();
  await page.keyboard.press('Enter');
  await expect(sheet(page).getByRole('columnheader').first()).toHaveText('Ion');
  await expect(later).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(sheet(page).getByRole('columnheader').nth(2)).toHaveText('λobs(Å)');
  await expect(later).toBeFocused();
  await expect(desk.status()).toContainText('moved the column observed wavelength');
  await page.getByRole('button', { name: 'Move notes to the left' }).press('Enter');
  await page.getByRole('button', { name: 'Move notes to the right' }).press('Enter');
  await expect(page.getByRole('button', { name: 'Move notes to the left' })).toBeFocused();
  for (let k = 0; k < 4; k++) await page.keyboard.press('ControlOrMeta+z');
  await expect(sheet(page).getByRole('columnheader').first()).toHaveText('λobs(Å)');
});

test('presets, rows, scale and digits change the table at once, and a column comes and goes', async ({ page }) => {
  await openPaper(page);
  await page.getByRole('button', { name: 'Appendix' }).click();
  expect(await heads(page)).toHaveLength(15);
  await expect(sheet(page).locator('tr.part').first()).toBeVisible();
  await page.getByRole('button', { name: 'Letter' }).click();
  await panel(page).getByLabel('Lines').selectOption('all');
  expect((await heads(page))[2]).toContain('I(λ)');
  const line = sheet(page).getByRole('row').filter({ hasText: '5006.84' });
  await expect(line).toContainText('[O iii]');
  await panel(page).getByLabel('Fluxes').selectOption('hbeta100');
  expect((await heads(page))[2]).toContain('F(λ)');
  await panel(page).getByLabel('Digits of an error').selectOption('2');
  await expect(line).toContainText(/\d ± \d\.\d(?!\d)|\d ± 0\.\d\d(?!\d)/);
  await panel(page).getByLabel('Another column').selectOption('lifetime');
  await panel(page).getByRole('button', { name: 'Add', exact: true }).click();
  expect((await heads(page)).at(-1)).toContain('τ');
  await panel(page).getByRole('button', { name: 'Leave lifetime out' }).click();
  expect((await heads(page)).at(-1)).not.toContain('τ');
});

test('only what was accepted is printed, and an unidentified line says so', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await desk.chooseRow('He I 5875');
  await page.keyboard.press('u');
  await desk.isIdle();
  await page.getByRole('tab', { name: 'Paper' }).click();
  await expect(sheet(page).locator('tbody tr')).toHaveCount(2);
  await expect(sheet(page).locator('tbody')).toContainText('unidentified');
});

test('figures are shown at their printed size and saved as SVG and as PNG of 300 dpi', async ({ page }) => {
  await openPaper(page);
  await show(page, 'Figures');
  for (const name of ['Atlas of the spectrum', 'Density ladder', 'Te against ne', /Fit of feature \d+/])
    await expect(sheet(page).getByRole('img', { name }).first()).toBeVisible();
  const svg = await saved(page, 'SVG: Density ladder');
  expect(svg.name).toBe('lantern-nebula-density-ladder.svg');
  expect(svg.bytes.toString()).not.toContain('<text');
  const png = await saved(page, 'PNG, 300 dpi: Te against ne');
  expect(png.name).toBe('lantern-nebula-temperature-density.png');
  expect(png.bytes.readUInt32BE(16)).toBe(Math.round((88 * 300) / 25.4));
  expect(png.bytes.readUInt32BE(png.bytes.indexOf('pHYs') + 4)).toBe(11_811);
});

test('the methods paragraph is edited, kept in the session, and made anew', async ({ page }) => {
  await openPaper(page);
  await show(page, 'Methods');
  const paragraph = sheet(page).getByLabel('Methods paragraph');
  await expect(paragraph).toHaveValue(/Lines were measured and identified with Linewright .* on the spectrum lantern-nebula\.csv/);
  await expect(sheet(page).locator('.bib')).toContainText('@article{ciddor1996');
  await paragraph.fill('We did it by hand.');
  await paragraph.blur();
  await expect(sheet(page).getByText('Edited by you')).toBeVisible();
  await page.reload();
  await expect(paragraph).toHaveValue('We did it by hand.', { timeout: 30_000 });
  await sheet(page).getByRole('button', { name: 'Make it anew' }).click();
  await expect(paragraph).toHaveValue(/Lines were measured/);
});

test('everything is saved as one ZIP, and the session in it gives the same tables again', async ({ page, browser, baseURL }) => {
  const desk = await openPaper(page);
  const first = unzipSync((await saved(page, 'Everything as one ZIP')).bytes);
  expect(Object.keys(first)).toEqual(
    expect.arrayContaining(['figures/atlas.png', 'figures/atlas.svg', 'session.linewright.json', 'tables/lines.fits']),
  );
  const context = await browser.newContext({ baseURL });
  const other = await context.newPage();
  const again = new Desk(other);
  await again.openSample();
  await other.getByRole('button', { name: 'Export and sessions' }).click();
  const chooser = other.waitForEvent('filechooser');
  await other.getByRole('button', { name: 'Open session' }).click();
  await (await chooser).setFiles({
    name: 'lantern-nebula.linewright.json',
    mimeType: 'application/json',
    buffer: Buffer.from(first['session.linewright.json']),
  });
  await again.isIdle();
  await other.getByRole('tab', { name: 'Paper' }).click();
  const second = unzipSync((await saved(other, 'Everything as one ZIP')).bytes);
  for (const path of Object.keys(first).filter((name) => name.startsWith('tables/')))
    expect(Buffer.from(second[path]).equals(Buffer.from(first[path])), path).toBe(true);
  expect([...desk.faults, ...again.faults]).toEqual([]);
  await context.close();
});

test('a second opinion is laid beside the session: what differs, and how probable each name is', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await desk.isIdle();
  const session = await desk.save(/Save session/);
  await page.keyboard.press('ControlOrMeta+z');
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('u');
  await desk.isIdle();
  await page.getByRole('tab', { name: 'Paper' }).click();
  await show(page, 'Second opinion');
  await sheet(page)
    .getByLabel('Session to compare with')
    .setInputFiles({ name: session.name, mimeType: 'application/json', buffer: Buffer.from(session.text) });
  await expect(sheet(page).getByText(/0 verdicts agree, 1 differs/)).toBeVisible();
  await expect(sheet(page).locator('.differences li')).toContainText(
    /First: unidentified; second: accepted O III 5008\.240\. The weighing gives O III 5008\.240 [01]\.\d{3}/,
  );
});

for (const colorScheme of ['light', 'dark'] as const) {
  test(`every sheet of the paper passes WCAG 2.2 AA in ${colorScheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme });
    const desk = await openPaper(page);
    for (const name of ['Table', 'Figures', 'Methods', 'Second opinion']) {
      await show(page, name);
      const { violations } = await new AxeBuilder({ page }).withTags(WCAG).analyze();
      expect(violations.map((v) => `${name}: ${v.id} ${v.nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([]);
      await desk.picture(`${colorScheme}-paper-${name.toLowerCase().replaceAll(' ', '-')}`);
    }
  });
}

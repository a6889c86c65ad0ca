import { readFileSync } from 'node:fs';
import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

const SAMPLE = readFileSync('public/samples/lantern-nebula.csv', 'utf8');
/** The sample without the lines that say what it is. */
const UNSTATED = SAMPLE.split('\n')
  .filter((line) => !line.startsWith('#'))
  .join('\n');

test('a file that cannot be read is refused in words and takes nothing away; a good one follows', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await desk.openText('notes.txt', 'dear diary\nthere are no numbers in here\n');
  await expect(page.locator('.strip-problem')).toContainText('notes.txt');
  await desk.picture('files-refused');
  await expect(page.locator('.facts')).toContainText('lantern-nebula.csv');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await page.getByRole('button', { name: 'Dismiss' }).click();
  await expect(page.locator('.strip-problem')).toHaveCount(0);

  await desk.openText('second.csv', UNSTATED);
  await expect(page.locator('.facts')).toContainText('second.csv', { timeout: 30_000 });
  await desk.isIdle();
  await desk.picture('files-good-after-refused');
  await expect(page.locator('.facts')).toContainText('0 accepted');
  await page.keyboard.press('ControlOrMeta+z');
  await expect(page.locator('.facts')).toContainText('lantern-nebula.csv', { timeout: 30_000 });
  await expect(page.locator('.facts')).toContainText('1 accepted');
  expect(desk.faults).toEqual([]);
});

test('a spectrum dropped on the window is opened, and air or vacuum is asked when the file does not say', async ({ page }) => {
  const desk = new Desk(page);
  await page.goto('/');
  await page.getByRole('button', { name: /sample/ }).waitFor();
  const transfer = await page.evaluateHandle((text) => {
    const files = new DataTransfer();
    files.items.add(new File([text], 'dropped.csv', { type: 'text/csv' }));
    return files;
  }, UNSTATED);
  await page.dispatchEvent('.app', 'dragover', { dataTransfer: transfer });
  await expect(page.getByText('Let go to open the file')).toBeVisible();
  await desk.picture('files-dropping');
  await page.dispatchEvent('.app', 'drop', { dataTransfer: transfer });
  await desk.isReady();
  const question = page.getByRole('region', { name: 'Air or vacuum wavelengths?' });
  await expect(question).toContainText('Taken as');
  await desk.picture('files-air-or-vacuum');
  await question.getByRole('button', { name: 'They are air' }).click();
  await expect(question).toHaveCount(0);
  await desk.isIdle();
  await page.keyboard.press('ControlOrMeta+z');
  await expect(question).toBeVisible({ timeout: 30_000 });
  expect(desk.faults).toEqual([]);
});

test('a session file takes the verdicts elsewhere and asks for the spectrum it is about', async ({ page, browser, baseURL }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await desk.isIdle();
  const session = await desk.save(/Save session/);
  expect(session.name).toBe('lantern-nebula.linewright.json');

  const elsewhere = await browser.newPage({ baseURL });
  const other = new Desk(elsewhere);
  await elsewhere.goto('/');
  await other.openText(session.name, session.text);
  await expect(elsewhere.getByRole('heading', { name: /This session is about lantern-nebula.csv/ })).toBeVisible();
  await other.openText('lantern-nebula.csv', SAMPLE);
  await other.isReady();
  await expect(elsewhere.locator('.facts')).toContainText('1 accepted');
  expect(other.faults).toEqual([]);
  await elsewhere.close();
});

test('a list of measured lines is named without a spectrum', async ({ page }) => {
  const desk = new Desk(page);
  await page.goto('/');
  const lines = [
    ['4340.46', 46.9],
    ['4363.21', 9.1],
    ['4685.70', 14],
    ['4861.33', 100],
    ['4958.91', 300],
    ['5006.84', 895],
    ['5875.66', 14],
    ['6548.05', 20],
    ['6562.80', 286],
    ['6583.45', 61],
    ['6716.44', 6],
    ['6730.82', 8],
  ];
  await desk.openText(
    'measured.csv',
    `# air wavelengths\nwavelength,wavelength_err,flux,flux_err\n${lines.map(([w, f]) => `${w},0.05,${f},0.5`).join('\n')}\n`,
  );
  await desk.isReady();
  await expect(page.locator('.facts')).toContainText('12 features');
  await expect(desk.row('[O III] 5006.84')).toBeVisible();
});

test('a changed setting is measured anew and can be undone; nonsense is refused in words', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  const count = page.locator('.fact-count b').first();
  const before = Number(await count.textContent());
  await page.keyboard.press('s');
  await page.getByLabel('Detection threshold').fill('60');
  await page.getByLabel('Detection threshold').press('Enter');
  await expect(async () => expect(Number(await count.textContent())).toBeLessThan(before)).toPass({ timeout: 30_000 });
  await desk.isIdle();
  await page.getByRole('button', { name: 'Undo' }).first().click();
  await expect(count).toHaveText(String(before), { timeout: 30_000 });
  await page.getByLabel('Tolerance', { exact: true }).fill('nonsense');
  await page.getByLabel('Tolerance', { exact: true }).press('Enter');
  await expect(page.getByText(/A number between/)).toBeVisible();
  expect(desk.faults).toEqual([]);
});

test('several files opened at once form a list, and each comes back as it was left', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: 'Open a file' }).click();
  const file = (name: string) => ({ name, mimeType: 'text/csv', buffer: Buffer.from(SAMPLE) });
  await (await chooser).setFiles([file('second.csv'), file('third.csv')]);
  await expect(page.locator('.facts')).toContainText('third.csv', { timeout: 30_000 });
  await desk.isIdle();
  await expect(page.locator('.facts')).toContainText('+ 2 more');
  await desk.picture('files-third');
  await page.getByRole('tab', { name: 'Reading' }).click();
  await page.getByRole('button', { name: 'Go to lantern-nebula.csv' }).click();
  await expect(page.locator('.facts')).toContainText('1 accepted', { timeout: 30_000 });
  await desk.isIdle();
  await page.getByRole('tab', { name: 'Reading' }).click();
  await page.getByRole('button', { name: 'Close third.csv' }).click();
  await expect(page.locator('.facts')).toContainText('+ 1 more');
  expect(desk.faults).toEqual([]);
});

test('opening a long spectrum can be stopped, and what was on the desk is still there and can be worked on', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  const rows = Array.from({ length: 500_000 }, (_, i) => `${(3700 + i * 0.01).toFixed(2)},${1 + ((i * 7919) % 101) / 1000}`);
  await desk.openText('long.csv', `# wavelengths in air\nwavelength,flux\n${rows.join('\n')}\n`);
  await page.getByRole('button', { name: 'Cancel' }).click();
  await expect(desk.status()).toHaveText(/Stopped/);
  await expect(page.locator('.facts')).toContainText('lantern-nebula.csv');
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await desk.isIdle();
  expect(desk.faults).toEqual([]);
});

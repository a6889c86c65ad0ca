import { expect, test } from '@playwright/test';
import { csvRows, Desk } from './desk.ts';

test('the sample is measured and named, accepted by peak, row and key, undone, kept over a reload and exported', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await expect(desk.row('[O III] 5006.84')).toBeVisible();
  await expect(page.locator('.facts')).toContainText(/features/);

  // by its peak: a click beside the strongest line of H beta, with the view close in on it
  await desk.chooseRow('H I 4861');
  await page.keyboard.press('c');
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('c');
  await page.waitForTimeout(400);
  const area = await page.locator('.plot-area').boundingBox();
  const line = await page.locator('.chosen-line').boundingBox();
  if (!area || !line) throw new Error('the spectrum is not drawn');
  await page.keyboard.press('ArrowRight');
  await expect(page.locator('.flag-name')).not.toHaveText('[O III] 5007');
  await page.mouse.click(line.x, area.y + area.height * 0.6);
  await expect(page.locator('.flag-name')).toHaveText('[O III] 5007');
  await page
    .locator('.chosen-flag')
    .getByRole('button', { name: /^Accept/ })
    .click();
  await expect(desk.status()).toHaveText(/accepted \[O III\] 5006\.84/);
  await desk.picture('job-accepted-by-click');

  // by its row
  await page.getByRole('searchbox').fill('4958');
  await page.locator('.body-row').first().hover();
  await page
    .locator('.body-row')
    .first()
    .getByRole('button', { name: /^Accept/ })
    .click();
  await expect(desk.status()).toHaveText(/accepted \[O III\] 4958\.91/);
  await page.getByRole('searchbox').fill('');

  // by key
  await desk.chooseRow('H I 6562');
  await page.keyboard.press('Enter');
  await expect(desk.status()).toHaveText(/accepted H I 6562/);
  await expect(page.locator('.facts')).toContainText('3 accepted');

  await desk.picture('job-accepted-by-key');
  await page.keyboard.press('ControlOrMeta+z');
  await expect(page.locator('.facts')).toContainText('2 accepted');
  await desk.picture('job-undone');
  await page.keyboard.press('ControlOrMeta+Shift+z');
  await expect(page.locator('.facts')).toContainText('3 accepted');
  await desk.isIdle();

  await page.reload();
  await desk.isReady();
  await expect(page.locator('.facts')).toContainText('3 accepted');
  await desk.picture('job-reloaded');
  await page.getByRole('button', { name: 'Undo' }).first().click();
  await expect(page.locator('.facts')).toContainText('2 accepted');
  await page.getByRole('button', { name: 'Redo' }).first().click();
  await expect(page.locator('.facts')).toContainText('3 accepted');

  const { name, text } = await desk.save(/Save as CSV/);
  expect(name).toBe('lantern-nebula-lines.csv');
  const rows = csvRows(text);
  expect(rows.map((row) => row.ion)).toEqual(['[O III]', '[O III]', 'H I']);
  expect(rows.every((row) => row.verdict === 'accepted')).toBe(true);
  expect(Number(rows[1].wavelength_lab)).toBeCloseTo(5006.84, 1);
  expect(Number(rows[1].flux) / Number(rows[0].flux)).toBeCloseTo(2.98, 0);
  expect(rows[1].thin_gas).toBe('true');
  expect(Number(rows[1].n_crit)).toBeGreaterThan(1e5);

  const latex = await desk.save(/Save as LaTeX \(longtable/);
  expect(latex.text).toContain('\\begin{longtable}');
  expect(desk.faults).toEqual([]);
});

test('a case shows its own candidates only, also after one in which two are called the same', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  // H alpha of the object and of the night sky
  await desk.chooseRow('H I 6562');
  await expect(page.locator('.candidate-name').first()).toContainText('H I 6562');
  await desk.chooseRow('[O III] 5006.84');
  await expect(page.locator('.candidate-name').first()).toContainText('[O III] 5006.84');
  await expect(page.locator('.candidate-name', { hasText: 'H I 6562' })).toHaveCount(0);
  for (let k = 0; k < 25; k++) {
    await page.keyboard.press('ArrowRight');
    const numbers = await page.locator('.candidate kbd').allTextContents();
    expect(numbers).toEqual(numbers.map((_, n) => (n < 9 ? String(n + 1) : '')));
  }
  expect(desk.faults).toEqual([]);
});

test('a refit keeps every verdict on its feature', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  for (const name of ['[O III] 5006.84', '[N II] 6583.45', 'He I 7065']) {
    await desk.chooseRow(name);
    await page.keyboard.press('Enter');
    await expect(desk.status()).toHaveText(/accepted/);
  }
  await expect(page.locator('.facts')).toContainText('3 accepted');
  const count = page.locator('.fact-count b').first();
  const before = Number(await count.textContent());
  await page.keyboard.press('s');
  await page.getByLabel('Detection threshold').fill('25');
  await page.getByLabel('Detection threshold').press('Enter');
  await expect(async () => expect(Number(await count.textContent())).toBeLessThan(before)).toPass({ timeout: 30_000 });
  await desk.isIdle();
  await expect(page.locator('.facts')).toContainText('3 accepted');
  for (const name of ['[O III] 5006.84', '[N II] 6583.45', 'He I 7065']) {
    await page.getByRole('searchbox').fill(name);
    await expect(page.locator('.body-row').first()).toContainText('accepted');
  }
  await page.getByRole('searchbox').fill('');
  await desk.picture('job-refitted');
  expect(desk.faults).toEqual([]);
});

test('the whole job is done without a mouse', async ({ page }) => {
  const desk = new Desk(page);
  await page.goto('/');
  const sample = page.getByRole('button', { name: /sample/ });
  for (let stops = 0; stops < 12 && !(await sample.evaluate((element) => element === document.activeElement)); stops++)
    await page.keyboard.press('Tab');
  await page.keyboard.press('Enter');
  await desk.isReady();
  const first = await desk.chosen().textContent();
  await page.keyboard.press('ArrowRight');
  await expect(desk.chosen()).not.toHaveText(first ?? '');
  await page.keyboard.press('/');
  await page.keyboard.type('He II 4685');
  await page.keyboard.press('Enter');
  await expect(page.locator('.flag-name')).toHaveText('He II 4686');
  await page.keyboard.press('1');
  await expect(desk.status()).toHaveText(/accepted He II 4685/);
  await page.keyboard.press('n');
  await page.keyboard.press('u');
  await expect(desk.status()).toHaveText(/unidentified/);
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Backspace');
  await expect(desk.status()).toHaveText(/rejected|unidentified/);
  await page.keyboard.press('m');
  await page.keyboard.type('checked by eye');
  await page.keyboard.press('Enter');
  await expect(desk.status()).toHaveText(/noted .* checked by eye/);
  const download = page.waitForEvent('download');
  await page.keyboard.press('e');
  expect((await download).suggestedFilename()).toBe('lantern-nebula-lines.csv');
  await page.keyboard.press('?');
  await expect(page.getByRole('tabpanel')).toContainText('Accept the top candidate');
  expect(desk.faults).toEqual([]);
});

import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

test('a feature is split, another one added by key, a place tried for a limit; all of it is taken back', async ({ page }) => {
  await new Desk(page).openSample();
  const count = page.getByText(/\d+ features/).first();
  const before = Number(/(\d+) features/.exec((await count.textContent()) ?? '')?.[1]);
  const features = async () => Number(/(\d+) features/.exec((await count.textContent()) ?? '')?.[1]);
  await page.keyboard.press('t');
  await expect.poll(features).toBe(before + 1);
  await expect(page.getByText('split by hand').first()).toBeVisible();
  await page.getByText('Fit by hand (1 step so far)').click();
  await page.getByRole('button', { name: 'Compare shapes' }).click();
  await expect(page.getByRole('rowheader', { name: 'Gaussian', exact: true })).toBeVisible();
  await page.getByRole('button', { name: 'Limit here' }).click();
  await expect(page.getByText(/an unseen line at .*3 sigma/)).toBeVisible();
  const spectrum = page.locator('.plot-canvas');
  const box = await spectrum.boundingBox();
  if (!box) throw new Error('no spectrum');
  await page.mouse.move(box.x + box.width * 0.62, box.y + box.height * 0.6);
  await page.keyboard.press('a');
  await expect.poll(features).toBe(before + 2);
  await page.screenshot({ path: 'test-results/by-hand.png' });
  await page.keyboard.press('ControlOrMeta+z');
  await page.keyboard.press('ControlOrMeta+z');
  await expect.poll(features).toBe(before);
});

test('the close-up takes a click for a place and a drag of its centre for a move', async ({ page }) => {
  await new Desk(page).openSample();
  const closeUp = page.locator('.close-up');
  const box = await closeUp.boundingBox();
  if (!box) throw new Error('no close-up');
  await page.mouse.click(box.x + box.width * 0.8, box.y + 40);
  await expect(page.getByRole('button', { name: 'Move this one here' })).toBeEnabled();
  await page.mouse.move(box.x + box.width * 0.5, box.y + 40);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width * 0.52, box.y + 40, { steps: 4 });
  await page.mouse.up();
  await expect(page.getByText(/moved feature \d+ to/).first()).toBeVisible();
});

import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

test('the line list is searched by ion and wavelength, and a line shows all that is known of it', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await page.getByRole('tab', { name: 'Lines' }).click();
  await page.getByRole('searchbox', { name: /Ion, wavelength/ }).fill('O III 5007');
  await page.getByRole('button', { name: /\[O III\] 5006\.843/ }).click();
  const panel = page.getByRole('tabpanel');
  for (const fact of ['2p2 3P 2 – 2p2 1D 2', 'forbidden', 'Critical density', 'Lykins']) await expect(panel).toContainText(fact);
  expect(desk.faults).toEqual([]);
});

test('own lines are added whole or not at all, and undo takes them out', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await page.getByRole('tab', { name: 'Lines' }).click();
  const own = page.getByRole('region', { name: 'Your own lines' });
  const file = (name: string, text: string) => ({ name, mimeType: 'text/csv', buffer: Buffer.from(text) });
  await own.locator('input').setInputFiles(file('bad.csv', 'ion,wavelength_air\nXe VI,far\n'));
  await expect(own.getByRole('alert')).toContainText('bad.csv, line 2');
  await own.locator('input').setInputFiles(file('mine.csv', 'ion,wavelength_air,nature\nXe VI,5409.5,forbidden\n'));
  await expect(own).toContainText('Lines of mine.csv are in the list');
  await page.getByRole('searchbox', { name: /Ion, wavelength/ }).fill('Xe VI');
  await expect(page.getByRole('button', { name: /\[Xe VI\] 5409\.500/ })).toBeVisible();
  await page.getByRole('button', { name: /^Undo/ }).first().click();
  await expect(own).not.toContainText('mine.csv');
  expect(desk.faults).toEqual([]);
});

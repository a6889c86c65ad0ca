import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

test('the tour comes up with the first spectrum, follows what is done, ends for good and can be taken again', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  const tour = page.getByRole('region', { name: 'Tour' });
  await expect(tour).toContainText('1 of 7');
  await page.screenshot({ path: 'test-results/screens/tour.png' });
  await page.keyboard.press('ArrowRight');
  await expect(tour).toContainText('2 of 7');
  await tour.getByRole('button', { name: 'Next step' }).click();
  await page.locator('.panel').focus();
  await page.keyboard.press('Enter');
  await expect(tour).toContainText('4 of 7');
  await page.keyboard.press('ControlOrMeta+z');
  await expect(tour).toContainText('5 of 7');
  await page.keyboard.press('+');
  await expect(tour).toContainText('6 of 7');
  await page.keyboard.press('Shift+ArrowDown');
  await expect(tour).toContainText('7 of 7');
  await tour.getByRole('button', { name: 'Done' }).click();
  await expect(tour).toHaveCount(0);
  await page.reload();
  await desk.isReady();
  await expect(tour).toHaveCount(0);
  await page.keyboard.press('?');
  await page.getByRole('button', { name: 'Take the two-minute tour' }).click();
  await expect(tour).toContainText('1 of 7');
  await tour.getByRole('button', { name: 'End the tour' }).click();
  await expect(tour).toHaveCount(0);
  expect(desk.faults).toEqual([]);
});

for (const [name, fact] of [
  ['Heron Marsh', 'v ='],
  ['Kiln Nebula', 'v ='],
  ['Ember Veil', 'v ='],
  ['Dunlin Galaxy', 'z = +0.103'],
]) {
  test(`one click opens the sample ${name}`, async ({ page }) => {
    const desk = new Desk(page);
    await page.goto('/');
    await page.getByRole('button', { name: new RegExp(name) }).click();
    await desk.isReady();
    await expect(page.locator('.facts')).toContainText(fact);
    await page.screenshot({ path: `test-results/screens/${name.toLowerCase().replace(' ', '-')}.png` });
    expect(desk.faults).toEqual([]);
  });
}

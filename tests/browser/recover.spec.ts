import { readFileSync } from 'node:fs';
import { expect, test } from '@playwright/test';
import { Desk } from './desk.ts';

const EMBER = readFileSync('public/samples/ember-veil.csv', 'utf8');

test('a tab closed in the middle of the work comes back with all that was decided, and undo still knows it', async ({ page, context }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await page.keyboard.press('m');
  await page.keyboard.type('brightest of the rim');
  await page.keyboard.press('Enter');
  await expect(desk.status()).toHaveText(/noted/);
  // closed at once, while the naming is still going on
  await page.close();

  const after = await context.newPage();
  const other = new Desk(after);
  await after.goto('/');
  await other.isReady();
  await expect(after.locator('.facts')).toContainText('1 accepted');
  await expect(other.row('brightest of the rim')).toHaveCount(1);
  await after.keyboard.press('h');
  await expect(after.getByRole('tabpanel')).toContainText('accepted [O III] 5006.84');
  await after.screenshot({ path: 'test-results/screens/recovered.png' });
  await after.keyboard.press('ControlOrMeta+z');
  await after.keyboard.press('ControlOrMeta+z');
  await expect(after.locator('.facts')).toContainText('0 accepted');
  expect(other.faults).toEqual([]);
});

test('a session knows its spectrum by the bytes: under another name it is taken, another one under its name is not', async ({
  page,
  browser,
  baseURL,
}) => {
  const desk = new Desk(page);
  await page.goto('/');
  await desk.openText('ember.csv', EMBER);
  await desk.isReady();
  await desk.chooseRow('[O III] 5006.84');
  await page.keyboard.press('Enter');
  await desk.isIdle();
  const session = await desk.save(/Save session/);
  const saved: { version: number; document: { source: { name: string; sha256: string } } } = JSON.parse(session.text);
  expect(saved.version).toBe(2);
  expect(saved.document.source.name).toBe('ember.csv');
  expect(saved.document.source.sha256).toMatch(/^[0-9a-f]{64}$/);

  const elsewhere = await browser.newPage({ baseURL });
  const other = new Desk(elsewhere);
  await elsewhere.goto('/');
  await other.openText(session.name, session.text);
  await expect(elsewhere.getByRole('heading', { name: /This session is about ember.csv/ })).toBeVisible();
  // one sample is changed: the size is the same, the bytes are not
  await other.openText(
    'ember.csv',
    EMBER.replace(/(\d)(?=,\S+\n$)/, (digit) => String((Number(digit) + 1) % 10)),
  );
  await other.isReady();
  await expect(elsewhere.locator('.strip-problem')).toContainText('is not the file the session is about');
  await expect(elsewhere.locator('.facts')).toContainText('0 accepted');
  await elsewhere.getByRole('button', { name: 'Dismiss' }).click();
  await other.openText('renamed.csv', EMBER);
  await other.isReady();
  expect(other.faults).toEqual([]);
  await elsewhere.close();
});

test('a second tab says that two would write over each other', async ({ page, context }) => {
  const desk = new Desk(page);
  await desk.openSample();
  const second = await context.newPage();
  await second.goto('/');
  await expect(second.locator('.strip-problem')).toContainText('open in another tab', { timeout: 10_000 });
  await page.reload();
  await desk.isReady();
});

test('the first key after a reload opens the dialog for files', async ({ page }) => {
  // listened to from the start: the browser only reports dialogs once it knows that somebody listens
  let dialogs = 0;
  page.on('filechooser', () => dialogs++);
  await page.goto('/');
  await page.getByRole('button', { name: /Try the sample/ }).waitFor();
  await page.keyboard.press('o');
  await expect(() => expect(dialogs).toBe(1)).toPass();
  await page.reload();
  await page.getByRole('button', { name: /Try the sample/ }).waitFor();
  await page.keyboard.press('o');
  await expect(() => expect(dialogs).toBe(2)).toPass();
});

test('what was kept and is broken is set aside with a word, and the desk starts all the same', async ({ page }) => {
  const desk = new Desk(page);
  await desk.openSample();
  await page.keyboard.press('Enter');
  await expect(page.locator('.facts')).toContainText('1 accepted');
  await desk.isIdle();
  const kept = await page.evaluate(
    () =>
      new Promise<string[]>((resolve, reject) => {
        const opening = indexedDB.open('linewright');
        opening.onerror = () => reject(opening.error);
        opening.onsuccess = () => {
          const store = opening.result.transaction('desk', 'readwrite').objectStore('desk');
          const reading = store.get('current');
          reading.onsuccess = () => {
            const { session, view } = reading.result;
            const writing = store.put({ session: { ...session, document: { settings: 'gone' } }, view }, 'current');
            writing.onsuccess = () => {
              opening.result.close();
              resolve(Object.keys(session));
            };
          };
        };
      }),
  );
  expect(kept).toContain('version');
  await page.reload();
  await expect(page.locator('.strip-problem')).toContainText('the work kept in this browser');
  await expect(page.locator('.strip-problem')).toContainText('set aside');
  await page.getByRole('button', { name: /Try the sample/ }).click();
  await desk.isReady();
  await page.reload();
  await desk.isReady();
  expect(desk.faults).toEqual([]);
});

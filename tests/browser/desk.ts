import { expect, type Page } from '@playwright/test';

/** A line table as the desk saves it: what is asked of a page in the tests. */
export class Desk {
  readonly page: Page;
  /** Requests that left the origin, and errors of the page. */
  readonly faults: string[] = [];

  constructor(page: Page) {
    this.page = page;
    page.on('pageerror', (error) => this.faults.push(error.message));
    page.on('console', (message) => {
      if (message.type() === 'error' && !/404/.test(message.text())) this.faults.push(message.text());
    });
    page.on('request', (request) => {
      const { protocol, host } = new URL(request.url());
      if (!['data:', 'blob:'].includes(protocol) && host !== new URL(page.url() || request.url()).host && page.url() !== 'about:blank')
        this.faults.push(`left the origin: ${request.url()}`);
    });
  }

  async openSample(): Promise<void> {
    await this.page.goto('/');
    await this.page.getByRole('button', { name: /Try the sample/ }).click();
    await this.isReady();
  }

  /** Features are named, the spectrum is drawn and nothing is going on. */
  async isReady(): Promise<void> {
    await expect(this.page.locator('.body-row').first()).toBeVisible({ timeout: 30_000 });
    await expect(this.page.locator('.plot-canvas .scatterlayer').first()).toBeAttached();
    await this.isIdle();
  }

  async isIdle(): Promise<void> {
    await expect(this.page.getByRole('progressbar')).toHaveCount(0, { timeout: 30_000 });
  }

  /** Chooses the feature a name stands for, by the filter of the table. */
  async chooseRow(words: string): Promise<void> {
    const filter = this.page.getByRole('searchbox');
    await filter.fill(words);
    await this.page.locator('.body-row').first().click();
    await filter.fill('');
    await filter.blur();
  }

  /** Leaves a picture to be looked at. */
  async picture(name: string): Promise<void> {
    await this.page.waitForTimeout(250);
    await this.page.screenshot({ path: `test-results/screens/${name}.png` });
  }

  row(words: string) {
    return this.page.locator('.body-row', { hasText: words });
  }

  status() {
    return this.page.getByRole('status');
  }

  chosen() {
    return this.page.locator('.case h2');
  }

  /** Opens a file that a test makes up. */
  async openText(name: string, text: string): Promise<void> {
    const chooser = this.page.waitForEvent('filechooser');
    await this.page.getByRole('button', { name: 'Open a file' }).first().click();
    await (await chooser).setFiles({ name, mimeType: 'text/plain', buffer: Buffer.from(text) });
  }

  /** Saves by the export menu and returns what was saved. */
  async save(label: RegExp): Promise<{ name: string; text: string }> {
    await this.page.getByRole('button', { name: 'Export and sessions' }).click();
    const download = this.page.waitForEvent('download');
    await this.page.getByRole('button', { name: label }).click();
    const file = await download;
    const chunks: Buffer[] = [];
    for await (const chunk of await file.createReadStream()) chunks.push(Buffer.from(chunk));
    return { name: file.suggestedFilename(), text: Buffer.concat(chunks).toString('utf8') };
  }
}

/** Rows of a CSV text as objects; good enough for cells without line ends. */
export function csvRows(text: string): Record<string, string>[] {
  const [head, ...lines] = text.trim().split(/\r?\n/).map(cells);
  return lines.map((line) => Object.fromEntries(head.map((key, k) => [key, line[k]])));
}

const cells = (line: string) =>
  [...line.matchAll(/("(?:[^"]|"")*"|[^,]*)(,|$)/g)].slice(0, -1).map(([, cell]) => cell.replace(/^"|"$/g, '').replaceAll('""', '"'));

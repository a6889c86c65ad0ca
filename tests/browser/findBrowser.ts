import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { chromium } from '@playwright/test';

const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome'];
const PLACES = [
  '/usr/bin/chromium',
  '/usr/bin/google-chrome',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
];

/** Flags a browser needs to start as root, and to keep quiet on the network. */
export const BROWSER_FLAGS = ['--no-sandbox', '--disable-gpu', '--disable-background-networking'];

const installed = (): string | undefined => {
  const onPath = (process.env.PATH ?? '').split(delimiter).flatMap((folder) => NAMES.map((name) => join(folder, name)));
  return [...PLACES, ...onPath].find(existsSync);
};

const playwrightsOwn = (): string | undefined => {
  const path = chromium.executablePath();
  return path && existsSync(path) ? path : undefined;
};

/**
 * A browser for the tests: CHROME_PATH, an installed Chrome or Chromium, Playwright's own; when there is none, Playwright's download is tried, then, on Debian as
 * root, its package.
 *
 * @throws Error that says what to install
 */
export function findBrowser(): string {
  const told = process.env.CHROME_PATH;
  if (told) {
    if (existsSync(told)) return told;
    throw new Error(`CHROME_PATH names ${told}, which is not there`);
  }
  const found = installed() ?? playwrightsOwn();
  if (found) return found;
  spawnSync('npx', ['playwright', 'install', '--only-shell', 'chromium'], { stdio: 'ignore', timeout: 60_000 });
  const downloaded = playwrightsOwn();
  if (downloaded) return downloaded;
  if (isDebian() && process.getuid?.() === 0) {
    process.stderr.write('no browser found: installing Debian’s chromium\n');
    spawnSync('apt-get', ['update'], { stdio: 'ignore' });
    spawnSync('apt-get', ['install', '-y', '--no-install-recommends', 'chromium'], {
      stdio: 'ignore',
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    });
    const packaged = installed();
    if (packaged) return packaged;
  }
  throw new Error(
    'The browser tests need Chrome or Chromium: install one, or set CHROME_PATH to it, or run `npx playwright install chromium`.',
  );
}

const isDebian = () => existsSync('/etc/os-release') && /^ID(_LIKE)?=.*debian|^ID=ubuntu/m.test(readFileSync('/etc/os-release', 'utf8'));

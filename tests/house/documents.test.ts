import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { expect, test } from 'vitest';

const house = resolve(import.meta.dirname, '../..');
const { scripts } = JSON.parse(readFileSync(join(house, 'package.json'), 'utf8')) as { scripts: Record<string, string> };

test.each(['README.md', 'DEVELOPERS.md'])('every command and link of %s exists', (name) => {
  const text = readFileSync(join(house, name), 'utf8');
  const commands = [...text.matchAll(/npm (?:run (?:-s )?)?([a-z]+)/g)]
    .map((m) => m[1])
    .filter((word) => !['ci', 'run', 'i'].includes(word));
  expect(commands.length).toBeGreaterThan(1);
  for (const command of commands) expect(Object.keys(scripts), `npm run ${command} in ${name}`).toContain(command);
  const links = [...text.matchAll(/\]\((?!https?:)([^)#]+)/g)].map((m) => m[1]);
  for (const link of links) expect(existsSync(join(dirname(join(house, name)), link)), `${link} in ${name}`).toBe(true);
  const paths = [...text.matchAll(/`((?:src|tests|public)\/[\w./-]+)`/g)].map((m) => m[1]);
  for (const path of paths) expect(existsSync(join(house, path)), `${path} in ${name}`).toBe(true);
});

test('the README opens with the job and states its cautions', () => {
  const text = readFileSync(join(house, 'README.md'), 'utf8');
  expect(text.split('\n\n')[1].length).toBeGreaterThan(300);
  for (const caution of ['proposal', 'Atomic data have errors', 'You decide']) expect(text).toContain(caution);
});

test('no tracked text speaks of a machine or of anything but the project', () => {
  // put together from pieces, so that this list does not find itself
  const banned = [
    ['/wo', 'rk/'],
    ['before', '-stop'],
    ['tran', 'script'],
    ['lect', 'ure'],
    ['seed ', 'document'],
    ['Cla', 'ude'],
    ['Chat', 'GPT'],
  ].map((p) => p.join(''));
  const files = execFileSync('git', ['ls-files'], { cwd: house, encoding: 'utf8' })
    .split('\n')
    .filter((path) => path && !/\.(bin|png|fits|gz|svg)$|package-lock/.test(path) && existsSync(join(house, path)));
  expect(files.length).toBeGreaterThan(50);
  const guilty = files.filter((path) => {
    const text = readFileSync(join(house, path), 'utf8');
    return banned.some((word) => text.toLowerCase().includes(word.toLowerCase()));
  });
  expect(guilty).toEqual([]);
});

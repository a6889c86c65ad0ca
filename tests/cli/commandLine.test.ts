import { expect, test } from 'vitest';
import { fileWith, linewright } from './linewright.ts';

test.each([
  [['tabel', 'x.csv'], /no command 'tabel'.*table, name, read, limits/],
  [['table'], /no file was named/],
  [['table', 'a.csv', 'b.csv'], /several files need --out/],
  [['table', 'a/x.csv', 'b/x.csv', '--out', '/tmp'], /a\/x\.csv and b\/x\.csv would both be written to x\.csv/],
  [['table', 'a.csv', '--velocty', '3'], /no option --velocty: did you mean --velocity\?/],
  [['table', 'a.csv', '--z', '1', '--velocity', '3'], /give one of them/],
  [['table', 'a.csv', '--z', 'far'], /--z far: expected a number/],
  [['table', 'a.csv', '--format', 'votabel'], /did you mean votable\?/],
  [['table', 'a.csv', '--kind', 'planet'], /there are unknown, hii-region/],
  [['read', 'a.fits', '--row', '0'], /--row 0: expected a whole number from 1 on/],
])('%j is refused in words', (args, words) => {
  const { code, out, err } = linewright(...args);
  expect(code).toBe(2);
  expect(out).toBe('');
  expect(err).toMatch(words);
  expect(err.trim().split('\n')).toHaveLength(1);
});

test('a file that is not there costs one line on stderr and exit 1', () => {
  const { code, out, err } = linewright('read', '/no/such/file.fits');
  expect(code).toBe(1);
  expect(out).toBe('');
  expect(err).toMatch(/^linewright: .*file\.fits: there is no such file\.\n$/);
});

test('help names every command', () => {
  const { code, out } = linewright('help');
  expect(code).toBe(0);
  for (const command of ['table', 'name', 'read', 'limits']) expect(out).toContain(`linewright ${command}`);
});

test('read prints the samples as stored and says how they were read', () => {
  const path = fileWith('lamp.csv', '# vacuum wavelengths in nm\nwavelength_nm,flux\n500.1,1.5\n500.2,\n500.3,2.25\n');
  const { code, out, err } = linewright('read', path);
  expect(err).toContain('"medium":"vacuum"');
  expect(code).toBe(0);
  expect(out.split('\n')[0]).toBe('wavelength,flux,flux_err,masked');
  expect(
    out
      .split('\n')
      .slice(1, 4)
      .map((line) =>
        line
          .split(',')
          .map(Number)
          .map((v) => Math.round(v * 1e6) / 1e6),
      ),
  ).toEqual([
    [5001, 1.5, 0, 0],
    [5002, 0, 0, 1],
    [5003, 2.25, 0, 0],
  ]);
});

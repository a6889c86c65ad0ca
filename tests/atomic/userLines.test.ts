import { expect, it } from 'vitest';
import { companionFinder, linesBetween, readUserLines, type UserLine, withUserLines } from '../../src/atomic/index.ts';
import { wordProblem } from '../../src/problems/index.ts';
import { vacuumFromAir } from '../../src/units/index.ts';
import { bundled, lineAtAir } from './bundledData.ts';

const read = (text: string) => readUserLines(text, 'mine.csv', bundled.lines);

/** The lines of a good list. */
function linesOf(text: string): readonly UserLine[] {
  const reading = read(text);
  if (reading.ended === 'refused') throw new Error(reading.problems.map(wordProblem).join('\n'));
  return reading.lines;
}

/** The sentences about a bad one. */
function complaints(text: string): string[] {
  const reading = read(text);
  if (reading.ended === 'read') throw new Error('the list was taken');
  return reading.problems.map(wordProblem);
}

it('columns may stand in any order, and air is turned into vacuum', () => {
  const [line] = linesOf('upper,strength,wavelength_air,ion,uncertainty,lower\r\n4d 2D 5/2,0.2,6825.5,[Kr III],0.05,\r\n');
  expect(line).toEqual({
    ion: 'Kr III',
    element: 'Kr',
    charge: 2,
    wavelengthVac: vacuumFromAir(6825.5),
    wavelengthErr: 0.05,
    nature: 'forbidden',
    strength: 0.2,
    lower: '',
    upper: '4d 2D 5/2',
    source: 'mine.csv, line 2',
  });
});

it('a column of media, comments, quotes and empty lines are understood', () => {
  const lines = linesOf(
    '# from, my, notes\nion,wavelength,medium,nature,upper\n\nTe III,21020,vacuum,forbidden,"5p2 3P, ""J"" 1"\n"Se IV",22864.0,VAC,forbidden,\n',
  );
  expect(lines.map(({ ion, wavelengthVac, upper, source }) => [ion, wavelengthVac, upper, source])).toEqual([
    ['Te III', 21_020, '5p2 3P, "J" 1', 'mine.csv, line 4'],
    ['Se IV', 22_864, '', 'mine.csv, line 5'],
  ]);
});

it('what was assumed is remarked: an uncertainty from the digits, a permitted nature, a line that is there already', () => {
  const reading = read('ion,wavelength_air\nO II,4649.13\nTe III,9000.5\n');
  if (reading.ended === 'refused') throw new Error('refused');
  expect(reading.lines.map(({ wavelengthErr, nature }) => [wavelengthErr, nature])).toEqual([
    [0.005, 'permitted'],
    [0.05, 'permitted'],
  ]);
  expect(reading.remarks.map(({ code, where }) => `${code} ${where.line}`)).toEqual([
    'uncertainty-from-digits 2',
    'nature-permitted 2',
    'line-in-list 2',
    'uncertainty-from-digits 3',
    'nature-permitted 3',
  ]);
});

it('every bad row gets its own sentence and nothing is loaded', () => {
  const found = complaints(
    'ion,wavelength_vac,nature,strength,uncertainty\nO III,5008.24,forbidden,1,0.01\nOx III,5000,,,\nO XII,5000,,,\nO IIX,5000,,,\nO III,fifty,,,\nO III,5,,,\nO III,5000,forbiden,,\n[O III],5000,permitted,,\nO III,5000,,-1,\nO III,5000,,,0\nO III,5000\nO III,,,,\n',
  );
  expect(found).toEqual([
    "mine.csv, line 3, column ion: 'Ox III': no element Ox. Did you mean O III?",
    "mine.csv, line 4, column ion: 'O XII': O has only 8 electrons. Write element and ionization stage, such as O III, [O III] or C III].",
    "mine.csv, line 5, column ion: 'O IIX': IIX is no Roman number. Write element and ionization stage, such as O III, [O III] or C III].",
    "mine.csv, line 6, column wavelength_vac: 'fifty'. Write a number between 100 and 10000000, in Angstrom.",
    "mine.csv, line 7, column wavelength_vac: '5'. Write a number between 100 and 10000000, in Angstrom.",
    "mine.csv, line 8, column nature: 'forbiden'. Did you mean forbidden?",
    "mine.csv, line 9, column nature: '[O III]' is written as forbidden, but the nature says permitted. Mend the one that is wrong.",
    "mine.csv, line 10, column strength: '-1'. Write a number above 0, or nothing.",
    "mine.csv, line 11, column uncertainty: '0'. Write a number above 0, or nothing.",
    'mine.csv, line 12: 2 cells, but 5 columns. Give every column a cell, empty where nothing is known.',
    'mine.csv, line 13, column wavelength: no wavelength. Write it in Angstrom.',
  ]);
});

it('a bad head is told before any row', () => {
  expect(complaints('ion,wavelenght_air\nO III,5007\n')).toEqual([
    "mine.csv, line 1, column wavelenght_air: a column 'wavelenght_air'. Did you mean wavelength_air?",
    'mine.csv, line 1: no column of wavelengths. Name it wavelength_air or wavelength_vac, in Angstrom.',
  ]);
  expect(complaints('ion,wavelength\nO III,5007\n')[0]).toContain("without a column 'medium'");
  expect(complaints('ion,ion,wavelength_air\nO III,O III,5007\n')[0]).toContain("two columns 'ion'");
  expect(complaints('wavelength_air\n5007\n')[0]).toContain("no column 'ion'");
});

it('a text that is no list is refused in words', () => {
  expect(complaints('')[0]).toContain('no rows of lines');
  expect(complaints('ion,wavelength_air\n')[0]).toContain('no rows of lines');
  expect(complaints('ion,wavelength_air\n"O III,5007\n')[0]).toContain('line 2: a quotation mark that is never closed');
  expect(complaints('\u0000\u0001PNG')[0]).toContain('no rows');
  expect(complaints(`ion,wavelength_air\n${'X I,1\n'.repeat(400)}`).length).toBe(101);
});

it('a row with both wavelengths, with a wrong medium or with none is told', () => {
  expect(complaints('ion,wavelength_air,wavelength_vac\nO III,5007,5008\n')[0]).toContain(
    'a wavelength in wavelength_vac and in wavelength_air',
  );
  expect(complaints('ion,wavelength,medium\nO III,5007,water\n')[0]).toContain("'water'. Write air or vacuum.");
  expect(complaints('ion,wavelength,medium\nO III,5007,\n')[0]).toContain('no medium. Write air or vacuum.');
});

const ADDED = linesOf(`ion,wavelength_vac,uncertainty,nature,strength,lower,upper
[Te III],21020,1,,0.01,5p2 3P 0,5p2 3P 1
O III,5010.5,0.01,forbidden,,${bundled.lowerLabel(lineAtAir('O III', 5006.84))},${bundled.upperLabel(lineAtAir('O III', 5006.84))}
[Te III],19000,1,,,5p2 3P 2,5p2 3P 1
`);
const joined = withUserLines(bundled, ADDED);

it('the user’s lines stand among the bundled ones, and no bundled line changes', () => {
  const { lines } = joined;
  expect(lines.count).toBe(bundled.lines.count + 3);
  for (let i = 1; i < lines.count; i++) if (!(lines.wavelengthVac[i] >= lines.wavelengthVac[i - 1])) throw new Error(`order at ${i}`);
  let k = 0;
  for (let i = 0; i < lines.count; i++) {
    if (joined.wavelengthNote(i).startsWith('added by you')) continue;
    const same =
      lines.wavelengthVac[i] === bundled.lines.wavelengthVac[k] &&
      lines.ion[i] === bundled.lines.ion[k] &&
      lines.nature(i) === bundled.lines.nature(k) &&
      lines.logStrength[i] === bundled.lines.logStrength[k] &&
      lines.upperId[i] === bundled.lines.upperId[k] &&
      joined.upperLabel(i) === bundled.upperLabel(k);
    if (!same) throw new Error(`bundled line ${k} changed`);
    k++;
  }
  expect(k).toBe(bundled.lines.count);
});

it('an added line keeps what was given and what follows from its labels', () => {
  const { lines } = joined;
  const [own] = linesBetween(lines, 5010.4999, 5010.5001);
  const pattern = lineAtAir('O III', 5006.84);
  expect(joined.lineSources(own)).toEqual(['added by you: mine.csv, line 3']);
  expect(lines.upperId[own]).toBe(bundled.lines.upperId[pattern]);
  expect(lines.upperLevel[own]).toBe(bundled.lines.upperLevel[pattern]);
  expect(lines.logStrength[own]).toBe(Number.NEGATIVE_INFINITY);
  expect(joined.strengthBasis(own)).toBe('unknown');
  expect(joined.ritzVac(own)).toBeCloseTo(bundled.ritzVac(pattern), 6);
  expect(companionFinder(joined)(own, 10_000, 100).some(({ relation }) => relation === 'same-upper-level')).toBe(true);
});

it('an ion new to the list gets a place, and its lines of one upper level belong together', () => {
  const { lines } = joined;
  const [one] = linesBetween(lines, 21_019.99, 21_020.01);
  const [two] = linesBetween(lines, 18_999.99, 19_000.01);
  const ion = lines.ions[lines.ion[one]];
  expect([ion.name, ion.element, ion.charge]).toEqual(['Te III', 'Te', 2]);
  expect(ion.creationEv).toBeGreaterThan(10);
  expect(ion.ionizationEv).toBeGreaterThan(ion.creationEv);
  expect(lines.upperId[one]).toBe(lines.upperId[two]);
  expect(lines.logStrength[one]).toBeCloseTo(-2, 6);
  expect(joined.referenceAbundance.length).toBe(lines.ions.length);
  expect(lines.wavelengthVac[joined.hydrogenicLine('H I', 2, 3)]).toBe(bundled.lines.wavelengthVac[bundled.hydrogenicLine('H I', 2, 3)]);
});

it('no lines added change nothing', () => {
  expect(withUserLines(bundled, [])).toBe(bundled);
});

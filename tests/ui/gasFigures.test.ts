import { describe, expect, it } from 'vitest';
import { DEFAULT_GAS_SETTINGS, describeGas } from '../../src/plasma/index.ts';
import { gasCsv } from '../../src/report/index.ts';
import { bandsFigure } from '../../src/ui/gas/bandsFigure.ts';
import { chargedIon } from '../../src/ui/gas/chargedIon.ts';
import { abundanceText, estimateText } from '../../src/ui/gas/estimateText.ts';
import { fadingOf } from '../../src/ui/gas/fading.ts';
import type { Figure } from '../../src/ui/gas/figure.ts';
import { figureSvg } from '../../src/ui/gas/figureSvg.ts';
import { ladderFigure } from '../../src/ui/gas/ladderFigure.ts';
import { motionFigure } from '../../src/ui/gas/motionFigure.ts';
import { reddeningFigure } from '../../src/ui/gas/reddeningFigure.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from '../plasma/simulatedGas.ts';

const lines = simulatedGas(SOME_GAS);
const gas = describeGas(lines, { data: bundled, settings: DEFAULT_GAS_SETTINGS, startTe: 1e4, startNe: 1e3 });
const WIDTH = 400;
const figures: Record<string, Figure> = {
  ladder: ladderFigure(gas.ladder, WIDTH, 6),
  reddening: reddeningFigure(gas.reddening, WIDTH),
  bands: bandsFigure(gas, WIDTH),
  motion: motionFigure(gas.kinematics, WIDTH, 'velocity', 'wavelength'),
};
const texts = (figure: Figure) => figure.shapes.flatMap((shape) => (shape.draw === 'text' ? [shape.text] : []));

describe('figures of the gas', () => {
  it.each(Object.entries(figures))('%s stays in its frame, has a title in words and no broken numbers', (_, figure) => {
    for (const shape of figure.shapes) {
      if (shape.draw === 'path' || shape.draw === 'area') expect(shape.d).not.toMatch(/NaN|Infinity|undefined/);
      else {
        expect(shape.x).toBeGreaterThanOrEqual(0);
        expect(shape.x).toBeLessThanOrEqual(WIDTH + 60);
        expect(shape.y).toBeGreaterThanOrEqual(0);
        expect(shape.y).toBeLessThanOrEqual(figure.height);
      }
    }
    expect(figure.title.length).toBeGreaterThan(20);
  });

  it.each(Object.entries(figures))('%s is a file that stands by itself: fixed colours, its title inside, markup escaped', (_, figure) => {
    const svg = figureSvg({ ...figure, title: `${figure.title} <&>` });
    expect(svg).toMatch(/^<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg"/);
    expect(svg).toContain('&lt;&amp;&gt;');
    expect(svg).not.toContain('var(');
    expect(svg.match(/<text/g)?.length).toBe(texts(figure).length);
  });

  it('the ladder has a rung a line, the diagram a letter a band', () => {
    expect(texts(figures.ladder).filter((text) => /^(S|O|N|Cl|Ar) I/.test(text))).toHaveLength(gas.ladder.rungs.length);
    for (let k = 0; k < gas.bands.length; k++) expect(texts(figures.bands)).toContain('abcdefghijkl'[k]);
    expect(texts(figures.bands)).toContain('medium');
  });

  it('an outlier of the reddening is crossed and named', () => {
    const spoiled = lines.map((line) => (line.label === 'H I 4103' ? { ...line, flux: 3 * line.flux } : line));
    const { reddening } = describeGas(spoiled, { data: bundled, settings: DEFAULT_GAS_SETTINGS, startTe: 1e4, startNe: 1e3 });
    expect(texts(reddeningFigure(reddening, WIDTH))).toContain('H I 4103');
  });
});

describe('a density tried on the lines', () => {
  it('leaves all as it is at the density of the gas itself, and fades [S II] before [O III] before what is permitted', () => {
    const own = fadingOf(gas, Math.log10(SOME_GAS.low.ne));
    const number = (label: string) => lines.find((line) => line.label === label)?.feature ?? 0;
    expect(own.get(number('S II 6718'))).toBeCloseTo(1, 1);
    const dense = fadingOf(gas, 6);
    expect(dense.get(number('S II 6718'))).toBeLessThan(0.01);
    expect(dense.get(number('O III 5008'))).toBeGreaterThan(0.3);
    expect(dense.has(number('H I 4863'))).toBe(false);
  });
});

describe('numbers in words', () => {
  it('show the digits their interval leaves', () => {
    expect(estimateText({ ended: 'value', value: 11_345.4, low: 11_321, high: 11_367 }, 'K')).toBe('11345 +22 −24 K');
    expect(estimateText({ ended: 'value', value: 1_846.5, low: 1_500, high: 2_300 }, 'cm⁻³')).toBe('1850 +450 −350 cm⁻³');
    expect(estimateText({ ended: 'below', limit: 384.4 }, 'cm⁻³')).toBe('< 380 cm⁻³');
    expect(estimateText({ ended: 'none', reason: 'x' }, 'K')).toBe('no value');
    expect(abundanceText(2.643e-4, 2.63e-4, 2.66e-4)).toBe('2.643 +0.017 −0.013 × 10⁻⁴');
  });

  it('an abundance names its ion by the charge', () => {
    expect(['O III', 'H II', 'N I', 'Fe VII', 'Ar X', 'Ar XIV', 'Fe IX'].map(chargedIon)).toEqual([
      'O²⁺',
      'H⁺',
      'N⁰',
      'Fe⁶⁺',
      'Ar⁹⁺',
      'Ar¹³⁺',
      'Fe⁸⁺',
    ]);
  });

  it('the CSV holds every view’s numbers, a row each, with as many cells as its head', () => {
    const [head, ...rows] = gasCsv(gas).trim().split('\r\n');
    const cells = (row: string) => [...row.matchAll(/(?:^|,)("(?:[^"]|"")*"|[^,]*)/g)].length;
    for (const row of rows) expect(cells(row), row).toBe(head.split(',').length);
    expect(rows.filter((row) => row.startsWith('diagnostic'))).toHaveLength(2 * gas.diagnostics.length);
    expect(rows.filter((row) => row.startsWith('ladder')).length).toBe(1 + 3 * gas.ladder.rungs.length);
  });
});

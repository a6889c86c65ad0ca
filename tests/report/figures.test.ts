import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { spreadLabels } from '../../src/report/figures/spreadLabels.ts';
import { outlineText } from '../../src/report/figures/svgText.ts';
import { atlasFigures, atlasInput, COLUMN_WIDTHS_MM, featureFitFigure, featureFitInput } from '../../src/report/index.ts';
import { glyphsFile } from '../house/glyphs.ts';
import { blend, oIII, table } from './someTable.ts';

const n = 4000;
const wavelength = Float64Array.from({ length: n }, (_, i) => 3800 + 0.4 * i);
const bump = (w: number) => 1 + 900 * Math.exp(-0.5 * ((w - oIII.wavelengthObs) / 1.1) ** 2);
const samples = {
  wavelength,
  flux: wavelength.map((w) => bump(w) + 0.1 * Math.sin(w * 7)),
  model: wavelength.map(bump),
  continuum: new Float64Array(n).fill(1),
  noise: new Float64Array(n).fill(0.1),
  masked: new Uint8Array(n),
};
const rows = table(oIII, { ...blend, verdict: 'accepted' });

describe('figures', () => {
  test('an atlas is as wide as a journal column, holds no font, and keeps the highest peak', () => {
    const [figure, ...others] = atlasFigures(atlasInput(rows, samples, { rows: 'all' }), { width: 'double', panels: 2 });
    expect(others).toEqual([]);
    expect(figure.svg).toContain(`width="${COLUMN_WIDTHS_MM.double}mm"`);
    expect(figure.svg).not.toMatch(/<text|font-family|NaN|undefined/);
    expect(figure.svg).toContain('<title>lantern_nebula.csv: atlas of the spectrum</title>');
    const colours = new Set([...figure.svg.matchAll(/#[0-9a-f]{3,6}/g)].map((m) => m[0]));
    for (const colour of colours) expect(colour).toMatch(/^#(.)\1\1$/);
  });

  test('more panels than fit a page make more pages', () => {
    const pages = atlasFigures(atlasInput(rows, samples, { rows: 'all' }), { width: 'single', panels: 7 });
    expect(pages.map((p) => p.name)).toEqual(['atlas-1', 'atlas-2']);
  });

  test('the fit of one feature is drawn with its residuals', () => {
    const input = featureFitInput(rows, samples, 1);
    if (!input) throw new Error('no input');
    const figure = featureFitFigure(input);
    expect(figure.name).toBe('feature-1');
    expect(figure.svg.match(/<circle/g)?.length).toBeGreaterThan(2 * 24);
    expect(featureFitInput(rows, samples, 99)).toBeUndefined();
  });
});

describe('labels of a figure', () => {
  test('neighbours are kept apart, each as near to its place as that allows', () => {
    const placed = spreadLabels(
      [
        { at: 10, weight: 1 },
        { at: 11, weight: 1 },
        { at: 50, weight: 1 },
      ],
      0,
      100,
      6,
    );
    expect(placed.map((p) => p.place)).toEqual([7.5, 13.5, 50]);
  });

  test('the lightest are left out when there is no room, none leaves the picture', () => {
    const many = Array.from({ length: 30 }, (_, k) => ({ at: 3 * k, weight: k }));
    const placed = spreadLabels(many, 0, 60, 6);
    expect(placed).toHaveLength(11);
    expect(Math.min(...placed.map((p) => p.label.weight))).toBe(19);
    expect(placed[0].place).toBeGreaterThanOrEqual(0);
    expect(placed[10].place).toBeLessThanOrEqual(60);
  });

  test('text has a width, and an unknown character is a question mark', () => {
    expect(outlineText('λ [O III] 5006.84', 10).width).toBeGreaterThan(50);
    expect(outlineText('\u4e00', 10).svg).toBe(outlineText('?', 10).svg);
  });
});

test('the outlines are what the font gives today', () => {
  const kept = readFileSync(new URL('../../src/report/figures/glyphs.ts', import.meta.url), 'utf8');
  const content = (text: string) => [...text.matchAll(/\[\s*(\d+),\s*'([^']*)',?\s*\]/g)].map((m) => `${m[1]} ${m[2]}`);
  expect(content(kept)).toEqual(content(glyphsFile()));
});

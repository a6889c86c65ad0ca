import { expect, test } from 'vitest';
import type { Gas, Rung } from '../../src/plasma/index.ts';
import {
  atlasFigures,
  atlasInput,
  densityLadderFigure,
  type Figure,
  featureFitFigure,
  featureFitInput,
  temperatureDensityFigure,
} from '../../src/report/index.ts';
import { blend, oIII, table } from '../report/someTable.ts';

// Every figure of a paper as it is drawn today; `npx vitest run tests/kept -u` writes the files anew. Outlined letters are left out and coordinates rounded to half a
// point, so that a change of the drawing is seen and a change in the last digit is not.
const n = 100;
const wavelength = Float64Array.from({ length: n }, (_, i) => 4985 + 0.4 * i);
const bump = (w: number) => 1 + 900 * Math.exp(-0.5 * ((w - oIII.wavelengthObs) / 1.1) ** 2);
const samples = {
  wavelength,
  flux: wavelength.map((w) => bump(w) + 0.5 * Math.sin(w * 7)),
  model: wavelength.map(bump),
  continuum: new Float64Array(n).fill(1),
  noise: new Float64Array(n).fill(0.5),
  masked: new Uint8Array(n).fill(1, 10, 13),
};
const neighbour = { ...blend, feature: 2, wavelengthObs: 5009.1, verdict: 'accepted' as const };
const rows = table(oIII, neighbour);
const logNe = Array.from({ length: 41 }, (_, k) => k / 2);
const rung = (label: string, nCrit: number): Rung => ({
  features: [1],
  label,
  ion: label,
  zone: 'medium',
  accepted: true,
  lifetimeS: 30,
  nCrit,
  survival: Float64Array.from(logNe, (log) => 1 / (1 + 10 ** log / nCrit)),
  halfAt: nCrit,
  tenthAt: 9 * nCrit,
  laboratory: '',
  insideRange: true,
});
const estimate = (value: number) => ({ ended: 'value', value, low: value, high: value }) as const;
const flat = (value: number) => logNe.map(() => value);
const gas: Pick<Gas, 'bands' | 'zones'> = {
  bands: [
    {
      label: '[O III] 4363/(4959+5007)',
      tells: 'temperature',
      at: logNe.map((log) => 10 ** log),
      middle: flat(11_000),
      low: flat(10_800),
      high: flat(11_200),
    },
  ],
  zones: [{ zone: 'medium', te: { estimate: estimate(11_000), from: '[O III]' }, ne: { estimate: estimate(2000), from: '[Ar IV]' } }],
};

const FIGURES: readonly (Figure | undefined)[] = [
  ...atlasFigures(atlasInput(rows, samples, { rows: 'all' }), { width: 'double', panels: 2 }),
  fitOf(1),
  densityLadderFigure(
    {
      te: 10_000,
      gases: [{ name: 'H II region', densityCm3: 1e3 }],
      logNe,
      rungs: [rung('[S II] 6716.44', 1e3), rung('[O III] 5006.84', 7e5)],
      contradictions: [],
    },
    'single',
  ),
  temperatureDensityFigure(gas, 'single'),
];

function fitOf(feature: number): Figure | undefined {
  const input = featureFitInput(rows, samples, feature);
  return input && featureFitFigure(input);
}

const halves = (text: string) => text.replaceAll(/-?\d+\.\d+/g, (number) => String(Math.round(2 * Number(number)) / 2 || 0));
const sketch = ({ svg }: Figure) => halves(svg.replaceAll(/<path transform="[^"]*" d="[^"]*"\/>/g, ''));

test.each(FIGURES.filter((figure) => figure !== undefined).map((figure) => [figure.name, figure] as const))(
  '%s is drawn as it was kept',
  async (name, figure) => {
    const text = sketch(figure);
    expect(text.length).toBeLessThan(20_000);
    await expect(text).toMatchFileSnapshot(`figures/${name}.svg`);
  },
);

test('every figure of a paper is kept', () => {
  expect(FIGURES.map((figure) => figure?.name)).toEqual(['atlas', 'feature-1', 'density-ladder', 'temperature-density']);
});

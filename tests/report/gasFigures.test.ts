import { describe, expect, test } from 'vitest';
import type { DensityLadder, Gas, Rung } from '../../src/plasma/index.ts';
import { densityLadderFigure } from '../../src/report/figures/densityLadder.ts';
import { temperatureDensityFigure } from '../../src/report/figures/temperatureDensity.ts';

const logNe = Array.from({ length: 41 }, (_, k) => k / 2);
const rung = (label: string, nCrit: number): Rung => ({
  features: [1],
  label,
  ion: label.split(' ').slice(0, 2).join(' '),
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
const ladder: DensityLadder = {
  te: 10_000,
  gases: [{ name: 'H II region', densityCm3: 1e3 }],
  logNe,
  rungs: [rung('[S II] 6716.44', 1e3), rung('[O III] 5006.84 + [Fe III] 5011.26', 7e5)],
  contradictions: [],
};
const onlyGrey = (svg: string) => [...svg.matchAll(/#[0-9a-f]{3,6}/g)].every(([colour]) => /^#(.)\1\1$/.test(colour));

describe('the density ladder for print', () => {
  const figure = densityLadderFigure(ladder, 'single');

  test('is one column wide, in black and grey, its text as outlines', () => {
    expect(figure?.svg).toContain('width="88mm"');
    expect(figure?.svg).not.toMatch(/<text|font-family|NaN|undefined/);
    expect(onlyGrey(figure?.svg ?? '')).toBe(true);
  });

  test('marks the critical density of every rung, in proportion to its logarithm', () => {
    const places = [...(figure?.svg ?? '').matchAll(/<circle cx="([\d.]+)"/g)].map(([, x]) => Number(x));
    expect(places).toHaveLength(2);
    const perDecade = (places[1] - places[0]) / Math.log10(700);
    expect(perDecade * 20).toBeCloseTo((88 / 25.4) * 72 - 34 - 8, 0);
  });

  test('is not drawn without collision data', () => {
    expect(densityLadderFigure({ ...ladder, rungs: [{ ...ladder.rungs[0], survival: undefined }] }, 'single')).toBeUndefined();
  });
});

describe('the plane of temperature and density for print', () => {
  const flat = (te: number) => logNe.map(() => te);
  const bands: Gas['bands'] = [
    {
      label: '[O III] 4363/5007',
      tells: 'temperature',
      at: logNe.map((log) => 10 ** log),
      middle: flat(11_000),
      low: flat(10_900),
      high: flat(11_100),
    },
  ];
  const value = (at: number) => ({ ended: 'value', value: at, low: at, high: at }) as const;
  const zones: Gas['zones'] = [
    { zone: 'medium', te: { estimate: value(11_000), from: '[O III]' }, ne: { estimate: value(1000), from: '[Ar IV]' } },
    { zone: 'high', te: { estimate: value(11_000), from: 'taken from the medium zone' }, ne: { estimate: value(1000), from: 'taken' } },
  ];

  test('draws a band within the frame and a circle only for zones with ratios of their own', () => {
    const svg = temperatureDensityFigure({ bands, zones }, 'single')?.svg ?? '';
    expect(svg).not.toMatch(/<text|NaN|undefined/);
    expect(onlyGrey(svg)).toBe(true);
    expect(svg.match(/<circle/g)).toHaveLength(1);
    expect(svg.match(/fill-opacity/g)).toHaveLength(1);
  });

  test('is not drawn without a measured ratio', () => {
    expect(temperatureDensityFigure({ bands: [], zones }, 'single')).toBeUndefined();
  });
});

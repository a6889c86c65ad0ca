import { describe, expect, it } from 'vitest';
import { caseBIntensity } from '../../src/atomic/index.ts';
import { DEFAULT_GAS_SETTINGS, describeGas, extinctionRatio, type GasSettings, type NamedLine } from '../../src/plasma/index.ts';
import { bundled, lineAtAir } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from './simulatedGas.ts';

const reddeningOf = (lines: readonly NamedLine[], settings: Partial<GasSettings> = {}) =>
  describeGas(lines, { data: bundled, settings: { ...DEFAULT_GAS_SETTINGS, ...settings }, startTe: 11_000, startNe: 1_500 }).reddening;
const clean = { ...SOME_GAS, noise: 0, floor: 1e-4 };
const changed = (lines: readonly NamedLine[], label: string, change: Partial<NamedLine>) =>
  lines.map((line) => (line.label === label ? { ...line, ...change } : line));

describe('c(H beta)', () => {
  it('is fitted to Balmer and Paschen lines at once', () => {
    const { cHbeta, lines, dof } = reddeningOf(simulatedGas(clean));
    expect(cHbeta?.value).toBeCloseTo(0.45, 3);
    expect(lines.filter(({ state }) => state === 'used')).toHaveLength(12);
    expect(dof).toBe(10);
  });

  it('a line far off the others is an outlier, shown with its distance, and does not move the rest', () => {
    const lines = simulatedGas(clean);
    const spoiled = reddeningOf(changed(lines, 'H I 3971', { flux: 2 * (lines[4].flux ?? 0) }));
    const outlier = spoiled.lines.find(({ label }) => label === 'H I 3971');
    expect(outlier).toMatchObject({ state: 'outlier', reason: expect.stringContaining('others') });
    expect(Math.abs(outlier?.offSigma ?? 0)).toBeGreaterThan(4);
    expect(spoiled.cHbeta?.value).toBeCloseTo(0.45, 3);
  });

  it('a line with a foreign part in its name is not used, and says why', () => {
    const lines = simulatedGas(clean);
    const neon = lineAtAir('Ne III', 3967.47);
    const hEpsilon = bundled.hydrogenicLine('H I', 2, 7);
    const found = reddeningOf(changed(lines, 'H I 3971', { lines: [hEpsilon, neon] })).lines.find(({ label }) => label === 'H I 3971');
    expect(found).toMatchObject({ state: 'unusable', reason: 'blended with another ion' });
  });

  it('H8 is left alone where He I 3888.65 lies within its width and He I is seen', () => {
    const lines = simulatedGas(clean);
    const [template] = lines;
    const extra = (index: number, flux: number, feature: number): NamedLine => ({
      ...template,
      feature,
      label: `extra ${feature}`,
      lines: [index],
      flux,
      fluxErr: 0.01 * flux,
      restVac: bundled.lines.wavelengthVac[index],
    });
    const eighth = extra(bundled.hydrogenicLine('H I', 2, 8), 15, 90);
    const withHelium = [...lines, eighth, extra(lineAtAir('He I', 5875.62), 12, 91)];
    const state = (of: readonly NamedLine[]) => reddeningOf(of).lines.find(({ features }) => features.includes(90));
    expect(state(withHelium)).toMatchObject({ state: 'unusable', reason: expect.stringContaining('He I 3889') });
    expect(state([...lines, eighth])?.state).not.toBe('unusable');
  });

  it('stellar absorption is filled in when it is given, and found when it is asked for', () => {
    const lines = simulatedGas({ ...clean, stellarEwA: 2 });
    expect(reddeningOf(lines).cHbeta?.value).not.toBeCloseTo(0.45, 2);
    expect(reddeningOf(lines, { stellarEwA: 2 }).cHbeta?.value).toBeCloseTo(0.45, 2);
    const fitted = reddeningOf(lines, { stellarEwA: 'fitted' });
    expect(fitted.stellarEwA).toBeCloseTo(2, 0);
    expect(fitted.cHbeta?.value).toBeCloseTo(0.45, 1);
  });

  it('He II under the Balmer lines is taken off, and He II alone gives the same c', () => {
    const { te, ne } = clean.medium;
    const k = (w: number) => extinctionRatio('ccm89-odonnell94', 3.1, w);
    const helium = [
      [3, 4],
      [4, 7],
      [4, 9],
      [5, 7],
    ].map(([lower, upper], feature): NamedLine => {
      const index = bundled.hydrogenicLine('He II', lower, upper);
      const restVac = bundled.lines.wavelengthVac[index];
      const intrinsic = 0.6 * caseBIntensity(bundled.caseB, 'He II', lower, upper, te, ne);
      const flux = intrinsic * 10 ** (-0.45 * (k(restVac) / k(4862.683) - 1));
      return {
        ...simulatedGas(clean)[0],
        feature: 100 + feature,
        label: `He II ${upper}`,
        lines: [index],
        restVac,
        flux,
        fluxErr: 1e-3 * flux,
        fwhmA: 6,
      };
    });
    const lines = simulatedGas(clean).map((line) => {
      const found = [3, 4, 5, 6, 7, 9, 10, 11].find((n) => line.lines[0] === bundled.hydrogenicLine('H I', 2, n));
      if (found === undefined) return line;
      const intrinsic = 0.6 * caseBIntensity(bundled.caseB, 'He II', 4, 2 * found, te, ne);
      return { ...line, flux: line.flux + intrinsic * 10 ** (-0.45 * (k(line.restVac) / k(4862.683) - 1)), fwhmA: 6 };
    });
    const without = reddeningOf(lines);
    const found = reddeningOf([...lines, ...helium]);
    expect(Math.abs((without.cHbeta?.value ?? 0) - 0.45)).toBeGreaterThan(0.005);
    expect(Math.abs((found.cHbeta?.value ?? 0) - 0.45)).toBeLessThan(0.002);
    expect(found.helium?.cHbeta.value).toBeCloseTo(0.45, 2);
  });
});

describe('corrected intensities', () => {
  it('stand on an H beta without stellar absorption and without He II', () => {
    const lines = simulatedGas({ ...clean, stellarEwA: 3 });
    const oxygen = lines.findIndex(({ label }) => label === 'O III 5008');
    const intensity = (settings: Partial<GasSettings>) =>
      describeGas(lines, { data: bundled, settings: { ...DEFAULT_GAS_SETTINGS, ...settings }, startTe: 11_000, startNe: 1_500 })
        .intensities?.[oxygen].value ?? 0;
    expect(Math.abs(intensity({ stellarEwA: 3 }) / 500 - 1)).toBeLessThan(0.005);
    expect(intensity({ stellarEwA: 0 }) / 500).toBeGreaterThan(1.01);
  });

  it('are there when H beta goes by the name of a blend with the He II line beside it', () => {
    const pickering = bundled.hydrogenicLine('He II', 4, 8);
    const blended = changed(simulatedGas(clean), 'H I 4863', { lines: [bundled.hydrogenicLine('H I', 2, 4), pickering] });
    const { intensities } = describeGas(blended, { data: bundled, settings: DEFAULT_GAS_SETTINGS, startTe: 11_000, startNe: 1_500 });
    expect(intensities).toHaveLength(blended.length);
  });

  it('are those of the gas, and their errors carry that of c(H beta) with its correlation', () => {
    const lines = simulatedGas(SOME_GAS);
    const gas = describeGas(lines, { data: bundled, settings: DEFAULT_GAS_SETTINGS, startTe: 11_000, startNe: 1_500 });
    const of = (label: string) => gas.intensities?.[lines.findIndex((line) => line.label === label)] ?? { value: 0, err: 0 };
    expect(Math.abs(of('O III 5008').value - 500)).toBeLessThan(3 * of('O III 5008').err);
    const sulphur = lines.find(({ label }) => label === 'S III 9533');
    const own = (sulphur?.fluxErr ?? 0) / (sulphur?.flux ?? 1);
    expect(of('S III 9533').err / of('S III 9533').value).toBeGreaterThan(1.5 * own);
    // H alpha makes c(H beta) and is corrected by it: its intensity is known better than its flux over H beta
    const alpha = of('H I 6565');
    expect(alpha.err / alpha.value).toBeLessThan(Math.hypot(lines[0].fluxErr / lines[0].flux, lines[1].fluxErr / lines[1].flux));
  });
});

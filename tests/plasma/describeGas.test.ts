import { describe, expect, it } from 'vitest';
import { DEFAULT_GAS_SETTINGS, describeGas, type Gas, type GasSettings, type NamedLine } from '../../src/plasma/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from './simulatedGas.ts';

const gasOf = (lines: readonly NamedLine[], settings: Partial<GasSettings> = {}): Gas =>
  describeGas(lines, { data: bundled, settings: { ...DEFAULT_GAS_SETTINGS, ...settings }, startTe: 10_000, startNe: 1_000 });

const inside = (estimate: Gas['zones'][number]['te']['estimate'], truth: number) =>
  estimate.ended === 'value' && estimate.low <= truth && truth <= estimate.high;

describe('a nebula of known temperature, density and reddening', () => {
  it('comes back within one sigma in at least 65 % of 200 draws of the noise, every quantity by itself', () => {
    const draws = 200;
    const counts = new Map<string, number>();
    const count = (name: string, hit: boolean) => counts.set(name, (counts.get(name) ?? 0) + (hit ? 1 : 0));
    for (let seed = 1; seed <= draws; seed++) {
      const { reddening, zones } = gasOf(simulatedGas({ ...SOME_GAS, seed }));
      const { value = Number.NaN, err = 0 } = reddening.cHbeta ?? {};
      count('c(H beta)', Math.abs(value - SOME_GAS.cHbeta) <= err);
      for (const zone of ['low', 'medium'] as const) {
        const found = zones.find((each) => each.zone === zone);
        if (!found) throw new Error(`no zone ${zone}`);
        count(`Te ${zone}`, inside(found.te.estimate, SOME_GAS[zone].te));
        count(`ne ${zone}`, inside(found.ne.estimate, SOME_GAS[zone].ne));
      }
    }
    expect(counts.size).toBe(5);
    for (const [name, hits] of counts) expect(hits / draws, `${name}: ${hits} of ${draws}`).toBeGreaterThanOrEqual(0.65);
  });

  it('comes back nearly exactly without noise, at other values too', () => {
    const truth = { low: { te: 12_000, ne: 300 }, medium: { te: 8_500, ne: 4_000 }, cHbeta: 1.3, noise: 0, seed: 3, floor: 1e-4 };
    const { reddening, zones, diagnostics } = gasOf(simulatedGas(truth));
    expect(reddening.cHbeta?.value).toBeCloseTo(1.3, 2);
    for (const { tells, zone, result, label } of diagnostics) {
      if (result.ended !== 'value') throw new Error(label);
      const expected = truth[zone === 'low' ? 'low' : 'medium'][tells === 'density' ? 'ne' : 'te'];
      expect(Math.abs(result.value / expected - 1), label).toBeLessThan(0.02);
    }
    expect(zones.find((each) => each.zone === 'high')?.te.from).toBe('taken from the medium zone');
  });

  it('gives the same numbers every time', () => {
    const lines = simulatedGas(SOME_GAS);
    expect(gasOf(lines)).toEqual(gasOf(lines));
  });
});

describe('limits', () => {
  it('a ratio in its flat part sets a limit, not a value', () => {
    const thin = gasOf(simulatedGas({ ...SOME_GAS, low: { te: 10_000, ne: 3 }, noise: 0.01 }));
    const sulphur = thin.diagnostics.find(({ label }) => label === '[S II] 6716/6731');
    expect(sulphur?.result).toMatchObject({ ended: 'below' });
    if (sulphur?.result.ended !== 'below') throw new Error('no limit');
    expect(sulphur.result.limit).toBeGreaterThan(10);
    expect(sulphur.result.limit).toBeLessThan(500);
  });

  it('a ratio no gas can give has no solution, and says so', () => {
    const lines = simulatedGas({ ...SOME_GAS, noise: 0 }).map((line) =>
      line.label === 'S II 6718' ? { ...line, flux: 4 * line.flux } : line,
    );
    const sulphur = gasOf(lines).diagnostics.find(({ label }) => label === '[S II] 6716/6731');
    expect(sulphur?.result).toMatchObject({ ended: 'none', reason: expect.stringContaining('beyond') });
  });
});

describe('what is given and what is in doubt', () => {
  it('given temperature, density and c(H beta) hold', () => {
    const { zones, reddening } = gasOf(simulatedGas(SOME_GAS), { te: 9000, ne: 500, cHbeta: 0.2 });
    for (const zone of zones) {
      expect(zone.te).toMatchObject({ from: 'given', estimate: { value: 9000 } });
      expect(zone.ne).toMatchObject({ from: 'given', estimate: { value: 500 } });
    }
    expect(reddening).toMatchObject({ ended: 'given', cHbeta: { value: 0.2, err: 0 } });
  });

  it('a saturated line takes its diagnostic out and is named as the reason', () => {
    const doubt = 'saturated: measured by what is left of its flanks';
    const lines = simulatedGas(SOME_GAS).map((line) => (line.label === 'N II 5756' ? { ...line, doubt } : line));
    const { diagnostics, unused } = gasOf(lines);
    expect(diagnostics.some(({ ion }) => ion === 'N II')).toBe(false);
    expect(unused).toContainEqual({ label: '[N II] 5755/(6548+6583)', reason: `N II 5756: ${doubt}` });
  });

  it('without a name there is nothing but an intensity', () => {
    const nameless = simulatedGas(SOME_GAS).map((line) => ({ ...line, lines: [] }));
    const gas = gasOf(nameless);
    expect(gas.reddening.ended).toBe('none');
    expect(gas.intensities).toBeUndefined();
    expect(gas.diagnostics).toEqual([]);
    const [hAlpha, hBeta, ...others] = simulatedGas(SOME_GAS);
    const some = gasOf([hAlpha, hBeta, { ...others[5], lines: [] }]);
    expect(some.intensities).toHaveLength(3);
  });
});

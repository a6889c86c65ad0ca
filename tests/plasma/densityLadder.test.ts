import { describe, expect, it } from 'vitest';
import { criticalDensity, survival } from '../../src/atomic/index.ts';
import { DEFAULT_GAS_SETTINGS, describeGas, type NamedLine } from '../../src/plasma/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from './simulatedGas.ts';

const ladderOf = (lines: readonly NamedLine[], settings = {}) =>
  describeGas(lines, { data: bundled, settings: { ...DEFAULT_GAS_SETTINGS, ...settings }, startTe: 1e4, startNe: 1e3 }).ladder;

describe('the density ladder', () => {
  const ladder = ladderOf(simulatedGas(SOME_GAS), { te: 10_000 });

  it('holds the thin-gas lines only, by rising critical density', () => {
    expect(ladder.rungs).toHaveLength(22);
    expect(ladder.rungs.some(({ ion }) => ion === 'H I')).toBe(false);
    const critical = ladder.rungs.map(({ nCrit }) => nCrit ?? 0);
    expect(critical).toEqual(critical.toSorted((a, b) => a - b));
  });

  it('its survival curves are those of the full level populations', () => {
    const rung = ladder.rungs.find(({ label }) => label === 'O III 5008');
    const model = bundled.levelModel('O III');
    if (!rung?.survival || !model) throw new Error('no curve');
    const ne = ladder.logNe.map((log) => 10 ** log);
    survival(model, 3, ladder.te, ne).forEach((value, k) => {
      expect((rung.survival?.[k] ?? 0) / value).toBeCloseTo(1, 4);
    });
    expect(rung.halfAt).toBeGreaterThan(3e5);
    expect(rung.halfAt).toBeLessThan(1e6);
  });

  it('its critical densities are those the tables of the trade are checked with', () => {
    for (const { label, ion, nCrit } of ladder.rungs) {
      const model = bundled.levelModel(ion);
      const line = simulatedGas(SOME_GAS).find((each) => each.label === label);
      if (!model || !line || nCrit === undefined) throw new Error(label);
      expect(nCrit / criticalDensity(model, bundled.lines.upperLevel[line.lines[0]], ladder.te), label).toBeCloseTo(1, 9);
    }
  });

  it('counts the collisions in one lifetime: 5007 waits 37 s and is struck 10^13 times in air', () => {
    const rung = ladder.rungs.find(({ label }) => label === 'O III 5008');
    const air = ladder.gases.findIndex(({ name }) => name.startsWith('air'));
    expect(rung?.lifetimeS).toBeCloseTo(37, 0);
    expect(Math.log10(rung?.collisions?.[air] ?? 0)).toBeCloseTo(13.5, 0);
    expect(rung?.laboratory).toContain('no such lamp shows it');
  });

  it('the line that fades first sets the ceiling', () => {
    expect(ladder.ceiling?.label).toBe('S II 6718');
    const tenths = ladder.rungs.map(({ tenthAt }) => tenthAt ?? Number.POSITIVE_INFINITY);
    expect(ladder.ceiling?.densityCm3).toBe(Math.min(...tenths));
  });

  it('only accepted lines set it, once some are accepted', () => {
    const lines = simulatedGas(SOME_GAS).map((line) => ({ ...line, accepted: line.label.startsWith('O III') }));
    expect(ladderOf(lines).ceiling?.label).toMatch(/O III (5008|4960)/);
  });

  it('a measured density that would put an accepted line out is called a contradiction', () => {
    expect(ladder.contradictions).toEqual([]);
    const dense = simulatedGas({ ...SOME_GAS, medium: { te: 11_000, ne: 90_000 } });
    const found = ladderOf(dense).contradictions;
    expect(found.length).toBeGreaterThan(0);
    expect(found[0]).toMatch(/\[Cl III\] 5518\/5538 asks for at least .* where .* keeps .* % of its light/);
  });
});

import { describe, expect, it } from 'vitest';
import { criticalDensity, isMetastable, radiativeLifetime } from '../../src/atomic/index.ts';
import { DEFAULT_GAS_SETTINGS, describeGas, hBetaEmissivity, type NamedLine } from '../../src/plasma/index.ts';
import { bundled, lineAtAir } from '../atomic/bundledData.ts';

/** A line as it was measured in a textbook example: 1 % error. */
function line(ion: string, air: number, flux: number): NamedLine {
  const index = lineAtAir(ion, air);
  return {
    feature: index,
    label: `${ion} ${air}`,
    lines: [index],
    shares: [1],
    accepted: true,
    flux,
    fluxErr: 0.01 * flux,
    restVac: bundled.lines.wavelengthVac[index],
    velocityKms: 0,
    velocityErrKms: 1,
  };
}

const gasOf = (lines: readonly NamedLine[], settings = {}) =>
  describeGas(lines, { data: bundled, settings: { ...DEFAULT_GAS_SETTINGS, ...settings }, startTe: 10_000, startNe: 100 });

function tellOf(lines: readonly NamedLine[], label: string, settings = {}): number {
  const found = gasOf(lines, { cHbeta: 0, ...settings }).diagnostics.find((each) => each.label === label)?.result;
  if (found?.ended !== 'value') throw new Error(`${label} gave no value`);
  return found.value;
}

describe('worked relations of Osterbrock & Ferland 2006, from memory', () => {
  // equations 5.4 to 5.7: nebular over auroral = a exp(b / T) / (1 + c ne / sqrt T); their collision strengths are older than ours, hence 6 %
  it.each([
    ['[O III] 4363/(4959+5007)', 'O III', [4958.91, 5006.84], 4363.21, 7.9, 3.29e4, 4.5e-4],
    ['[N II] 5755/(6548+6583)', 'N II', [6548.05, 6583.45], 5754.59, 8.23, 2.5e4, 4.4e-3],
    ['[S III] 6312/(9069+9531)', 'S III', [9068.6, 9530.6], 6312.06, 5.44, 2.28e4, 3.5e-4],
  ] as const)('Te of %s follows the printed formula within 6 % from 8000 to 14000 K', (label, ion, nebular, auroral, a, b, c) => {
    const ne = 1_000;
    for (const te of [8_000, 10_000, 14_000]) {
      const ratio = (a * Math.exp(b / te)) / (1 + (c * ne) / Math.sqrt(te));
      const lines = [line(ion, nebular[0], 1), line(ion, nebular[1], 3), line(ion, auroral, 4 / ratio)];
      expect(Math.abs(tellOf(lines, label, { ne }) / te - 1), `${te} K`).toBeLessThan(0.06);
    }
  });

  it('ne of [S II] follows figure 5.8: ratio 1 near 600 cm^-3, 0.6 near 3000, each within 30 %', () => {
    const at = (ratio: number) => tellOf([line('S II', 6716.44, ratio), line('S II', 6730.82, 1)], '[S II] 6716/6731', { te: 10_000 });
    expect(Math.abs(at(1) / 600 - 1)).toBeLessThan(0.3);
    expect(Math.abs(at(0.6) / 3_000 - 1)).toBeLessThan(0.3);
  });

  it('[S II] has no value beyond its ends, 1.5 in the thinnest and 0.43 in the densest gas', () => {
    for (const ratio of [1.6, 0.4]) {
      const { diagnostics } = gasOf([line('S II', 6716.44, ratio), line('S II', 6730.82, 1)], { cHbeta: 0, te: 10_000 });
      expect(diagnostics[0].result.ended).toBe('none');
    }
  });

  it('twice the intrinsic Balmer decrement is c(H beta) = 1.01 under CCM89, where f(H alpha) = 0.8178/1.1642 - 1', () => {
    const { reddening } = gasOf([line('H I', 6562.8, 2 * 286), line('H I', 4861.33, 100)], { curve: 'ccm89', te: 10_000, ne: 100 });
    expect(reddening.cHbeta?.value).toBeCloseTo(0.30103 / (1 - 0.8178 / 1.1642), 2);
    // common practice, no source: c(H beta) is about 1.45 E(B-V)
    expect((reddening.cHbeta?.value ?? 0) / (reddening.eBV?.value ?? 1)).toBeCloseTo(1.45, 1);
  });

  it('H beta shines with 1.24e-25 erg cm^3 s^-1 at 10^4 K and falls about as T^-0.88', () => {
    expect(hBetaEmissivity(10_000)).toBeCloseTo(1.235e-25, 28);
    expect(Math.log(hBetaEmissivity(20_000) / hBetaEmissivity(5_000)) / Math.log(4)).toBeCloseTo(-0.87, 2);
  });
});

describe('facts of the trade: common practice, no source', () => {
  /** Thin-gas levels whose collisions are known, with a line that leaves them. */
  const levels = (() => {
    const seen = new Map<string, { ion: string; level: number; critical: number; lifetime: number }>();
    for (let k = 0; k < bundled.lines.count; k++) {
      const ion = bundled.lines.ions[bundled.lines.ion[k]].name;
      const level = bundled.lines.upperLevel[k];
      const model = bundled.levelModel(ion);
      if (!model || level <= 0 || seen.has(`${ion} ${level}`) || !isMetastable(model, level)) continue;
      const critical = criticalDensity(model, level, 10_000);
      if (Number.isFinite(critical)) seen.set(`${ion} ${level}`, { ion, level, critical, lifetime: radiativeLifetime(model, level) });
    }
    return [...seen.values()];
  })();
  const NEBULA = [1e3, 1e4];
  const AIR = 1e19;

  it('the levels of the great nebular lines wait seconds to hours, those of ordinary lines well under a microsecond', () => {
    for (const [ion, air] of [
      ['O III', 5006.84],
      ['N II', 6583.45],
      ['O I', 6300.3],
      ['S II', 6730.82],
      ['O II', 3728.82],
      ['Ne III', 3868.76],
      ['Ar III', 7135.79],
    ] as const) {
      const model = bundled.levelModel(ion);
      if (!model) throw new Error(ion);
      const lifetime = radiativeLifetime(model, bundled.lines.upperLevel[lineAtAir(ion, air)]);
      expect(lifetime, ion).toBeGreaterThan(1);
      expect(lifetime, ion).toBeLessThan(10 * 3600);
    }
    for (const [ion, air] of [
      ['H I', 4861.33],
      ['He I', 5875.62],
      ['C II', 4267.18],
      ['O II', 4649.13],
      ['N II', 5679.56],
      ['Ca II', 3933.66],
    ] as const)
      expect(1 / bundled.lines.aValue[lineAtAir(ion, air)], ion).toBeLessThan(2e-7);
  });

  it('all thin-gas lines but a handful shine in a nebula, and in air every one is struck thousands of times before it could', () => {
    expect(levels.length).toBeGreaterThan(400);
    const dimmed = levels.filter(({ critical }) => critical < 0.1 * NEBULA[0]);
    expect(dimmed.length / levels.length).toBeLessThan(0.04);
    for (const { ion, level, critical } of levels) expect(AIR / critical, `${ion} level ${level}`).toBeGreaterThan(1e4);
  });
});

import { expect, it } from 'vitest';
import { vacuumFromAir } from '../../src/units/index.ts';
import { bundled, lineAt, lineAtAir } from './bundledData.ts';

const { lines } = bundled;

/** Lines that a list for thin gas is asked for and that compilations often lack: ion, air wavelength as printed (H2: vacuum), how far off it may be. */
const ASKED = `
C III 4067.94 0.05; C III 4068.92 0.05; C III 4070.26 0.06; C III 4186.90 0.05; C IV 4658.30 0.05; C II 4074.52 0.05; C II 4075.85 0.05
N III 4641.85 0.05; Ne II 4409.30 0.05; O V 5114.06 0.05; Kr III 6826.70 0.05; Kr IV 5346.02 0.05; Kr IV 5867.74 0.05; Xe III 5846.77 0.05
Xe IV 5709.2 0.05; Xe IV 7535.4 0.05; Se III 8855.3 0.05; Br III 6131.0 0.05; Rb IV 5759.55 0.05; F II 4789.45 0.05; F II 4868.99 0.05
F IV 4060.0 0.2; F IV 3996.92 0.05; Fe X 6374.51 0.05; Fe XI 7891.8 0.1; Fe XIII 10746.8 0.1; Fe XIII 10797.9 0.1; Fe XIV 5302.86 0.05
Ni XIII 5115.8 0.05; O VI 6825.44 0.05; O VI 7082.36 0.05; H2 21218.3 0.5; O VI 3811.35 0.05; He II 4685.70 0.03`
  .split(/[;\n]/)
  .filter((text) => text.trim() !== '')
  .map((text) => {
    const m = /^\s*(.+) (\S+) (\S+)\s*$/.exec(text)!;
    return { ion: m[1], air: Number(m[2]), tolerance: Number(m[3]) };
  });

it('lines that compilations often lack are in the list', () => {
  const missed = ASKED.filter(({ ion, air, tolerance }) => {
    const vacuum = ion === 'H2' ? air : vacuumFromAir(air);
    return Math.abs(lines.wavelengthVac[lineAt(ion, vacuum)] - vacuum) > tolerance;
  });
  expect(missed).toEqual([]);
});

it('Raman-scattered O VI is no transition of O VI', () => {
  expect(lines.nature(lineAtAir('O VI', 6825.44))).toBe('raman');
  expect(lines.nature(lineAtAir('O VI', 7082.36))).toBe('raman');
});

it('every n-level atom with decays in range has lines', () => {
  const present = new Set(Array.from(lines.ion, (ion) => lines.ions[ion].name));
  const silent = bundled.modelIons.filter((ion) => bundled.levelModel(ion)!.radiative.a.length > 0 && !present.has(ion));
  expect(silent).toEqual([]);
});

it('an ion made at a higher energy is not made at less', () => {
  for (const ion of lines.ions) if (ion.charge > 0 && ion.creationEv > 0) expect(ion.ionizationEv).toBeGreaterThan(ion.creationEv);
});

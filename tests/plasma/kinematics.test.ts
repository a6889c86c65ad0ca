import { describe, expect, it } from 'vitest';
import { DEFAULT_GAS_SETTINGS, describeGas, type NamedLine } from '../../src/plasma/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from './simulatedGas.ts';

const kinematicsOf = (lines: readonly NamedLine[]) =>
  describeGas(lines, { data: bundled, settings: DEFAULT_GAS_SETTINGS, startTe: 1e4, startNe: 1e3 }).kinematics;
const lines = simulatedGas(SOME_GAS);
const energyOf = (line: NamedLine) => {
  const [k] = line.lines;
  const ion = bundled.lines.ions[bundled.lines.ion[k]];
  return bundled.lines.mechanism(k) === 'recombination' ? ion.ionizationEv : ion.creationEv;
};

describe('kinematics', () => {
  it('finds nothing where all lines move alike', () => {
    const { findings, velocityByEnergy, ions } = kinematicsOf(lines);
    expect(findings).toEqual([]);
    expect(Math.abs(velocityByEnergy?.slope ?? 1)).toBeLessThan(3 * (velocityByEnergy?.slopeErr ?? 0));
    expect(ions.find(({ ion }) => ion === 'S II')).toMatchObject({ count: 4 });
  });

  it('a drift of the calibration shows against wavelength and is called one', () => {
    const drifting = lines.map((line) => ({ ...line, velocityKms: line.velocityKms + 0.004 * (line.restVac - 5000) }));
    const { velocityByWavelength, findings } = kinematicsOf(drifting);
    expect(Math.abs((velocityByWavelength?.slope ?? 0) - 0.004)).toBeLessThan(3 * (velocityByWavelength?.slopeErr ?? 0));
    expect(findings.join(' ')).toContain('wavelength calibration');
  });

  it('a flow that slows outwards shows against ionisation energy', () => {
    const flowing = lines.map((line) => ({
      ...line,
      velocityKms: line.velocityKms - 0.6 * energyOf(line),
      fwhmKms: 25 + 0.4 * energyOf(line),
    }));
    const { velocityByEnergy, widthByEnergy, findings } = kinematicsOf(flowing);
    expect(velocityByEnergy?.slope).toBeCloseTo(-0.6, 1);
    expect(widthByEnergy?.slope).toBeCloseTo(0.4, 1);
    expect(findings.filter((sentence) => sentence.includes('ionisation energy'))).toHaveLength(2);
  });

  it('one wild velocity does not tilt the line', () => {
    const wild = lines.map((line, k) => (k === 3 ? { ...line, velocityKms: 400 } : line));
    const { velocityByWavelength } = kinematicsOf(wild);
    expect(Math.abs(velocityByWavelength?.slope ?? 1)).toBeLessThan(3 * (velocityByWavelength?.slopeErr ?? 0));
  });
});

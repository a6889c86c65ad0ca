import { caseBIntensity, decayRate, levelPopulations } from '../../src/atomic/index.ts';
import { seededRandom } from '../../src/numeric/index.ts';
import { extinctionRatio, type NamedLine } from '../../src/plasma/index.ts';
import { bundled, lineAtAir } from '../atomic/bundledData.ts';

/** Ion, air wavelengths of its lines (Angstrom; a sum is one blended feature) and the flux of the first for H beta = 100, no reddening. Usual order of a nebula, from memory. */
const COLLISIONAL = [
  { ion: 'S II', air: [6730.82, 6716.44, 4068.6, 4076.35], scale: 7.5, zone: 'low' },
  { ion: 'O II', air: [3726.03, 3728.82, '7318.92+7319.99', '7329.67+7330.73'], scale: 60, zone: 'low' },
  { ion: 'N II', air: [6583.45, 6548.05, 5754.59], scale: 66, zone: 'low' },
  { ion: 'O III', air: [5006.84, 4958.91, 4363.21], scale: 500, zone: 'medium' },
  { ion: 'Cl III', air: [5517.71, 5537.87], scale: 0.6, zone: 'medium' },
  { ion: 'Ar III', air: [7135.79, 7751.11, 5191.82], scale: 14, zone: 'medium' },
  { ion: 'S III', air: [9068.6, 9530.6, 6312.06], scale: 25, zone: 'medium' },
] as const;

const BALMER = [3, 4, 5, 6, 7, 9, 10, 11];
const PASCHEN = [9, 10, 11, 12];

export interface SomeGas {
  readonly low: { readonly te: number; readonly ne: number };
  readonly medium: { readonly te: number; readonly ne: number };
  readonly cHbeta: number;
  /** Relative error of a line of flux 100; weaker ones have more, as photon noise. */
  readonly noise: number;
  readonly seed: number;
  readonly stellarEwA?: number;
  /** Relative error that no line goes below. */
  readonly floor?: number;
}

export const SOME_GAS: SomeGas = { low: { te: 9_500, ne: 900 }, medium: { te: 11_000, ne: 1_500 }, cHbeta: 0.45, noise: 0.005, seed: 1 };

const FLOOR = 0.003;

/** A nebula of known temperature, density and reddening as it is measured: level populations and case B, reddened (CCM89 with O'Donnell 1994, R_V 3.1), with noise. */
export function simulatedGas(gas: SomeGas): NamedLine[] {
  const random = seededRandom(gas.seed);
  const k = (wavelength: number) => extinctionRatio('ccm89-odonnell94', 3.1, wavelength);
  const measured = (ion: string, lines: readonly number[], intensity: number, feature: number): NamedLine => {
    const restVac = bundled.lines.wavelengthVac[lines[0]];
    const reddened = intensity * 10 ** (-gas.cHbeta * (k(restVac) / k(4862.683) - 1));
    const fluxErr = Math.hypot((gas.floor ?? FLOOR) * reddened, gas.noise * Math.sqrt(100 * reddened));
    const ew = reddened;
    const filled = ion === 'H I' && restVac < 6600 && gas.stellarEwA ? reddened * (1 - gas.stellarEwA / ew) : reddened;
    return {
      feature,
      label: `${ion} ${restVac.toFixed(0)}`,
      lines,
      shares: lines.map(() => 1 / lines.length),
      accepted: true,
      flux: filled + fluxErr * random.normal(),
      fluxErr,
      restVac,
      ew: filled === reddened ? ew : (ew * filled) / reddened,
      fwhmA: 1,
      velocityKms: 30 + 2 * random.normal(),
      velocityErrKms: 2,
      fwhmKms: 25 + random.normal(),
      fwhmErrKms: 1,
    };
  };
  const named: NamedLine[] = [];
  const { te, ne } = gas.medium;
  const series = [...BALMER.map((n) => [2, n] as const), ...PASCHEN.map((n) => [3, n] as const)];
  for (const [lower, upper] of series)
    named.push(
      measured(
        'H I',
        [bundled.hydrogenicLine('H I', lower, upper)],
        caseBIntensity(bundled.caseB, 'H I', lower, upper, te, ne),
        named.length + 1,
      ),
    );
  for (const { ion, air, scale, zone } of COLLISIONAL) {
    const lines = air.map((text) =>
      String(text)
        .split('+')
        .map((w) => lineAtAir(ion, Number(w))),
    );
    const emission = lines.map((parts) => parts.reduce((sum, line) => sum + emissionOf(ion, line, gas[zone]), 0));
    lines.forEach((parts, j) => {
      named.push(measured(ion, parts, (scale * emission[j]) / emission[0], named.length + 1));
    });
  }
  return named;
}

function emissionOf(ion: string, line: number, { te, ne }: { te: number; ne: number }): number {
  const model = bundled.levelModel(ion);
  const [u, l] = [bundled.lines.upperLevel[line], bundled.lines.lowerLevel[line]];
  if (!model) throw new Error(`no atom of ${ion}`);
  return levelPopulations(model, te, ne)[u] * decayRate(model, u, l) * (model.levels[u].energyCm1 - model.levels[l].energyCm1);
}

import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { fromVacuum, type Medium, toVacuum } from '../spectrum/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { SkyView } from './analysis.ts';

/** Bands that only dim gently over a wide range would shade a third of the picture. */
const GENTLE = /shallow/;
/** At most so many lines of the sky are handed on, the strongest. */
const MOST_LINES = 400;

/**
 * What the Earth's atmosphere and lamps put into a spectrum between two wavelengths (Angstrom in `medium`).
 *
 * @param correctionKms the wavelengths were multiplied by 1 + v/c: the sky moved with them
 */
export function skyView(data: AtomicData, medium: Medium, from: number, to: number, correctionKms = 0): SkyView {
  const factor = 1 + correctionKms / SPEED_OF_LIGHT_KMS;
  const shown = (vac: number) => fromVacuum(vac * factor, medium);
  const low = toVacuum(from, medium) / factor;
  const high = toVacuum(to, medium) / factor;
  const bands = data.skyBands
    .filter((band) => band.kind === 'telluric' && band.highVac > low && band.lowVac < high && !GENTLE.test(band.note))
    .map((band) => ({ species: band.species, low: shown(band.lowVac), high: shown(band.highVac) }));
  return { bands: joined(bands), lines: skyLines(data, low, high).map(({ vac, strength }) => ({ at: shown(vac), strength })) };
}

type Band = SkyView['bands'][number];

/** Overlapping bands as one, named by its molecules. */
function joined(bands: readonly Band[]): Band[] {
  const result: Band[] = [];
  for (const band of [...bands].sort((a, b) => a.low - b.low)) {
    const last = result.at(-1);
    if (!last || band.low > last.high) result.push(band);
    else
      result[result.length - 1] = { species: bothSpecies(last.species, band.species), low: last.low, high: Math.max(last.high, band.high) };
  }
  return result;
}

/** "mixed" says less than a molecule. */
function bothSpecies(a: string, b: string): string {
  const names = [...new Set([...a.split(' + '), ...b.split(' + ')])];
  const molecules = names.filter((name) => name !== 'mixed');
  return (molecules.length > 0 ? molecules : names).join(' + ');
}

function skyLines(data: AtomicData, low: number, high: number): { vac: number; strength: number }[] {
  const { lines } = data;
  const [first, end] = linesBetween(lines, low, high);
  const found: { vac: number; strength: number }[] = [];
  for (let line = first; line < end; line++) {
    if (lines.nature(line) !== 'sky') continue;
    const strength = 10 ** lines.logStrength[line];
    found.push({ vac: lines.wavelengthVac[line], strength: strength > 0 ? strength : 1 });
  }
  return found
    .sort((a, b) => b.strength - a.strength)
    .slice(0, MOST_LINES)
    .sort((a, b) => a.vac - b.vac);
}

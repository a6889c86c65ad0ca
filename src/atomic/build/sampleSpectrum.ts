import { seededRandom } from '../../numeric/index.ts';
import { airFromVacuum, SPEED_OF_LIGHT_KMS, vacuumFromAir } from '../../units/index.ts';
import type { AtomicData } from '../atomicData.ts';
import { linesBetween } from '../linesBetween.ts';
import { emissivityPerIon } from '../physics/emissivity.ts';
import type { SampleRecipe } from './sampleRecipes.ts';

/** Conditions at which the list states its strengths. */
const REFERENCE = { te: 10_000, ne: 3_000 };
/** [O I] 5577.338 of the night sky (air). */
const SKY_AIR = 5577.338;

/**
 * The spectrum of an object of our own invention. Line fluxes come from the line list and its level populations at the object's temperature and density,
 * dimmed by dust, shifted, broadened, sampled and given seeded noise. Invented data, for trying the program only.
 *
 * @returns the file's text: three columns, log-linear wavelengths
 */
export function sampleSpectrum(data: AtomicData, recipe: SampleRecipe): string {
  const random = seededRandom(recipe.seed);
  const step = 1 / (recipe.resolvingPower * recipe.samplesPerFwhm);
  const n = Math.floor(Math.log(recipe.to / recipe.from) / step) + 1;
  const wave = Float64Array.from({ length: n }, (_, i) => recipe.from * Math.exp(i * step));
  const flux = Float64Array.from(wave, (w) => recipe.continuum(isFar(recipe) ? w / (1 + recipe.z) : w));
  for (const { at, strength } of emissionLines(data, recipe)) addLine(recipe, wave, flux, at, (strength / 100) * recipe.hBeta);
  const rows = Array.from(wave, (w, i) => {
    const err = Math.sqrt(recipe.readNoise ** 2 + recipe.photonNoise * Math.max(0, flux[i]) + (0.006 * flux[i]) ** 2 * 0.02);
    const value = flux[i] + err * random.normal();
    return `${w.toFixed(4)},${value.toPrecision(6)},${err.toPrecision(4)}`;
  });
  const head = [
    `# ${recipe.title}`,
    `# wavelengths in ${recipe.medium}`,
    'wavelength [Angstrom],flux [1e-15 erg/s/cm2/A],flux_err [1e-15 erg/s/cm2/A]',
  ];
  return `${[...head, ...rows].join('\n')}\n`;
}

/** Of nearby gas the continuum is smooth: its shift does not show. */
const isFar = ({ z }: SampleRecipe) => Math.abs(z) > 0.01;

/** Wavelengths in the medium of the recipe, as observed. */
function emissionLines(data: AtomicData, recipe: SampleRecipe): { at: number; strength: number }[] {
  const { lines } = data;
  const inMedium = (vacuum: number) => (recipe.medium === 'air' ? airFromVacuum(vacuum) : vacuum);
  const vacuumOf = (at: number) => (recipe.medium === 'air' ? vacuumFromAir(at) : at);
  const rest = (at: number) => (isFar(recipe) ? vacuumOf(at) / (1 + recipe.z) : vacuumOf(at));
  const [first, end] = linesBetween(lines, rest(recipe.from), rest(recipe.to));
  const seen: { at: number; strength: number }[] = [
    { at: recipe.medium === 'air' ? SKY_AIR : vacuumFromAir(SKY_AIR), strength: recipe.sky },
  ];
  for (let line = first; line < end; line++) {
    const nature = lines.nature(line);
    if (nature !== 'permitted' && nature !== 'forbidden' && nature !== 'intercombination') continue;
    const strength =
      10 ** lines.logStrength[line] *
      stageShare(data, recipe, line) *
      conditions(data, recipe, line) *
      10 ** (-recipe.cHbeta * dimming(lines.wavelengthVac[line]));
    if (strength >= recipe.faintest) seen.push({ at: inMedium(lines.wavelengthVac[line] * (1 + recipe.z)), strength });
  }
  return seen;
}

function stageShare(data: AtomicData, { stages }: SampleRecipe, line: number): number {
  const ion = data.lines.ions[data.lines.ion[line]];
  const made = data.lines.mechanism(line) === 'recombination' ? ion.ionizationEv : ion.creationEv;
  return stages.findLast(({ fromEv }) => made >= fromEv)?.share ?? 0;
}

/** How the nebula's temperature and density change a line against the reference, from level populations where the list has them. */
function conditions(data: AtomicData, recipe: SampleRecipe, line: number): number {
  const upper = data.lines.upperLevel[line];
  const lower = data.lines.lowerLevel[line];
  const model = data.levelModel(data.lines.ions[data.lines.ion[line]].name);
  if (!model || upper <= 0 || lower < 0 || data.lines.mechanism(line) !== 'collisional') return 1;
  const emission = ({ te, ne }: { te: number; ne: number }) => emissivityPerIon(model, upper, lower, te, ne) / ne;
  const ratio = emission(recipe) / emission(REFERENCE);
  return Number.isFinite(ratio) ? ratio : 1;
}

/** Gaussian of the instrument and the gas, averaged over each sample by five points. */
function addLine(recipe: SampleRecipe, wave: Float64Array, into: Float64Array, centre: number, flux: number): void {
  const sigma = centre * Math.hypot(1 / recipe.resolvingPower / 2.3548, recipe.sigmaKms / SPEED_OF_LIGHT_KMS);
  for (let i = 1; i < wave.length - 1; i++) {
    if (Math.abs(wave[i] - centre) > 8 * sigma) continue;
    const width = (wave[i + 1] - wave[i - 1]) / 2;
    let mean = 0;
    for (let k = -2; k <= 2; k++) mean += Math.exp(-0.5 * ((wave[i] + (k * width) / 5 - centre) / sigma) ** 2) / 5;
    into[i] += (flux / (sigma * Math.sqrt(2 * Math.PI))) * mean;
  }
}

/** A(lambda) / A(H beta) - 1 for R_V = 3.1: Cardelli, Clayton & Mathis 1989, ApJ 345, 245, equations 2 and 3 (from memory). */
function dimming(wavelengthVac: number): number {
  return curve(1e4 / wavelengthVac) / curve(1e4 / 4862.683) - 1;
}

const OPTICAL_A = [1, 0.17699, -0.50447, -0.02427, 0.72085, 0.01979, -0.7753, 0.32999];
const OPTICAL_B = [0, 1.41338, 2.28305, 1.07233, -5.38434, -0.62251, 5.3026, -2.09002];

function curve(x: number): number {
  if (x < 1.1) return (0.574 - 0.527 / 3.1) * x ** 1.61;
  const y = x - 1.82;
  const power = (terms: readonly number[]) => terms.reduceRight((sum, c) => sum * y + c, 0);
  return power(OPTICAL_A) + power(OPTICAL_B) / 3.1;
}

import { seededRandom } from '../../numeric/index.ts';
import { airFromVacuum, SPEED_OF_LIGHT_KMS, vacuumFromAir } from '../../units/index.ts';
import type { AtomicData } from '../atomicData.ts';
import { linesBetween } from '../linesBetween.ts';
import { emissivityPerIon } from '../physics/emissivity.ts';

/**
 * The sample spectrum: the Lantern Nebula, an object of our own invention. Line fluxes come from the line list and its level populations at the nebula's
 * temperature and density, dimmed by dust, shifted, broadened, sampled and given seeded noise. Invented data, for the demo only.
 */
const LANTERN = {
  seed: 20261201,
  /** Angstrom in air. */
  from: 3700,
  to: 9300,
  resolvingPower: 2200,
  samplesPerFwhm: 2.5,
  velocityKms: 31.2,
  /** Gaussian sigma of the gas' own motions. */
  sigmaKms: 11,
  te: 11_400,
  ne: 1_800,
  cHbeta: 0.42,
  /** 1e-15 erg s^-1 cm^-2, H beta after dimming. */
  hBeta: 240,
  /** Lines fainter than this (H beta = 100) are left out. */
  faintest: 0.02,
  /** Noise: of the detector, flux unit, and of the photons, share of the flux in it. */
  readNoise: 0.012,
  photonNoise: 0.0006,
} as const;

/** Conditions at which the list states its strengths. */
const REFERENCE = { te: 10_000, ne: 3_000 };
/** Share of each stage against the reference nebula: a star of about 70,000 K leaves little gas above the second edge of helium. */
const HIGH_STAGE_EV = 54.4;
const HIGH_STAGE_SHARE = 0.05;
const NEUTRAL_SHARE = 0.25;
/** Residual of the night sky: [O I] 5577.338 (air), observer's frame, H beta = 100. */
const SKY = { air: 5577.338, flux: 0.9 };

/** The file's text: three columns, log-linear wavelengths in air. */
export function lanternNebula(data: AtomicData): string {
  const random = seededRandom(LANTERN.seed);
  const step = 1 / (LANTERN.resolvingPower * LANTERN.samplesPerFwhm);
  const n = Math.floor(Math.log(LANTERN.to / LANTERN.from) / step) + 1;
  const wave = Float64Array.from({ length: n }, (_, i) => LANTERN.from * Math.exp(i * step));
  const flux = Float64Array.from(wave, continuum);
  for (const { air, strength } of emissionLines(data)) addLine(wave, flux, air, (strength / 100) * LANTERN.hBeta);
  const rows = Array.from(wave, (w, i) => {
    const err = Math.sqrt(LANTERN.readNoise ** 2 + LANTERN.photonNoise * Math.max(0, flux[i]) + (0.006 * flux[i]) ** 2 * 0.02);
    const value = flux[i] + err * random.normal();
    return `${w.toFixed(4)},${value.toPrecision(6)},${err.toPrecision(4)}`;
  });
  const head = [
    '# Lantern Nebula: an invented object, made from the line list by a seeded script; for trying the desk only',
    '# wavelengths in air',
    'wavelength [Angstrom],flux [1e-15 erg/s/cm2/A],flux_err [1e-15 erg/s/cm2/A]',
  ];
  return `${[...head, ...rows].join('\n')}\n`;
}

/** Starlight of the faint hot centre and the nebula's own, smooth over the range. */
const continuum = (w: number) => 0.22 * (w / 5000) ** -2.1 + 0.16 * (w / 5000) ** -0.4;

function emissionLines(data: AtomicData): { air: number; strength: number }[] {
  const { lines } = data;
  const shift = 1 + LANTERN.velocityKms / SPEED_OF_LIGHT_KMS;
  const [first, end] = linesBetween(lines, vacuumFromAir(LANTERN.from), vacuumFromAir(LANTERN.to));
  const seen: { air: number; strength: number }[] = [{ air: SKY.air, strength: SKY.flux }];
  for (let line = first; line < end; line++) {
    const nature = lines.nature(line);
    if (nature !== 'permitted' && nature !== 'forbidden' && nature !== 'intercombination') continue;
    const strength =
      10 ** lines.logStrength[line] *
      stageShare(data, line) *
      conditions(data, line) *
      10 ** (-LANTERN.cHbeta * dimming(lines.wavelengthVac[line]));
    if (strength >= LANTERN.faintest) seen.push({ air: airFromVacuum(lines.wavelengthVac[line] * shift), strength });
  }
  return seen;
}

function stageShare(data: AtomicData, line: number): number {
  const ion = data.lines.ions[data.lines.ion[line]];
  const made = data.lines.mechanism(line) === 'recombination' ? ion.ionizationEv : ion.creationEv;
  if (made >= HIGH_STAGE_EV) return HIGH_STAGE_SHARE;
  return made < 13 ? NEUTRAL_SHARE : 1;
}

/** How the nebula's temperature and density change a line against the reference, from level populations where the list has them. */
function conditions(data: AtomicData, line: number): number {
  const upper = data.lines.upperLevel[line];
  const lower = data.lines.lowerLevel[line];
  const model = data.levelModel(data.lines.ions[data.lines.ion[line]].name);
  if (!model || upper <= 0 || lower < 0 || data.lines.mechanism(line) !== 'collisional') return 1;
  const emission = ({ te, ne }: { te: number; ne: number }) => emissivityPerIon(model, upper, lower, te, ne) / ne;
  const ratio = emission(LANTERN) / emission(REFERENCE);
  return Number.isFinite(ratio) ? ratio : 1;
}

/** Gaussian of the instrument and the gas, averaged over each sample by five points. */
function addLine(wave: Float64Array, into: Float64Array, centre: number, flux: number): void {
  const sigma = centre * Math.hypot(1 / LANTERN.resolvingPower / 2.3548, LANTERN.sigmaKms / SPEED_OF_LIGHT_KMS);
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

/** An invented object and the instrument that looked at it. */
export interface SampleRecipe {
  /** Name of the file below public/samples. */
  readonly file: string;
  /** First comment of the file: what it is, and that it is invented. */
  readonly title: string;
  readonly seed: number;
  readonly medium: 'air' | 'vacuum';
  /** Angstrom in `medium`, as observed. */
  readonly from: number;
  readonly to: number;
  readonly resolvingPower: number;
  readonly samplesPerFwhm: number;
  readonly z: number;
  /** Gaussian sigma of the gas' own motions. */
  readonly sigmaKms: number;
  readonly te: number;
  readonly ne: number;
  readonly cHbeta: number;
  /** 1e-15 erg s^-1 cm^-2, H beta after dimming. */
  readonly hBeta: number;
  /** Lines fainter than this (H beta = 100) are left out. */
  readonly faintest: number;
  /** Noise: of the detector, flux unit, and of the photons, share of the flux in it. */
  readonly readNoise: number;
  readonly photonNoise: number;
  /** Share of gas against the reference nebula by the energy that was needed to make it: the last whose energy (eV) is reached counts. */
  readonly stages: readonly { readonly fromEv: number; readonly share: number }[];
  /** Light without lines, flux unit, at a wavelength in the object's frame. */
  readonly continuum: (rest: number) => number;
  /** Residual of the night sky: [O I] 5577, observer's frame, H beta = 100. */
  readonly sky: number;
}

const KMS = 1 / 299_792.458;

/** A star of about 70,000 K: little gas above the second edge of helium. */
const lantern: SampleRecipe = {
  file: 'lantern-nebula.csv',
  title: 'Lantern Nebula: an invented object, made from the line list by a seeded script; for trying the desk only',
  seed: 20261201,
  medium: 'air',
  from: 3700,
  to: 9300,
  resolvingPower: 2200,
  samplesPerFwhm: 2.5,
  z: 31.2 * KMS,
  sigmaKms: 11,
  te: 11_400,
  ne: 1_800,
  cHbeta: 0.42,
  hBeta: 240,
  faintest: 0.02,
  readNoise: 0.012,
  photonNoise: 0.0006,
  stages: [
    { fromEv: 0, share: 0.25 },
    { fromEv: 13, share: 1 },
    { fromEv: 54.4, share: 0.05 },
  ],
  continuum: (w) => 0.22 * (w / 5000) ** -2.1 + 0.16 * (w / 5000) ** -0.4,
  sky: 0.9,
};

/** A young cluster in a salt marsh of gas: cool, thin, nothing above the second edge of helium. */
const heronMarsh: SampleRecipe = {
  ...lantern,
  file: 'heron-marsh.csv',
  title: 'Heron Marsh: an invented H II region, made from the line list by a seeded script; for trying the desk only',
  seed: 20261202,
  from: 3650,
  to: 9600,
  resolvingPower: 3000,
  z: -18.5 * KMS,
  sigmaKms: 9,
  te: 8_300,
  ne: 140,
  cHbeta: 0.61,
  hBeta: 95,
  stages: [
    { fromEv: 0, share: 0.5 },
    { fromEv: 13, share: 1.4 },
    { fromEv: 24, share: 0.8 },
    { fromEv: 35, share: 0.28 },
    { fromEv: 47, share: 0 },
  ],
  continuum: (w) => 0.5 * (w / 5000) ** -1.6 + 0.12,
  sky: 2,
};

/** A small hot shell about a star of some 150,000 K. */
const kiln: SampleRecipe = {
  ...lantern,
  file: 'kiln-nebula.csv',
  title:
    'Kiln Nebula: an invented planetary nebula of high excitation, made from the line list by a seeded script; for trying the desk only',
  seed: 20261203,
  from: 3580,
  to: 7300,
  resolvingPower: 5500,
  z: 74.6 * KMS,
  sigmaKms: 15,
  te: 14_600,
  ne: 7_500,
  cHbeta: 0.17,
  hBeta: 410,
  stages: [
    { fromEv: 0, share: 0.05 },
    { fromEv: 13, share: 0.25 },
    { fromEv: 24, share: 0.2 },
    { fromEv: 27, share: 0.8 },
    { fromEv: 35, share: 0.2 },
    { fromEv: 39, share: 0.5 },
    { fromEv: 54.4, share: 1.2 },
  ],
  continuum: (w) => 0.3 * (w / 5000) ** -2.6 + 0.2,
  sky: 0.3,
};

/** The rim of an old remnant, where the gas is driven together: much of it hardly ionized. */
const emberVeil: SampleRecipe = {
  ...lantern,
  file: 'ember-veil.csv',
  title: 'Ember Veil: an invented shocked shell at low resolution, made from the line list by a seeded script; for trying the desk only',
  seed: 20261204,
  from: 3600,
  to: 7600,
  resolvingPower: 700,
  z: -112 * KMS,
  sigmaKms: 55,
  te: 13_000,
  ne: 350,
  cHbeta: 0.3,
  hBeta: 30,
  faintest: 0.3,
  stages: [
    { fromEv: 0, share: 6 },
    { fromEv: 13, share: 2.2 },
    { fromEv: 13.59, share: 1 },
    { fromEv: 14, share: 2.4 },
    { fromEv: 24, share: 0.7 },
    { fromEv: 54.4, share: 0.1 },
  ],
  continuum: (w) => 0.06 * (w / 5000) ** -0.8,
  sky: 3,
};

/** Stars behind the gas: a break and the strongest absorption lines (rest, vacuum Angstrom; depth; sigma in Angstrom). */
const STARS = [
  { at: 3934.8, depth: 0.45, sigma: 7 },
  { at: 3969.6, depth: 0.4, sigma: 7 },
  { at: 4305.6, depth: 0.15, sigma: 9 },
  { at: 5176.6, depth: 0.2, sigma: 12 },
  { at: 5895.6, depth: 0.12, sigma: 7 },
] as const;

/** A galaxy with a quiet nucleus, some 460 Mpc away. */
const dunlin: SampleRecipe = {
  ...lantern,
  file: 'dunlin-galaxy.csv',
  title: 'Dunlin Galaxy: an invented narrow-line galaxy, made from the line list by a seeded script; for trying the desk only',
  seed: 20261205,
  medium: 'vacuum',
  from: 3850,
  to: 9200,
  resolvingPower: 1900,
  z: 0.1037,
  sigmaKms: 150,
  te: 13_500,
  ne: 420,
  cHbeta: 0.35,
  hBeta: 2.4,
  faintest: 0.3,
  readNoise: 0.0035,
  photonNoise: 0.0001,
  stages: [
    { fromEv: 0, share: 1.6 },
    { fromEv: 13, share: 1.2 },
    { fromEv: 24, share: 0.9 },
    { fromEv: 54.4, share: 0.35 },
  ],
  continuum: (w) =>
    STARS.reduce(
      (light, { at, depth, sigma }) => light * (1 - depth * Math.exp(-0.5 * ((w - at) / sigma) ** 2)),
      0.09 * (0.62 + 0.38 / (1 + Math.exp((4000 - w) / 40))) * (w / 5000) ** 0.4,
    ),
  sky: 12,
};

export const SAMPLE_RECIPES: readonly SampleRecipe[] = [lantern, heronMarsh, kiln, emberVeil, dunlin];

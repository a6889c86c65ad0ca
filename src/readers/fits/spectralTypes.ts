import { airFromVacuum, vacuumFromAir } from '../../units/index.ts';

/** Speed of light: Angstrom Hz and m/s, exact. */
const C_ANGSTROM_HZ = 2.99792458e18;
const C_MS = 299_792_458;
/** hc in J Angstrom, from the exact constants of the SI. */
const HC_J_ANGSTROM = 1.986_445_857_148_929e-15;

/** A spectral variable of FITS WCS paper III (Greisen et al. 2006, A&A 446, 747, table 1), in SI units except wavelengths, which are in Angstrom. */
export interface SpectralVariable {
  /** Vacuum wavelength, Angstrom, of a value. */
  toVacuum(value: number): number;
  /** d(vacuum wavelength)/d(value) at a value. */
  slope(value: number): number;
  /** Value of a vacuum wavelength. */
  fromVacuum(vacuum: number): number;
}

const air: SpectralVariable = {
  toVacuum: (a) => vacuumFromAir(a),
  slope: (a) => (vacuumFromAir(a * (1 + 1e-4)) - vacuumFromAir(a * (1 - 1e-4))) / (2e-4 * a),
  fromVacuum: (w) => airFromVacuum(w),
};
const inverse = (k: number): SpectralVariable => ({ toVacuum: (x) => k / x, slope: (x) => -k / x ** 2, fromVacuum: (w) => k / w });

/**
 * The variable a CTYPE code names; those of velocity need the vacuum rest wavelength (Angstrom).
 * Undefined for other codes, and for velocities without rest wavelength.
 */
export function spectralVariable(code: string, restVacuum: number | undefined): SpectralVariable | undefined {
  switch (code) {
    case 'WAVE':
      return { toVacuum: (w) => w, slope: () => 1, fromVacuum: (w) => w };
    case 'AWAV':
      return air;
    case 'FREQ':
      return inverse(C_ANGSTROM_HZ);
    case 'ENER':
      return inverse(HC_J_ANGSTROM);
    case 'WAVN':
      // per metre
      return inverse(1e10);
  }
  if (!restVacuum) return undefined;
  const rest = restVacuum;
  switch (code) {
    case 'VOPT':
      return { toVacuum: (v) => rest * (1 + v / C_MS), slope: () => rest / C_MS, fromVacuum: (w) => C_MS * (w / rest - 1) };
    case 'ZOPT':
      return { toVacuum: (z) => rest * (1 + z), slope: () => rest, fromVacuum: (w) => w / rest - 1 };
    case 'VRAD':
      return {
        toVacuum: (v) => rest / (1 - v / C_MS),
        slope: (v) => rest / C_MS / (1 - v / C_MS) ** 2,
        fromVacuum: (w) => C_MS * (1 - rest / w),
      };
    case 'VELO':
      return relativistic(rest, C_MS);
    case 'BETA':
      return relativistic(rest, 1);
    default:
      return undefined;
  }
}

/** lambda = rest sqrt((1 + b)/(1 - b)), b = v/c. */
function relativistic(rest: number, c: number): SpectralVariable {
  const toVacuum = (v: number) => rest * Math.sqrt((1 + v / c) / (1 - v / c));
  return {
    toVacuum,
    slope: (v) => toVacuum(v) / (c * (1 - (v / c) ** 2)),
    fromVacuum: (w) => (c * ((w / rest) ** 2 - 1)) / ((w / rest) ** 2 + 1),
  };
}

/** SI value (Angstrom for wavelengths) of one of the usual unit of a code, when CUNIT is given in our unit registry's base. */
export const BASE_TO_SI: Readonly<Record<string, number>> = {
  wavelength: 1,
  frequency: 1,
  energy: 1.602176634e-19,
  wavenumber: 100,
  velocity: 1000,
};

import { type AirAngstrom, airAngstrom, type VacuumAngstrom, vacuumAngstrom } from './brands.ts';

/** Below this vacuum wavelength (Angstrom) wavelengths are always given in vacuum: common practice, no source. */
export const AIR_LIMIT = 2000;

/**
 * Refractive index of standard air (15 C, 101325 Pa, 450 ppm CO2, dry) at a vacuum wavelength.
 *
 * @param vacuum Angstrom
 * Ciddor 1996, Applied Optics 35, 1566, equation 1; published for 2300-16900 A, used beyond as handbooks do.
 * Checked in tests/reference/airVacuum.test.ts.
 */
function refractiveIndexOfAir(vacuum: number): number {
  const s2 = (1e4 / vacuum) ** 2;
  return 1 + 0.057_921_05 / (238.0185 - s2) + 0.001_679_17 / (57.362 - s2);
}

/** Vacuum wavelength -> wavelength in standard air, Angstrom; unchanged below `AIR_LIMIT`. Ciddor 1996. */
export function airFromVacuum(vacuum: number): AirAngstrom {
  return airAngstrom(vacuum < AIR_LIMIT ? vacuum : vacuum / refractiveIndexOfAir(vacuum));
}

/** Wavelength in standard air -> vacuum, Angstrom; inverse of `airFromVacuum` to 1e-9 A by fixed-point iteration. */
export function vacuumFromAir(air: number): VacuumAngstrom {
  if (air < AIR_LIMIT / refractiveIndexOfAir(AIR_LIMIT)) return vacuumAngstrom(air);
  let vacuum = air * refractiveIndexOfAir(air);
  for (let k = 0; k < 4; k++) vacuum = air * refractiveIndexOfAir(vacuum);
  return vacuumAngstrom(vacuum);
}

import type { Mark } from '../../src/identify/index.ts';
import { seededRandom } from '../../src/numeric/index.ts';
import { vacuumFromAir } from '../../src/units/index.ts';

/**
 * A nebula of middle excitation as a handbook would print it: ion, air wavelength (Angstrom), flux for H beta = 100.
 * Wavelengths from memory of laboratory tables, fluxes of the usual order, from memory; no particular object.
 */
export const NEBULA = `[O II] 3726.03 60;[O II] 3728.82 45;H I 3835.39 7;[Ne III] 3868.76 40;He I 3888.65 9;[Ne III] 3967.47 12;H I 3970.07 15.5;He I 4026.20 2.1;
[S II] 4068.60 1.3;[S II] 4076.35 .45;H I 4101.73 25.9;He I 4143.76 .3;C II 4267.18 .35;H I 4340.46 46.8;[O III] 4363.21 4.2;He I 4387.93 .5;He I 4471.49 4.6;O II 4649.13 .2;
[Fe III] 4658.05 .5;He II 4685.71 4;[Ar IV] 4711.37 .9;[Ar IV] 4740.17 .8;H I 4861.33 100;[Fe III] 4881.00 .2;He I 4921.93 1.2;[O III] 4958.91 240;[O III] 5006.84 716;He I 5015.68 2.3;
[N I] 5197.90 .2;[N I] 5200.26 .13;[Fe III] 5270.40 .25;[Cl III] 5517.71 .45;[Cl III] 5537.87 .45;[N II] 5754.59 1.1;He I 5875.62 13.8;[O I] 6300.30 3;[S III] 6312.06 1.5;[O I] 6363.78 1;
[N II] 6548.05 22;H I 6562.80 286;[N II] 6583.45 66;He I 6678.15 3.8;[S II] 6716.44 6;[S II] 6730.82 7.5;He I 7065.19 5.6;[Ar III] 7135.79 14;He I 7281.35 .7;[O II] 7319.99 3;[O II] 7330.73 2.6;
[Ar III] 7751.11 3.4;[S III] 9068.62 25`;

export interface NamedMark extends Mark {
  readonly ion: string;
  readonly air: number;
}

/**
 * The nebula as an observer measures it.
 *
 * @param seed    of the noise
 * @param z       redshift put on
 * @param scatter one sigma of the wavelengths, Angstrom
 */
export function nebula({ seed = 1, z = 0, scatter = 0.06, dex = 0.05, list = NEBULA } = {}): NamedMark[] {
  const random = seededRandom(seed);
  return list.split(';').map((entry) => {
    const words = entry.trim().split(/\s+/);
    const [air, flux] = words.slice(-2).map(Number);
    const measured = flux * 10 ** (dex * random.normal());
    return {
      ion: words.slice(0, -2).join(' '),
      air,
      wavelength: vacuumFromAir(air) * (1 + z) + scatter * random.normal(),
      wavelengthErr: scatter,
      flux: measured,
      fluxErr: 0.02 * measured + 0.02,
    };
  });
}

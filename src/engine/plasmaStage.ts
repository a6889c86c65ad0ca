import type { AtomicData } from '../atomic/index.ts';
import type { NamingSettings } from '../identify/index.ts';
import type { Measurement } from '../measure/index.ts';
import { type Continuum, describeGas, type Gas, type GasSettings, type NamedLine } from '../plasma/index.ts';
import { fromVacuum, type Medium, type Spectrum } from '../spectrum/index.ts';

interface PlasmaParts {
  readonly data: AtomicData;
  readonly lines: readonly NamedLine[];
  readonly spectrum?: Spectrum;
  readonly measurement?: Measurement;
  readonly medium: Medium;
  readonly z: number;
  readonly settings: GasSettings;
  /** Te and ne where nothing is known. */
  readonly namingSettings: NamingSettings;
}

/** What the names in force say of the gas. */
export function plasmaStage({ data, lines, spectrum, measurement, medium, z, settings, namingSettings }: PlasmaParts): Gas {
  return describeGas(lines, {
    data,
    settings,
    startTe: namingSettings.te,
    startNe: namingSettings.ne,
    ...(spectrum && measurement ? { continuum: continuumOf(spectrum, measurement, medium, z) } : {}),
  });
}

/** The samples with the fitted lines taken off, looked up by rest wavelength. */
function continuumOf(spectrum: Spectrum, { model, continuum }: Measurement, medium: Medium, z: number): Continuum {
  const { wavelength, flux, masked } = spectrum;
  return {
    z,
    levels(from, to) {
      const [low, high] = [from, to].map((rest) => fromVacuum(rest * (1 + z), medium));
      if (!(wavelength[0] <= low && wavelength[wavelength.length - 1] >= high)) return undefined;
      const levels: number[] = [];
      for (let i = firstAtLeast(wavelength, low); i < wavelength.length && wavelength[i] <= high; i++)
        if (!masked[i]) levels.push(flux[i] - (model[i] - continuum[i]));
      return levels;
    },
  };
}

/** First index whose value is >= `bound`. */
function firstAtLeast(ascending: Float64Array, bound: number): number {
  let low = 0;
  let high = ascending.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (ascending[middle] < bound) low = middle + 1;
    else high = middle;
  }
  return low;
}

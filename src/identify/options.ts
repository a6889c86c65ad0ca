import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { factsOf } from './lineFacts.ts';
import type { SystemModel } from './model.ts';
import type { Mark, NamingSettings } from './naming.ts';

/** One transition that a mark may be, before it is weighed. */
export interface Option {
  readonly line: number;
  /** Observed minus expected, Angstrom, at the velocity of the model it was made with. */
  readonly off: number;
  /** One sigma of `off`, Angstrom: mark, line and dispersion. */
  readonly sigma: number;
  /** Inside the tolerance; a line outside it can only be a part of a blend. */
  readonly within: boolean;
}

/** Families that stand still in the observer's frame. */
export const isLocal = (data: AtomicData, line: number): boolean => factsOf(data).local[line] === 1;

/** Interstellar clouds move against the observer by up to this much, km/s, one sigma. */
const CLOUD_KMS = 25;
/** A line whose own wavelength is uncertain may lie that many of its errors off. */
const LINE_SIGMAS = 3;

/** A part of a blend lies at most this far from its mean, in FWHM of the feature. */
const BLEND_REACH_FWHM = 0.8;

/**
 * All lines within the tolerance of a mark: `toleranceKms`, or `toleranceSigma` times the mark's error, or three errors of the line's own wavelength.
 *
 * @param width FWHM of the feature, or what is unresolved, Angstrom
 * @param model systemic velocity, its trend with the ion, and the extra scatter of centroids
 */
export function optionsOf(
  mark: Mark,
  width: number,
  data: AtomicData,
  settings: NamingSettings,
  { z, dispersionKms, trendKms }: SystemModel,
): Option[] {
  if (mark.artefact) return [];
  const { lines } = data;
  const { local, absorbs, hardness } = factsOf(data);
  const absorbing = mark.flux < 0 ? 1 : 0;
  const reach = Math.max((settings.toleranceKms / SPEED_OF_LIGHT_KMS) * mark.wavelength, settings.toleranceSigma * mark.wavelengthErr);
  // two unresolved lines make a feature between them: either may lie further off than the tolerance
  const blendReach = absorbing === 1 ? 0 : BLEND_REACH_FWHM * width;
  const widest = Math.max(reach, blendReach) + 2;
  const options: Option[] = [];
  const consider = (shift: number, inPlace: number) => {
    const [first, end] = linesBetween(lines, (mark.wavelength - widest) / shift, (mark.wavelength + widest) / shift);
    for (let line = first; line < end; line++) {
      if (local[line] !== inPlace || absorbs[line] !== absorbing) continue;
      const trend = inPlace === 1 ? 0 : (trendKms * hardness[lines.ion[line]]) / SPEED_OF_LIGHT_KMS;
      const off = mark.wavelength - lines.wavelengthVac[line] * shift * (1 + trend);
      const lineErr = lines.wavelengthErr[line] * shift;
      const within = Math.abs(off) <= Math.max(reach, LINE_SIGMAS * Math.hypot(lineErr, mark.wavelengthErr));
      if (!within && (inPlace === 1 || Math.abs(off) > blendReach)) continue;
      const spreadKms = absorbing === 1 && lines.nature(line) === 'interstellar' ? CLOUD_KMS : dispersionKms;
      const spread = (spreadKms / SPEED_OF_LIGHT_KMS) * mark.wavelength;
      options.push({ line, off, sigma: Math.hypot(mark.wavelengthErr, lineErr, spread), within });
    }
  };
  if (absorbing === 0) consider(1 + z, 0);
  consider(1, 1);
  return options;
}

import { quantile } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addLocalContinuum, addProfiles } from './addProfiles.ts';
import type { GroupFit } from './fitGroup.ts';
import type { FitSamples } from './fitSamples.ts';
import { firstAtLeast } from './profile.ts';

/** How far the instrument's profile is from a Gaussian, as shares of a line's peak. */
export interface Misfit {
  /** rms of what is left over within one FWHM and a half of the centre. */
  readonly core: number;
  /** rms of what is left over between two and four FWHM. */
  readonly wing: number;
}

/** A line tells of the profile when its peak stands this far above the noise. */
const TELLING_PEAK = 60;
const MOST_TELLING = 20;
const FEWEST_TELLING = 3;
/** The sum of squares must exceed that of noise by so many of its own sigma to count. */
const CLEAR_SIGMA = 4;
const CORE_FWHM = 1.5;
const WING_FROM_FWHM = 2;
const WING_TO_FWHM = 4;
/** Where the wing was measured, and how it falls from there: scattered light goes as the square of the distance (common practice, no source). */
const WING_AT_FWHM = 3;
/** Wings are followed this far, in FWHM. */
const REACH_FWHM = 40;

/** What Gaussians leave over of the strongest lines that were fitted alone, beyond the noise; zeros when fewer than three lines are strong. */
export function misfitOf(samples: FitSamples, fits: readonly GroupFit[]): Misfit {
  const { x, y, noise, usable } = samples;
  const lines = fits
    .flatMap((fit) =>
      fit.components.filter((c) => c.flux > 0).map((c) => ({ fit, ...c, peak: c.flux / (c.sigma * Math.sqrt(2 * Math.PI)) })),
    )
    .map((c) => ({ ...c, snr: c.peak / noise[Math.min(x.length - 1, firstAtLeast(x, c.centre))] }))
    .filter((c) => c.snr > TELLING_PEAK)
    .sort((a, b) => b.snr - a.snr)
    .slice(0, MOST_TELLING);
  if (lines.length < FEWEST_TELLING) return { core: 0, wing: 0 };
  const model = new Float64Array(x.length);
  for (const fit of new Set(lines.map((l) => l.fit))) {
    addProfiles(samples, fit.components, model);
    addLocalContinuum(samples, fit, model);
  }
  const rms = (low: number, high: number) =>
    lines.map(({ centre, sigma, peak }) => {
      const fwhm = FWHM_PER_SIGMA * sigma;
      let left = 0;
      let variance = 0;
      let count = 0;
      for (let i = firstAtLeast(x, centre - high * fwhm); i < x.length && x[i] <= centre + high * fwhm; i++) {
        if (!usable[i] || Math.abs(x[i] - centre) < low * fwhm) continue;
        left += (y[i] - model[i]) ** 2 - noise[i] ** 2;
        variance += 2 * noise[i] ** 4;
        count++;
      }
      return left > CLEAR_SIGMA * Math.sqrt(variance) ? Math.sqrt(left / count) / peak : 0;
    });
  return { core: quantile(rms(0, CORE_FWHM), 0.5), wing: quantile(rms(WING_FROM_FWHM, WING_TO_FWHM), 0.5) };
}

/**
 * Adds what the profiles of lines are not known to, in quadrature, into the noise: errors become true where lines are no Gaussians, and what is left of a strong
 * line breeds no features.
 */
export function addMisfit(samples: FitSamples, fits: readonly GroupFit[], { core, wing }: Misfit): void {
  const { x, noise, sampleWidth } = samples;
  const unknown = new Float64Array(x.length);
  for (const { components } of fits) {
    for (const { centre, sigma, flux } of components) {
      const fwhm = FWHM_PER_SIGMA * sigma;
      const peak = Math.abs(flux) / (sigma * Math.sqrt(2 * Math.PI));
      for (let i = firstAtLeast(x, centre - REACH_FWHM * fwhm); i < x.length && x[i] <= centre + REACH_FWHM * fwhm; i++) {
        const away = Math.abs(x[i] - centre) / fwhm;
        const share =
          away < CORE_FWHM ? Math.max(core, wing) : wing * Math.min((WING_AT_FWHM / WING_FROM_FWHM) ** 2, (WING_AT_FWHM / away) ** 2);
        // the misfit of neighbouring samples goes the same way: as noise of single samples it must be larger by the root of the samples in a line
        const level = peak * share * Math.sqrt(Math.max(1, fwhm / sampleWidth[i]));
        if (level > unknown[i]) unknown[i] = level;
      }
    }
  }
  for (let i = 0; i < unknown.length; i++) noise[i] = Math.hypot(noise[i], unknown[i]);
}

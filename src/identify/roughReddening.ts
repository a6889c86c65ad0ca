/**
 * log10 of the dimming at a wavelength relative to H beta for c(Hbeta) = 1: a power law of index 1.25 in 1/lambda, f(H alpha) = -0.31, near the
 * mean of published optical curves. Rough on purpose: it only keeps far-apart lines comparable while names are sought.
 *
 * @param wavelength vacuum Angstrom, rest frame
 */
export function roughDimming(wavelength: number): number {
  const limited = Math.min(25_000, Math.max(1500, wavelength));
  return (4862.7 / limited) ** 1.25 - 1;
}

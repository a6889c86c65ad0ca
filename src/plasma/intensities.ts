import type { ReddeningFit } from './fitReddening.ts';
import type { WithErr } from './gas.ts';
import { fullErr, type LineFlux } from './lineFluxes.ts';
import type { NamedLine } from './namedLine.ts';

/** How ln I of every line follows the measured fluxes. */
interface Correction {
  readonly c: number;
  /** Change of c with ln of each named line's flux, errors inflated as those of c(H beta). */
  readonly slopes: Float64Array;
}

/** c(H beta) and how it hangs on each named line. A given c hangs on none. */
export function correctionOf(
  named: readonly NamedLine[],
  fluxes: readonly LineFlux[],
  fit: ReddeningFit | undefined,
  given: number | undefined,
): Correction | undefined {
  const slopes = new Float64Array(named.length);
  if (given !== undefined) return { c: given, slopes };
  if (!fit) return undefined;
  const formal = Math.hypot(...fit.used.map((line, k) => fit.weights[k] * line.yErr));
  const inflation = formal > 0 ? fit.cHbetaErr / formal : 1;
  fit.used.forEach(({ line }, k) => {
    const { from, flux } = fluxes[line.index];
    for (const member of from) slopes[member] += (inflation * fit.weights[k] * named[member].flux) / flux;
  });
  return { c: fit.cHbeta, slopes };
}

/**
 * Intensities corrected for reddening, H beta = 100, one a named line. A negative c(H beta) corrects nothing.
 *
 * @param hBeta the flux of H beta
 * @param f     A(lambda)/A(H beta) - 1
 * Errors: those of the line, of H beta and of c(H beta), which hangs on both: propagated to first order with their correlations. H beta keeps its own error.
 */
export function intensitiesOf(
  named: readonly NamedLine[],
  hBeta: LineFlux,
  { c, slopes }: Correction,
  calibrationErr: number,
  f: (wavelength: number) => number,
): (WithErr & { readonly feature: number })[] {
  const errs = named.map((line) => fullErr(line.flux, line.fluxErr, calibrationErr) / line.flux);
  const members = new Set(hBeta.from);
  return named.map((line, k) => {
    const fk = f(line.restVac);
    const value = (100 * line.flux * 10 ** (Math.max(0, c) * fk)) / hBeta.flux;
    if (members.has(k)) return { feature: line.feature, value, err: value * errs[k] };
    let variance = 0;
    for (let j = 0; j < named.length; j++) {
      const own = (j === k ? 1 : 0) - (members.has(j) ? named[j].flux / hBeta.flux : 0) + Math.LN10 * fk * slopes[j];
      if (own !== 0) variance += (own * errs[j]) ** 2;
    }
    return { feature: line.feature, value, err: value * Math.sqrt(variance) };
  });
}

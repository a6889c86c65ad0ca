import type { AtomicData } from '../atomic/index.ts';
import { caseBIntensity } from '../atomic/index.ts';
import { extinctionRatio } from './extinction.ts';
import { type FitLine, fitLines, fitReddening, type ReddeningFit } from './fitReddening.ts';
import type { GasSettings } from './gasSettings.ts';
import { type HydrogenicFlux, hydrogenicFluxes } from './hydrogenLines.ts';
import type { LineFlux } from './lineFluxes.ts';

/** Vacuum wavelength of H beta, Angstrom (NIST ASD). */
export const H_BETA_VAC = 4862.683;
const HE_II_4686_VAC = 4687.02;
/** Equivalent widths of stellar absorption among which one is fitted, Angstrom. */
const HIGHEST_STELLAR_EW = 10;
/** He II is never taken to be more than the rest of a line: such a line is no hydrogen line. */
const LEAST_PURE = 0.01;
const GOLDEN = (Math.sqrt(5) - 1) / 2;
const GOLDEN_STEPS = 30;

/** A(lambda)/A(H beta) - 1 under the chosen law. */
export function curveOf(settings: Pick<GasSettings, 'curve' | 'rV'>): (wavelength: number) => number {
  const atHbeta = extinctionRatio(settings.curve, settings.rV, H_BETA_VAC);
  return (wavelength) => extinctionRatio(settings.curve, settings.rV, wavelength) / atHbeta - 1;
}

/** Everything found out about reddening, before it is put into words. */
export interface ReddeningResult {
  readonly lines: readonly HydrogenicFlux[];
  readonly fit?: ReddeningFit;
  /** Stellar absorption used, Angstrom of equivalent width; its error when it was fitted. */
  readonly stellarEwA: number;
  readonly stellarEwErrA?: number;
  /** Of each hydrogen line, by its place among the fluxes: light of H I alone over the measured flux, and the flux with stellar absorption filled over it. */
  readonly shares: ReadonlyMap<number, { readonly pure: number; readonly filled: number }>;
  /** The same from He II alone. */
  readonly helium?: ReddeningFit;
}

/**
 * c(H beta) of the hydrogen lines against case B.
 *
 * @param te, ne K and cm^-3 of the case-B intensities
 */
export function reddeningOf(data: AtomicData, fluxes: readonly LineFlux[], settings: GasSettings, te: number, ne: number): ReddeningResult {
  const f = curveOf(settings);
  const lines = hydrogenicFluxes(data, 'H I', fluxes);
  const usable = lines.filter((line) => line.unusable === undefined);
  const heliumLines = hydrogenicFluxes(data, 'He II', fluxes);
  const he4686 = heliumLines.find((line) => line.nLower === 3 && line.nUpper === 4);
  const table = { caseB: data.caseB, te, ne };
  const helium = fitReddening(
    fitLines(
      heliumLines.filter((line) => line.unusable === undefined),
      heliumLines.filter((line) => line.unusable === undefined).map((line) => line.flux),
      { ...table, ion: 'He II' },
      f,
    ),
  );
  const attempt = (stellarEwA: number): ReddeningFit | undefined => {
    let c = settings.cHbeta ?? 0;
    let fit: ReddeningFit | undefined;
    // what He II adds depends on c a little: twice is enough
    for (let round = 0; round < (he4686 ? 3 : 1); round++) {
      fit = fitReddening(hydrogenFitLines(usable, stellarEwA, he4686?.flux ?? 0, c, table, f));
      c = fit?.cHbeta ?? c;
    }
    return fit;
  };
  const found =
    settings.stellarEwA === 'fitted' ? fittedStellar(attempt) : { fit: attempt(settings.stellarEwA), stellarEwA: settings.stellarEwA };
  const c = settings.cHbeta ?? found.fit?.cHbeta ?? 0;
  const shares = lines.map((line) => {
    const filled = filledFlux(line, found.stellarEwA);
    const pure = filled - heliumUnder(line, he4686?.flux ?? 0, c, table, f);
    return [line.index, { pure: Math.max(LEAST_PURE, pure / line.flux), filled: filled / line.flux }] as const;
  });
  return { lines, ...found, shares: new Map(shares), ...(helium ? { helium } : {}) };
}

/** Flux of a line with the stellar absorption under it filled: only Balmer lines over a known continuum have some. */
const filledFlux = ({ flux, nLower, ew }: HydrogenicFlux, stellarEwA: number) =>
  nLower === 2 && ew !== undefined && ew > 0 ? flux * (1 + stellarEwA / ew) : flux;

function hydrogenFitLines(
  usable: readonly HydrogenicFlux[],
  stellarEwA: number,
  flux4686: number,
  c: number,
  table: Omit<Parameters<typeof fitLines>[2], 'ion'>,
  f: (wavelength: number) => number,
): FitLine[] {
  const corrected = usable.map((line) => filledFlux(line, stellarEwA) - heliumUnder(line, flux4686, c, table, f));
  return fitLines(usable, corrected, { ...table, ion: 'H I' }, f);
}

/** Observed flux of the He II line under a Balmer line. */
function heliumUnder(
  line: HydrogenicFlux,
  flux4686: number,
  c: number,
  { caseB, te, ne }: Omit<Parameters<typeof fitLines>[2], 'ion'>,
  f: (wavelength: number) => number,
): number {
  if (!line.under || flux4686 === 0) return 0;
  const intrinsic = caseBIntensity(caseB, 'He II', line.under[0], line.under[1], te, ne) / 100;
  return Number.isFinite(intrinsic) ? flux4686 * intrinsic * 10 ** (-c * (f(line.restVac) - f(HE_II_4686_VAC))) : 0;
}

/** Stellar absorption and c(H beta) at once: the equivalent width with the least chi2 (golden section), its error where chi2 has grown by 1 (times chi2/dof where that is more). */
function fittedStellar(attempt: (ew: number) => ReddeningFit | undefined): Pick<ReddeningResult, 'fit' | 'stellarEwA' | 'stellarEwErrA'> {
  const free = attempt(0);
  // one degree of freedom more is needed, and the same lines throughout
  if (!free || free.dof < 1) return { fit: free, stellarEwA: 0 };
  const badness = (ew: number) => attempt(ew)?.chi2 ?? Number.POSITIVE_INFINITY;
  let [low, high] = [0, HIGHEST_STELLAR_EW];
  for (let step = 0; step < GOLDEN_STEPS; step++) {
    const [p, q] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
    if (badness(p) < badness(q)) high = q;
    else low = p;
  }
  const stellarEwA = (low + high) / 2;
  const fit = attempt(stellarEwA);
  if (!fit) return { fit: free, stellarEwA: 0 };
  const step = Math.max(0.05, 0.05 * stellarEwA);
  const curvature = (badness(stellarEwA + step) - 2 * fit.chi2 + badness(Math.max(0, stellarEwA - step))) / step ** 2;
  const dof = Math.max(1, fit.dof - 1);
  const stellarEwErrA = curvature > 0 ? Math.sqrt((2 / curvature) * Math.max(1, fit.chi2 / dof)) : HIGHEST_STELLAR_EW;
  const slope = ((attempt(stellarEwA + step)?.cHbeta ?? fit.cHbeta) - fit.cHbeta) / step;
  return { fit: { ...fit, cHbetaErr: Math.hypot(fit.cHbetaErr, slope * stellarEwErrA), dof: fit.dof - 1 }, stellarEwA, stellarEwErrA };
}

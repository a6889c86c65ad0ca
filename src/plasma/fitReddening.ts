import { type CaseBTable, caseBIntensity } from '../atomic/index.ts';
import { median, robustSigma } from '../numeric/index.ts';
import type { HydrogenicFlux } from './hydrogenLines.ts';

/** One line of the fit: natural logarithms. */
export interface FitLine {
  readonly line: HydrogenicFlux;
  /** A(lambda)/A(H beta) - 1. */
  readonly f: number;
  /** ln of observed over case B, up to a constant. */
  readonly y: number;
  readonly yErr: number;
}

/** c(H beta) from a set of lines. */
export interface ReddeningFit {
  readonly cHbeta: number;
  /** One sigma, inflated by sqrt(chi2/dof) where that is above 1. */
  readonly cHbetaErr: number;
  /** ln of the flux of H beta that all lines together predict. */
  readonly lnHbeta: number;
  readonly chi2: number;
  readonly dof: number;
  /** Change of c(H beta) with ln of each used line's flux, parallel to `used`. */
  readonly weights: readonly number[];
  readonly used: readonly FitLine[];
  readonly outliers: readonly FitLine[];
}

/** A line is an outlier from this many of its errors (scatter of the lines included) on. */
const OUTLIER_SIGMA = 4;
/** Fewer lines than this are not sorted into good ones and outliers. */
const LEAST_FOR_OUTLIERS = 4;
const MOST_ROUNDS = 8;
const LN10 = Math.LN10;
/** f must differ by this much among the lines for c(H beta) to be had. */
const LEAST_SPREAD = 0.03;

/** Lines as the fit takes them: what case B says taken out. `fluxes` in the order of `lines`, corrected for what lies under them. */
export function fitLines(
  lines: readonly HydrogenicFlux[],
  fluxes: readonly number[],
  table: { readonly caseB: CaseBTable; readonly ion: string; readonly te: number; readonly ne: number },
  f: (wavelength: number) => number,
): FitLine[] {
  return lines.flatMap((line, k) => {
    const expected = caseBIntensity(table.caseB, table.ion, line.nLower, line.nUpper, table.te, table.ne) / 100;
    const found = { line, f: f(line.restVac), y: Math.log(fluxes[k] / expected), yErr: line.fluxErr / fluxes[k] };
    return Number.isFinite(found.y) && Number.isFinite(found.f) ? [found] : [];
  });
}

/**
 * Weighted fit of ln(F/F_caseB) = s - ln 10 c f over hydrogen lines, outliers left out.
 *
 * @returns undefined when fewer than two lines, or lines of one colour only, are left
 * Outliers: more than 4 sigma off, sigma being the line's own error and the scatter of all lines (median absolute deviation) in quadrature.
 */
export function fitReddening(lines: readonly FitLine[]): ReddeningFit | undefined {
  let used = [...lines];
  if (lines.length >= LEAST_FOR_OUTLIERS) {
    const { slope, middle, scatter } = robustLine(lines);
    const agrees = (l: FitLine, s: number, perF: number) => Math.abs(l.y - s - perF * l.f) <= OUTLIER_SIGMA * Math.hypot(l.yErr, scatter);
    used = lines.filter((l) => agrees(l, middle, slope));
    for (let round = 0; round < MOST_ROUNDS; round++) {
      const fit = solve(used, scatter);
      const kept = fit ? lines.filter((l) => agrees(l, fit.s, -LN10 * fit.c)) : used;
      const settled = kept.length === used.length && kept.every((l, k) => l === used[k]);
      if (settled || kept.length < LEAST_FOR_OUTLIERS - 1) break;
      used = kept;
    }
  }
  const fit = solve(used, 0);
  if (!fit) return undefined;
  const residuals = used.map((l) => (l.y - fit.s + LN10 * fit.c * l.f) / l.yErr);
  const chi2 = residuals.reduce((sum, r) => sum + r * r, 0);
  const dof = used.length - 2;
  const inflation = dof > 0 ? Math.max(1, Math.sqrt(chi2 / dof)) : 1;
  return {
    cHbeta: fit.c,
    cHbetaErr: fit.cErr * inflation,
    lnHbeta: fit.s,
    chi2,
    dof,
    weights: fit.weights,
    used,
    outliers: lines.filter((l) => !used.includes(l)),
  };
}

/** Median of the slopes of all pairs (Theil 1950, Sen 1968), the median level, and the scatter about that line. */
function robustLine(lines: readonly FitLine[]): { readonly slope: number; readonly middle: number; readonly scatter: number } {
  const slopes = lines.flatMap((p, i) =>
    lines.slice(i + 1).flatMap((q) => (Math.abs(p.f - q.f) > LEAST_SPREAD ? [(p.y - q.y) / (p.f - q.f)] : [])),
  );
  const slope = slopes.length > 0 ? median(slopes) : 0;
  const levels = lines.map((l) => l.y - slope * l.f);
  return { slope, middle: median(levels), scatter: robustSigma(levels) };
}

/** Weighted straight line; `weights` say how c follows each y. */
function solve(
  lines: readonly FitLine[],
  scatter: number,
): { readonly s: number; readonly c: number; readonly cErr: number; readonly weights: number[] } | undefined {
  const w = lines.map((l) => 1 / (l.yErr ** 2 + scatter ** 2));
  const total = w.reduce((sum, x) => sum + x, 0);
  const meanF = lines.reduce((sum, l, k) => sum + w[k] * l.f, 0) / total;
  const meanY = lines.reduce((sum, l, k) => sum + w[k] * l.y, 0) / total;
  const spread = lines.reduce((sum, l, k) => sum + w[k] * (l.f - meanF) ** 2, 0);
  const range = Math.max(...lines.map((l) => l.f)) - Math.min(...lines.map((l) => l.f));
  if (lines.length < 2 || !(range > LEAST_SPREAD) || !(spread > 0)) return undefined;
  const weights = lines.map((l, k) => (-w[k] * (l.f - meanF)) / (spread * LN10));
  const c = lines.reduce((sum, l, k) => sum + weights[k] * (l.y - meanY), 0);
  return { s: meanY + LN10 * c * meanF, c, cErr: 1 / (Math.sqrt(spread) * LN10), weights };
}

import { type Single, sharesOf } from './blends.ts';
import { claimedElsewhere } from './claims.ts';
import type { Mark } from './naming.ts';
import { isLocal } from './options.ts';
import { logFluxErr } from './sightings.ts';
import type { WeighContext } from './weighContext.ts';
import type { Weighed } from './weighed.ts';
import { widthNats } from './widths.ts';

/** log10 odds that a blend rather than one line is measured, before anything is known. */
const BLEND_PRIOR = Math.log(0.35);
/** A part of the sky or an interstellar line: the reference strengths are on a scale of their own. */
const LOCAL_PRIOR = Math.log(0.2);
/** Far outliers in strength happen (fluorescence, variability): the normal is given a floor of a wide one. */
const WIDE_SHARE = 0.01;
const WIDE_DEX = 1.2;
/** Centroids have outliers too: unseen blends, underestimated errors. */
const OUTLIER_SHARE = 0.02;
const OUTLIER_SIGMAS = 3;
const MOST_OWED = 5;
/** Two marks may be named in each other’s stead: a claim by another mark is trusted no further than this. */
const CLAIM_TRUST = 0.85;
/** Strangers are faint: their number falls by e for so many dex above the limit; a few are of any flux within three dex. */
const STRANGER_DEX = 0.8;
const ANY_FLUX_SHARE = 0.12;
const ANY_FLUX_DEX = 3;

/** Chance that an ion is present of which one line alone would be seen: from the simulated nebulae of the tests; and sightings that settle it. */
const ALONE_IS_PRESENT = 0.35;
const SETTLING_SIGHTINGS = 1;

const familyNats = ({ seen }: Single) => Math.log(1 - (1 - ALONE_IS_PRESENT) * Math.exp((-3 * Math.max(0, seen)) / SETTLING_SIGHTINGS));

/** Density of strangers in log10 flux, per dex, `above` dex over the limit. */
const strangersPerDex = (above: number) =>
  ((1 - ANY_FLUX_SHARE) * Math.exp(-Math.max(0, above) / STRANGER_DEX)) / STRANGER_DEX + ANY_FLUX_SHARE / ANY_FLUX_DEX;

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);
const normal = (x: number, s: number) => Math.exp(-0.5 * (x / s) ** 2) / (s * ROOT_TWO_PI);

const ALONE = [1] as const;

/** Parts of a name and their shares, strongest first. */
function strongestFirst(parts: readonly Single[]): readonly [readonly Single[], readonly number[]] {
  if (parts.length === 1) return [parts, ALONE];
  const shares = sharesOf(parts);
  const order = shares.map((_, k) => k).sort((a, b) => shares[b] - shares[a]);
  return [order.map((k) => parts[k]), order.map((k) => shares[k])];
}

/** The nats of one name: a line, or a blend of `parts`. */
export function scoreName(mark: Mark, j: number, parts: readonly Single[], context: WeighContext): Weighed {
  const { data, survey, claims } = context;
  const [sorted, sortedShares] = strongestFirst(parts);
  const off = sorted.reduce((sum, p, k) => sum + sortedShares[k] * p.off, 0);
  // the shares themselves are uncertain: half the spread between the parts times their uncertainty
  const mixing = sorted.reduce((sum, p, k) => sum + sortedShares[k] * (p.off - off) ** 2, 0);
  const sigma = Math.sqrt(sorted.reduce((sum, p, k) => sum + sortedShares[k] * p.sigma ** 2, 0) + 0.3 * mixing);
  const logPredicted = sorted.length === 1 ? sorted[0].logPredicted : Math.log10(sorted.reduce((sum, p) => sum + 10 ** p.logPredicted, 0));
  const fluxErr = logFluxErr(mark);
  const mixed = (of: (part: Single) => number) =>
    Math.hypot(Math.sqrt(sorted.reduce((sum, p, k) => sum + sortedShares[k] * of(p) ** 2, 0)), fluxErr);
  const err = mixed((p) => p.err);
  const errUp = mixed((p) => p.errUp);
  const errDown = mixed((p) => p.errDown);
  const excess = Math.log10(Math.abs(mark.flux)) - logPredicted;
  // two halves of normals that join at the prediction
  const strengthLog = (x: number) => {
    const sided = x > 0 ? errUp : errDown;
    const join = (2 * sided) / (errUp + errDown);
    return Math.log((1 - WIDE_SHARE) * join * normal(x, sided) + WIDE_SHARE * normal(x, Math.hypot(sided, WIDE_DEX)));
  };
  // against a stranger anywhere between the neighbours, and faint as strangers are
  const wavelengthNats =
    Math.log((1 - OUTLIER_SHARE) * normal(off, sigma) + OUTLIER_SHARE * normal(off, OUTLIER_SIGMAS * sigma)) +
    Math.log(survey.spacingAt(mark.wavelength));
  const owedNats = Math.min(
    MOST_OWED,
    sorted.reduce((sum, p) => sum + p.owed, 0),
  );
  const logStrangers = Math.log(strangersPerDex(Math.log10(Math.abs(mark.flux)) - survey.logLimitAt(mark.wavelength)));
  const strengthNats = strengthLog(excess) - logStrangers;
  let priorNats = -Math.log(context.model.strangers);
  if (parts.length > 1) priorNats += BLEND_PRIOR * (parts.length - 1);
  let claimNats = 0;
  for (const part of sorted) {
    if (isLocal(data, part.line)) priorNats += LOCAL_PRIOR;
    const elsewhere = claimedElsewhere(claims, part.line, j);
    const share = parts.length > 1 ? sortedShares[sorted.indexOf(part)] : 1;
    claimNats += share * Math.log(1 - CLAIM_TRUST * elsewhere);
  }
  return {
    lines: sorted.map((p) => p.line),
    shares: sortedShares,
    off,
    sigma,
    logPredicted,
    logPredictedErr: err,
    wavelengthNats,
    strengthNats,
    excitationNats: strengthNats + logStrangers - strengthLog(excess + sorted.reduce((sum, p, k) => sum + sortedShares[k] * p.excited, 0)),
    widthNats: widthNats(mark, Math.sqrt(mixing), survey.fwhmKms),
    priorNats,
    claimNats,
    owedNats,
    familyNats: sorted.reduce((sum, p, k) => sum + sortedShares[k] * familyNats(p), 0),
    ionSeen: sorted[0].seen,
    probability: 0,
    logStrangers,
  };
}

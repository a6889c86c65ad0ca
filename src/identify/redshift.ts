import type { AtomicData } from '../atomic/index.ts';
import { median } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { Mark, RedshiftHypothesis } from './naming.ts';
import { roughDimming } from './roughReddening.ts';
import type { Survey } from './survey.ts';

const LOWEST_Z = -0.01;
const HIGHEST_Z = 10;
/** Lines that may be among the brightest of a spectrum: this strong on the scale H beta = 100, in some kind of object. */
const ANCHOR_LOG_STRENGTH = 0.3;
const MOST_ANCHORS = 260;
/** Brightest marks that vote, and brightest anchors they may be. */
const VOTING_MARKS = 14;
const VOTING_ANCHORS = 60;
/** Marks compared with the predicted pattern. */
const PATTERN_MARKS = 60;
/** A line and its mark agree within this, or three of the mark's own errors. */
const AGREE_KMS = 120;
/** Scatter of ln flux about the reference nebula: one sigma of a factor six. */
const LOG_FLUX_SCATTER = 0.8;
const MOST_HYPOTHESES = 16;
/**
 * Half of all spectra are of gas in our own and the nearest galaxies; the other half is spread over some two thousand distinguishable redshifts. A hypothesis
 * nearby starts with this advantage, nats (our estimate).
 */
const NEARBY_Z = 0.005;
const NEARBY_NATS = 4;
/** Spectra of far objects are rarer, nats for a factor e in 1 + z (our estimate). */
const FAR_NATS = 1;
/** Bright marks that an object should explain, and what each costs that stays without a strong line, nats. */
const BRIGHT_MARKS = 10;
const UNEXPLAINED_NATS = 1.5;
const FEW_MARKS = 3;
const FEW_MARKS_TRUST = 0.4;

interface Anchor {
  readonly line: number;
  readonly wavelength: number;
  readonly logStrength: number;
  readonly dimming: number;
}

/**
 * Blind redshift from the features alone: every bright mark taken for every strong line votes; each z is then scored by how well the strong lines expected
 * in the observed range are there with fluxes of the right order, and by those that are missing.
 *
 * @returns hypotheses, best first, probabilities summing to 1; with fewer than three marks they say what the marks could be
 */
export function findRedshift(marks: readonly Mark[], data: AtomicData, survey: Survey): RedshiftHypothesis[] {
  const bright = marks.filter((m) => !m.artefact && m.flux > 0).sort((a, b) => b.flux - a.flux);
  if (bright.length === 0)
    return [{ z: 0, zErr: 0, probability: 1, reason: 'no emission feature to tell a redshift from; z = 0 is assumed' }];
  const anchors = anchorsOf(data);
  const pattern = bright.slice(0, PATTERN_MARKS).sort((a, b) => a.wavelength - b.wavelength);
  const zs = new Set<number>();
  for (const mark of bright.slice(0, VOTING_MARKS)) {
    for (const anchor of anchors.slice(0, VOTING_ANCHORS)) {
      const z = mark.wavelength / anchor.wavelength - 1;
      if (z > LOWEST_Z && z < HIGHEST_Z) zs.add(z);
    }
  }
  const scored = [...zs].map((z) => scoreRedshift(z, pattern, anchors, survey)).sort((a, b) => b.score - a.score);
  const distinct: typeof scored = [];
  for (const s of scored) {
    if (distinct.every((d) => Math.abs(Math.log((1 + d.z) / (1 + s.z))) * SPEED_OF_LIGHT_KMS > 400)) distinct.push(s);
    if (distinct.length >= MOST_HYPOTHESES) break;
  }
  if (distinct.length === 0)
    return [
      { z: 0, zErr: 0, probability: 1, reason: 'no redshift between -0.01 and 10 puts a strong line where a feature is; z = 0 is assumed' },
    ];
  const best = distinct[0].score;
  // one or two features never settle a redshift, however well a pair of lines fits
  const trust = bright.length < FEW_MARKS ? FEW_MARKS_TRUST : 1;
  const weights = distinct.map((d) => Math.exp(trust * (d.score - best)));
  const total = weights.reduce((a, b) => a + b, 0);
  return distinct.map((d, k) => ({
    z: d.z,
    zErr: d.zErr,
    probability: weights[k] / total,
    reason: reasonOf(d, data, bright.length, weights[k] / total),
  }));
}

function anchorsOf(data: AtomicData): Anchor[] {
  const { lines } = data;
  const anchors: Anchor[] = [];
  for (let line = 0; line < lines.count; line++) {
    const nature = lines.nature(line);
    if (nature === 'sky' || nature === 'telluric' || nature === 'interstellar' || nature === 'raman') continue;
    if (lines.logStrength[line] >= ANCHOR_LOG_STRENGTH)
      anchors.push({
        line,
        wavelength: lines.wavelengthVac[line],
        logStrength: lines.logStrength[line],
        dimming: roughDimming(lines.wavelengthVac[line]),
      });
  }
  return anchors.sort((a, b) => b.logStrength - a.logStrength).slice(0, MOST_ANCHORS);
}

interface Scored {
  readonly z: number;
  readonly zErr: number;
  readonly score: number;
  readonly matched: readonly number[];
}

function scoreRedshift(z0: number, marks: readonly Mark[], anchors: readonly Anchor[], survey: Survey): Scored {
  let z = z0;
  let matches = matchAnchors(z, marks, anchors, survey);
  for (let round = 0; round < 2 && matches.length > 0; round++) {
    z = median(matches.map(({ mark, anchor }) => mark.wavelength / anchor.wavelength)) - 1;
    matches = matchAnchors(z, marks, anchors, survey);
  }
  if (matches.length === 0) return { z: z0, zErr: 0, score: Number.NEGATIVE_INFINITY, matched: [] };
  const dimmed = dimmingOf(matches);
  const density = marks.length / Math.max(0.01, Math.log(survey.high / survey.low));
  let score = Math.abs(z) < NEARBY_Z ? NEARBY_NATS : -FAR_NATS * Math.log1p(Math.abs(z));
  const used = new Set<Mark>();
  const ratios: number[] = [];
  for (const { mark, anchor, toleranceLog } of matches) {
    if (used.has(mark)) continue;
    used.add(mark);
    const off = (Math.log10(mark.flux) - anchor.logStrength - dimmed(anchor)) / LOG_FLUX_SCATTER;
    // a chance mark within the tolerance has this probability; an agreement in flux is worth the rest
    const chance = Math.min(0.9, density * 2 * toleranceLog);
    score += Math.min(6, -Math.log(chance)) * Math.exp(-0.5 * off * off) - 0.25 * Math.min(9, off * off);
    ratios.push(mark.wavelength / anchor.wavelength);
  }
  for (const anchor of anchors) {
    const at = anchor.wavelength * (1 + z);
    if (!survey.covers(at) || matches.some((m) => m.anchor === anchor)) continue;
    const above = anchor.logStrength + dimmed(anchor) - survey.logLimitAt(at);
    if (above > 0) score -= Math.min(2, above / LOG_FLUX_SCATTER) * 0.7;
  }
  // bright marks left without any explanation speak against
  const brightest = [...marks].sort((a, b) => b.flux - a.flux).slice(0, BRIGHT_MARKS);
  for (const mark of brightest) if (!used.has(mark)) score -= UNEXPLAINED_NATS;
  const centre = median(ratios);
  const scatter = median(ratios.map((r) => Math.abs(r - centre))) * 1.4826;
  return { z, zErr: Math.max(scatter / Math.sqrt(ratios.length), 1e-7), score, matched: matches.map((m) => m.anchor.line) };
}

/** Reddening is looked for in these steps, c(Hbeta); more than the first costs that many nats a unit, on a scatter of one dex. */
const REDDENINGS = [0, 0.5, 1, 1.5, 2, 2.5, 3] as const;
const REDDENING_COST = 0.1;

/** log10 flux minus log10 strength expected of an anchor: flux zero and reddening that bring the matched fluxes nearest to the strengths, by least absolute deviation. */
function dimmingOf(matches: readonly { mark: Mark; anchor: Anchor }[]): (anchor: Anchor) => number {
  let best = { spread: Number.POSITIVE_INFINITY, offset: 0, c: 0 };
  for (const c of REDDENINGS) {
    const excess = matches.map(({ mark, anchor }) => Math.log10(mark.flux) - anchor.logStrength + c * anchor.dimming);
    const offset = median(excess);
    const spread = excess.reduce((sum, e) => sum + Math.abs(e - offset), 0) / excess.length + REDDENING_COST * c;
    if (spread < best.spread) best = { spread, offset, c };
    if (matches.length < LEAST_FOR_REDDENING) break;
  }
  return ({ dimming }) => best.offset - best.c * dimming;
}

const LEAST_FOR_REDDENING = 4;

function matchAnchors(
  z: number,
  marks: readonly Mark[],
  anchors: readonly Anchor[],
  survey: Survey,
): { mark: Mark; anchor: Anchor; toleranceLog: number }[] {
  const matches: { mark: Mark; anchor: Anchor; toleranceLog: number }[] = [];
  for (const anchor of anchors) {
    const at = anchor.wavelength * (1 + z);
    if (!survey.covers(at)) continue;
    const mark = nearestMark(marks, at);
    const toleranceLog = Math.max(AGREE_KMS / SPEED_OF_LIGHT_KMS, (3 * mark.wavelengthErr) / at);
    if (Math.abs(Math.log(mark.wavelength / at)) <= toleranceLog) matches.push({ mark, anchor, toleranceLog });
  }
  return matches;
}

/** @param marks ascending, at least one */
function nearestMark(marks: readonly Mark[], wavelength: number): Mark {
  let low = 0;
  let high = marks.length - 1;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (marks[mid].wavelength < wavelength) low = mid + 1;
    else high = mid;
  }
  const before = marks[low - 1];
  return before && wavelength - before.wavelength < Math.abs(marks[low].wavelength - wavelength) ? before : marks[low];
}

function reasonOf(scored: Scored, data: AtomicData, marks: number, probability: number): string {
  const names = scored.matched
    .slice(0, 4)
    .map((line) => `${data.lines.ions[data.lines.ion[line]].name} ${Math.round(data.lines.wavelengthVac[line])}`);
  const few = marks < 3 ? `; ${marks === 1 ? 'one feature' : 'two features'} cannot settle a redshift` : '';
  const unsure = probability < 0.9 && marks >= 3 ? '; other redshifts fit nearly as well' : '';
  return `${scored.matched.length === 1 ? 'one strong line agrees' : `${scored.matched.length} strong lines agree`} (${names.join(', ')}${scored.matched.length > 4 ? ' ...' : ''})${few}${unsure}`;
}

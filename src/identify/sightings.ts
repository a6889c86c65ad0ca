import type { AtomicData } from '../atomic/index.ts';
import { factsOf, type LineFacts } from './lineFacts.ts';
import { predictedLog, type SystemModel } from './model.ts';
import type { Mark } from './naming.ts';
import { GRID_COUNT, gridScale, type Sighting } from './scalePosterior.ts';
import { logOddsOf, type Weighed, type Weighing } from './weighed.ts';

/** Calibration and real scatter of fluxes, dex. */
const LEAST_FLUX_ERR_DEX = 0.04;
/** Names that cannot reach this probability at any scale of their ion tell nothing of it. */
const LEAST_TELLING = 0.02;
/** Names a mark may tell of. */
const MOST_TELLING = 12;

export interface Sightings {
  readonly byFamily: ReadonlyMap<number, readonly Sighting[]>;
  /** What each mark says, by family, in the order of the marks. */
  readonly ofMark: readonly ReadonlyMap<number, Sighting>[];
}

/** What the names so far say of each family's scale. */
export function sightingsOf(weighings: readonly Weighing[], marks: readonly Mark[], data: AtomicData, model: SystemModel): Sightings {
  const facts = factsOf(data);
  const byFamily = new Map<number, Sighting[]>();
  const ofMark = marks.map((mark, j) => {
    const said = new Map<number, Sighting>();
    const weighing = weighings[j];
    if (!weighing) return said;
    const odds = Float64Array.from(weighing.candidates, (candidate) => Math.exp(logOddsOf(candidate)));
    for (const family of familiesOf(weighing, facts)) {
      const sighting = sightingOf(mark, j, weighing, odds, family, facts, model);
      if (!sighting) continue;
      said.set(family, sighting);
      const list = byFamily.get(family);
      if (list) list.push(sighting);
      else byFamily.set(family, [sighting]);
    }
    return said;
  });
  return { byFamily, ofMark };
}

function familiesOf({ candidates }: Weighing, facts: LineFacts): Set<number> {
  const families = new Set<number>();
  for (const { lines } of candidates.slice(0, MOST_TELLING)) for (const line of lines) families.add(facts.family[line]);
  return families;
}

/** A minor part of a blend says little of its own ion, dex. */
const blendErrDex = ({ lines }: Weighed, share: number) => (lines.length > 1 ? 0.3 / Math.max(0.1, share) - 0.3 : 0);
/** Far outliers in strength happen, as in the weighing of names. */
const WIDE_SHARE = 0.01;
const WIDE_DEX = 1.2;

/** The mark is a line of the family, whose strength tells the scale, or something else, which tells nothing of it. */
function sightingOf(
  mark: Mark,
  j: number,
  { candidates, noneProbability }: Weighing,
  odds: Float64Array,
  family: number,
  facts: LineFacts,
  model: SystemModel,
): Sighting | undefined {
  const fluxErr = logFluxErr(mark);
  const certain = candidates.length === 1 && noneProbability === 0;
  let others = certain ? 0 : 1;
  let weight = 0;
  let most = 0;
  const ways: { bare: number; err: number; excess: number }[] = [];
  for (let c = 0; c < candidates.length; c++) {
    const candidate = candidates[c];
    const k = placeOf(candidate.lines, family, facts);
    if (k < 0) {
      others += odds[c];
      continue;
    }
    const share = candidate.shares[k];
    const err = Math.hypot(facts.errDex[candidate.lines[k]], fluxErr, blendErrDex(candidate, share));
    // all that speaks for the name but for its strength, against a stranger of this flux
    const bare = odds[c] * Math.exp(-candidate.strengthNats - candidate.logStrangers);
    weight += candidate.probability * Math.sqrt(share);
    most += bare / (err * ROOT_TWO_PI);
    ways.push({ bare, err, excess: Math.log10(Math.abs(mark.flux) * share) - predictedLog(facts, candidate.lines[k], model) });
  }
  if (most < LEAST_TELLING * others || most < LEAST_TELLING) return undefined;
  const likelihood = new Float64Array(GRID_COUNT);
  for (const { bare, err, excess } of ways) {
    const core = (bare * (1 - WIDE_SHARE)) / (err * ROOT_TWO_PI);
    const wide = (bare * WIDE_SHARE) / (WIDE_DEX * ROOT_TWO_PI);
    for (let g = 0; g < GRID_COUNT; g++) {
      const off = Math.abs(excess - gridScale(g));
      likelihood[g] += core * bell(off / err) + wide * bell(off / WIDE_DEX);
    }
  }
  let top = 0;
  for (let g = 0; g < GRID_COUNT; g++) top = Math.max(top, likelihood[g]);
  const placing = placingOf(mark);
  for (let g = 0; g < GRID_COUNT; g++) likelihood[g] = Math.max(LEAST_LOG, placing * Math.log((others + likelihood[g]) / (others + top)));
  return { mark: j, weight: weight * placing, logLikelihood: likelihood };
}

const LEAST_LOG = -700;

function placeOf(lines: readonly number[], family: number, facts: LineFacts): number {
  for (let k = 0; k < lines.length; k++) if (facts.family[lines[k]] === family) return k;
  return -1;
}

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

const BELL_STEP = 1 / 64;
const BELL_END = 9;
const BELL = Float64Array.from({ length: BELL_END / BELL_STEP + 2 }, (_, k) => Math.exp(-0.5 * (k * BELL_STEP) ** 2));

/** exp(-x^2 / 2) for x >= 0 from a table, to 3e-5 of its peak: the grid asks for it millions of times. */
function bell(x: number): number {
  if (x >= BELL_END) return 0;
  const place = x / BELL_STEP;
  const k = Math.floor(place);
  return BELL[k] + (place - k) * (BELL[k + 1] - BELL[k]);
}

/** A centroid worse than this share of the width is vague: wings and fillings of a crowded fit. */
const VAGUE_FWHM = 0.2;

/** How much a mark's place can tell of an ion, 0 to 1. */
const placingOf = ({ fwhm, wavelengthErr }: Mark) => (fwhm === undefined ? 1 : Math.min(1, ((VAGUE_FWHM * fwhm) / wavelengthErr) ** 2));

/** One sigma of log10 flux. */
export const logFluxErr = (mark: Mark) =>
  Math.hypot(LEAST_FLUX_ERR_DEX, Number.isFinite(mark.fluxErr) ? Math.min(1, (Math.LOG10E * mark.fluxErr) / Math.abs(mark.flux)) : 0);

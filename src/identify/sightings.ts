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
    for (const family of familiesOf(weighing, facts)) {
      const sighting = sightingOf(mark, j, weighing, family, facts, model);
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
  family: number,
  facts: LineFacts,
  model: SystemModel,
): Sighting | undefined {
  const fluxErr = logFluxErr(mark);
  const certain = candidates.length === 1 && noneProbability === 0;
  let others = certain ? 0 : 1;
  let weight = 0;
  let tells = false;
  const likelihood = new Float64Array(GRID_COUNT);
  for (const candidate of candidates) {
    const k = candidate.lines.findIndex((line) => facts.family[line] === family);
    if (k < 0) {
      others += Math.exp(logOddsOf(candidate));
      continue;
    }
    const share = candidate.shares[k];
    const err = Math.hypot(facts.errDex[candidate.lines[k]], fluxErr, blendErrDex(candidate, share));
    const excess = Math.log10(Math.abs(mark.flux) * share) - predictedLog(facts, candidate.lines[k], model);
    // all that speaks for the name but for its strength, against a stranger of this flux
    const odds = Math.exp(logOddsOf(candidate) - candidate.strengthNats - candidate.logStrangers);
    weight += candidate.probability * Math.sqrt(share);
    for (let g = 0; g < GRID_COUNT; g++) {
      const off = excess - gridScale(g);
      likelihood[g] +=
        (odds * ((1 - WIDE_SHARE) * Math.exp(-0.5 * (off / err) ** 2))) / (err * ROOT_TWO_PI) +
        (odds * (WIDE_SHARE * Math.exp(-0.5 * (off / WIDE_DEX) ** 2))) / (WIDE_DEX * ROOT_TWO_PI);
    }
    tells ||= odds / (err * ROOT_TWO_PI) > LEAST_TELLING;
  }
  if (!tells) return undefined;
  const most = Math.max(...likelihood);
  if (most < LEAST_TELLING * others) return undefined;
  const placing = placingOf(mark);
  for (let g = 0; g < GRID_COUNT; g++) likelihood[g] = placing * Math.log((others + likelihood[g]) / (others + most));
  return { mark: j, weight: weight * placing, logLikelihood: likelihood };
}

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

/** A centroid worse than this share of the width is vague: wings and fillings of a crowded fit. */
const VAGUE_FWHM = 0.2;

/** How much a mark's place can tell of an ion, 0 to 1. */
const placingOf = ({ fwhm, wavelengthErr }: Mark) => (fwhm === undefined ? 1 : Math.min(1, ((VAGUE_FWHM * fwhm) / wavelengthErr) ** 2));

/** One sigma of log10 flux. */
export const logFluxErr = (mark: Mark) =>
  Math.hypot(LEAST_FLUX_ERR_DEX, Number.isFinite(mark.fluxErr) ? Math.min(1, (Math.LOG10E * mark.fluxErr) / Math.abs(mark.flux)) : 0);

import type { AtomicData } from '../atomic/index.ts';
import type { Sighting } from './ionScales.ts';
import { factsOf } from './lineFacts.ts';
import { predictedLog, type SystemModel } from './model.ts';
import type { Mark } from './naming.ts';
import type { Weighing } from './weighed.ts';

/** Calibration and real scatter of fluxes, dex. */
const LEAST_FLUX_ERR_DEX = 0.04;
/** Names less probable than this tell nothing of their ion. */
const LEAST_TELLING = 0.02;

export interface Sightings {
  readonly byIon: ReadonlyMap<number, readonly Sighting[]>;
  /** Ions that each mark may have shown, in the order of the marks. */
  readonly ionsOfMark: readonly ReadonlySet<number>[];
}

/** What the names so far say of each ion's scale. */
export function sightingsOf(weighings: readonly Weighing[], marks: readonly Mark[], data: AtomicData, model: SystemModel): Sightings {
  const facts = factsOf(data);
  const byIon = new Map<number, Sighting[]>();
  const ionsOfMark = marks.map(() => new Set<number>());
  weighings.forEach(({ candidates }, mark) => {
    const placing = placingOf(marks[mark]);
    for (const candidate of candidates) {
      if (candidate.probability < LEAST_TELLING) continue;
      candidate.lines.forEach((line, k) => {
        const ion = data.lines.ion[line];
        ionsOfMark[mark].add(ion);
        const logFlux = Math.log10(Math.abs(marks[mark].flux) * candidate.shares[k]);
        // a minor part of a blend says little of its own ion
        const err = Math.hypot(
          facts.errDex[line],
          logFluxErr(marks[mark]),
          candidate.lines.length > 1 ? 0.3 / Math.max(0.1, candidate.shares[k]) - 0.3 : 0,
        );
        const list = byIon.get(ion) ?? [];
        list.push({
          mark,
          line,
          weight: candidate.probability * Math.sqrt(candidate.shares[k]) * placing,
          excess: logFlux - predictedLog(facts, line, model),
          err,
        });
        byIon.set(ion, list);
      });
    }
  });
  return { byIon, ionsOfMark };
}

/** A centroid worse than this share of the width is vague: wings and fillings of a crowded fit. */
const VAGUE_FWHM = 0.2;

/** How much a mark's place can tell of an ion, 0 to 1. */
const placingOf = ({ fwhm, wavelengthErr }: Mark) => (fwhm === undefined ? 1 : Math.min(1, ((VAGUE_FWHM * fwhm) / wavelengthErr) ** 2));

/** One sigma of log10 flux. */
export const logFluxErr = (mark: Mark) =>
  Math.hypot(LEAST_FLUX_ERR_DEX, Number.isFinite(mark.fluxErr) ? Math.min(1, (Math.LOG10E * mark.fluxErr) / Math.abs(mark.flux)) : 0);

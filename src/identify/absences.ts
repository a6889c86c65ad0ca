import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { Absence, IonScale } from './ionScales.ts';
import { factsOf } from './lineFacts.ts';
import { predictedLog, type SystemModel } from './model.ts';
import type { Mark, NamingSettings } from './naming.ts';
import type { Survey } from './survey.ts';

/** Lines of an ion that are looked for and, when absent, held against it. */
const MOST_ABSENCES = 14;
const FAINTEST_LOOKED_FOR = -6;
/** Lines predicted this far below the limit say nothing by their absence, dex. */
const FAR_BELOW_DEX = 3;

/** For every ion its strongest lines in the observed range, one list an ion. */
export function strongestLines(data: AtomicData, survey: Survey, z: number): number[][] {
  const { lines } = data;
  const { local } = factsOf(data);
  const strongest: number[][] = lines.ions.map(() => []);
  const collect = (shift: number, isLocal: number) => {
    const [first, end] = linesBetween(lines, survey.low / shift, survey.high / shift);
    for (let line = first; line < end; line++) {
      if (local[line] === isLocal && lines.logStrength[line] > FAINTEST_LOOKED_FOR) strongest[lines.ion[line]].push(line);
    }
  };
  collect(1 + z, 0);
  collect(1, 1);
  return strongest.map((list) => list.sort((a, b) => lines.logStrength[b] - lines.logStrength[a]).slice(0, MOST_ABSENCES));
}

/** For every ion those of its strongest lines at whose place no mark stands. */
export function absencesOf(
  marks: readonly Mark[],
  data: AtomicData,
  strongest: readonly (readonly number[])[],
  survey: Survey,
  model: SystemModel,
  settings: NamingSettings,
): Absence[][] {
  const { lines } = data;
  const facts = factsOf(data);
  const places = placesOf(marks);
  return strongest.map((list) =>
    list.flatMap((line): Absence[] => {
      const at = lines.wavelengthVac[line] * (facts.local[line] === 1 ? 1 : 1 + model.z);
      const reach = Math.max((settings.toleranceKms / SPEED_OF_LIGHT_KMS) * at, 3 * lines.wavelengthErr[line]);
      if (hasWithin(places, at, reach)) return [];
      const room = survey.logLimitAt(at) - predictedLog(facts, line, model);
      return room < FAR_BELOW_DEX ? [{ line, room, err: facts.errDex[line] }] : [];
    }),
  );
}

/** Ions of this many sightings are sure enough to tell what a list leaves out. */
const SURE_SIGHTINGS = 2.5;
/** Lines predicted this far above the limit, in their own errors, should be there. */
const CLEAR_SIGMAS = 1.5;
/** The share is taken as this before anything is counted, as if it had been seen on so many lines. */
const USUAL_LEFT_OUT = 0.05;
const USUAL_WEIGHT = 20;

/**
 * Share of the lines that well-seen ions should show above the limit and that are not among the marks: an observer's selection, gaps, a limit that varies.
 */
export function leftOutShare(
  marks: readonly Mark[],
  data: AtomicData,
  strongest: readonly (readonly number[])[],
  survey: Survey,
  model: SystemModel,
  scales: readonly IonScale[],
  settings: NamingSettings,
): number {
  const facts = factsOf(data);
  const places = placesOf(marks);
  let missing = 0;
  let expected = 0;
  strongest.forEach((list, ion) => {
    if (facts.localIon[ion] === 1 || !(scales[ion].seen > SURE_SIGHTINGS)) return;
    for (const line of list) {
      const at = data.lines.wavelengthVac[line] * (1 + model.z);
      const above = predictedLog(facts, line, model) + scales[ion].mean - survey.logLimitAt(at);
      if (above < CLEAR_SIGMAS * Math.hypot(facts.errDex[line], Math.sqrt(scales[ion].variance))) continue;
      expected++;
      if (!hasWithin(places, at, (settings.toleranceKms / SPEED_OF_LIGHT_KMS) * at)) missing++;
    }
  });
  return (missing + USUAL_LEFT_OUT * USUAL_WEIGHT) / (expected + USUAL_WEIGHT);
}

/** Where marks stand, ascending, and how far from its centre a mark can hide an unresolved line. */
interface Places {
  readonly at: readonly number[];
  readonly hides: readonly number[];
  readonly widest: number;
}

/** A line this far from the centre of a feature, in FWHM, is a part of it. */
const HIDES_FWHM = 0.7;

function placesOf(marks: readonly Mark[]): Places {
  const sorted = marks.filter((m) => !m.artefact).sort((a, b) => a.wavelength - b.wavelength);
  const hides = sorted.map((m) => HIDES_FWHM * (m.fwhm ?? 0));
  return { at: sorted.map((m) => m.wavelength), hides, widest: Math.max(0, ...hides) };
}

function hasWithin({ at: places, hides, widest }: Places, at: number, reach: number): boolean {
  const far = Math.max(reach, widest);
  let low = 0;
  let high = places.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (places[mid] < at - far) low = mid + 1;
    else high = mid;
  }
  for (let k = low; k < places.length && places[k] <= at + far; k++) if (Math.abs(places[k] - at) <= Math.max(reach, hides[k])) return true;
  return false;
}

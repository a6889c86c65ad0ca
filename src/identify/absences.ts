import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { factsOf } from './lineFacts.ts';
import { predictedLog, type SystemModel } from './model.ts';
import type { Mark, NamingSettings } from './naming.ts';
import { hasWithin, placesOf } from './places.ts';
import type { Absence } from './scalePosterior.ts';
import type { Survey } from './survey.ts';

/** Lines of an ion that are looked for and, when absent, held against it. */
const MOST_ABSENCES = 14;
const FAINTEST_LOOKED_FOR = -6;
/** Lines predicted this far below the limit say nothing by their absence, dex. */
const FAR_BELOW_DEX = 3;
/** A line of its ion may be pumped by light that this object does not have. */
const UNFED = 0.3;

/** For every family its strongest lines in the observed range, one list a family. */
export function strongestLines(data: AtomicData, survey: Survey, z: number): number[][] {
  const { lines } = data;
  const { local, family, families } = factsOf(data);
  const strongest: number[][] = families.map(() => []);
  const collect = (shift: number, isLocal: number) => {
    const [first, end] = linesBetween(lines, survey.low / shift, survey.high / shift);
    for (let line = first; line < end; line++) {
      if (local[line] === isLocal && lines.logStrength[line] > FAINTEST_LOOKED_FOR) strongest[family[line]].push(line);
    }
  };
  collect(1 + z, 0);
  collect(1, 1);
  return strongest.map((list) => list.sort((a, b) => lines.logStrength[b] - lines.logStrength[a]).slice(0, MOST_ABSENCES));
}

/** For every family those of its strongest lines at whose place no mark stands. */
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
      if (!survey.covers(at) || hasWithin(places, at, reach)) return [];
      const room = survey.logLimitAt(at) - predictedLog(facts, line, model);
      return room < FAR_BELOW_DEX
        ? [{ line, room, err: facts.errDex[line], unfed: lines.mechanism(line) === 'fluorescence' ? UNFED : 0 }]
        : [];
    }),
  );
}

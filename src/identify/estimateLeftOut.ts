import type { AtomicData } from '../atomic/index.ts';
import { normalTail } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { chanceLeftOut, type LeftOut, USUAL_LEFT_OUT } from './leftOut.ts';
import { factsOf } from './lineFacts.ts';
import { predictedLog, type SystemModel } from './model.ts';
import type { Mark, NamingSettings } from './naming.ts';
import { hasWithin, placesOf } from './places.ts';
import type { FamilyScale } from './scalePosterior.ts';
import type { Survey } from './survey.ts';

/** Families of this many sightings are sure enough to tell what a list leaves out. */
const SURE_SIGHTINGS = 2.5;
/** The usual values hold as if they had been seen on so many lines, and the fall within this factor. */
const USUAL_WEIGHT = 20;
const DEX_SPREAD = Math.log(1.7);
const SHARES = [0.02, 0.03, 0.05, 0.08, 0.12, 0.18, 0.25, 0.35, 0.5, 0.65] as const;
const DEXES = [0.4, 0.55, 0.7, 0.9, 1.2, 1.6, 2.2, 3] as const;

/**
 * What the list leaves out, from the lines that well-seen families should show: the likeliest of a grid of shares and falls.
 *
 * @param scales of the families as their sightings alone tell: what absences say must not decide how much they say
 */
export function estimateLeftOut(
  marks: readonly Mark[],
  data: AtomicData,
  strongest: readonly (readonly number[])[],
  survey: Survey,
  model: SystemModel,
  scales: readonly FamilyScale[],
  settings: NamingSettings,
): LeftOut {
  const facts = factsOf(data);
  const places = placesOf(marks);
  const looked: { above: number; faint: number; missing: boolean }[] = [];
  strongest.forEach((list, family) => {
    if (facts.families[family].local || facts.families[family].mechanism === 'fluorescence' || !(scales[family].seen > SURE_SIGHTINGS))
      return;
    for (const line of list) {
      const at = data.lines.wavelengthVac[line] * (1 + model.z);
      const above = predictedLog(facts, line, model) + scales[family].mean - survey.logLimitAt(at);
      if (above < 0) continue;
      const err = Math.hypot(facts.errDex[line], Math.sqrt(scales[family].variance));
      const missing = !hasWithin(places, at, (settings.toleranceKms / SPEED_OF_LIGHT_KMS) * at);
      looked.push({ above, faint: normalTail(above / err), missing });
    }
  });
  let best = USUAL_LEFT_OUT;
  let most = Number.NEGATIVE_INFINITY;
  for (const share of SHARES) {
    for (const dex of DEXES) {
      let log =
        USUAL_WEIGHT * (USUAL_LEFT_OUT.share * Math.log(share) + (1 - USUAL_LEFT_OUT.share) * Math.log(1 - share)) -
        0.5 * (Math.log(dex / USUAL_LEFT_OUT.dex) / DEX_SPREAD) ** 2;
      for (const { above, faint, missing } of looked) {
        const left = chanceLeftOut({ share, dex }, above);
        const gone = left + (1 - left) * faint;
        log += Math.log(missing ? gone : 1 - gone);
      }
      if (log > most) {
        most = log;
        best = { share, dex };
      }
    }
  }
  return best;
}

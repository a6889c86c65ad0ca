import type { AtomicData } from '../atomic/index.ts';
import { infer } from './inference.ts';
import type { Mark, NamingSettings, RedshiftHypothesis } from './naming.ts';
import { surveyOf } from './survey.ts';

/** A redshift this probable after the vote of the strong lines needs no second look. */
const SETTLED = 0.98;
/** Marks taken for the second look, brightest. */
const MOST_MARKS = 60;
const ROUNDS = 3;
/** Names of one redshift lean on each other: their evidence counts by this share. */
const TRUST = 0.35;
/** Hypotheses worth showing. */
const MOST_SHOWN = 6;
/** One or two features never settle a redshift. */
const FEW_MARKS = 3;

/**
 * A second look where the strong lines leave the redshift open: at each hypothesis the bright marks are named with the whole list, and what the names
 * explain, less the strong lines that then are missing, is weighed.
 *
 * @param marks ascending wavelength
 */
export function judgeRedshifts(
  hypotheses: readonly RedshiftHypothesis[],
  marks: readonly Mark[],
  data: AtomicData,
  settings: NamingSettings,
): RedshiftHypothesis[] {
  const shown = marks.filter((m) => !m.artefact && m.flux > 0);
  if (hypotheses.length < 2 || hypotheses[0].probability > SETTLED || shown.length < FEW_MARKS) return hypotheses.slice(0, MOST_SHOWN);
  const bright = [...shown]
    .sort((a, b) => b.flux - a.flux)
    .slice(0, MOST_MARKS)
    .sort((a, b) => a.wavelength - b.wavelength);
  const survey = surveyOf(bright, settings.gaps);
  const logs = hypotheses.map((h) => {
    const { evidence } = infer(bright, data, { ...settings, kind: 'unknown' }, survey, h.z, h.zErr, [], ROUNDS);
    return Math.log(Math.max(1e-300, h.probability)) + TRUST * evidence;
  });
  const top = Math.max(...logs);
  const weights = logs.map((log) => Math.exp(log - top));
  const total = weights.reduce((a, b) => a + b, 0);
  return hypotheses
    .map((h, k) => ({ ...h, probability: weights[k] / total }))
    .sort((a, b) => b.probability - a.probability)
    .slice(0, MOST_SHOWN);
}

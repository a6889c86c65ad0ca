import type { AtomicData } from '../atomic/index.ts';
import type { Remark } from '../problems/index.ts';
import { caseOf } from './caseOf.ts';
import { kinOf, missingLines } from './companions.ts';
import { asMeasured, shownDrift } from './drift.ts';
import { impliedByAbsence, impliedByNameless } from './implications.ts';
import { infer } from './inference.ts';
import { judgeRedshifts } from './judgeRedshifts.ts';
import { factsOf } from './lineFacts.ts';
import { predictedLog } from './model.ts';
import type { FixedName, Mark, Naming, NamingSettings, ObjectKind } from './naming.ts';
import { findRedshift } from './redshift.ts';
import { surveyOf } from './survey.ts';

export interface NamingControl {
  readonly progress?: (share: number) => void;
  /** Looked at between the stages: search for the redshift, inference, cases. */
  readonly signal?: AbortSignal;
}

/**
 * Names every mark jointly: redshift, ion scales, reddening and dispersion are estimated with the assignments.
 *
 * @param marks any order; wavelengths in vacuum Angstrom
 * @param fixed the user's verdicts: they are kept, and teach the rest
 * @returns one naming a mark, in the order of `marks`; probabilities of a mark's candidates and of "none of these" sum to 1
 * Checked in tests/identify on line lists with known names.
 */
export function nameMarks(
  marks: readonly Mark[],
  data: AtomicData,
  settings: NamingSettings,
  fixed: readonly FixedName[],
  control: NamingControl = {},
): Naming {
  const remarks: Remark[] = [];
  if (marks.length === 0) return emptyNaming(settings, remarks);
  const order = marks.map((_, j) => j).sort((a, b) => marks[a].wavelength - marks[b].wavelength);
  const sorted = order.map((j) => marks[j]);
  const place = new Map(order.map((j, k) => [j, k]));
  const survey = surveyOf(sorted, settings.gaps);
  const given = settings.z !== undefined;
  const redshifts = given
    ? [{ z: settings.z ?? 0, zErr: 0, probability: 1, reason: 'given' }]
    : judgeRedshifts(findRedshift(sorted, data, survey), sorted, data, settings);
  control.signal?.throwIfAborted();
  control.progress?.(0.3);
  if (!given && redshifts[0].probability < 0.9) {
    remarks.push({
      code: 'redshift-unsure',
      weight: 'warning',
      where: {},
      found: `the redshift is not certain: ${redshifts
        .slice(0, 3)
        .map((h) => `z = ${h.z.toFixed(4)} (${(100 * h.probability).toFixed(0)} %; ${h.reason})`)
        .join(', or ')}`,
      doThis: 'Type the redshift if you know it.',
    });
  }
  const fixedSorted = fixed.map((f) => ({ ...f, mark: place.get(f.mark) ?? f.mark }));
  const inferred = infer(sorted, data, settings, survey, redshifts[0].z, redshifts[0].zErr, fixedSorted);
  control.signal?.throwIfAborted();
  control.progress?.(0.8);
  const kin = kinOf(data);
  const forced = new Set(fixedSorted.filter((f) => 'lines' in f).map((f) => f.mark));
  const named = sorted.map((mark, k) => ({
    ...caseOf(inferred.placed[k], k, inferred.placed, inferred, kin, data, survey, settings, forced.has(k), mark.wavelength),
    implies: impliedByNameless(mark, inferred.weighings[k], survey, data),
  }));
  const { model, scales } = inferred;
  if (inferred.kind !== settings.kind) remarks.push(kindRemark(inferred.kind));
  const drift = shownDrift(inferred.drift, LEAST_DRIFT_KMS);
  if (drift) remarks.push(driftRemark(drift));
  const refined = redshifts.map((h, k) => (k === 0 ? { ...h, z: model.z, zErr: model.zErr } : h));
  return {
    features: marks.map((_, j) => named[place.get(j) ?? j]),
    redshifts: refined,
    z: model.z,
    zErr: model.zErr,
    dispersionKms: model.dispersionKms,
    kind: inferred.kind,
    ...(model.trendKms === 0 ? {} : { trendKms: model.trendKms }),
    ...(drift ? { drift } : {}),
    remarks,
    missing: missingLines(
      inferred.placed,
      data,
      survey,
      model,
      (line) => scales[factsOf(data).family[line]],
      (line) => predictedLog(factsOf(data), line, model),
      settings.toleranceKms,
    ).map(({ line, predictedFlux, expectedAt, above }) => ({
      line,
      predictedFlux,
      expectedAt: asMeasured(inferred.drift, expectedAt),
      implies: impliedByAbsence(line, above, scales[factsOf(data).family[line]], data),
    })),
  };
}

const kindRemark = (kind: ObjectKind): Remark => ({
  code: 'kind-estimated',
  weight: 'note',
  where: {},
  found: `the strengths of the recognised ions are those of this kind of object: ${kind.replaceAll('-', ' ')}; it was taken as what to expect of the others`,
  doThis: 'Set the kind of object if this is wrong.',
});

/** A smaller drift is not worth a word, km/s. */
const LEAST_DRIFT_KMS = 5;

function driftRemark(drift: readonly { wavelength: number; kms: number }[]): Remark {
  const least = drift.reduce((a, b) => (b.kms < a.kms ? b : a));
  const most = drift.reduce((a, b) => (b.kms > a.kms ? b : a));
  const say = ({ wavelength, kms }: { wavelength: number; kms: number }) => `${kms.toFixed(0)} km/s near ${wavelength.toFixed(0)} A`;
  return {
    code: 'calibration-drift',
    weight: 'warning',
    where: {},
    found: `the recognised lines do not share one velocity: they stand off by ${say(least)} and by ${say(most)}`,
    expected: 'one velocity along the whole spectrum',
    doThis:
      'Check the wavelength calibration there. The names allow for the drift; the wavelengths and velocities in the table are as measured.',
  };
}

const emptyNaming = (settings: NamingSettings, remarks: readonly Remark[]): Naming => ({
  features: [],
  redshifts: [{ z: settings.z ?? 0, zErr: 0, probability: 1, reason: settings.z === undefined ? 'no feature' : 'given' }],
  z: settings.z ?? 0,
  zErr: 0,
  dispersionKms: 0,
  kind: settings.kind,
  remarks,
  missing: [],
});

import type { AtomicData } from '../atomic/index.ts';
import type { Mark, Naming, NamingSettings } from '../identify/index.ts';
import type { Feature, Measurement, MeasureSettings } from '../measure/index.ts';
import type { Gas } from '../plasma/index.ts';
import { sameKeys, type Verdict } from '../session/index.ts';
import { fromVacuum } from '../spectrum/index.ts';
import type { Analysis, CandidateView, FeatureView } from './analysis.ts';
import { candidateViewer } from './candidateView.ts';
import { lineLabel } from './lineNames.ts';
import { lineTableOf } from './lineTableOf.ts';
import type { Material } from './material.ts';
import { methodFacts } from './methodFacts.ts';
import { skyView } from './skyView.ts';

/** The finished stages. */
interface Parts {
  readonly data: AtomicData;
  /** Lines of the list that are the user's own. */
  readonly ownLines: number;
  /** Of the source's bytes. */
  readonly sha256: string;
  readonly material: Material;
  readonly measurement?: Measurement;
  readonly features: readonly Feature[];
  readonly marks: readonly Mark[];
  readonly naming: Naming;
  readonly byFeature: readonly (Verdict | undefined)[];
  readonly lost: readonly Verdict[];
  readonly measureSettings: MeasureSettings;
  readonly namingSettings: NamingSettings;
  readonly timings: Analysis['timings'];
}

/** The features with their cases and the verdicts on them. */
export function featureViews(parts: Parts): FeatureView[] {
  const { data, material, naming, namingSettings } = parts;
  const view = candidateViewer({ data, medium: material.reading.medium, te: namingSettings.te });
  return parts.features.map((measured, k): FeatureView => {
    const { candidates, noneProbability } = naming.features[k];
    const verdict = parts.byFeature[k];
    const shown = candidates.map(view);
    const name = nameInForce(shown, noneProbability, measured, verdict);
    return {
      number: k + 1,
      centroid: measured.centroid,
      centroidErr: measured.centroidErr,
      at: parts.marks[k].wavelength,
      atErr: Number.isFinite(measured.centroidErr) ? measured.centroidErr : 0,
      measured,
      candidates: shown,
      noneProbability,
      ...(verdict ? { verdict } : {}),
      ...(name ? { name } : {}),
    };
  });
}

/** The same features with other verdicts, before the candidates are weighed anew. */
export function withVerdicts(features: readonly FeatureView[], byFeature: readonly (Verdict | undefined)[]): FeatureView[] {
  return features.map(({ verdict: _verdict, name: _name, ...feature }, k) => {
    const verdict = byFeature[k];
    const candidates = feature.candidates.filter((each) => !verdict?.turnedDown?.some((keys) => sameKeys(keys, each.keys)));
    const name = nameInForce(candidates, feature.noneProbability, feature.measured, verdict);
    return { ...feature, ...(verdict ? { verdict } : {}), ...(name ? { name } : {}) };
  });
}

/** Stages, verdicts and names put together as they are shown and printed. */
export function assemble(parts: Parts & Pick<Analysis, 'changes'>, features: readonly FeatureView[], gas: Gas): Analysis {
  const { data, material, measurement, naming, namingSettings } = parts;
  const { medium, mediumStated, fluxUnit, name: title } = material.reading;
  const remarks = [...material.reading.remarks, ...(measurement?.remarks ?? []), ...naming.remarks];
  return {
    reading: material.reading,
    ...(material.spectrum && measurement ? { samples: samplesOf(material.spectrum, measurement) } : {}),
    sky: skyOf(parts),
    groups: measurement?.groups ?? [],
    resolvingPower: measurement?.resolvingPower,
    resolvingPowerFrom: measurement?.resolvingPowerFrom,
    noiseFactor: measurement?.noiseFactor,
    ...(measurement ? { lineWidth: { fwhmA: measurement.lineWidth.fwhmA, form: measurement.lineWidth.form } } : {}),
    continuumHalfPeriodA: measurement?.continuumHalfPeriodA,
    expectedFalse: measurement?.expectedFalse,
    features,
    redshifts: naming.redshifts,
    z: naming.z,
    zErr: naming.zErr,
    dispersionKms: naming.dispersionKms,
    settings: { measure: parts.measureSettings, naming: namingSettings, gas: gas.settings },
    gas,
    missing: naming.missing.map((m) => ({
      label: lineLabel(data, m.line, medium),
      expectedAt: fromVacuum(m.expectedAt, medium),
      predictedFlux: m.predictedFlux,
      implies: m.implies,
    })),
    unnamed: features.flatMap((feature, k) =>
      feature.name || feature.verdict?.decision === 'artefact' || feature.measured.artefact
        ? []
        : [{ feature: k, implies: naming.features[k].implies }],
    ),
    changes: parts.changes,
    remarks,
    lostVerdicts: parts.lost,
    table: lineTableOf(
      features,
      {
        title,
        medium,
        mediumStated,
        fluxUnit,
        z: naming.z,
        zErr: naming.zErr,
        te: namingSettings.te,
        resolvingPower: measurement?.resolvingPower,
        atomicVersion: data.version,
        sha256: parts.sha256,
      },
      gas,
    ),
    methods: methodFacts({ ...parts, features, gas, naming: { ...naming, remarks } }),
    timings: parts.timings,
  };
}

/** What the feature is called: the accepted name; without a verdict the best candidate, if it is likelier than "none of these"; else nothing. */
function nameInForce(
  shown: readonly CandidateView[],
  noneProbability: number,
  measured: Feature,
  verdict: Verdict | undefined,
): CandidateView | undefined {
  if (verdict?.decision === 'accepted') return shown.find((candidate) => sameKeys(candidate.keys, verdict.accepted ?? []));
  if (verdict?.decision !== undefined || measured.artefact !== undefined) return undefined;
  return shown.length > 0 && shown[0].probability > noneProbability ? shown[0] : undefined;
}

function skyOf({ data, material, features }: Parts): Analysis['sky'] {
  const { medium, choices } = material.reading;
  const wavelengths = material.spectrum?.wavelength ?? features.map((feature) => feature.centroid);
  const [from, to] = [wavelengths[0], wavelengths[wavelengths.length - 1]];
  return from === undefined || to === undefined ? { bands: [], lines: [] } : skyView(data, medium, from, to, choices.velocityCorrectionKms);
}

function samplesOf(spectrum: NonNullable<Material['spectrum']>, measurement: Measurement): Analysis['samples'] {
  const { wavelength, flux, masked } = spectrum;
  const { continuum, model, noise } = measurement;
  return { wavelength, flux, masked, continuum, model, noise };
}

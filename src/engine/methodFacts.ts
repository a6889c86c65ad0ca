import type { AtomicData } from '../atomic/index.ts';
import type { NamingSettings } from '../identify/index.ts';
import { DEFAULT_MEASURE_SETTINGS, type Measurement, type MeasureSettings } from '../measure/index.ts';
import type { Estimate, Gas } from '../plasma/index.ts';
import { wordProblem } from '../problems/index.ts';
import { type MethodFacts, PROGRAM, significant } from '../report/index.ts';
import type { Analysis, FeatureView } from './analysis.ts';
import type { Material } from './material.ts';

interface Done {
  readonly data: AtomicData;
  /** The bundled list without the user's lines. */
  readonly ownLines: number;
  readonly sha256: string;
  readonly material: Material;
  readonly measurement?: Measurement;
  readonly measureSettings: MeasureSettings;
  readonly namingSettings: NamingSettings;
  readonly features: readonly FeatureView[];
  readonly gas: Gas;
  readonly naming: Pick<Analysis, 'z' | 'zErr' | 'dispersionKms' | 'remarks'>;
}

/** What was done to a spectrum, for the methods paragraph and the provenance. */
export function methodFacts(done: Done): MethodFacts {
  const { data, material, namingSettings, naming } = done;
  const { reading, spectrum } = material;
  return {
    program: PROGRAM,
    lineList: {
      edition: data.version,
      inputsHash: data.inputsHash,
      lines: data.lines.count - done.ownLines,
      ions: ionsOf(data),
      ownLines: done.ownLines,
    },
    source: {
      name: reading.name,
      sha256: done.sha256,
      kind: reading.kind,
      samples: reading.samples,
      maskedSamples: reading.maskedSamples,
      medium: reading.medium,
      mediumStated: reading.mediumStated,
      ...(spectrum ? { range: [spectrum.wavelength[0], spectrum.wavelength[spectrum.wavelength.length - 1]] as const } : {}),
      how: reading.how,
    },
    ...(done.measurement && spectrum ? { measuring: measuringFacts(done, done.measurement, spectrum.fluxErr !== undefined) } : {}),
    naming: {
      z: naming.z,
      zErr: naming.zErr,
      zGiven: namingSettings.z !== undefined,
      dispersionKms: naming.dispersionKms,
      toleranceKms: namingSettings.toleranceKms,
      toleranceSigma: namingSettings.toleranceSigma,
      kind: namingSettings.kind,
      te: namingSettings.te,
      ne: namingSettings.ne,
    },
    gas: gasFacts(done.gas),
    counts: countsOf(done.features),
    settings: settingsOf(done),
    remarks: naming.remarks.map(wordProblem),
    citations: done.features.flatMap((feature) => feature.name?.transitions.flatMap((t) => t.sources) ?? []),
  };
}

/** Ions with lines of their own: carriers of sky lines and bands are none. */
function ionsOf({ lines }: AtomicData): number {
  const names = new Set<string>();
  for (let line = 0; line < lines.count; line++) {
    const { name } = lines.ions[lines.ion[line]];
    if (/^[A-Z][a-z]? [IVXL]+$/.test(name) && !['sky', 'telluric'].includes(lines.nature(line))) names.add(name);
  }
  return names.size;
}

function measuringFacts({ measureSettings, features }: Done, measurement: Measurement, hasErrors: boolean): MethodFacts['measuring'] {
  const { continuum, edits = [] } = measureSettings;
  return {
    errorsFrom: hasErrors ? 'file' : 'scatter',
    ...(measurement.noiseFactor === undefined ? {} : { noiseFactor: measurement.noiseFactor }),
    noiseCorrelation: measurement.noiseCorrelation,
    continuumHalfPeriodA: measurement.continuumHalfPeriodA,
    pins: continuum?.pins?.length ?? 0,
    excluded: continuum?.exclude?.length ?? 0,
    thresholdSigma: measureSettings.thresholdSigma,
    expectedFalse: measurement.expectedFalse,
    resolvingPower: measurement.resolvingPower,
    resolvingPowerFrom: measurement.resolvingPowerFrom,
    widthForm: measurement.lineWidth.form,
    edits: edits.length,
    reshaped: features.filter((f) => f.measured.byHand?.startsWith('measured as')).length,
    tied: features.filter((f) => f.measured.byHand?.startsWith('tied to')).length,
    absorption: measureSettings.absorption,
  };
}

function gasFacts({ settings, reddening, zones }: Gas): MethodFacts['gas'] {
  const shown = (estimate: Estimate, unit: string) => {
    if (estimate.ended === 'none') return '';
    if (estimate.ended === 'value')
      return `${significant(estimate.value, 3)} ${unit} (${significant(estimate.low, 3)}-${significant(estimate.high, 3)})`;
    return `${estimate.ended === 'below' ? '<' : '>'} ${significant(estimate.limit, 2)} ${unit}`;
  };
  return {
    curve: settings.curve,
    rV: settings.rV,
    ...(reddening.cHbeta ? { cHbeta: reddening.cHbeta.value, cHbetaErr: reddening.cHbeta.err } : {}),
    given: reddening.ended === 'given',
    hydrogenLines: reddening.lines.filter((line) => line.state === 'used').length,
    zones: zones
      .filter(({ te, ne }) => !(isBorrowed(te.from) && isBorrowed(ne.from)))
      .map(({ zone, te, ne }) => ({ zone: `${zone} ionisation`, te: shown(te.estimate, 'K'), ne: shown(ne.estimate, 'cm^-3') }))
      .filter(({ te, ne }) => te && ne),
  };
}

/** Taken from another zone, or assumed: not measured. */
const isBorrowed = (from: string) => from.startsWith('taken') || from.startsWith('assumed');

function countsOf(features: readonly FeatureView[]): MethodFacts['counts'] {
  const of = (decision: string) => features.filter((f) => f.verdict?.decision === decision).length;
  const artefacts = features.filter(
    (f) => f.verdict?.decision === 'artefact' || (f.measured.artefact && f.verdict?.decision === undefined),
  ).length;
  const [accepted, unidentified, rejected] = [of('accepted'), of('unidentified'), of('rejected')];
  return {
    features: features.length - artefacts,
    accepted,
    unidentified,
    rejected,
    open: features.length - artefacts - accepted - unidentified,
    artefacts,
  };
}

/** Settings that differ from the program's own. */
function settingsOf({ measureSettings, namingSettings, gas, material }: Done): { key: string; value: string }[] {
  const text = (value: unknown) => (typeof value === 'string' ? value : JSON.stringify(value));
  const list = (group: string, settings: object, own: object = {}) =>
    Object.entries(settings)
      .filter(([key, value]) => value !== undefined && JSON.stringify(value) !== JSON.stringify((own as Record<string, unknown>)[key]))
      .map(([key, value]) => ({ key: `${group}.${key}`, value: text(value) }));
  return [
    ...list('reading', material.reading.choices),
    ...list('measure', measureSettings, DEFAULT_MEASURE_SETTINGS),
    ...list('naming', namingSettings),
    ...list('gas', gas.settings),
  ];
}

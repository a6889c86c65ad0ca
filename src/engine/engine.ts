import { type AtomicData, readUserLines, withUserLines } from '../atomic/index.ts';
import { DEFAULT_NAMING_SETTINGS, type Naming, type NamingSettings, nameMarks } from '../identify/index.ts';
import {
  DEFAULT_MEASURE_SETTINGS,
  type FeatureShape,
  type FittedSpectrum,
  type FluxLimit,
  fitSpectrum,
  fluxLimit,
  type Measurement,
  type MeasureSettings,
  measurementOf,
  shapesOfFeature,
} from '../measure/index.ts';
import { DEFAULT_GAS_SETTINGS, type Gas, type GasSettings } from '../plasma/index.ts';
import { ProblemError } from '../problems/index.ts';
import type { ByteSource, ReadingChoices } from '../readers/index.ts';
import { matchVerdicts, type OwnLines, type Settings, type Verdict } from '../session/index.ts';
import type { Analysis, FeatureView, Progress } from './analysis.ts';
import { assemble, featureViews, withVerdicts } from './assemble.ts';
import { fixedNames } from './fixedNames.ts';
import { gapsOf } from './gapsOf.ts';
import { marksOf } from './marksOf.ts';
import { guessKind, type Material, readMaterial, type SourceKind } from './material.ts';
import { nameChanges } from './nameChanges.ts';
import { namedPairs } from './namedPairs.ts';
import { plasmaLines } from './plasmaLines.ts';
import { plasmaStage } from './plasmaStage.ts';
import { sourceHash } from './sourceHash.ts';

/** How a run is watched and stopped. */
export interface RunControl {
  readonly progress?: (progress: Progress) => void;
  /** Told what the names of before say of the gas under the new verdicts and settings, at once: the candidates are weighed after that. */
  readonly gas?: (gas: Gas) => void;
  readonly signal?: AbortSignal;
}

/** One open source and the stages that follow from it; a stage whose inputs did not change is not run again. */
export interface Engine {
  /** The line list, with the user's own lines among the bundled ones when given. @throws ProblemError when they cannot be read: the first of their problems */
  dataWith(own: OwnLines | undefined): AtomicData;
  /** Takes `source` for all following analyses; `guess` looks into the file whether it holds samples or measured lines. */
  open(source: ByteSource, kind: SourceKind | 'guess'): Promise<SourceKind>;
  /** SHA-256 of the open source's bytes, hex; RangeError when nothing is open. */
  sha256(control?: RunControl): Promise<string>;
  /** @throws ProblemError when the source cannot be read as chosen; RangeError when nothing is open */
  analyse(settings: Settings, verdicts: readonly Verdict[], control?: RunControl): Promise<Analysis>;
  /** Of the spectrum last analysed: the feature nearest to `at` (Angstrom, medium of the reading) in other shapes, best first; empty for a list of lines. */
  shapesAt(at: number): readonly FeatureShape[];
  /** Of the spectrum last analysed: three-sigma limit of an unseen line; undefined outside of it, or for a list of lines. */
  limitAt(at: number): FluxLimit | undefined;
}

/**
 * @param data the opened atomic bundle
 * @param now  seconds from any origin, for the timings: the core asks no clock of its own
 */
export function createEngine(data: AtomicData, now: () => number): Engine {
  let source: { readonly bytes: ByteSource; readonly kind: SourceKind } | undefined;
  const lists = listsOf(data);
  const hashed = stage<string>();
  const material = stage<Material>();
  const fitted = stage<FittedSpectrum | undefined>();
  const measured = stage<Measurement | undefined>();
  const tied = stage<Measurement | undefined>();
  let last: { readonly fitted: FittedSpectrum; readonly measurement: Measurement; readonly edits: MeasureSettings['edits'] } | undefined;
  const named = stage<Naming>();
  const described = stage<Gas>();
  let before:
    | { readonly views: readonly FeatureView[]; readonly measured: number; readonly z: number; readonly measurement?: Measurement }
    | undefined;

  return {
    dataWith: lists,
    async open(bytes, kind) {
      const found = kind === 'guess' ? await guessKind(bytes) : kind;
      source = { bytes, kind: found };
      material.forget();
      hashed.forget();
      return found;
    },
    async sha256(control = {}) {
      if (!source) throw new RangeError('sha256 was called before open');
      const { bytes } = source;
      return hashed.of([], () => sourceHash(bytes, (share) => control.progress?.({ stage: 'hashing', share }), control.signal));
    },
    async analyse(settings, verdicts, control = {}) {
      if (!source) throw new RangeError('analyse was called before open');
      const { bytes, kind } = source;
      const list = lists(settings.ownLines);
      const timings: { stage: string; seconds: number }[] = [];
      const run = async <T>(name: string, work: (progress: (share: number) => void) => T | Promise<T>): Promise<T> => {
        control.signal?.throwIfAborted();
        control.progress?.({ stage: name, share: 0 });
        const began = now();
        const result = await work((share) => control.progress?.({ stage: name, share }));
        timings.push({ stage: name, seconds: now() - began });
        return result;
      };

      const what = await material.of([settings.reading], () =>
        run('reading', (progress) =>
          readMaterial(bytes, kind, settings.reading satisfies ReadingChoices, { progress, signal: control.signal }),
        ),
      );
      const { spectrum } = what;
      const sha256 = await hashed.of([], () => run('hashing', (progress) => sourceHash(bytes, progress, control.signal)));
      const measureSettings: MeasureSettings = { ...DEFAULT_MEASURE_SETTINGS, ...settings.measure };
      const { edits = [], ...fitSettings } = measureSettings;
      const fits = await fitted.of([material.stamp(), fitSettings], () =>
        spectrum
          ? run('measuring', (progress) =>
              fitSpectrum(spectrum, fitSettings, { progress: (_, share) => progress(share), signal: control.signal }),
            )
          : undefined,
      );
      const alone = await measured.of([fitted.stamp(), edits], () => fits && measurementOf(fits, edits));
      const found = alone?.features ?? what.features;
      const marks = marksOf(found, what.reading.medium);
      const { byFeature, lost } = matchVerdicts(
        verdicts,
        marks.map((mark, k) => ({ at: mark.wavelength, atErr: found[k].centroidErr })),
      );
      const namingSettings: NamingSettings = {
        ...DEFAULT_NAMING_SETTINGS,
        ...settings.naming,
        medium: what.reading.medium,
        ...(spectrum ? { gaps: gapsOf(spectrum) } : {}),
      };
      const fixed = fixedNames(byFeature, list);
      const gasSettings: GasSettings = { ...DEFAULT_GAS_SETTINGS, ...settings.gas };
      const { medium } = what.reading;
      const gasUnder = (views: readonly FeatureView[], z: number, measurement: Measurement | undefined): Promise<Gas> => {
        const lines = plasmaLines(views, { data: list, medium, z, leastProbability: gasSettings.leastProbability });
        return described.of([measured.stamp(), tied.stamp(), lines, gasSettings, namingSettings, settings.ownLines], () =>
          run('gas', () => plasmaStage({ data: list, lines, spectrum, measurement, medium, z, settings: gasSettings, namingSettings })),
        );
      };
      if (control.gas && before?.measured === measured.stamp())
        control.gas(await gasUnder(withVerdicts(before.views, byFeature), before.z, before.measurement));
      const naming = await named.of([material.stamp(), measured.stamp(), namingSettings, fixed, settings.ownLines], () =>
        run('naming', (progress) => nameMarks(marks, list, namingSettings, fixed, { progress, signal: control.signal })),
      );
      const pairs = alone && measureSettings.tieNamedPairs ? namedPairs(list, what.reading.medium, found, naming, byFeature) : [];
      const measurement = await tied.of([measured.stamp(), pairs], () =>
        fits && pairs.length > 0 ? tieOrNot(fits, alone, edits, pairs) : alone,
      );
      const features = measurement?.features ?? what.features;
      last = fits && measurement && { fitted: fits, measurement, edits };
      const parts = {
        data: list,
        ownLines: list.lines.count - data.lines.count,
        sha256,
        material: what,
        measurement,
        features,
        marks,
        naming,
        byFeature,
        lost,
        measureSettings,
        namingSettings,
        timings,
      };
      const views = featureViews(parts);
      const changes = before?.measured === measured.stamp() ? nameChanges(before.views, views) : [];
      before = { views, measured: measured.stamp(), z: naming.z, measurement };
      return assemble({ ...parts, changes }, views, await gasUnder(views, naming.z, measurement));
    },
    shapesAt: (at) => (last ? shapesOfFeature(last.fitted, last.edits ?? [], at) : []),
    limitAt: (at) => last && fluxLimit(last.fitted, last.measurement.model, at),
  };
}

/** The measurement with ties, unless they made a feature come or go: names are counted along the features. */
function tieOrNot(
  fits: FittedSpectrum,
  alone: Measurement | undefined,
  edits: NonNullable<MeasureSettings['edits']>,
  pairs: ReturnType<typeof namedPairs>,
): Measurement | undefined {
  const withTies = measurementOf(fits, edits, pairs);
  return withTies.features.length === alone?.features.length ? withTies : alone;
}

/** The bundled list, or the last one that was joined with the user's lines. */
function listsOf(data: AtomicData): (own: OwnLines | undefined) => AtomicData {
  let kept: { readonly text: string; readonly data: AtomicData } | undefined;
  return (own) => {
    if (!own) return data;
    if (kept?.text !== own.text) {
      const reading = readUserLines(own.text, own.name, data.lines);
      if (reading.ended === 'refused') throw new ProblemError(reading.problems[0]);
      kept = { text: own.text, data: withUserLines(data, reading.lines) };
    }
    return kept.data;
  };
}

/** Keeps the last result of a stage with the inputs it came from. */
function stage<T>() {
  let key: string | undefined;
  let kept: T | undefined;
  let count = 0;
  return {
    /** The kept result when `inputs` (plain data) are the same as last time, else that of `make`. */
    async of(inputs: readonly unknown[], make: () => T | Promise<T>): Promise<T> {
      const asked = JSON.stringify(inputs);
      if (asked !== key) {
        kept = await make();
        key = asked;
        count++;
      }
      return kept as T;
    },
    /** Changes whenever the result does. */
    stamp: () => count,
    forget() {
      key = undefined;
    },
  };
}

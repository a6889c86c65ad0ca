import type { AtomicData } from '../atomic/index.ts';
import type { NamedLine } from '../plasma/index.ts';
import { type Medium, toVacuum } from '../spectrum/index.ts';
import { kmsFromWidth } from '../units/index.ts';
import type { CandidateView, FeatureView } from './analysis.ts';
import { lineOfKey } from './lineNames.ts';

/** Light that is not the object's. */
const NOT_OF_THE_OBJECT = new Set(['sky', 'telluric', 'interstellar']);

interface Frame {
  readonly data: AtomicData;
  readonly medium: Medium;
  readonly z: number;
  /** Open features keep their best name from this probability on. */
  readonly leastProbability: number;
}

/** Emission features of the object for the plasma room: accepted names, likely ones of open features, and the rest without a name. */
export function plasmaLines(features: readonly FeatureView[], frame: Frame): NamedLine[] {
  return features.flatMap((feature): NamedLine[] => {
    const { measured, name } = feature;
    const accepted = feature.verdict?.decision === 'accepted';
    const foreign = name?.transitions.some(({ nature }) => NOT_OF_THE_OBJECT.has(nature)) ?? false;
    const isLight = measured.flux > 0 && (measured.artefact === undefined || accepted) && feature.verdict?.decision !== 'artefact';
    if (!isLight || foreign) return [];
    const taken = name && (accepted || name.probability >= frame.leastProbability) ? linesOf(frame.data, name) : undefined;
    const doubt = doubtOf(feature);
    return [
      {
        feature: feature.number,
        label: name?.label ?? '',
        lines: taken ?? [],
        shares: taken ? (name?.shares ?? []) : [],
        accepted,
        flux: measured.flux,
        fluxErr: measured.fluxErr,
        restVac: toVacuum(feature.centroid, frame.medium) / (1 + frame.z),
        ...(Number.isFinite(measured.ew) ? { ew: measured.ew / (1 + frame.z) } : {}),
        ...(measured.fwhm > 0 ? { fwhmA: measured.fwhm / (1 + frame.z) } : {}),
        velocityKms: name?.velocityKms ?? Number.NaN,
        velocityErrKms: name?.velocityErrKms ?? Number.NaN,
        ...widthOf(feature),
        ...(doubt === undefined ? {} : { doubt }),
      },
    ];
  });
}

/** Lines of a name in this edition of the list; undefined when one is not there. */
function linesOf(data: AtomicData, name: CandidateView): number[] | undefined {
  const lines = name.keys.map((key) => lineOfKey(data, key));
  return lines.every((line) => line !== undefined) ? lines : undefined;
}

/** Width with the instrument taken out; its error grows as the line gets narrower than the instrument. */
function widthOf({ measured, centroid }: FeatureView): Pick<NamedLine, 'fwhmKms' | 'fwhmErrKms'> {
  const observed = kmsFromWidth(measured.fwhm, centroid);
  const fwhmKms = measured.intrinsicFwhmKms ?? observed;
  if (!(fwhmKms > 0)) return {};
  const fwhmErrKms = (kmsFromWidth(measured.fwhmErr, centroid) * observed) / fwhmKms;
  return { fwhmKms, ...(Number.isFinite(fwhmErrKms) ? { fwhmErrKms } : {}) };
}

/** Why a flux should not be relied on. */
function doubtOf({ measured }: FeatureView): string | undefined {
  if (measured.fit.ended === 'failed') return 'its fit failed';
  if (measured.fit.ended === 'at-bound') return 'its fit rests on a bound';
  return measured.notes.find((note) => note.startsWith('saturated') || note.startsWith('cut by'));
}

import type { AtomicData } from '../atomic/index.ts';
import type { Mark } from './naming.ts';
import type { FamilyScale } from './scalePosterior.ts';
import type { Survey } from './survey.ts';
import type { Weighing } from './weighed.ts';

/** An ion of fewer sightings hangs on one name. */
const FEW_SIGHTINGS = 1.5;
/** Brighter than the limit by this much, a feature cannot be noise: dex. */
const BRIGHT_DEX = 0.7;
/** A name this many nats below the best place or strength says why it was turned down. */
const POOR_NATS = -2;

/** What it would imply that a predicted line is not there. */
export function impliedByAbsence(line: number, above: number, { seen }: FamilyScale, { lines }: AtomicData): string {
  const ion = lines.ions[lines.ion[line]].name;
  const times = `It should stand ${Number((10 ** above).toPrecision(2))} times above the faintest features`;
  return seen < FEW_SIGHTINGS
    ? `${times}; ${ion} hangs on one other name, which its absence puts in doubt.`
    : `${times}; other lines of ${ion} are there, so look for a gap, a masked stretch or absorption at its place, or for a line ratio unlike the usual one.`;
}

/** What it would imply that a feature stays without a name. */
export function impliedByNameless(mark: Mark, { candidates }: Weighing, survey: Survey, { lines }: AtomicData): string {
  if (mark.artefact) return 'A spike narrower than a line can be: a fault of the data.';
  if (mark.flux < 0)
    return 'An absorption that no listed telluric or interstellar line explains: of a star in the beam, or of the sky subtraction.';
  const above = Math.log10(mark.flux) - survey.logLimitAt(mark.wavelength);
  const kind =
    above > BRIGHT_DEX
      ? 'It is too bright for noise: a line that the list lacks, gas at another velocity, or sky left over'
      : 'It is near the limit: noise, an artefact, or a faint line that the list lacks';
  const [best] = candidates;
  if (!best) return `${kind}; no line of the list lies within the tolerance.`;
  const { ion } = lines;
  const name = lines.ions[ion[best.lines[0]]].name;
  const why =
    best.strengthNats < POOR_NATS
      ? 'its flux does not fit'
      : best.wavelengthNats < POOR_NATS
        ? 'its place does not fit'
        : 'nothing else speaks for that ion';
  return `${kind}; the nearest thing to a name is ${name}, but ${why}.`;
}

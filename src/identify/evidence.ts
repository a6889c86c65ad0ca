import type { AtomicData } from '../atomic/index.ts';
import { airFromVacuum, SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { WeighedCompanion } from './companions.ts';
import { factsOf } from './lineFacts.ts';
import type { Evidence, Mark } from './naming.ts';
import { isLocal } from './options.ts';
import type { Survey } from './survey.ts';
import type { Weighed } from './weighed.ts';
import { fwhmKms } from './widths.ts';

/** The case of one candidate: every piece of its log odds with a sentence that a referee can read. The pieces sum to the log odds against "none of these". */
export function evidenceOf(
  mark: Mark,
  weighed: Weighed,
  companions: readonly WeighedCompanion[],
  data: AtomicData,
  survey: Survey,
  strangers: number,
  medium: 'air' | 'vacuum' = 'vacuum',
): Evidence[] {
  const evidence: Evidence[] = [
    { kind: 'wavelength', nats: weighed.wavelengthNats, sentence: wavelengthSentence(mark, weighed, data) },
    { kind: 'strength', nats: weighed.strengthNats - weighed.excitationNats, sentence: strengthSentence(mark, weighed, data) },
  ];
  for (const { finding, nats, sameUpper } of companions) {
    evidence.push({ kind: 'companion', nats, sentence: companionSentence(mark, finding, sameUpper, data, medium) });
  }
  const further: Evidence[] = [
    { kind: 'excitation', nats: weighed.excitationNats, sentence: excitationSentence(weighed, data) },
    { kind: 'ion', nats: weighed.familyNats, sentence: familySentence(weighed, data) },
    { kind: 'ion', nats: weighed.owedNats, sentence: owedSentence(mark, weighed, data) },
    { kind: 'width', nats: weighed.widthNats, sentence: widthSentence(mark, weighed, survey) },
    { kind: 'prior', nats: weighed.claimNats, sentence: claimSentence(weighed) },
  ];
  const told = further.filter(({ nats }) => Math.abs(nats) >= LEAST_TOLD);
  const untold = further.reduce((sum, { nats }) => sum + (Math.abs(nats) < LEAST_TOLD ? nats : 0), 0);
  return [...evidence, ...told, { kind: 'prior', nats: weighed.priorNats + untold, sentence: priorSentence(weighed, data, strangers) }];
}

/** Weighted sightings from which an ion counts as seen elsewhere. */
const ION_SEEN = 0.7;
/** Pieces below this many nats have no sentence of their own. */
const LEAST_TOLD = 0.02;

const ionName = (data: AtomicData, line: number) => data.lines.ions[data.lines.ion[line]].name;

function wavelengthSentence(mark: Mark, { lines, off, sigma }: Weighed, data: AtomicData): string {
  const kms = (value: number) => (value / mark.wavelength) * SPEED_OF_LIGHT_KMS;
  const where = isLocal(data, lines[0]) ? 'its place in the observer’s frame' : 'the object’s velocity';
  const mean = lines.length > 1 ? 'The flux-weighted mean of the blend lies ' : 'The feature lies ';
  return `${mean}${signed(kms(off))} ± ${kms(sigma).toFixed(1)} km/s (${signed(off, 3)} Å) from ${where}: ${(Math.abs(off) / sigma).toFixed(1)} sigma.`;
}

function strengthSentence(mark: Mark, { lines, logPredicted, logPredictedErr, ionSeen }: Weighed, data: AtomicData): string {
  const ratio = 10 ** (Math.log10(Math.abs(mark.flux)) - logPredicted);
  const factor = 10 ** logPredictedErr;
  const basis =
    ionSeen > ION_SEEN
      ? `from what ${ionName(data, lines[0])} shows in other features`
      : `from typical abundances (no other line of ${ionName(data, lines[0])} is recognised)`;
  return `The flux is ${ratio >= 100 || ratio < 0.01 ? ratio.toExponential(1) : Number(ratio.toPrecision(2))} times the one expected ${basis}, which is known within a factor ${factor.toFixed(factor < 3 ? 1 : 0)}.`;
}

function companionSentence(
  mark: Mark,
  { line, predictedFlux, outcome, expectedAt }: WeighedCompanion['finding'],
  sameUpper: boolean,
  data: AtomicData,
  medium: 'air' | 'vacuum',
): string {
  const shown = (vacuum: number) => (medium === 'air' ? airFromVacuum(vacuum) : vacuum).toFixed(1);
  const name = `${ionName(data, line)} ${shown(data.lines.wavelengthVac[line])}`;
  const kin = sameUpper ? 'from the same upper level' : 'of the same multiplet';
  const share = (predictedFlux / mark.flux).toPrecision(2);
  switch (outcome) {
    case 'seen':
      return `${name}, ${kin}, is there at the ratio predicted (${share} of this feature).`;
    case 'wrong-ratio':
      return `${name}, ${kin}, should have ${share} of this feature’s flux; what stands there is fainter.`;
    case 'absent':
      return `${name}, ${kin}, should have ${share} of this feature’s flux, above the detection limit at ${shown(expectedAt)} Å, and is not there.`;
    case 'outside':
      return `${name}, ${kin}, lies outside the observed range or in a gap of it.`;
    case 'too-faint':
      return `${name}, ${kin}, should have ${share} of this feature’s flux: too faint to be seen here.`;
    default:
      return `${name}, ${kin}, may hide in a stronger feature at its place.`;
  }
}

function priorSentence({ lines }: Weighed, data: AtomicData, strangers: number): string {
  const blend = lines.length > 1 ? ` A blend of ${lines.length} is less common than one line.` : '';
  const local = isLocal(data, lines[0]) ? ' Reduced spectra have most of their sky taken off.' : '';
  return `About ${Math.max(1, Math.round(100 * strangers))} features in a hundred belong to no line of the list.${blend}${local}`;
}

const claimSentence = ({ lines }: Weighed) =>
  lines.length > 1 ? 'Another feature claims a part of this blend.' : 'Another feature claims this line with as good a right.';

function owedSentence(mark: Mark, { lines, logPredicted, logPredictedErr }: Weighed, data: AtomicData): string {
  const names = [...new Set(lines.map((line) => ionName(data, line)))].join(' and ');
  const share = Number((10 ** (logPredicted - Math.log10(Math.abs(mark.flux)))).toPrecision(2));
  const sure = 10 ** logPredictedErr;
  return `What is known of ${names} predicts ${share} of this flux here, within a factor ${sure.toFixed(sure < 3 ? 1 : 0)}, and no other feature at this place can be that line.`;
}

function excitationSentence({ lines, excitationNats }: Weighed, data: AtomicData): string {
  const { family, families } = factsOf(data);
  const { zoneEv } = families[family[lines[0]]];
  const { name } = data.lines.ions[data.lines.ion[lines[0]]];
  const how = excitationNats > 0 ? 'speaks for' : 'speaks against';
  return zoneEv > 0
    ? `${name} shines in gas that takes ${zoneEv.toFixed(0)} eV to make; the strength of other ions of such gas ${how} it.`
    : `${name} is neutral gas; the strength of other such ions ${how} it.`;
}

function familySentence({ lines, ionSeen }: Weighed, data: AtomicData): string {
  const name = ionName(data, lines[0]);
  return ionSeen > ION_SEEN
    ? `${name} is recognised by other features too.`
    : `No other feature is recognised as ${name}: an ion known by one line alone is less often there.`;
}

function widthSentence(mark: Mark, { lines }: Weighed, { fwhmKms: typical }: Survey): string {
  const width = fwhmKms(mark);
  const times =
    typical === undefined ? '' : `, ${(width / typical).toFixed(2)} times that of the brighter features (${typical.toFixed(0)} km/s)`;
  return `Its FWHM is ${width.toFixed(0)} km/s${times}${lines.length > 1 ? '; the parts of the blend widen it' : ''}.`;
}

const signed = (value: number, digits = 1) => `${value < 0 ? '−' : '+'}${Math.abs(value).toFixed(digits)}`;

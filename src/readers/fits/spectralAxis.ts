import { ProblemError } from '../../problems/index.ts';
import { unitInWords } from '../columnsToSpectrum.ts';
import type { MediumEvidence } from '../mediumWords.ts';
import { type Notes, noteFact, warn } from '../notes.ts';
import type { ReadingChoices } from '../reading.ts';
import { likelyUnit, type SpectralUnit, spectralUnit, toAngstrom, unitNamed } from '../spectralUnits.ts';
import { type AxisCards, isVelocityAxis, STANDARD } from './axisCards.ts';
import { commentOf, type Header, numberOf, textOf } from './header.ts';
import { BASE_TO_SI, spectralVariable } from './spectralTypes.ts';
import { watAttributes } from './wat.ts';

/** Wavelengths along an image axis, Angstrom as stored. */
export interface AxisWavelengths {
  readonly wavelength: Float64Array;
  readonly medium?: MediumEvidence;
}

/**
 * Wavelengths of the pixels 1 ... n of an axis, by FITS WCS paper III or by the older habits of optical spectra (log10 axes with DC-FLAG = 1,
 * units in WAT cards). How it was worked out is noted.
 *
 * @throws ProblemError when the axis cannot be turned into wavelengths
 */
export function axisWavelengths(
  cards: AxisCards,
  header: Header,
  n: number,
  choices: ReadingChoices,
  notes: Notes,
  hdu: number,
): AxisWavelengths {
  const standard = STANDARD.exec(cards.type);
  const isVelocity = isVelocityAxis(cards);
  if (choices.wavelengthUnit === undefined && (isVelocity || (standard && !(standard[2] === undefined && isOddUnit(cards)))))
    return standardAxis(cards, standard, header, n, notes, hdu);
  return plainAxis(cards, header, n, choices, notes, hdu);
}

/** CTYPE of the standard but a unit that is none, or none with numbers that are no metres: the older habit. */
function isOddUnit({ type, unitWords, reference }: AxisCards): boolean {
  if (!/^(WAVE|AWAV)/.test(type)) return false;
  const unit = spectralUnit(unitWords);
  if (unit && !unit.log) return false;
  return unitWords !== '' || reference > 0.01;
}

function standardAxis(
  cards: AxisCards,
  match: RegExpExecArray | null,
  header: Header,
  n: number,
  notes: Notes,
  hdu: number,
): AxisWavelengths {
  const { axis, reference, pixel, step } = cards;
  const code = (match?.[1] ?? oldVelocityCode(cards)).toUpperCase();
  const algorithm = match?.[2];
  const place = { file: notes.file, hdu, column: `CTYPE${axis}` };
  const rest = restVacuum(header);
  const variable = spectralVariable(code, rest);
  if (!variable || algorithm === 'TAB' || algorithm === 'GRI' || algorithm === 'GRA') {
    throw new ProblemError({
      code: variable ? 'unknown-axis-algorithm' : 'velocity-axis',
      where: place,
      found: variable
        ? `an axis of type ${cards.type}, worked out by a look-up table or a grism formula`
        : `an axis of velocity (${cards.type}${cards.unitWords ? `, ${cards.unitWords}` : ''}) without the wavelength or frequency at rest`,
      expected: 'an axis of wavelength, or RESTFRQ or RESTWAV beside a velocity',
      doThis: variable ? 'Resample the spectrum to a linear or logarithmic axis.' : 'Give the spectrum a wavelength axis first.',
    });
  }
  const unit = unitOfStandard(code, cards.unitWords);
  const at = reference * unit.scale;
  const wavelength = new Float64Array(n);
  const isWave = code === 'WAVE' || code === 'AWAV';
  const inAir = code === 'AWAV';
  if (algorithm === undefined || algorithm === 'LOG') {
    for (let i = 0; i < n; i++) {
      const along = step * (i + 1 - pixel);
      const value = algorithm === 'LOG' ? reference * Math.exp(along / reference) : reference + along;
      // wavelengths stay as stored: no detour over vacuum
      wavelength[i] = isWave ? value * unit.scale : variable.toVacuum(value * unit.scale);
    }
  } else {
    // linear in X (first letter), expressed as S: X = X_r + w dX/dS (paper III, equation 14)
    const x = spectralVariable({ F: 'FREQ', W: 'WAVE', A: 'AWAV', V: 'BETA' }[algorithm[0]] ?? 'WAVE', rest ?? 1);
    const vacuum = variable.toVacuum(at);
    if (x && vacuum > 0) {
      const xr = x.fromVacuum(vacuum);
      const dxds = variable.slope(at) / x.slope(xr);
      for (let i = 0; i < n; i++) {
        const w = x.toVacuum(xr + step * (i + 1 - pixel) * unit.scale * dxds);
        wavelength[i] = inAir ? variable.fromVacuum(w) : w;
      }
    } else wavelength.fill(Number.NaN);
  }
  const shown = `${cards.type}, ${unit.name}${algorithm ? ` (${algorithm === 'LOG' ? 'logarithmic' : `linear in ${algorithm[0]}`})` : ', linear'}`;
  noteFact(notes, 'wavelength', `axis ${axis}: ${shown}`, `CTYPE${axis} = ${cards.type}, CRVAL${axis} = ${reference}, step ${step}`);
  if (isVelocityAxis(cards)) {
    warn(
      notes,
      'velocity-axis',
      `the axis counts velocities (${cards.type}); wavelengths were worked out with the rest ${numberOf(header, 'RESTWAV') ? 'wavelength' : 'frequency'} of the header`,
      { where: { hdu }, doThis: 'Check that this is what you want: only lines near that wavelength can be there.' },
    );
  }
  return {
    wavelength,
    medium: {
      medium: inAir ? 'air' : 'vacuum',
      evidence: isWave
        ? `CTYPE${axis} = ${cards.type} means ${inAir ? 'air' : 'vacuum'} wavelengths (FITS WCS paper III)`
        : `a ${quantityOf(code)} gives vacuum wavelengths`,
    },
  };
}

const quantityOf = (code: string) =>
  code === 'FREQ' ? 'frequency' : code === 'ENER' ? 'photon energy' : code === 'WAVN' ? 'wavenumber' : 'velocity';

/** FELO and VELO-LSR of older radio spectra are optical and radio velocities; otherwise the radio convention is usual. */
const oldVelocityCode = ({ type }: AxisCards) => (/^FELO|^VOPT/i.test(type) ? 'VOPT' : /^VELO$/i.test(type) ? 'VELO' : 'VRAD');

function unitOfStandard(code: string, words: string): { name: string; scale: number } {
  const unit = spectralUnit(words);
  const expected =
    code === 'WAVE' || code === 'AWAV'
      ? 'wavelength'
      : code === 'FREQ'
        ? 'frequency'
        : code === 'ENER'
          ? 'energy'
          : code === 'WAVN'
            ? 'wavenumber'
            : 'velocity';
  if (unit && unit.quantity === expected && !unit.log) return { name: unit.name, scale: unit.scale * BASE_TO_SI[expected] };
  // no CUNIT: the SI unit, by the standard
  return expected === 'wavelength' ? { name: 'm', scale: 1e10 } : { name: 'SI', scale: 1 };
}

function restVacuum(header: Header): number | undefined {
  const wave = numberOf(header, 'RESTWAV');
  if (wave && wave > 0) return wave * 1e10;
  const frequency = numberOf(header, 'RESTFRQ') ?? numberOf(header, 'RESTFREQ');
  return frequency && frequency > 0 ? 2.99792458e18 / frequency : undefined;
}

/** Logarithms of Angstrom have such reference values and such small steps. */
const LOG_LOW = 2.9;
const LOG_HIGH = 4.8;
const LOG_STEP = 0.002;

function plainAxis(cards: AxisCards, header: Header, n: number, choices: ReadingChoices, notes: Notes, hdu: number): AxisWavelengths {
  const { axis, reference, pixel, step } = cards;
  const stored = new Float64Array(n);
  for (let i = 0; i < n; i++) stored[i] = reference + step * (i + 1 - pixel);
  const log = logEvidence(cards, header, notes, hdu);
  const found = choices.wavelengthUnit
    ? { unit: unitNamed(choices.wavelengthUnit), reason: 'chosen by you' }
    : unitOfAxis(cards, header, stored, log !== undefined, notes, hdu);
  const unit: SpectralUnit = log && !found.unit.log ? { ...found.unit, name: `log10 ${found.unit.name}`, log: 10 } : found.unit;
  if (unit.quantity === 'velocity') {
    throw new ProblemError({
      code: 'velocity-axis',
      where: { file: notes.file, hdu, column: `CUNIT${axis}` },
      found: `an axis in ${unit.name}`,
      expected: 'an axis of wavelength',
      doThis: 'Give the spectrum a wavelength axis first.',
    });
  }
  noteFact(
    notes,
    'wavelength',
    `axis ${axis}, ${log ? 'linear in log10 of the wavelength' : 'linear'}: starts at ${reference}, step ${step}`,
    `CRVAL${axis}${log ? `; ${log}` : ''}`,
  );
  noteFact(notes, 'wavelength unit', unit.name, found.reason);
  const medium = mediumOfPlain(cards, unit);
  return { wavelength: toAngstrom(stored, unit), ...(medium ? { medium } : {}) };
}

/** WAVE and AWAV say the medium whatever the unit; a frequency has none but vacuum. */
function mediumOfPlain({ type, axis }: AxisCards, { quantity }: SpectralUnit): MediumEvidence | undefined {
  if (quantity !== 'wavelength') return { medium: 'vacuum', evidence: `a ${quantity} gives vacuum wavelengths` };
  const code = /^(WAVE|AWAV)(-|\s*$)/.exec(type)?.[1];
  return code
    ? {
        medium: code === 'AWAV' ? 'air' : 'vacuum',
        evidence: `CTYPE${axis} = ${type} means ${code === 'AWAV' ? 'air' : 'vacuum'} wavelengths (FITS WCS paper III)`,
      }
    : undefined;
}

/** Why the axis is one of log10 of the wavelength; undefined when it is not. */
function logEvidence({ reference, step, type, axis, unitWords }: AxisCards, header: Header, notes: Notes, hdu: number): string | undefined {
  const flag = numberOf(header, 'DC-FLAG');
  const isSmall = reference > LOG_LOW && reference < LOG_HIGH && Math.abs(step) < LOG_STEP;
  if (flag === 1 && reference < 10) return 'DC-FLAG = 1 means log10';
  if (/log/i.test(textOf(header, 'WFITTYPE')) && reference < 10) return `WFITTYPE = ${textOf(header, 'WFITTYPE')}`;
  if (/^LOG|LOG_?LAM|LOG10/.test(type)) return `CTYPE${axis} = ${type}`;
  if (spectralUnit(unitWords)?.log) return undefined;
  if (isSmall && numberOf(header, 'COEFF0') !== undefined) return 'COEFF0 and COEFF1 count in log10';
  if (isSmall && flag !== 0) {
    warn(notes, 'log-assumed', `the axis starts at ${reference} with a step of ${step}: taken as log10 of Angstrom`, {
      where: { hdu, column: `CRVAL${axis}` },
      doThis: 'Choose the unit if this is wrong.',
    });
    return 'assumed from the numbers';
  }
  return undefined;
}

function unitOfAxis(
  cards: AxisCards,
  header: Header,
  stored: Float64Array,
  isLog: boolean,
  notes: Notes,
  hdu: number,
): { unit: SpectralUnit; reason: string } {
  const { axis, type, unitWords } = cards;
  const wat = watAttributes(header, axis);
  const sources: (readonly [string, string])[] = [
    [unitWords, `CUNIT${axis} = ${unitWords}`],
    [wat.units ?? '', `units=${wat.units} in WAT${axis}_001`],
    [type, `CTYPE${axis} = ${type}`],
    [/[[({]([^\])}]+)[\])}]/.exec(commentOf(header, `CRVAL${axis}`))?.[1] ?? '', `the comment of CRVAL${axis}`],
    [/[[({]([^\])}]+)[\])}]/.exec(commentOf(header, `CDELT${axis}`))?.[1] ?? '', `the comment of CDELT${axis}`],
    [textOf(header, 'WAVEUNIT') || textOf(header, 'WUNIT') || textOf(header, 'XUNITS') || textOf(header, 'UNITS'), 'a unit keyword'],
  ];
  for (const [words, reason] of sources) {
    const unit = words === '' ? undefined : spectralUnit(words);
    if (!unit || unit.quantity === 'velocity') continue;
    if (unitWords && !spectralUnit(unitWords)) warnOddUnit(unitWords, unit, reason, notes, hdu, axis);
    return { unit, reason };
  }
  for (const keyword of [`CTYPE${axis}`, `CUNIT${axis}`, `CRVAL${axis}`, `CDELT${axis}`, `CD${axis}_${axis}`]) {
    const unit = unitInWords(`wave ${commentOf(header, keyword)}`);
    if (unit) return { unit, reason: `the comment of ${keyword}` };
  }
  if (isLog) return { unit: unitNamed('Angstrom'), reason: 'log10 axes of optical spectra count in Angstrom (common practice, no source)' };
  const low = Math.min(stored[0], stored[stored.length - 1]);
  const likely = likelyUnit(low, Math.max(stored[0], stored[stored.length - 1]));
  if (!likely) {
    throw new ProblemError({
      code: 'no-wavelength-axis',
      where: { file: notes.file, hdu, column: `CTYPE${axis}` },
      found: `an axis ${type || 'without type'}${unitWords ? ` in ${unitWords}` : ' without unit'} from ${Number(stored[0].toPrecision(6))} to ${Number(stored[stored.length - 1].toPrecision(6))}`,
      expected: 'an axis of wavelength',
      doThis: 'Choose the unit of the wavelengths, or another part of the file.',
    });
  }
  if (unitWords) warnOddUnit(unitWords, likely.unit, likely.reason, notes, hdu, axis);
  else
    warn(notes, 'unit-assumed', `no unit of wavelength is stated; ${likely.unit.name} is assumed: ${likely.reason}`, {
      where: { hdu },
      doThis: 'Choose the unit if this is wrong.',
    });
  return { unit: likely.unit, reason: `assumed: ${likely.reason}` };
}

function warnOddUnit(words: string, unit: SpectralUnit, reason: string, notes: Notes, hdu: number, axis: number): void {
  warn(notes, 'odd-unit', `CUNIT${axis} says "${words}", which is no unit of wavelength; ${unit.name} is taken (${reason})`, {
    where: { hdu, column: `CUNIT${axis}` },
    doThis: 'Choose the unit if this is wrong.',
  });
}

/** What a spectral axis counts. */
export type SpectralQuantity = 'wavelength' | 'frequency' | 'energy' | 'wavenumber' | 'velocity';

/** A unit of a spectral axis. */
export interface SpectralUnit {
  /** As shown: "Angstrom", "log10 Angstrom", "GHz". */
  readonly name: string;
  readonly quantity: SpectralQuantity;
  /** Base units (Angstrom, Hz, eV, cm^-1, km/s) in one of it. */
  readonly scale: number;
  /** The stored number is a logarithm of the value, to base 10 or e. */
  readonly log?: 10 | 'e';
}

interface Spelling {
  readonly name: string;
  readonly quantity: SpectralQuantity;
  readonly scale: number;
  readonly spelt: RegExp;
}

// Spellings met in published files; the VOUnits names are among them.
const SPELLINGS: readonly Spelling[] = [
  {
    name: 'Angstrom',
    quantity: 'wavelength',
    scale: 1,
    spelt: /^(A|aa|å|a\.?u\.?0|ang|angs|angst|angstr|an?gstr[oöø]ms?|ångstr[oö]ms?|angstrem|angstom|angstorms?|\\aa)\.?$/i,
  },
  { name: 'nm', quantity: 'wavelength', scale: 10, spelt: /^(nm|nanomet(er|re)s?|nanons?|millimicrons?)$/i },
  { name: 'um', quantity: 'wavelength', scale: 1e4, spelt: /^(um|µm|μm|mum|\\mum|microns?|micromet(er|re)s?|mu|micro-?m)$/i },
  { name: 'mm', quantity: 'wavelength', scale: 1e7, spelt: /^(mm|millimet(er|re)s?)$/ },
  { name: 'cm', quantity: 'wavelength', scale: 1e8, spelt: /^(cm|centimet(er|re)s?)$/i },
  { name: 'm', quantity: 'wavelength', scale: 1e10, spelt: /^(m|[mM][eE][tT]([eE][rR]|[rR][eE])[sS]?)$/ },
  { name: 'pm', quantity: 'wavelength', scale: 1e-2, spelt: /^(pm|picomet(er|re)s?)$/ },
  { name: 'Hz', quantity: 'frequency', scale: 1, spelt: /^(hz|hertz|s-1|1\/s|s\*\*-1|s\^-1|sec-1)$/i },
  { name: 'kHz', quantity: 'frequency', scale: 1e3, spelt: /^khz$/i },
  { name: 'MHz', quantity: 'frequency', scale: 1e6, spelt: /^mhz$/i },
  { name: 'GHz', quantity: 'frequency', scale: 1e9, spelt: /^ghz$/i },
  { name: 'THz', quantity: 'frequency', scale: 1e12, spelt: /^thz$/i },
  { name: 'eV', quantity: 'energy', scale: 1, spelt: /^(ev|electron-?volts?)$/i },
  { name: 'keV', quantity: 'energy', scale: 1e3, spelt: /^kev$/i },
  { name: 'MeV', quantity: 'energy', scale: 1e6, spelt: /^MeV$/ },
  { name: 'cm-1', quantity: 'wavenumber', scale: 1, spelt: /^(cm-1|1\/cm|cm\^-1|cm\^\{-1\}|cm\*\*-1|cm\*\*\(-1\)|\/cm|kayser)$/i },
  { name: 'm-1', quantity: 'wavenumber', scale: 0.01, spelt: /^(m-1|1\/m|m\^-1|m\*\*-1)$/ },
  { name: 'um-1', quantity: 'wavenumber', scale: 1e4, spelt: /^(um-1|1\/um|um\^-1|micron-1|1\/micron)$/i },
  { name: 'km/s', quantity: 'velocity', scale: 1, spelt: /^(km\/s(ec)?|km\.?s-1|km s-1|km s\^-1|km s\*\*-1|kms-?1?|kps)$/i },
  { name: 'm/s', quantity: 'velocity', scale: 1e-3, spelt: /^(m\/s(ec)?|m\.?s-1|m s-1|m s\^-1)$/ },
];

const LOGARITHM = /^(log10|log_10|log|lg|dex|ln)\s*[([]?\s*(?:(?:lambda|wave(?:length)?|wl|λ)\s*[/,]?\s*)?[([]?\s*([^()[\]]*?)\s*[)\]]*$/i;
const SCALED =
  /^(?:10(?:\*\*|\^)?(?:\(([+-]?\d{1,3})\)|([+-]\d{1,3}))|10(?:\*\*|\^)(\d{1,3})|([0-9]*\.?[0-9]+(?:e[+-]?\d{1,3})?))\s*\*?\s*(.+)$/i;
const MEDIUM_WORDS = /[\s_,;:/-]*[([]?\s*\b(in\s+)?(air|vacuum|vac|obs(erved)?|rest(frame)?|heliocentric|barycentric)\b\s*[)\]]?/gi;

/**
 * The spectral unit a file's words mean; undefined when they mean none.
 *
 * Takes VOUnits and FITS forms with a scale factor (`0.1nm`, `10**-10 m`), logarithms (`log(Angstrom)`), brackets, and the usual misspellings.
 */
export function spectralUnit(words: string): SpectralUnit | undefined {
  if (words.length > 200) return undefined;
  const bare = words
    .normalize('NFKC')
    .replace(MEDIUM_WORDS, ' ')
    .trim()
    .replace(/^['"([{<\s]+|['")\]}>\s]+$/g, '')
    .trim();
  if (bare === '' || bare.length > 60) return undefined;
  const plain = lookUp(bare);
  if (plain) return plain;
  const scaled = SCALED.exec(bare);
  if (scaled) {
    const power = scaled[1] ?? scaled[2] ?? scaled[3];
    const factor = power === undefined ? Number(scaled[4]) : Number(`1e${Number(power)}`);
    const unit = lookUp(scaled[5].trim());
    // 10**-10 must not become 1.0000000000000001e-10 Angstrom: the product is rounded to what decimal factors give
    if (unit && factor > 0) return { ...unit, name: bare, scale: Number((unit.scale * factor).toPrecision(15)) };
  }
  const logarithm = /^(log|lg|dex|ln)/i.test(bare) ? LOGARITHM.exec(words.normalize('NFKC').trim()) : null;
  if (logarithm) {
    const inner = logarithm[2] === '' ? undefined : spectralUnit(logarithm[2].replace(/^\(|\)$/g, ''));
    if (!inner || inner.log) return undefined;
    const natural = logarithm[1].toLowerCase() === 'ln';
    return { ...inner, name: `${natural ? 'ln' : 'log10'} ${inner.name}`, log: natural ? 'e' : 10 };
  }
  return undefined;
}

function lookUp(word: string): SpectralUnit | undefined {
  const found = SPELLINGS.find(({ spelt }) => spelt.test(word));
  return found && { name: found.name, quantity: found.quantity, scale: found.scale };
}

/** The unit by the name shown to the user, with or without `log10 ` before it. @throws RangeError when there is none */
export function unitNamed(name: string): SpectralUnit {
  const unit = spectralUnit(name);
  if (!unit) throw new RangeError(`no spectral unit ${name}`);
  return unit;
}

/** Speed of light, Angstrom Hz (exact by the definition of the metre). */
const LIGHT_ANGSTROM_HZ = 2.99792458e18;
/** hc in eV Angstrom, from the exact constants of the SI (CODATA 2018). */
const HC_EV_ANGSTROM = 12398.419843320025;
/** Angstrom times cm^-1. */
const ANGSTROM_PER_CM = 1e8;

/** Turns stored values into Angstrom: a new array; NaN where the value has no wavelength. @throws RangeError for a velocity */
export function toAngstrom(values: Float64Array, unit: SpectralUnit): Float64Array {
  const out = new Float64Array(values.length);
  const { quantity, scale, log } = unit;
  if (quantity === 'velocity') throw new RangeError('a velocity needs a rest wavelength');
  for (let i = 0; i < values.length; i++) {
    const linear = (log === 10 ? 10 ** values[i] : log === 'e' ? Math.exp(values[i]) : values[i]) * scale;
    if (quantity === 'wavelength') out[i] = linear;
    else if (!(linear > 0)) out[i] = Number.NaN;
    else if (quantity === 'frequency') out[i] = LIGHT_ANGSTROM_HZ / linear;
    else if (quantity === 'energy') out[i] = HC_EV_ANGSTROM / linear;
    else out[i] = ANGSTROM_PER_CM / linear;
  }
  return out;
}

/** Where reduced spectra of gas lie, Angstrom: far ultraviolet to the far infrared. */
const LIKELY_LOW = 900;
const LIKELY_HIGH = 3e6;

/**
 * The unit that puts bare numbers where spectra lie, with the reason; undefined when none does.
 * The order matters: nanometres are far likelier than the extreme ultraviolet in Angstrom.
 */
export function likelyUnit(low: number, high: number): { readonly unit: SpectralUnit; readonly reason: string } | undefined {
  const range = `the numbers run from ${short(low)} to ${short(high)}`;
  const as = (name: string, why: string) => ({ unit: unitNamed(name), reason: `${range}: ${why}` });
  if (low >= LIKELY_LOW && high <= 300_000) return as('Angstrom', 'only Angstrom puts them where reduced spectra lie');
  if (low >= 90 && high <= 6000 && low < LIKELY_LOW) {
    if (low > 500 && high > 3000) return as('Angstrom', 'as Angstrom they are ultraviolet to visible');
    return as('nm', 'as nanometres they are where reduced spectra lie');
  }
  if (low >= 0.09 && high <= 300) return as('um', 'as micrometres they are where reduced spectra lie');
  if (low >= LIKELY_LOW * 1e-10 && high <= LIKELY_HIGH * 1e-10) return as('m', 'as metres they are where reduced spectra lie');
  if (low > 1e12 && high < 1e17) return as('Hz', 'as hertz they are infrared to ultraviolet');
  if (low > 300 && high <= LIKELY_HIGH) return as('Angstrom', 'Angstrom is the usual unit');
  return undefined;
}

const short = (value: number) => String(Number(value.toPrecision(6)));

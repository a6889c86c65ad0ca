/** A wavelength unit as files spell it, and Angstrom in one of it. */
export interface WavelengthUnit {
  readonly name: 'Angstrom' | 'nm' | 'um' | 'mm' | 'cm' | 'm';
  readonly angstroms: number;
}

const UNITS: readonly { readonly unit: WavelengthUnit; readonly spelt: RegExp }[] = [
  { unit: { name: 'Angstrom', angstroms: 1 }, spelt: /^(a|aa|å|ang|angs|angstroms?|angström|ångström|ångstrom|0\.1 ?nm|10\*\*-10 ?m)$/i },
  { unit: { name: 'nm', angstroms: 10 }, spelt: /^(nm|nanomet(er|re)s?)$/i },
  { unit: { name: 'um', angstroms: 1e4 }, spelt: /^(um|µm|μm|microns?|mum|micromet(er|re)s?)$/i },
  { unit: { name: 'mm', angstroms: 1e7 }, spelt: /^mm$/ },
  { unit: { name: 'cm', angstroms: 1e8 }, spelt: /^cm$/ },
  { unit: { name: 'm', angstroms: 1e10 }, spelt: /^(m|met(er|re)s?)$/ },
];

/** The unit a file's word means, undefined when it is none of wavelength. */
export function wavelengthUnit(word: string): WavelengthUnit | undefined {
  const bare = word
    .trim()
    .replace(/^['"([]+|['")\]]+$/g, '')
    .trim();
  return UNITS.find(({ spelt }) => spelt.test(bare))?.unit;
}

/** The unit a user may choose, by its name. */
export const unitNamed = (name: WavelengthUnit['name']): WavelengthUnit => {
  const found = UNITS.find(({ unit }) => unit.name === name);
  if (!found) throw new RangeError(`no wavelength unit ${name}`);
  return found.unit;
};

/** Optical and near-infrared spectra of nebulae, Angstrom: what a bare number must turn into for a unit to be likely. */
const LIKELY_LOW = 900;
const LIKELY_HIGH = 300_000;

/** The unit that puts a bare range of numbers where spectra of nebulae lie; Angstrom wins when several do. */
export function likelyUnit(low: number, high: number): WavelengthUnit | undefined {
  const fits = ({ angstroms }: WavelengthUnit) => low * angstroms >= LIKELY_LOW && high * angstroms <= LIKELY_HIGH;
  // 300-2500 read as Angstrom would be far ultraviolet: nanometres are far more common there
  if (low >= 250 && high <= 3000 && low < LIKELY_LOW) return unitNamed('nm');
  return UNITS.map(({ unit }) => unit).find(fits);
}

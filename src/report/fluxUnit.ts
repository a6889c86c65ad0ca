/** How a format spells units: FITS 4.0 section 4.3 (ECSV reads it, too), VOUnits 1.0, CDS 2.0. */
export type UnitStyle = 'fits' | 'vounits' | 'cds';

/** A unit as a power of ten and powers of names. */
interface Unit {
  readonly exponent: number;
  readonly powers: ReadonlyMap<string, number>;
}

/** Names that files use -> the name of the standards. */
const NAMES: Readonly<Record<string, string>> = {
  erg: 'erg',
  ergs: 'erg',
  w: 'W',
  j: 'J',
  s: 's',
  sec: 's',
  second: 's',
  seconds: 's',
  cm: 'cm',
  m: 'm',
  a: 'Angstrom',
  aa: 'Angstrom',
  ang: 'Angstrom',
  angstrom: 'Angstrom',
  angstroms: 'Angstrom',
  å: 'Angstrom',
  nm: 'nm',
  um: 'um',
  micron: 'um',
  microns: 'um',
  hz: 'Hz',
  jy: 'Jy',
  mjy: 'mJy',
  count: 'count',
  counts: 'count',
  ct: 'count',
  adu: 'adu',
  dn: 'adu',
  electron: 'electron',
  electrons: 'electron',
  photon: 'photon',
  photons: 'photon',
  ph: 'photon',
  arcsec: 'arcsec',
  sr: 'sr',
  pix: 'pix',
  pixel: 'pix',
};

/**
 * Unit of a line's flux - the unit of the spectrum times Angstrom - as a format spells it; the text as it stands, with `Angstrom` behind it, when it is no unit that
 * can be read; empty when the spectrum says nothing.
 */
export function lineFluxUnit(fluxUnit: string, style: UnitStyle): string {
  if (fluxUnit.trim() === '') return '';
  const unit = readUnit(fluxUnit);
  return unit ? spell(times(unit, 'Angstrom', 1), style) : `${fluxUnit} Angstrom`;
}

/** `1e-15 erg/s/cm2/A`, `10^-17 erg/(s cm^2 Angstrom)`, `erg s-1 cm-2 A-1` ... */
function readUnit(text: string): Unit | undefined {
  const scaled = /^\s*(?:(?:1(?:\.0*)?)?(?:e|\s*[x*]\s*10\s*(?:\*\*|\^)\s*\(?|10\s*(?:\*\*|\^)\s*\(?)([+-]?\d+)\)?)?\s*[.*]?\s*(.*)$/i.exec(
    text,
  );
  if (!scaled) return undefined;
  let unit: Unit = { exponent: Number(scaled[1] ?? 0), powers: new Map() };
  let sign = 1;
  let inBrackets = 0;
  for (const [token] of scaled[2].matchAll(/\/|\(|\)|[a-zA-ZÅ]+\s*(?:\*\*|\^)?\s*\(?[+-]?\d*\)?|\S/g)) {
    if (token === '/') sign = -1;
    else if (token === '(') inBrackets++;
    else if (token === ')') {
      inBrackets--;
      sign = 1;
    } else if (token !== '.' && token !== '*') {
      const found = /^([a-zA-ZÅ]+)\s*(?:\*\*|\^)?\s*\(?([+-]?\d*)\)?$/.exec(token);
      const name = found && NAMES[found[1].toLowerCase()];
      if (!found || !name) return undefined;
      unit = times(unit, name, sign * (found[2] === '' ? 1 : Number(found[2])));
      // a slash divides by the next name, or by the whole bracket
      if (inBrackets === 0) sign = 1;
      else if (token.endsWith(')') && !token.includes('(')) {
        inBrackets--;
        sign = 1;
      }
    }
  }
  return inBrackets === 0 && unit.powers.size > 0 ? unit : undefined;
}

function times(unit: Unit, name: string, power: number): Unit {
  const powers = new Map(unit.powers);
  const after = (powers.get(name) ?? 0) + power;
  if (after === 0) powers.delete(name);
  else powers.set(name, after);
  return { ...unit, powers };
}

/** Names that CDS spells otherwise. */
const CDS_NAMES: Readonly<Record<string, string>> = { count: 'ct' };

function spell({ exponent, powers }: Unit, style: UnitStyle): string {
  const names = [...powers].map(([standard, power]) => {
    const name = style === 'cds' ? (CDS_NAMES[standard] ?? standard) : standard;
    return power === 1 ? name : `${name}${style === 'vounits' ? '**' : ''}${power}`;
  });
  if (exponent === 0) return names.join(style === 'fits' ? ' ' : '.');
  if (style === 'fits') return `10**${exponent} ${names.join(' ')}`;
  return style === 'vounits' ? `10**${exponent}${names.join('.')}` : `10${exponent > 0 ? '+' : ''}${exponent}${names.join('.')}`;
}

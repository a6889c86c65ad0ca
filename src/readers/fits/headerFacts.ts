import { type MediumEvidence, mediumInWords, saysRestFrame } from '../mediumWords.ts';
import { type Notes, noteFact, warn } from '../notes.ts';
import type { Hdu } from './hdus.ts';
import { commentOf, type Header, logicalOf, numberOf, textOf } from './header.ts';
import { watAttributes } from './wat.ts';

/** What the headers say around a spectrum. */
export interface HeaderFacts {
  readonly medium?: MediumEvidence;
  readonly maker: string;
  readonly frame?: string;
  readonly restFrame?: string;
  readonly resolvingPower?: number;
  readonly fluxUnit?: { readonly unit: string; readonly evidence: string };
}

const VELOCITIES = [
  'BARYCORR',
  'BARY_COR',
  'BERV',
  'HELIO_RV',
  'VHELIO',
  'HELCORR',
  'HELVEL',
  'HIERARCH ESO QC VRAD BARYCOR',
  'ESO QC VRAD BARYCOR',
  'ESO DRS BERV',
  'ESO QC VRAD HELICOR',
  'BSS_VHEL',
  'VELOSYS',
  'VBARY',
  'VCORR',
  'BARYVEL',
  'HEL_RV',
];
const MAKER_KEYWORDS = [
  'TELESCOP',
  'INSTRUME',
  'ORIGIN',
  'SURVEY',
  'PROJECT',
  'OBSERVAT',
  'COLLECT',
  'HLSPID',
  'PROV1',
  'PRODCATG',
  'DATA_V',
];

/** Gathers and notes what the HDU's header and the primary one say of medium, frame, velocity and unit. */
export function headerFacts(hdu: Hdu, primary: Hdu, notes: Notes): HeaderFacts {
  const headers = hdu === primary ? [hdu.header] : [hdu.header, primary.header];
  const first = <T>(look: (header: Header) => T | undefined): T | undefined => headers.map(look).find((v) => v !== undefined);
  const text = (keyword: string) => first((h) => textOf(h, keyword) || undefined) ?? '';
  const object = text('OBJECT') || text('TARGNAME') || text('TARGET') || text('TARGETID') || text('OBJNAME');
  if (object) noteFact(notes, 'object', object, 'the header');
  const frame = text('SPECSYS');
  noteVelocities(headers, notes);
  const medium = first(mediumOfHeader) ?? mediumOfAxis(hdu.header) ?? mediumOfTexts(headers, notes);
  const rest = first((h) => h.texts.find((t) => /wave|lam/i.test(t) && saysRestFrame(t)));
  const rp = first((h) => numberOf(h, 'SPEC_RP') ?? numberOf(h, 'SPECRP') ?? numberOf(h, 'RESOLPOW'));
  const unit = fluxUnitOf(hdu, primary);
  return {
    maker: MAKER_KEYWORDS.map(text).join(' '),
    ...(medium ? { medium } : {}),
    ...(frame ? { frame } : {}),
    ...(rest ? { restFrame: `"${rest.slice(0, 100)}"` } : {}),
    ...(rp && rp > 10 && rp < 1e7 ? { resolvingPower: rp } : {}),
    ...(unit ? { fluxUnit: unit } : {}),
  };
}

/** VACUUM, AIRORVAC and their like. */
function mediumOfHeader(header: Header): MediumEvidence | undefined {
  const vacuum = header.cards.has('VACUUM') ? logicalOf(header, 'VACUUM') : undefined;
  if (vacuum !== undefined) return { medium: vacuum ? 'vacuum' : 'air', evidence: `VACUUM = ${vacuum ? 'T' : 'F'} in the header` };
  for (const keyword of [
    'AIRORVAC',
    'AIRVAC',
    'VACORAIR',
    'VAC_AIR',
    'AIR_VAC',
    'WAVEMED',
    'MEDIUM',
    'WAVMED',
    'WAVETYPE',
    'WMEDIUM',
    'REFRAME',
    'VACWAVE',
    'WAVEVAC',
    'LAMBTYPE',
    'WAVE_TYP',
    'WAT_MED',
  ]) {
    const words = textOf(header, keyword);
    if (words === '') continue;
    if (/^(VACWAVE|WAVEVAC)$/.test(keyword) && /^(T|F)$/.test(words))
      return { medium: words === 'T' ? 'vacuum' : 'air', evidence: `${keyword} = ${words} in the header` };
    const air = /\bair\b/i.test(words);
    const vac = /\bvac/i.test(words);
    if (air !== vac) return { medium: air ? 'air' : 'vacuum', evidence: `${keyword} = ${words} in the header` };
  }
  return undefined;
}

/** The words around the first axis: CTYPE1, the comments of its cards, the label in its WAT cards. */
function mediumOfAxis(header: Header): MediumEvidence | undefined {
  const label = watAttributes(header, 1).label ?? '';
  const words = [textOf(header, 'CTYPE1'), label, ...['CTYPE1', 'CUNIT1', 'CRVAL1', 'CDELT1', 'CD1_1'].map((k) => commentOf(header, k))];
  // AWAV and WAVE themselves are read with the axis
  return words
    .filter((w) => !/^(AWAV|WAVE)/.test(w))
    .map((w) => mediumInWords(`wavelength ${w}`))
    .find((m) => m !== undefined);
}

function mediumOfTexts(headers: readonly Header[], notes: Notes): MediumEvidence | undefined {
  const said = headers.flatMap((h) =>
    h.texts.map((t) => (/wave|lambda|angstrom|dispersion/i.test(t) ? mediumInWords(t) : undefined)).filter((m) => m !== undefined),
  );
  if (said.length === 0) return undefined;
  // the later of two steps of a reduction counts, but that is for the user to say
  const other = said.find((m) => m.medium !== said[0].medium);
  if (!other) return said[0];
  warn(notes, 'medium-contradiction', `the header's comments say both: ${said[0].evidence} and ${other.evidence}`, {
    doThis: 'Say whether the wavelengths are in air or in vacuum.',
  });
  return undefined;
}

function noteVelocities(headers: readonly Header[], notes: Notes): void {
  for (const keyword of VELOCITIES) {
    const value = headers.map((h) => numberOf(h, keyword)).find((v) => v !== undefined);
    if (value === undefined) continue;
    // VELOSYS is in m/s by the standard
    const kms = keyword === 'VELOSYS' ? value / 1000 : value;
    noteFact(
      notes,
      'velocity of the observer',
      `${keyword} = ${value}${keyword === 'VELOSYS' ? ' m/s' : ' km/s'}`,
      'the header; it may or may not be applied already, so wavelengths are shown as stored',
    );
    if (kms !== 0 && Math.abs(kms) < 200)
      notes.offers.push({
        label: `correct the wavelengths by ${keyword}, ${kms} km/s`,
        adds: true,
        choices: { velocityCorrectionKms: kms },
      });
    return;
  }
}

function fluxUnitOf(hdu: Hdu, primary: Hdu): { unit: string; evidence: string } | undefined {
  const own = textOf(hdu.header, 'BUNIT');
  if (own) return { unit: own, evidence: `BUNIT of HDU ${hdu.index}` };
  const first = textOf(primary.header, 'BUNIT');
  if (first && (primary.axes.length === 0 || hdu.kind !== 'image')) return { unit: first, evidence: 'BUNIT of the primary header' };
  const other = textOf(hdu.header, 'FLUXUNIT') || textOf(hdu.header, 'FUNIT') || textOf(hdu.header, 'YUNITS');
  return other ? { unit: other, evidence: 'the header' } : undefined;
}

import type { Medium } from '../spectrum/index.ts';

/** What words say of the medium; `evidence` quotes them. */
export interface MediumEvidence {
  readonly medium: Medium;
  readonly evidence: string;
}

const TO_VACUUM = /\b(air)\b.{0,12}\bto\b.{0,12}\b(vac(uum)?)\b/i;
const TO_AIR = /\b(vac(uum)?)\b.{0,12}\bto\b.{0,12}\b(air)\b/i;
const ABOUT_WAVELENGTHS = /wave|lam(bda)?\b|λ|angstrom|\bwl\b|medium|spectral|airorvac|refract/i;

/** Characters of a line that are looked at. */
const LONGEST_SENTENCE = 300;

/**
 * Whether a line of text says that wavelengths are in air or in vacuum; undefined when it does not, or says both.
 * "air mass", "vacuum pump" and the like are not about wavelengths.
 */
export function mediumInWords(words: string): MediumEvidence | undefined {
  const text = words.slice(0, LONGEST_SENTENCE);
  if (!ABOUT_WAVELENGTHS.test(text)) return undefined;
  const evidence = `"${text.trim().slice(0, 100)}"`;
  if (TO_VACUUM.test(text)) return { medium: 'vacuum', evidence };
  if (TO_AIR.test(text)) return { medium: 'air', evidence };
  const negated = /\bnot\b/i.test(text);
  const plain = text
    .replace(/air[\s_-]?mass/gi, ' ')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .replace(/_/g, ' ');
  const air = /\b(air|awav)\b/i.test(plain);
  const vacuum = /\bvac(uum|uo)?\b/i.test(plain);
  if (air === vacuum || negated) return undefined;
  const switchedOff = /\bvac(uum)?\s*[=:]\s*(f|false|no|0)\b/i.test(plain);
  if (vacuum && switchedOff) return { medium: 'air', evidence };
  if (air && /\bair\s*[=:]\s*(f|false|no|0)\b/i.test(plain)) return { medium: 'vacuum', evidence };
  return { medium: air ? 'air' : 'vacuum', evidence };
}

/** Whether a column's name, unit or UCD says the medium: `wave_air`, `Angstrom (vac)`, `em.wl;obs.atmos`. */
export function mediumInColumn({
  name,
  unit,
  ucd,
  description,
}: {
  name: string;
  unit: string;
  ucd?: string;
  description?: string;
}): MediumEvidence | undefined {
  if (ucd && /^em\.wl/i.test(ucd) && /obs\.atmos/i.test(ucd)) return { medium: 'air', evidence: `the column's UCD ${ucd}` };
  for (const words of [name, unit, description ?? '']) {
    const plain = words.replace(/([a-z])([A-Z])/g, '$1 $2').replace(/_/g, ' ');
    const air = /(^|\b)(air|awav)(\b|$)/i.test(plain) || /(lambda|wave|wl)air$/i.test(plain);
    const vacuum = /(^|\b)vac(uum)?(\b|$)/i.test(plain) || /(lambda|wave|wl)vac(uum)?$/i.test(plain);
    if (air !== vacuum) return { medium: air ? 'air' : 'vacuum', evidence: `the column's words "${words}"` };
  }
  return undefined;
}

/** Whether words say that the redshift has been taken out already. */
export const saysRestFrame = (text: string): boolean =>
  /rest[\s_-]?frame|\brest\b.{0,12}\bwave|wave.{0,12}\brest\b|de-?redshifted|\(emitted\)/i.test(text) && !/not\b.{0,20}rest/i.test(text);

import type { Header } from './header.ts';

/** Characters of a string that fills its card. */
const FULL = 68;

/** The WAT cards of an axis (0 = all axes) joined: the text of a card counts with its trailing blanks, which stand between numbers. */
export function watText(header: Header, axis: number): string {
  let text = '';
  for (let k = 1; k < 1000; k++) {
    const value = header.cards.get(`WAT${axis}_${String(k).padStart(3, '0')}`)?.value;
    if (typeof value !== 'string') break;
    text += value.padEnd(FULL);
  }
  return text.trimEnd();
}

/** `wtype=linear label=Wavelength units=angstroms spec1 = "..."` as pairs. */
export function watAttributes(header: Header, axis: number): Readonly<Record<string, string | undefined>> {
  const pairs: Record<string, string> = {};
  for (const [, name, quoted, bare] of watText(header, axis).matchAll(/\b([A-Za-z]\w{0,30})\s*=\s*(?:"([^"]*)(?:"|$)|(\S+))/g))
    pairs[name.toLowerCase()] ??= quoted ?? bare;
  return pairs;
}

import { ProblemError } from '../../problems/index.ts';

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';
const BLANKS = ' \t\r\n';

/** Bytes of base64 text (RFC 4648); blanks are skipped. @throws ProblemError for other letters */
export function fromBase64(text: string, file: string): Uint8Array {
  const table = new Int16Array(128).fill(-1);
  for (let i = 0; i < LETTERS.length; i++) table[LETTERS.charCodeAt(i)] = i;
  for (const blank of BLANKS) table[blank.charCodeAt(0)] = -2;
  table['='.charCodeAt(0)] = -2;
  const bytes = new Uint8Array(Math.floor((text.length * 3) / 4));
  let at = 0;
  let bits = 0;
  let held = 0;
  for (let i = 0; i < text.length; i++) {
    const value = table[text.charCodeAt(i)] ?? -1;
    if (value === -2) continue;
    if (value === -1)
      throw new ProblemError({
        code: 'bad-base64',
        where: { file, excerpt: text.slice(i, i + 20) },
        found: `the letter "${text[i]}" among base64 data`,
        expected: 'letters, digits, + and /',
        doThis: 'Fetch the file again: it is damaged.',
      });
    held = ((held << 6) | value) & 0xffffff;
    bits += 6;
    if (bits >= 8) {
      bits -= 8;
      bytes[at++] = (held >> bits) & 0xff;
    }
  }
  return bytes.subarray(0, at);
}

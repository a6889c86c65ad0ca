import { ProblemError } from '../../problems/index.ts';
import type { ByteSource } from '../reading.ts';

/** FITS 4.0 (Pence et al. 2010, A&A 524, A42; IAU FITS Working Group 2018), section 3: blocks of 2880 bytes, cards of 80. */
const BLOCK = 2880;
const CARD = 80;
/** A header of more blocks than this is no header. */
const MOST_BLOCKS = 2000;

export type CardValue = string | number | boolean;

/** One header-data unit: its keywords and where its data lie. */
export interface Hdu {
  readonly index: number;
  readonly cards: ReadonlyMap<string, CardValue>;
  /** COMMENT and HISTORY texts. */
  readonly comments: readonly string[];
  /** Byte at which the data start, and their length without padding. */
  readonly dataStart: number;
  readonly dataLength: number;
}

/** All header-data units of a file. @throws ProblemError when it is no FITS file or a header is broken */
export async function readHdus(source: ByteSource): Promise<Hdu[]> {
  const hdus: Hdu[] = [];
  let at = 0;
  while (at < source.size) {
    const header = await readHeader(source, at, hdus.length);
    if (!header) break;
    const dataStart = at + header.length;
    const dataLength = lengthOfData(source.name, hdus.length, header.cards);
    hdus.push({ index: hdus.length, cards: header.cards, comments: header.comments, dataStart, dataLength });
    at = dataStart + Math.ceil(dataLength / BLOCK) * BLOCK;
  }
  if (hdus.length === 0)
    throw new ProblemError({
      code: 'not-fits',
      where: { file: source.name },
      found: 'no FITS header',
      expected: 'a file that starts with SIMPLE',
    });
  return hdus;
}

async function readHeader(
  source: ByteSource,
  start: number,
  hdu: number,
): Promise<{ cards: Map<string, CardValue>; comments: string[]; length: number } | undefined> {
  const cards = new Map<string, CardValue>();
  const comments: string[] = [];
  let long: string | undefined;
  for (let block = 0; block < MOST_BLOCKS; block++) {
    const bytes = await source.read(start + block * BLOCK, start + (block + 1) * BLOCK);
    const text = new TextDecoder('latin1').decode(bytes);
    for (let c = 0; c + CARD <= text.length; c += CARD) {
      const card = text.slice(c, c + CARD);
      const keyword = card.slice(0, 8).trim();
      if (block === 0 && c === 0 && keyword !== 'SIMPLE' && keyword !== 'XTENSION') {
        // what follows the last unit may be anything: FITS allows special records
        if (hdu > 0) return undefined;
        throw new ProblemError({
          code: 'not-fits',
          where: { file: source.name, excerpt: card.slice(0, 60) },
          found: 'the file does not start with SIMPLE',
          expected: 'a FITS file',
        });
      }
      if (keyword === 'END') return { cards, comments, length: (block + 1) * BLOCK };
      if (keyword === 'COMMENT' || keyword === 'HISTORY') comments.push(card.slice(8).trim());
      else if (keyword === 'CONTINUE' && long !== undefined) {
        const more = stringValue(card.slice(8));
        const before = String(cards.get(long) ?? '').replace(/&$/, '');
        cards.set(long, before + (more ?? ''));
      } else if (card.startsWith('HIERARCH')) {
        const [name, ...rest] = card.slice(8).split('=');
        const value = rest.length > 0 ? cardValue(rest.join('=')) : undefined;
        if (value !== undefined) cards.set(name.trim(), value);
      } else if (card.slice(8, 10) === '= ') {
        const value = cardValue(card.slice(10));
        if (value !== undefined && !cards.has(keyword)) cards.set(keyword, value);
        long = keyword;
      }
    }
    if (bytes.length < BLOCK) break;
  }
  throw new ProblemError({
    code: 'no-end-card',
    where: { file: source.name, hdu, byte: start },
    found: 'a header without END',
    expected: 'an END card within the file',
    doThis: 'The file is cut: copy it once more.',
  });
}

function stringValue(text: string): string | undefined {
  const quoted = /^\s*'((?:[^']|'')*)'/.exec(text);
  return quoted ? quoted[1].replaceAll("''", "'").trimEnd() : undefined;
}

function cardValue(text: string): CardValue | undefined {
  const quoted = stringValue(text);
  if (quoted !== undefined) return quoted;
  const bare = text.split('/')[0].trim();
  if (bare === 'T') return true;
  if (bare === 'F') return false;
  const number = Number(bare.replace(/[dD]/, 'e'));
  return bare === '' || Number.isNaN(number) ? undefined : number;
}

/** |BITPIX|/8 x GCOUNT x (PCOUNT + NAXIS1 x ... x NAXISn), FITS 4.0 section 4.4.1. */
function lengthOfData(file: string, hdu: number, cards: ReadonlyMap<string, CardValue>): number {
  const whole = (name: string, other: number) => {
    const value = cards.get(name) ?? other;
    if (typeof value !== 'number' || !Number.isSafeInteger(value) || (value < 0 && name !== 'BITPIX')) {
      throw new ProblemError({
        code: 'bad-keyword',
        where: { file, hdu, column: name },
        found: `${name} = ${String(value)}`,
        expected: 'a whole number, not negative',
      });
    }
    return value;
  };
  const axes = whole('NAXIS', 0);
  if (axes === 0 || axes > 999) return 0;
  let product = 1;
  for (let k = 1; k <= axes; k++) product *= whole(`NAXIS${k}`, 0);
  return (Math.abs(whole('BITPIX', 8)) / 8) * whole('GCOUNT', 1) * (whole('PCOUNT', 0) + product);
}

export const textCard = (hdu: Hdu, name: string): string => String(hdu.cards.get(name) ?? '').trim();
export function numberCard(hdu: Hdu, name: string): number | undefined {
  const value = hdu.cards.get(name);
  return typeof value === 'number' ? value : undefined;
}

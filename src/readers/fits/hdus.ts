import { ProblemError } from '../../problems/index.ts';
import { count, excerpt, type Notes, note, warn } from '../notes.ts';
import type { ByteSource } from '../reading.ts';
import { type Header, headerBuilder, numberOf, textOf } from './header.ts';

/** Blocks and cards of FITS 4.0 (IAU FITS Working Group 2018), section 3. */
const BLOCK = 2880;
const CARD = 80;
/** Bytes of header read at once. */
const SLICE = BLOCK * 8;
/** Longer headers and more units are damage. */
const MOST_HEADER_BYTES = BLOCK * 4000;
const MOST_HDUS = 2000;

/** One header-data unit. */
export interface Hdu {
  readonly index: number;
  readonly header: Header;
  readonly kind: 'image' | 'binary table' | 'ASCII table' | 'other';
  readonly name: string;
  /** NAXIS1 ... NAXISn. */
  readonly axes: readonly number[];
  readonly bitpix: number;
  /** First byte of the data and how many bytes the file really holds of them. */
  readonly dataStart: number;
  readonly dataBytes: number;
  /** Bytes the header promises; Infinity beyond what a number can count. */
  readonly promised: number;
}

/**
 * The header-data units of a FITS file, headers read, data untouched.
 *
 * @throws ProblemError when the first header is damaged; damage further on ends the list with a remark
 */
export async function listHdus(source: ByteSource, notes: Notes): Promise<Hdu[]> {
  const hdus: Hdu[] = [];
  let at = 0;
  let unreadable: string[] = [];
  while (at < source.size && hdus.length < MOST_HDUS) {
    const read = await readHeader(source, at, hdus.length, notes);
    if (!read) break;
    const hdu = openHdu(read.header, hdus.length, at + read.bytes, source.size);
    unreadable = [...unreadable, ...read.header.unreadable];
    hdus.push(hdu);
    at = hdu.dataStart + Math.ceil(hdu.promised / BLOCK) * BLOCK;
  }
  if (unreadable.length) {
    note(
      notes,
      'unreadable-cards',
      `${count(unreadable.length, 'header card')} could not be understood and ${unreadable.length === 1 ? 'was' : 'were'} skipped`,
      { where: { excerpt: excerpt(unreadable[0]) } },
    );
  }
  return hdus;
}

async function readHeader(
  source: ByteSource,
  start: number,
  index: number,
  notes: Notes,
): Promise<{ header: Header; bytes: number } | undefined> {
  const { add, header } = headerBuilder();
  const decoder = new TextDecoder('latin1');
  for (let offset = 0; offset < MOST_HEADER_BYTES; offset += SLICE) {
    const bytes = await source.read(start + offset, Math.min(source.size, start + offset + SLICE));
    const text = decoder.decode(bytes);
    for (let c = 0; c + CARD <= text.length; c += CARD) {
      const card = text.slice(c, c + CARD);
      if (offset === 0 && c === 0 && index > 0 && !card.startsWith('XTENSION')) return undefined;
      if (/^END {5}/.test(card) && card.trim() === 'END') return { header, bytes: Math.ceil((offset + c + CARD) / BLOCK) * BLOCK };
      if (hasControls(card)) return broken(source, index, start + offset + c, card, notes);
      add(card);
    }
    if (bytes.length < SLICE) break;
  }
  return broken(source, index, start, '', notes);
}

const hasControls = (card: string) => {
  for (let i = 0; i < card.length; i++) if (card.charCodeAt(i) < 9 && card.charCodeAt(i) >= 0) return true;
  return false;
};

function broken(source: ByteSource, index: number, byte: number, card: string, notes: Notes): undefined {
  const where = { hdu: index, byte, ...(card ? { excerpt: excerpt(card) } : {}) };
  const found = card ? 'a header broken by bytes that are no text' : 'a header without END';
  if (index === 0) {
    throw new ProblemError({
      code: 'broken-header',
      where: { file: source.name, ...where },
      found,
      expected: 'cards of 80 characters up to END',
      doThis: 'Fetch the file again: it is cut or damaged.',
    });
  }
  warn(notes, 'broken-header', `${found}: what follows is not read`, { where, doThis: 'Fetch the file again if something is missing.' });
  return undefined;
}

function openHdu(header: Header, index: number, dataStart: number, size: number): Hdu {
  const whole = (keyword: string, other: number) => {
    const value = numberOf(header, keyword);
    return value !== undefined && Number.isInteger(value) && value >= 0 ? value : other;
  };
  const rank = Math.min(whole('NAXIS', 0), 999);
  const axes = Array.from({ length: rank }, (_, k) => whole(`NAXIS${k + 1}`, 0));
  const bitpix = numberOf(header, 'BITPIX') ?? 8;
  const xtension = textOf(header, 'XTENSION').toUpperCase();
  const isGroups = axes[0] === 0 && header.cards.get('GROUPS')?.value === true;
  const cells = rank === 0 ? 0 : (isGroups ? axes.slice(1) : axes).reduce((a, b) => a * b, 1);
  const bytes = (Math.abs(bitpix) / 8) * whole('GCOUNT', 1) * (whole('PCOUNT', 0) + cells);
  const promised = rank === 0 ? 0 : Number.isSafeInteger(Math.ceil(bytes)) ? Math.ceil(bytes) : Number.POSITIVE_INFINITY;
  const kind = isGroups
    ? 'other'
    : xtension === '' || xtension === 'IMAGE' || xtension === 'IUEIMAGE'
      ? 'image'
      : xtension === 'BINTABLE' || xtension === 'A3DTABLE'
        ? 'binary table'
        : xtension === 'TABLE'
          ? 'ASCII table'
          : 'other';
  const isPacked = kind === 'binary table' && header.cards.get('ZIMAGE')?.value === true;
  return {
    index,
    header,
    kind: isPacked ? 'other' : kind,
    name: textOf(header, 'EXTNAME') || textOf(header, 'HDUNAME'),
    axes,
    bitpix,
    dataStart,
    dataBytes: Math.max(0, Math.min(promised, size - dataStart)),
    promised,
  };
}

/** "HDU 4 (B_FLUX)". */
export const nameHdu = ({ index, name }: Hdu): string => `HDU ${index}${name ? ` (${name})` : ''}`;

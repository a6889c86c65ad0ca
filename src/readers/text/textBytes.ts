import { ProblemError } from '../../problems/index.ts';
import type { ByteSource } from '../reading.ts';

/** Bytes asked for at once. */
const SLICE = 1 << 22;
/** Bytes of the head in which layout, names and units are looked for. */
const HEAD = 1 << 18;

/** How a text is stored. */
export interface Encoding {
  readonly label: 'utf-8' | 'windows-1252' | 'utf-16le' | 'utf-16be';
  /** Bytes of the byte-order mark to skip. */
  readonly skip: number;
}

/** Encoding by byte-order mark, else by what the head can be; and the head as text. @throws ProblemError for bytes that are no text */
export async function openText(source: ByteSource): Promise<{ encoding: Encoding; head: string; whole: boolean }> {
  const bytes = await source.read(0, Math.min(source.size, HEAD));
  const encoding = encodingOf(bytes, source.name);
  const head = new TextDecoder(encoding.label).decode(bytes.subarray(encoding.skip));
  return { encoding, head: head.replace(/\uFFFD$/, ''), whole: bytes.length >= source.size };
}

function encodingOf(bytes: Uint8Array, file: string): Encoding {
  const [a, b, c] = bytes;
  if (a === 0xef && b === 0xbb && c === 0xbf) return { label: 'utf-8', skip: 3 };
  if (a === 0xff && b === 0xfe) return { label: 'utf-16le', skip: 2 };
  if (a === 0xfe && b === 0xff) return { label: 'utf-16be', skip: 2 };
  let even = 0;
  let odd = 0;
  const looked = Math.min(bytes.length, 4096);
  for (let i = 0; i < looked; i++) if (bytes[i] === 0) i % 2 ? odd++ : even++;
  if (odd > looked * 0.3 && even === 0) return { label: 'utf-16le', skip: 0 };
  if (even > looked * 0.3 && odd === 0) return { label: 'utf-16be', skip: 0 };
  if (even + odd > 0) {
    throw new ProblemError({
      code: 'not-text',
      where: { file, byte: bytes.indexOf(0) },
      found: 'it is neither text nor a FITS file: it holds zero bytes',
      expected: 'delimited text, ECSV, VOTable or FITS, perhaps packed with gzip',
      doThis: 'Save the spectrum as text or FITS.',
    });
  }
  return { label: isUtf8(bytes) ? 'utf-8' : 'windows-1252', skip: 0 };
}

function isUtf8(bytes: Uint8Array): boolean {
  try {
    // the head may end inside a character
    new TextDecoder('utf-8', { fatal: true }).decode(bytes.subarray(0, Math.max(0, bytes.length - 3)), { stream: true });
    return true;
  } catch (error) {
    if (error instanceof TypeError) return false;
    throw error;
  }
}

/** The text in slices whose digits are single ASCII bytes; UTF-16 is turned into UTF-8. */
export async function* slicesOf(source: ByteSource, encoding: Encoding): AsyncGenerator<{ bytes: Uint8Array; share: number }> {
  const wide = encoding.label === 'utf-16le' || encoding.label === 'utf-16be';
  const decoder = wide ? new TextDecoder(encoding.label) : undefined;
  const encoder = new TextEncoder();
  for (let start = encoding.skip; start < source.size; start += SLICE) {
    const end = Math.min(source.size, start + SLICE);
    const bytes = await source.read(start, end);
    if (bytes.length === 0) return;
    yield { bytes: decoder ? encoder.encode(decoder.decode(bytes, { stream: true })) : bytes, share: end / source.size };
  }
}

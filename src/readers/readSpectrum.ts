import { ProblemError } from '../problems/index.ts';
import { spectrumOfColumns } from './columns.ts';
import { readFitsTable } from './fits/readFits.ts';
import { gunzip } from './gunzip.ts';
import type { ByteSource, Reading, ReadingChoices, ReadingControl } from './reading.ts';
import { readTextTable } from './text/readText.ts';

/** Texts are read whole: larger ones do not fit into a browser's memory as numbers and text at once. */
const MOST_TEXT_BYTES = 400 << 20;

/**
 * Reads a spectrum from a file of any kind known, recognised by its content.
 *
 * @throws ProblemError when the file holds no spectrum, is broken, or the choices do not fit it
 */
export async function readSpectrum(source: ByteSource, choices: ReadingChoices, control: ReadingControl = {}): Promise<Reading> {
  const whole = await gunzip(source);
  const head = new TextDecoder('latin1').decode(await whole.read(0, 80));
  if (head.startsWith('SIMPLE')) return spectrumOfColumns(await readFitsTable(whole, choices, control), choices);
  return spectrumOfColumns(readTextTable(whole.name, await wholeText(whole)), choices);
}

/** All bytes of a text file. @throws ProblemError when it is empty, too large or no text */
export async function wholeText(source: ByteSource): Promise<Uint8Array> {
  if (source.size === 0)
    throw new ProblemError({ code: 'empty-file', where: { file: source.name }, found: 'an empty file', expected: 'a spectrum' });
  if (source.size > MOST_TEXT_BYTES)
    throw new ProblemError({
      code: 'text-too-large',
      where: { file: source.name },
      found: `${source.size} bytes of text`,
      expected: `at most ${MOST_TEXT_BYTES}`,
      doThis: 'Store it as a FITS table.',
    });
  const bytes = await source.read(0, source.size);
  const zeros = bytes.subarray(0, 4096).reduce((sum, b) => sum + (b === 0 ? 1 : 0), 0);
  const utf16 = (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
  if (zeros > 0 && !utf16)
    throw new ProblemError({
      code: 'not-text',
      where: { file: source.name },
      found: 'binary data of an unknown kind',
      expected: 'a text table or a FITS file',
    });
  return bytes;
}

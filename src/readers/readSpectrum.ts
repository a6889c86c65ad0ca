import { ProblemError } from '../problems/index.ts';
import { fitsSpectrum } from './fits/fitsSpectrum.ts';
import { gunzip } from './gunzip.ts';
import type { ByteSource, Reading, ReadingChoices, ReadingControl } from './reading.ts';
import { refuseForeign } from './refuse.ts';
import { textSpectrum } from './text/textSpectrum.ts';
import { votableSpectrum } from './votable/votableSpectrum.ts';

const HEAD = 1024;

/**
 * Reads a spectrum from FITS, VOTable, ECSV or delimited text, packed with gzip or not.
 *
 * @param choices what the user chose; everything else is proposed and explained in the reading
 * @throws ProblemError, and nothing else, when the file cannot be read; the signal's reason when the read is cancelled
 */
export async function readSpectrum(source: ByteSource, choices: ReadingChoices, control: ReadingControl = {}): Promise<Reading> {
  control.signal?.throwIfAborted();
  const opened = await unpacked(source, control);
  const head = await opened.read(0, Math.min(opened.size, HEAD));
  refuseForeign(head, source.name);
  const text = new TextDecoder('latin1').decode(head);
  if (/^SIMPLE\s*=/.test(text)) return fitsSpectrum(opened, choices, control);
  const plain = text.replaceAll('\0', '');
  if (/<([a-z]\w*:)?VOTABLE\b/i.test(plain) || /^\W{0,4}<\?xml/.test(plain)) return votableSpectrum(opened, choices, control);
  if (/<!doctype html|<html/i.test(text)) {
    throw new ProblemError({
      code: 'web-page',
      where: { file: source.name },
      found: 'it is a web page, not a spectrum',
      expected: 'delimited text, ECSV, VOTable or FITS',
      doThis: 'Save the spectrum itself: the download may have ended on a log-in or error page.',
    });
  }
  return textSpectrum(opened, choices, control);
}

/** The source itself, or what is in it when it is packed with gzip; twice packed is unpacked twice. */
export async function unpacked(source: ByteSource, control: ReadingControl): Promise<ByteSource> {
  let opened = source;
  for (let layers = 0; layers < 2; layers++) {
    const [a, b] = await opened.read(0, Math.min(opened.size, 2));
    if (a !== 0x1f || b !== 0x8b) break;
    opened = await gunzip(opened, control);
  }
  return opened;
}

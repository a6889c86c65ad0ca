import { ProblemError } from '../problems/index.ts';

const FOREIGN: readonly { readonly name: string; readonly starts: readonly number[]; readonly doThis: string }[] = [
  { name: 'a zip archive', starts: [0x50, 0x4b, 0x03, 0x04], doThis: 'Unpack it and open the spectrum inside.' },
  { name: 'packed with bzip2', starts: [0x42, 0x5a, 0x68], doThis: 'Unpack it with bunzip2, or pack it with gzip.' },
  { name: 'packed with xz', starts: [0xfd, 0x37, 0x7a, 0x58, 0x5a], doThis: 'Unpack it with unxz, or pack it with gzip.' },
  { name: 'packed with zstd', starts: [0x28, 0xb5, 0x2f, 0xfd], doThis: 'Unpack it, or pack it with gzip.' },
  { name: 'packed with the old Unix compress', starts: [0x1f, 0x9d], doThis: 'Unpack it with uncompress, or pack it with gzip.' },
  { name: 'a 7z archive', starts: [0x37, 0x7a, 0xbc, 0xaf], doThis: 'Unpack it and open the spectrum inside.' },
  { name: 'an HDF5 file', starts: [0x89, 0x48, 0x44, 0x46], doThis: 'Save the spectrum as FITS or text.' },
  { name: 'an ASDF file', starts: [0x23, 0x41, 0x53, 0x44, 0x46], doThis: 'Save the spectrum as FITS or text.' },
  { name: 'a NumPy array', starts: [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59], doThis: 'Save the spectrum as FITS or text.' },
  { name: 'a PDF document', starts: [0x25, 0x50, 0x44, 0x46, 0x2d], doThis: 'Ask for the spectrum itself, as FITS or text.' },
  { name: 'a PNG picture', starts: [0x89, 0x50, 0x4e, 0x47], doThis: 'A picture holds no samples: open the spectrum itself.' },
  { name: 'a JPEG picture', starts: [0xff, 0xd8, 0xff], doThis: 'A picture holds no samples: open the spectrum itself.' },
  { name: 'a GIF picture', starts: [0x47, 0x49, 0x46, 0x38], doThis: 'A picture holds no samples: open the spectrum itself.' },
  { name: 'an old Office document', starts: [0xd0, 0xcf, 0x11, 0xe0], doThis: 'Save the sheet as CSV.' },
];

/** Refuses files of known kinds that are no spectra, by name. @throws ProblemError */
export function refuseForeign(head: Uint8Array, file: string): void {
  const foreign = FOREIGN.find(({ starts }) => starts.every((b, i) => head[i] === b));
  if (!foreign) return;
  throw new ProblemError({
    code: 'foreign-format',
    where: { file, byte: 0 },
    found: `it is ${foreign.name}`,
    expected: 'delimited text, ECSV, VOTable or FITS, perhaps packed with gzip',
    doThis: foreign.doThis,
  });
}

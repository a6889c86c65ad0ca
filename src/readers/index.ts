// Bytes -> Spectrum with remarks: delimited text, FITS tables and images (FITS 4.0), gzip. Each refusal is a worded ProblemError.
// Deliberately not here: any guess that is not said; corrections of wavelengths.
export { bytesSource } from './byteSource.ts';
export type { ByteSource, Offer, Reading, ReadingChoices, ReadingControl } from './reading.ts';
export { type MeasuredList, readLineList } from './readLineList.ts';
export { readSpectrum } from './readSpectrum.ts';

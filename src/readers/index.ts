// Bytes -> Spectrum: delimited text, ECSV, IPAC tables, VOTable, FITS 4.0 images and tables, gzip. Each refusal is a typed, worded problem; each
// assumption a remark with its reason. Not here: what the lines are. Standards: FITS 4.0 (2018) and its WCS papers, VOTable 1.5, VOUnits 1.1.
export { bytesSource } from './byteSource.ts';
export type { ByteSource, Fact, Offer, Reading, ReadingChoices, ReadingControl } from './reading.ts';
export { type LineListReading, readLineList } from './readLineList.ts';
export { readSpectrum } from './readSpectrum.ts';

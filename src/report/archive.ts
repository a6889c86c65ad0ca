import { strToU8, zipSync } from 'fflate';

/** Files of an archive by their path inside it. */
export type ArchiveFiles = Readonly<Record<string, string | Uint8Array>>;

/** The only time that a file of an archive bears, so that the same files give the same bytes: ZIP counts from 1980. */
const NO_TIME = new Date(1980, 0, 1, 0, 0, 0);

/** One ZIP archive (APPNOTE 6.3, deflate) of all files, in the order of their paths. */
export function zipArchive(files: ArchiveFiles): Uint8Array<ArrayBuffer> {
  const entries = Object.entries(files).sort(([a], [b]) => (a < b ? -1 : 1));
  const bytes = Object.fromEntries(entries.map(([path, content]) => [path, typeof content === 'string' ? strToU8(content) : content]));
  return new Uint8Array(zipSync(bytes, { level: 6, mtime: NO_TIME }));
}

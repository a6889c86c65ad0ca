import { readFileSync } from 'node:fs';
import { type FileHandle, open } from 'node:fs/promises';
import { basename, dirname, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type AtomicData, loadAtomicData } from '../engine/index.ts';
import { ProblemError } from '../problems/index.ts';
import type { ByteSource } from '../readers/index.ts';

/** The line list that comes with the program. */
export const openAtomicData = (): AtomicData => loadAtomicData(readShipped('atomic.bin'));

/** A file as it lies beside the program: in `public` of the source tree, in the built page beside the built terminal. */
export function readShipped(name: string): Uint8Array {
  const here = dirname(fileURLToPath(import.meta.url));
  for (const folder of ['../../public', '../web', '../../dist/web']) {
    const bytes = readIfThere(resolve(here, folder, name));
    if (bytes) return bytes;
  }
  throw new ProblemError({
    code: 'no-line-list',
    where: { file: `public/${name}` },
    found: 'a file that comes with the program is missing',
    doThis: 'Run: npm run data',
  });
}

function readIfThere(path: string): Uint8Array | undefined {
  try {
    return new Uint8Array(readFileSync(path));
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}

/** Opens a file for reading by slices, hands it to `work` and closes it. @throws ProblemError when it cannot be opened */
export async function withFile<T>(path: string, work: (source: ByteSource) => Promise<T>): Promise<T> {
  const handle = await openFile(path);
  try {
    const { size } = await handle.stat();
    const read = async (start: number, end: number) => {
      const bytes = new Uint8Array(Math.max(0, Math.min(end, size) - start));
      let done = 0;
      while (done < bytes.length) {
        const { bytesRead } = await handle.read(bytes, done, bytes.length - done, start + done);
        if (bytesRead === 0) break;
        done += bytesRead;
      }
      return bytes.subarray(0, done);
    };
    return await work({ name: basename(path), size, read });
  } finally {
    await handle.close();
  }
}

async function openFile(path: string): Promise<FileHandle> {
  try {
    const handle = await open(path, 'r');
    if ((await handle.stat()).isFile()) return handle;
    await handle.close();
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    throw new ProblemError({
      code: 'cannot-open',
      where: { file: path },
      found: code === 'ENOENT' ? 'there is no such file' : `it cannot be opened (${code})`,
    });
  }
  throw new ProblemError({ code: 'cannot-open', where: { file: path }, found: 'it is not a file' });
}

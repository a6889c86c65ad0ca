import { ProblemError } from '../problems/index.ts';
import { bytesSource } from './byteSource.ts';
import type { ByteSource, ReadingControl } from './reading.ts';

/** Bytes a packed file may unpack to. */
export const MOST_UNPACKED = 1 << 30;
const SLICE = 1 << 20;

/**
 * Unpacks a gzip source (RFC 1952) into memory, slice by slice.
 *
 * @throws ProblemError when it is damaged or unpacks to more than `limit` bytes
 */
export async function gunzip(source: ByteSource, control: ReadingControl, limit = MOST_UNPACKED): Promise<ByteSource> {
  const stream = new DecompressionStream('gzip');
  const writer = stream.writable.getWriter();
  const reader = stream.readable.getReader();
  const chunks: Uint8Array[] = [];
  let size = 0;
  let failure: unknown;
  const feed = async () => {
    for (let start = 0; start < source.size; start += SLICE) {
      const bytes = await source.read(start, Math.min(source.size, start + SLICE));
      if (bytes.length === 0) break;
      await writer.write(new Uint8Array(bytes));
      control.progress?.((0.5 * start) / source.size);
    }
    await writer.close();
  };
  const feeding = feed().catch((error: unknown) => {
    failure ??= error;
  });
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done || !value) break;
      control.signal?.throwIfAborted();
      size += value.length;
      if (size > limit) throw tooLarge(source.name, limit);
      chunks.push(value);
    }
  } catch (error) {
    await reader.cancel().catch(() => undefined);
    await writer.abort().catch(() => undefined);
    await feeding;
    if (error instanceof ProblemError || control.signal?.aborted) throw error;
    throw damaged(source.name, size);
  }
  await feeding;
  if (failure !== undefined) throw damaged(source.name, size);
  return bytesSource(source.name.replace(/\.gz$/i, ''), joined(chunks, size));
}

function joined(chunks: readonly Uint8Array[], size: number): Uint8Array {
  const all = new Uint8Array(size);
  let at = 0;
  for (const chunk of chunks) {
    all.set(chunk, at);
    at += chunk.length;
  }
  return all;
}

const damaged = (file: string, size: number) =>
  new ProblemError({
    code: 'damaged-gzip',
    where: { file },
    found: `the gzip data end or break after ${size} unpacked bytes`,
    expected: 'a whole gzip file',
    doThis: 'Fetch the file again.',
  });

const tooLarge = (file: string, limit: number) =>
  new ProblemError({
    code: 'unpacks-too-large',
    where: { file },
    found: `it unpacks to more than ${Math.round(limit / 1e6)} MB`,
    expected: 'a spectrum',
    doThis: 'Unpack the file on disk and open what is in it.',
  });

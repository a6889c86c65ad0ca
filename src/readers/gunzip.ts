import { ProblemError } from '../problems/index.ts';
import { bytesSource } from './byteSource.ts';
import type { ByteSource } from './reading.ts';

/** Decompression stops here, bytes: a small file can promise terabytes. */
const MOST_BYTES = 1 << 30;
const CHUNK = 1 << 20;

/** A gzip file as a source of what is in it (in memory). Anything else comes back as it is. */
export async function gunzip(source: ByteSource): Promise<ByteSource> {
  const head = await source.read(0, 2);
  if (head[0] !== 0x1f || head[1] !== 0x8b) return source;
  const fail = (found: string): never => {
    throw new ProblemError({
      code: 'bad-gzip',
      where: { file: source.name },
      found,
      expected: 'a whole gzip file',
      doThis: 'Copy the file once more, or decompress it first.',
    });
  };
  const stream = new DecompressionStream('gzip');
  const writer = stream.writable.getWriter();
  const feeding = (async () => {
    for (let at = 0; at < source.size; at += CHUNK) await writer.write(await source.read(at, Math.min(source.size, at + CHUNK)));
    await writer.close();
  })();
  // a broken stream fails on both ends: the reader's failure is the one that is told
  feeding.catch(() => undefined);
  const reader = stream.readable.getReader();
  const parts: Uint8Array[] = [];
  let total = 0;
  for (;;) {
    const { done, value } = await reader
      .read()
      .catch((error: unknown) => fail(`the compressed data are broken (${error instanceof Error ? error.message : String(error)})`));
    if (done || !value) break;
    total += value.length;
    if (total > MOST_BYTES) {
      await reader.cancel();
      fail(`more than ${MOST_BYTES} bytes after decompression`);
    }
    parts.push(value);
  }
  const whole = new Uint8Array(total);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return bytesSource(source.name.replace(/\.gz$/i, ''), whole);
}

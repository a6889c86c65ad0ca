import { sha256 } from '@noble/hashes/sha2.js';
import type { ByteSource } from '../readers/index.ts';

/** Bytes hashed at once: a huge file never stands in memory as a whole. */
const SLICE = 1 << 22;

/** SHA-256 (FIPS 180-4) of the original bytes, 64 hex digits: the proof of which file a table came from. */
export async function sourceHash(source: ByteSource, progress?: (share: number) => void, signal?: AbortSignal): Promise<string> {
  const hash = sha256.create();
  for (let start = 0; start < source.size; start += SLICE) {
    signal?.throwIfAborted();
    hash.update(await source.read(start, Math.min(source.size, start + SLICE)));
    progress?.(start / source.size);
  }
  return Array.from(hash.digest(), (byte) => byte.toString(16).padStart(2, '0')).join('');
}

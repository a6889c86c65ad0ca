import type { ByteSource } from './reading.ts';

/** A source over bytes that are already in memory. */
export const bytesSource = (name: string, bytes: Uint8Array): ByteSource => ({
  name,
  size: bytes.length,
  read: async (start, end) => bytes.subarray(start, Math.min(end, bytes.length)),
});

/** Bytes before the first place where a chunk may stand: the signature and the head (IHDR, 13 bytes and its frame). */
const AFTER_HEAD = 8 + 25;
/** Unit of `pHYs`: the metre. */
const METRE = 1;

/**
 * A PNG that says how large it is meant to be printed: the same picture with a `pHYs` chunk (PNG specification, third edition, 11.3.4.3).
 *
 * @param png a whole PNG without such a chunk, as canvases make them
 * @throws TypeError when the bytes are no PNG
 */
export function withResolution(png: Uint8Array, dotsPerMm: number): Uint8Array<ArrayBuffer> {
  if (png.length < AFTER_HEAD || png[0] !== 0x89 || String.fromCharCode(...png.subarray(12, 16)) !== 'IHDR')
    throw new TypeError('not a PNG');
  const chunk = new Uint8Array(12 + 9);
  const view = new DataView(chunk.buffer);
  const dotsPerMetre = Math.round(dotsPerMm * 1000);
  view.setUint32(0, 9);
  chunk.set(
    [...'pHYs'].map((c) => c.charCodeAt(0)),
    4,
  );
  view.setUint32(8, dotsPerMetre);
  view.setUint32(12, dotsPerMetre);
  chunk[16] = METRE;
  view.setUint32(17, crc32(chunk.subarray(4, 17)));
  const whole = new Uint8Array(png.length + chunk.length);
  whole.set(png.subarray(0, AFTER_HEAD));
  whole.set(chunk, AFTER_HEAD);
  whole.set(png.subarray(AFTER_HEAD), AFTER_HEAD + chunk.length);
  return whole;
}

/** Reversed polynomial of the checksum that PNG takes from ISO 3309. */
const POLYNOMIAL = 0xedb88320;

function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let bit = 0; bit < 8; bit++) crc = crc & 1 ? (crc >>> 1) ^ POLYNOMIAL : crc >>> 1;
  }
  return (crc ^ 0xffffffff) >>> 0;
}

import { BUNDLE_MAGIC, BUNDLE_SCHEMA, type BundleHeader } from './bundleFormat.ts';

/** The sections of an opened bundle; numbers are views into the bytes, text is decoded when first asked for. */
export interface Bundle {
  readonly header: BundleHeader;
  readonly u8: (name: string) => Uint8Array;
  readonly i8: (name: string) => Int8Array;
  readonly u16: (name: string) => Uint16Array;
  readonly i16: (name: string) => Int16Array;
  readonly u32: (name: string) => Uint32Array;
  readonly f32: (name: string) => Float32Array;
  readonly f64: (name: string) => Float64Array;
  readonly text: (name: string) => readonly string[];
}

/**
 * Opens the bytes of `atomic.bin` (uncompressed).
 *
 * @throws RangeError when the bytes are no bundle or one of another schema: the program was built with other data, a fault of ours
 */
export function openBundle(bytes: Uint8Array): Bundle {
  const decoder = new TextDecoder();
  const at = BUNDLE_MAGIC.length;
  if (bytes.length < at + 4 || decoder.decode(bytes.subarray(0, at)) !== BUNDLE_MAGIC) throw new RangeError('not a bundle of atomic data');
  // typed-array views need an aligned start: copy only when the bytes came as a slice of something else
  const own = bytes.byteOffset % 8 === 0 ? bytes : bytes.slice();
  const headLength = new DataView(own.buffer, own.byteOffset).getUint32(at, true);
  const header: BundleHeader = JSON.parse(decoder.decode(own.subarray(at + 4, at + 4 + headLength)));
  if (header.schema !== BUNDLE_SCHEMA) throw new RangeError(`atomic data of schema ${header.schema}, this program reads ${BUNDLE_SCHEMA}`);
  const start = own.byteOffset + ((at + 4 + headLength + 7) & ~7);
  const find = (name: string, type: string): [ArrayBufferLike, number, number] => {
    const section = header.sections[name];
    if (section === undefined || section.type !== type) throw new RangeError(`atomic data without section ${name} (${type})`);
    return [own.buffer, start + section.offset, section.count];
  };
  const texts = new Map<string, readonly string[]>();
  return {
    header,
    u8: (name) => new Uint8Array(...find(name, 'u8')),
    i8: (name) => new Int8Array(...find(name, 'i8')),
    u16: (name) => new Uint16Array(...find(name, 'u16')),
    i16: (name) => new Int16Array(...find(name, 'i16')),
    u32: (name) => new Uint32Array(...find(name, 'u32')),
    f32: (name) => new Float32Array(...find(name, 'f32')),
    f64: (name) => new Float64Array(...find(name, 'f64')),
    text: (name) => {
      let pool = texts.get(name);
      if (pool === undefined) {
        const [, offset, count] = find(name, 'text');
        pool = decoder.decode(own.subarray(offset - own.byteOffset, offset - own.byteOffset + count)).split('\n');
        texts.set(name, pool);
      }
      return pool;
    },
  };
}

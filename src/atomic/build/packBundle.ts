import { BUNDLE_MAGIC, BUNDLE_SCHEMA, type BundleHeader, type SectionType } from '../bundleFormat.ts';

export type Section =
  | { readonly type: Exclude<SectionType, 'text'>; readonly values: readonly number[] }
  | { readonly type: 'text'; readonly values: readonly string[] };

const WIDTH: Readonly<Record<SectionType, number>> = { u8: 1, i8: 1, u16: 2, i16: 2, u32: 4, f32: 4, f64: 8, text: 1 };
const RANGE: Partial<Record<SectionType, readonly [number, number]>> = {
  u8: [0, 255],
  i8: [-128, 127],
  u16: [0, 65_535],
  i16: [-32_768, 32_767],
  u32: [0, 4_294_967_295],
};

function bytesOf(name: string, section: Section): Uint8Array {
  if (section.type === 'text') return new TextEncoder().encode(section.values.join('\n'));
  const bytes = new Uint8Array(section.values.length * WIDTH[section.type]);
  const view = new DataView(bytes.buffer);
  const range = RANGE[section.type];
  section.values.forEach((value, i) => {
    if (range && !(Number.isInteger(value) && value >= range[0] && value <= range[1]))
      throw new Error(`section ${name}: ${value} does not fit ${section.type}`);
    const at = i * WIDTH[section.type];
    if (section.type === 'u8') view.setUint8(at, value);
    else if (section.type === 'i8') view.setInt8(at, value);
    else if (section.type === 'u16') view.setUint16(at, value, true);
    else if (section.type === 'i16') view.setInt16(at, value, true);
    else if (section.type === 'u32') view.setUint32(at, value, true);
    else if (section.type === 'f32') view.setFloat32(at, value, true);
    else view.setFloat64(at, value, true);
  });
  return bytes;
}

/** Magic word, length of the header, header as JSON, then the sections, each on a multiple of 8 bytes; little-endian. */
export function packBundle(counts: BundleHeader['counts'], inputsHash: string, sections: Readonly<Record<string, Section>>): Uint8Array {
  const names = Object.keys(sections).sort();
  const packed = names.map((name) => bytesOf(name, sections[name]));
  let offset = 0;
  const directory: Record<string, { type: SectionType; offset: number; count: number }> = {};
  names.forEach((name, i) => {
    const section = sections[name];
    directory[name] = { type: section.type, offset, count: section.type === 'text' ? packed[i].length : section.values.length };
    offset = (offset + packed[i].length + 7) & ~7;
  });
  const header: BundleHeader = { schema: BUNDLE_SCHEMA, inputsHash, counts, sections: directory };
  const head = new TextEncoder().encode(JSON.stringify(header));
  const start = (BUNDLE_MAGIC.length + 4 + head.length + 7) & ~7;
  const out = new Uint8Array(start + offset);
  out.set(new TextEncoder().encode(BUNDLE_MAGIC), 0);
  new DataView(out.buffer).setUint32(BUNDLE_MAGIC.length, head.length, true);
  out.set(head, BUNDLE_MAGIC.length + 4);
  names.forEach((name, i) => {
    out.set(packed[i], start + directory[name].offset);
  });
  return out;
}

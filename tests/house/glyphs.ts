// Outlines of the characters that printed figures use: `npx tsx tests/house/glyphs.ts` writes src/report/figures/glyphs.ts. Figures hold their text as paths, so
// that they look the same in every program and need no font. Source Sans 3 by Adobe, SIL Open Font License 1.1: outlines may be embedded in documents.
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import opentype from 'opentype.js';

const LATIN = ' !"#$%&\'()*+,-./0123456789:;<=>?@ABCDEFGHIJKLMNOPQRSTUVWXYZ[\\]^_`abcdefghijklmnopqrstuvwxyz{|}~°±·×Åµ–−';
const GREEK = 'αβγδλστΔΩ';
const folder = fileURLToPath(new URL('../../node_modules/@fontsource/source-sans-3/files/', import.meta.url));
const fontOf = (subset: string) => {
  const bytes = readFileSync(`${folder}source-sans-3-${subset}-400-normal.woff`);
  return opentype.parse(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength));
};

/** Advance and outline (1000 units an em, y down) of every character; `−` is drawn as `–` where the font has none. */
export function glyphsFile(): string {
  const rows: string[] = [];
  for (const [subset, characters] of [
    ['latin', LATIN],
    ['greek', GREEK],
  ] as const) {
    const font = fontOf(subset);
    const em = 1000 / font.unitsPerEm;
    for (const character of characters) {
      const named = font.charToGlyph(character);
      const glyph = named.index === 0 && character === '−' ? font.charToGlyph('–') : named;
      if (glyph.index === 0) throw new Error(`the ${subset} font has no ${character}`);
      rows.push(
        `  ${JSON.stringify(character)}: [${Math.round((glyph.advanceWidth ?? 0) * em)}, '${outline(glyph.getPath(0, 0, 1000).commands)}'],`,
      );
    }
  }
  return [
    '// Made by tests/house/glyphs.ts from Source Sans 3 (Adobe, SIL Open Font License 1.1); do not edit.',
    '/** Advance width and outline of each character, 1000 units an em, y down from the baseline. */',
    'export const GLYPHS: Readonly<Record<string, readonly [number, string]>> = {',
    ...rows,
    '};',
    '',
  ].join('\n');
}

function outline(commands: readonly opentype.PathCommand[]): string {
  const n = (value: number) => String(Math.round(value));
  return commands
    .map((c) => {
      if (c.type === 'M' || c.type === 'L') return `${c.type}${n(c.x)} ${n(c.y)}`;
      if (c.type === 'Q') return `Q${n(c.x1)} ${n(c.y1)} ${n(c.x)} ${n(c.y)}`;
      if (c.type === 'C') return `C${n(c.x1)} ${n(c.y1)} ${n(c.x2)} ${n(c.y2)} ${n(c.x)} ${n(c.y)}`;
      return 'Z';
    })
    .join('');
}

if (process.argv[1] === fileURLToPath(import.meta.url))
  writeFileSync(fileURLToPath(new URL('../../src/report/figures/glyphs.ts', import.meta.url)), glyphsFile());

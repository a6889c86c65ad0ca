import type { InlineText } from '../inline.ts';
import { GLYPHS } from './glyphs.ts';

/** Raised and lowered pieces: size and shift of the baseline, in ems of the line. */
const SMALL = 0.7;
const RAISE = 0.36;
const LOWER = 0.16;
const SMALL_CAPS = 0.78;
const MISSING = '?';

/** Text turned into outlines, with its width, in the unit of `size`. */
export interface TextOutline {
  readonly width: number;
  /** SVG group contents, baseline at the origin. */
  readonly svg: string;
}

/** Sets a line of text: figures hold no fonts. A character that is not among the outlines becomes a question mark. */
export function outlineText(pieces: InlineText | string, size: number): TextOutline {
  let x = 0;
  const paths: string[] = [];
  const set = (text: string, share: number, shift: number) => {
    const scale = (size * share) / 1000;
    for (const character of text.replaceAll('\u00a0', ' ')) {
      const [advance, d] = GLYPHS[character] ?? GLYPHS[MISSING];
      if (d) paths.push(`<path transform="translate(${fixed(x)} ${fixed(-shift * size)}) scale(${fixed(scale, 5)})" d="${d}"/>`);
      x += advance * scale;
    }
  };
  for (const piece of typeof pieces === 'string' ? [pieces] : pieces) {
    if (typeof piece === 'string') set(piece, 1, 0);
    else if ('sup' in piece) {
      // a ring is drawn: few fonts have one
      if (piece.sup === '○') {
        const r = 0.13 * size;
        paths.push(
          `<circle cx="${fixed(x + r * 1.4)}" cy="${fixed(-0.55 * size)}" r="${fixed(r)}" fill="none" stroke="#000" stroke-width="${fixed(0.05 * size)}"/>`,
        );
        x += 2.8 * r;
      } else set(piece.sup, SMALL, RAISE);
    } else if ('sub' in piece) set(piece.sub, SMALL, -LOWER);
    else if ('sign' in piece) set(piece.sign, 1, 0);
    else set(piece.caps.toUpperCase(), SMALL_CAPS, 0);
  }
  return { width: x, svg: paths.join('') };
}

/** A text at a place: `anchor` says which part of it stands there; `turn` in degrees about the place. */
export function textAt(
  pieces: InlineText | string,
  x: number,
  y: number,
  size: number,
  anchor: 'start' | 'middle' | 'end' = 'start',
  turn = 0,
): string {
  const { width, svg } = outlineText(pieces, size);
  const shift = anchor === 'start' ? 0 : anchor === 'middle' ? -width / 2 : -width;
  const rotate = turn === 0 ? '' : ` rotate(${turn})`;
  return `<g transform="translate(${fixed(x)} ${fixed(y)})${rotate} translate(${fixed(shift)} 0)">${svg}</g>`;
}

export const fixed = (value: number, digits = 2) => String(Number(value.toFixed(digits)));

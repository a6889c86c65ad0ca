/** A piece of a printed line: plain text, raised, lowered, in small capitals, or the sign of a quantity, which is set in italics. Every printed form is made from these. */
export type Inline = string | { readonly sup: string } | { readonly sub: string } | { readonly caps: string } | { readonly sign: string };
export type InlineText = readonly Inline[];

/** The pieces as plain text: `[O III]`, `10^5`. */
export const plainText = (pieces: InlineText): string =>
  pieces
    .map((piece) => {
      if (typeof piece === 'string') return piece;
      if ('sup' in piece) return `^${piece.sup}`;
      if ('sub' in piece) return `_${piece.sub}`;
      return 'caps' in piece ? piece.caps : piece.sign;
    })
    .join('');

/** `[O III]` -> `[O`, small capitals `iii`, `]`; the parts of a blend keep their `+`. */
export function ionInline(ion: string): InlineText {
  return ion.split('+').flatMap((part, k): Inline[] => {
    const found = /^(.*?\d?)\s+([IVXL]+)(.*)$/.exec(part.trim());
    const pieces: Inline[] = found
      ? [`${found[1]}\u00a0`, { caps: found[2].toLowerCase() }, ...(found[3] ? [found[3]] : [])]
      : [part.trim()];
    return k === 0 ? pieces : [' + ', ...pieces];
  });
}

import type { Inline, InlineText } from '../../report/index.ts';

/** Pieces of a printed line on the page. */
export function PaperWords({ pieces }: { readonly pieces: InlineText }) {
  // pieces have no name but their place in the line
  const placed = pieces.map((piece, place) => [`${place}`, piece] as const);
  return placed.map(([place, piece]) => <Piece key={place} piece={piece} />);
}

function Piece({ piece }: { readonly piece: Inline }) {
  if (typeof piece === 'string') return <span>{piece}</span>;
  if ('sup' in piece) return <sup>{piece.sup}</sup>;
  if ('sub' in piece) return <sub>{piece.sub}</sub>;
  return 'sign' in piece ? <i>{piece.sign}</i> : <span className="small-caps">{piece.caps}</span>;
}

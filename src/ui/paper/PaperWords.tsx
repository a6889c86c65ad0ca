import type { InlineText } from '../../report/index.ts';

/** Pieces of a printed line on the page. */
export function PaperWords({ pieces }: { readonly pieces: InlineText }) {
  return pieces.map((piece, k) => {
    const key = `${k} ${JSON.stringify(piece)}`;
    if (typeof piece === 'string') return <span key={key}>{piece}</span>;
    if ('sup' in piece) return <sup key={key}>{piece.sup}</sup>;
    return 'sub' in piece ? (
      <sub key={key}>{piece.sub}</sub>
    ) : (
      <span key={key} className="small-caps">
        {piece.caps}
      </span>
    );
  });
}

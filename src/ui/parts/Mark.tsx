import type { Standing } from '../desk/deskRows.ts';

const SHAPES: Record<Standing, { d: string; filled: boolean }> = {
  open: { d: 'M4 4h8v8H4Z', filled: false },
  accepted: { d: 'M3.500 3.500h9v9h-9Z', filled: true },
  rejected: { d: 'M4 4l8 8M12 4l-8 8', filled: false },
  unidentified: { d: 'M8 2.500 13.500 8 8 13.500 2.500 8Z', filled: false },
  artefact: { d: 'M2.500 4h11L8 13.500Z', filled: false },
};

/** The sign of a verdict, the same as on the spectrum; a ring about it says that the line needs thin gas. */
export function Mark({ standing, ring = false }: { standing: Standing; ring?: boolean }) {
  const shape = SHAPES[standing];
  return (
    <svg className="mark" viewBox="0 0 16 16" width="12" height="12" aria-hidden="true">
      <path
        d={shape.d}
        className={shape.filled ? 'filled' : undefined}
        transform={ring ? 'translate(8 8) scale(.62) translate(-8 -8)' : undefined}
      />
      {ring && <circle cx="8" cy="8" r="7" />}
    </svg>
  );
}

/** The small open ring of a thin-gas line. */
export function Ring({ title }: { title: string }) {
  return (
    <svg className="mark ring" viewBox="0 0 16 16" width="10" height="10" role="img" aria-label={title}>
      <title>{title}</title>
      <circle cx="8" cy="8" r="6" />
    </svg>
  );
}

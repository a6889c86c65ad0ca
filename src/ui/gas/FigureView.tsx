import type { Figure, Shape } from './figure.ts';

/** A figure on the page, in the colours of the page. */
export function FigureView({ figure }: { readonly figure: Figure }) {
  const { width, height, title, shapes } = figure;
  // shapes have no name but their place in the drawing
  const inOrder = shapes.map((shape, place) => [`${place} ${shape.draw}`, shape] as const);
  return (
    <svg className="figure" width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={title}>
      {inOrder.map(([key, shape]) => (
        <ShapeView key={key} shape={shape} />
      ))}
    </svg>
  );
}

function ShapeView({ shape }: { readonly shape: Shape }) {
  switch (shape.draw) {
    case 'path':
      return <path d={shape.d} fill="none" stroke={`var(--${shape.ink})`} strokeWidth={shape.width ?? 1} strokeDasharray={shape.dash} />;
    case 'area':
      return <path d={shape.d} fill={`var(--${shape.ink})`} fillOpacity={shape.share} />;
    case 'dot':
      return (
        <circle
          cx={shape.x}
          cy={shape.y}
          r={shape.r}
          fill={shape.filled ? `var(--${shape.ink})` : 'var(--surface)'}
          stroke={`var(--${shape.ink})`}
        />
      );
    case 'text':
      return (
        <text
          x={shape.x}
          y={shape.y}
          fill={`var(--${shape.ink ?? 'muted'})`}
          textAnchor={shape.anchor}
          fontWeight={shape.bold ? 600 : undefined}
          transform={shape.turned ? `rotate(-90 ${shape.x} ${shape.y})` : undefined}
        >
          {shape.text}
        </text>
      );
  }
}

import type { Figure, InkName, Shape } from './figure.ts';

/** Colours of a figure in a file: those of the light page, whatever the page shows (tokens.css). */
const PAPER: Record<InkName, string> = {
  ink: '#1b2429',
  muted: '#566068',
  faint: '#8d958f',
  hairline: '#dcd8cf',
  fit: '#1f6f8f',
  accent: '#b1450b',
  band: '#f4f2ec',
  surface: '#ffffff',
};
const FONT = '"Helvetica Neue", Arial, "Liberation Sans", sans-serif';
const FONT_PX = 11;

/** A figure as an SVG file that stands by itself. */
export function figureSvg({ width, height, title, shapes }: Figure): string {
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" font-family='${FONT}' font-size="${FONT_PX}">`,
    `<title>${escaped(title)}</title>`,
    `<rect width="${width}" height="${height}" fill="${PAPER.surface}"/>`,
    ...shapes.map(shapeSvg),
    '</svg>',
    '',
  ].join('\n');
}

function shapeSvg(shape: Shape): string {
  const colour = PAPER[shape.ink ?? 'muted'];
  switch (shape.draw) {
    case 'path':
      return `<path d="${shape.d}" fill="none" stroke="${colour}" stroke-width="${shape.width ?? 1}"${shape.dash ? ` stroke-dasharray="${shape.dash}"` : ''}/>`;
    case 'area':
      return `<path d="${shape.d}" fill="${colour}" fill-opacity="${shape.share}"/>`;
    case 'dot':
      return `<circle cx="${shape.x.toFixed(1)}" cy="${shape.y.toFixed(1)}" r="${shape.r}" fill="${shape.filled ? colour : PAPER.surface}" stroke="${colour}"/>`;
    case 'text': {
      const [x, y] = [shape.x.toFixed(1), shape.y.toFixed(1)];
      const turned = shape.turned ? ` transform="rotate(-90 ${x} ${y})"` : '';
      return `<text x="${x}" y="${y}" fill="${colour}"${shape.anchor ? ` text-anchor="${shape.anchor}"` : ''}${shape.bold ? ' font-weight="600"' : ''}${turned}>${escaped(shape.text)}</text>`;
    }
  }
}

const escaped = (text: string) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');

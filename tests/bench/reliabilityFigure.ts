import { type Bin, binsOf, type Claims } from '../identify/reliability.ts';

const SIZE = 420;
const LEFT = 56;
const TOP = 24;
const WIDTH = SIZE + LEFT + 24;
const HEIGHT = SIZE + TOP + 56;
/** Bins with fewer names are not drawn. */
const POPULATED = 60;
const TOLERANCE = 0.05;

const x = (p: number) => (LEFT + SIZE * p).toFixed(1);
const y = (p: number) => (TOP + SIZE * (1 - p)).toFixed(1);

/** Claimed probability against the share of right names, as SVG: one mark a populated bin with one sigma of its count, the band of tolerance, both sets. */
export function reliabilityFigure(usual: Claims, aside: Claims): string {
  const ticks = [0, 0.2, 0.4, 0.6, 0.8, 1];
  const axes = ticks.flatMap((t) => [
    `<path d="M${x(t)} ${y(0)}v5M${x(0)} ${y(t)}h-5"/>`,
    `<text x="${x(t)}" y="${(Number(y(0)) + 20).toFixed(1)}" text-anchor="middle">${t}</text>`,
    `<text x="${(LEFT - 10).toFixed(1)}" y="${(Number(y(t)) + 4).toFixed(1)}" text-anchor="end">${t}</text>`,
  ]);
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${HEIGHT}" font-family="sans-serif" font-size="13" stroke="#222" fill="none">`,
    '<title>Claimed probability of the first name against the share of right ones, simulated nebulae</title>',
    `<rect width="${WIDTH}" height="${HEIGHT}" fill="#fff" stroke="none"/>`,
    `<path d="M${x(0)} ${y(TOLERANCE)}L${x(1 - TOLERANCE)} ${y(1)}H${x(1)}V${y(1 - TOLERANCE)}L${x(TOLERANCE)} ${y(0)}H${x(0)}Z" fill="#e4e9ee" stroke="none"/>`,
    `<rect x="${x(0)}" y="${y(1)}" width="${SIZE}" height="${SIZE}"/>`,
    `<path d="M${x(0)} ${y(0)}L${x(1)} ${y(1)}" stroke-dasharray="4 4"/>`,
    ...axes.map((a) => (a.startsWith('<text') ? a.replace('<text', '<text fill="#222" stroke="none"') : a)),
    `<text x="${x(0.5)}" y="${HEIGHT - 12}" text-anchor="middle" fill="#222" stroke="none">claimed probability of the first name</text>`,
    `<text transform="translate(16 ${y(0.5)}) rotate(-90)" text-anchor="middle" fill="#222" stroke="none">share of right names</text>`,
    ...populated(usual).map((bin) => markOf(bin, true)),
    ...populated(aside).map((bin) => markOf(bin, false)),
    ...legend(usual, aside),
    '</svg>',
    '',
  ].join('\n');
}

const populated = ({ claims }: Claims) => binsOf(claims).filter(({ count }) => count >= POPULATED);

function markOf({ claimed, right, count }: Bin, filled: boolean): string {
  const sigma = Math.sqrt((right * (1 - right)) / count);
  const bar = `<path d="M${x(claimed)} ${y(Math.min(1, right + sigma))}V${y(right - sigma)}"/>`;
  const note = `<title>claimed ${claimed.toFixed(3)}, right ${right.toFixed(3)} of ${count}</title>`;
  return filled
    ? `${bar}<circle cx="${x(claimed)}" cy="${y(right)}" r="5" fill="#1b5e8c">${note}</circle>`
    : `${bar}<rect x="${(Number(x(claimed)) - 4.5).toFixed(1)}" y="${(Number(y(right)) - 4.5).toFixed(1)}" width="9" height="9" fill="#fff">${note}</rect>`;
}

const legend = (usual: Claims, aside: Claims): string[] => [
  `<circle cx="${x(0.06)}" cy="${y(0.95)}" r="5" fill="#1b5e8c"/>`,
  `<text x="${x(0.09)}" y="${(Number(y(0.95)) + 4).toFixed(1)}" fill="#222" stroke="none">${usual.claims.length} names of ${usual.spectra} nebulae</text>`,
  `<rect x="${(Number(x(0.06)) - 4.5).toFixed(1)}" y="${(Number(y(0.89)) - 4.5).toFixed(1)}" width="9" height="9" fill="#fff"/>`,
  `<text x="${x(0.09)}" y="${(Number(y(0.89)) + 4).toFixed(1)}" fill="#222" stroke="none">${aside.claims.length} of ${aside.spectra} outside those ranges</text>`,
];

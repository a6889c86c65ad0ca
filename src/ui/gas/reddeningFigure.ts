import type { Reddening, ReddeningLine } from '../../plasma/index.ts';
import { place, svgPath } from '../plot/svgPath.ts';
import { words } from '../words.ts';
import { axesShapes, errorBar, type Figure, frameOf, px, roomFor, type Shape } from './figure.ts';

const { reddening: label } = words.gas;
const HEIGHT = 250;
const CROSS_PX = 4;

/** Observed over case B against the extinction law: one slope, c(H beta), through all hydrogen lines. Outliers are crossed; lines that were not fitted are left out. */
export function reddeningFigure(reddening: Reddening, width: number): Figure {
  const points = reddening.lines.filter((line) => line.state !== 'unusable');
  const height = HEIGHT;
  const logs = points.map((line) => Math.log10(line.observed / line.expected));
  const errs = points.map((line) => line.observedErr / line.observed / Math.LN10);
  const [fLow, fHigh] = roomFor(
    points.map((line) => line.f),
    0.08,
    0.05,
  );
  const c = reddening.cHbeta?.value ?? 0;
  const cErr = reddening.cHbeta?.err ?? 0;
  const [low, high] = roomFor([...logs, -c * fLow, -c * fHigh], 0.08, 0.02);
  const x = { low: fLow, high: fHigh, title: label.axisF };
  const y = { low, high, title: label.axisRatio };
  const frame = frameOf(width, height, x, y);
  const ends = [fLow, fHigh];
  const line = (slope: number) =>
    svgPath(
      ends,
      ends.map((f) => -slope * f),
      frame.x,
      frame.y,
    );
  return {
    width,
    height,
    title: label.describe(points.length, c.toFixed(3)),
    shapes: [
      ...axesShapes(frame, x, y),
      { draw: 'path', d: line(c + cErr) + line(c - cErr), ink: 'fit', dash: '3 3' },
      { draw: 'path', d: line(c), ink: 'fit', width: 1.5 },
      ...points.flatMap((point, k): Shape[] => [
        errorBar(frame, point.f, logs[k] - errs[k], logs[k] + errs[k], 'ink'),
        ...signOf(point, place(frame.x, point.f), place(frame.y, logs[k])),
      ]),
    ],
  };
}

/** Used lines are dots, outliers crosses with their name. */
function signOf({ state, label: name }: ReddeningLine, x: number, y: number): Shape[] {
  if (state === 'used') return [{ draw: 'dot', x, y, r: 3, ink: 'ink', filled: true }];
  const d = `M${px(x - CROSS_PX)} ${px(y - CROSS_PX)}L${px(x + CROSS_PX)} ${px(y + CROSS_PX)}M${px(x - CROSS_PX)} ${px(y + CROSS_PX)}L${px(x + CROSS_PX)} ${px(y - CROSS_PX)}`;
  return [
    { draw: 'path', d, ink: 'accent', width: 1.5 },
    { draw: 'text', x: x + 6, y: y - 6, text: name, ink: 'accent' },
  ];
}

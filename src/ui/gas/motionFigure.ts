import type { KinematicPoint, Kinematics, Trend } from '../../plasma/index.ts';
import { place, svgPath } from '../plot/svgPath.ts';
import { words } from '../words.ts';
import { axesShapes, errorBar, type Figure, frameOf, roomFor, type Shape } from './figure.ts';

const { motion: label } = words.gas;
const HEIGHT = 250;

export type MotionY = 'velocity' | 'width';
export type MotionX = 'energy' | 'wavelength';

/** The trend that belongs to a choice of axes. */
export function trendOf(kinematics: Kinematics, y: MotionY, x: MotionX): Trend | undefined {
  if (y === 'velocity') return x === 'energy' ? kinematics.velocityByEnergy : kinematics.velocityByWavelength;
  return x === 'energy' ? kinematics.widthByEnergy : kinematics.widthByWavelength;
}

/** Velocity or width of every line against the energy that made its ion, or against wavelength, with the trend. */
export function motionFigure(kinematics: Kinematics, width: number, yWhat: MotionY, xWhat: MotionX): Figure {
  const points = kinematics.points.flatMap((point) => {
    const y = yWhat === 'velocity' ? point.velocityKms : point.fwhmKms;
    const err = yWhat === 'velocity' ? point.velocityErrKms : point.fwhmErrKms;
    return y === undefined ? [] : [{ x: xOf(point, xWhat), y, err: err ?? 0 }];
  });
  const trend = trendOf(kinematics, yWhat, xWhat);
  const [xLow, xHigh] = roomFor(
    points.map((p) => p.x),
    0.04,
    1,
  );
  const [low, high] = roomFor(middleOf(points.map((p) => p.y)), 0.2, 1);
  const x = { low: xLow, high: xHigh, title: label.axes[xWhat] };
  const y = { low, high, title: label.axes[yWhat] };
  const frame = frameOf(width, HEIGHT, x, y);
  const shown = points.filter((p) => p.y >= low && p.y <= high);
  const line = (at: number) => (trend ? trend.at + trend.slope * (at - trend.about) : 0);
  return {
    width,
    height: HEIGHT,
    title: label.describe(points.length, label.axes[yWhat], label.axes[xWhat]),
    shapes: [
      ...axesShapes(frame, x, y),
      ...(trend
        ? [{ draw: 'path', d: svgPath([xLow, xHigh], [line(xLow), line(xHigh)], frame.x, frame.y), ink: 'fit', width: 1.5 } as const]
        : []),
      ...shown.flatMap((p): Shape[] => [
        errorBar(frame, p.x, p.y - p.err, p.y + p.err, 'faint'),
        { draw: 'dot', x: place(frame.x, p.x), y: place(frame.y, p.y), r: 2.5, ink: 'ink', filled: true },
      ]),
    ],
  };
}

const xOf = (point: KinematicPoint, what: MotionX) => (what === 'energy' ? point.energyEv : point.restVac);

/** Without the wildest values, which would press all others into a line: the middle 96 of 100. */
function middleOf(values: readonly number[]): number[] {
  const sorted = values.toSorted((a, b) => a - b);
  const cut = Math.floor(sorted.length * 0.02);
  return sorted.slice(cut, sorted.length - cut);
}

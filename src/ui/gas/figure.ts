import { evenTicks } from '../plot/evenTicks.ts';
import { type Axis, place } from '../plot/svgPath.ts';

/** Names of colour tokens a figure may use. */
export type InkName = 'ink' | 'muted' | 'faint' | 'hairline' | 'fit' | 'accent' | 'band' | 'surface';

/** One thing drawn; pixels of the figure. */
export type Shape =
  | { readonly draw: 'path'; readonly d: string; readonly ink: InkName; readonly width?: number; readonly dash?: string }
  | { readonly draw: 'area'; readonly d: string; readonly ink: InkName; readonly share: number }
  | {
      readonly draw: 'text';
      readonly x: number;
      readonly y: number;
      readonly text: string;
      readonly ink?: InkName;
      readonly anchor?: 'start' | 'middle' | 'end';
      readonly turned?: boolean;
      readonly bold?: boolean;
    }
  | { readonly draw: 'dot'; readonly x: number; readonly y: number; readonly r: number; readonly ink: InkName; readonly filled: boolean };

/** A picture as plain data: the page draws it with its tokens, a file with fixed colours. */
export interface Figure {
  readonly width: number;
  readonly height: number;
  /** What it shows, a sentence for those who cannot see it. */
  readonly title: string;
  readonly shapes: readonly Shape[];
}

/** A frame with axes: where numbers go. */
export interface Frame {
  readonly x: Axis;
  readonly y: Axis;
  readonly width: number;
  readonly height: number;
}

export interface AxisChoice {
  readonly low: number;
  readonly high: number;
  readonly title: string;
  /** Where ticks stand and what they say; even round numbers when absent. */
  readonly ticks?: readonly (readonly [number, string])[];
}

const LEFT = 52;
const RIGHT = 12;
const TOP = 10;
const BOTTOM = 36;
const X_TICK_PX = 64;
const Y_TICK_PX = 40;
const TICK_PX = 4;

export function frameOf(width: number, height: number, x: AxisChoice, y: AxisChoice): Frame {
  return {
    width,
    height,
    x: { low: x.low, high: x.high, from: LEFT, to: width - RIGHT },
    y: { low: y.low, high: y.high, from: height - BOTTOM, to: TOP },
  };
}

/** Axes with ticks, numbers and titles; faint lines across at the ticks. */
export function axesShapes(frame: Frame, x: AxisChoice, y: AxisChoice): Shape[] {
  const { x: ax, y: ay, height } = frame;
  const xTicks = x.ticks ?? plainTicks(x, (ax.to - ax.from) / X_TICK_PX);
  const yTicks = y.ticks ?? plainTicks(y, (ay.from - ay.to) / Y_TICK_PX);
  const across = [
    ...xTicks.map(([at]) => `M${px(place(ax, at))} ${px(ay.from)}V${px(ay.to)}`),
    ...yTicks.map(([at]) => `M${px(ax.from)} ${px(place(ay, at))}H${px(ax.to)}`),
  ];
  return [
    { draw: 'path', d: across.join(''), ink: 'hairline', width: 0.75 },
    { draw: 'path', d: `M${ax.from} ${ay.to}V${ay.from}H${ax.to}`, ink: 'muted' },
    ...xTicks.map(([at, text]): Shape => ({ draw: 'text', x: place(ax, at), y: ay.from + TICK_PX + 10, text, anchor: 'middle' })),
    ...yTicks.map(([at, text]): Shape => ({ draw: 'text', x: ax.from - TICK_PX, y: place(ay, at) + 4, text, anchor: 'end' })),
    { draw: 'text', x: (ax.from + ax.to) / 2, y: height - 6, text: x.title, anchor: 'middle' },
    { draw: 'text', x: 12, y: (ay.from + ay.to) / 2, text: y.title, anchor: 'middle', turned: true },
  ];
}

const plainTicks = ({ low, high }: AxisChoice, count: number) =>
  evenTicks(low, high, Math.max(2, count)).map((tick) => [tick, text(tick)] as const);
const text = (tick: number) => String(tick).replace('-', '−');
export const px = (value: number) => value.toFixed(1);

/** Ticks at whole powers of ten of an axis that counts logarithms. */
export function powerTicks(low: number, high: number, step = 1): (readonly [number, string])[] {
  const ticks: (readonly [number, string])[] = [];
  for (let log = Math.ceil(low / step) * step; log <= high + 1e-9; log += step) ticks.push([log, `10${raised(log)}`]);
  return ticks;
}

const raised = (power: number) => [...String(power)].map((c) => (c === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)])).join('');

/** Range of values with some air about them. */
export function roomFor(values: readonly number[], share = 0.06, least = 1e-9): [number, number] {
  const finite = values.filter(Number.isFinite);
  if (finite.length === 0) return [0, 1];
  const [low, high] = [Math.min(...finite), Math.max(...finite)];
  const air = Math.max((high - low) * share, least);
  return [low - air, high + air];
}

/** An upright bar of an error, cut at the frame. */
export function errorBar({ x, y }: Frame, at: number, low: number, high: number, ink: InkName): Shape {
  const clip = (value: number) => Math.min(Math.max(place(y, value), y.to), y.from);
  return { draw: 'path', d: `M${px(place(x, at))} ${px(clip(low))}V${px(clip(high))}`, ink };
}

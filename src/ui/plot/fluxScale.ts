import { evenTicks } from './evenTicks.ts';

export type ScaleKind = 'linear' | 'log' | 'asinh';
export const SCALE_KINDS: readonly ScaleKind[] = ['linear', 'log', 'asinh'];

/** How flux is laid out on the vertical axis. */
export interface FluxScale {
  readonly kind: ScaleKind;
  /** Flux -> axis; NaN stays NaN. */
  readonly forward: (flux: number) => number;
  /** Axis -> flux. */
  readonly back: (shown: number) => number;
}

/**
 * @param small a positive flux at the level of the noise: below it a logarithm is cut and asinh becomes linear
 */
export function fluxScale(kind: ScaleKind, small: number): FluxScale {
  switch (kind) {
    case 'linear':
      return { kind, forward: (flux) => flux, back: (shown) => shown };
    case 'log':
      return { kind, forward: (flux) => Math.log10(flux > small ? flux : Number.isNaN(flux) ? flux : small), back: (s) => 10 ** s };
    case 'asinh':
      return { kind, forward: (flux) => Math.asinh(flux / small), back: (shown) => small * Math.sinh(shown) };
  }
}

/** A stretch of less than a decade is ticked evenly. */
const FEWEST_TICKS = 3;

/** Round fluxes for the axis between two fluxes, about `count` of them, ascending. */
export function fluxTicks(scale: FluxScale, low: number, high: number, count: number): number[] {
  if (!(high > low)) return [];
  if (scale.kind === 'linear') return evenTicks(low, high, count);
  const spread = scale.forward(high) - scale.forward(low);
  const kept: number[] = [];
  for (const tick of decadeTicks(low, high)) {
    const last = kept.at(-1);
    if (last === undefined || scale.forward(tick) - scale.forward(last) >= (0.6 * spread) / count) kept.push(tick);
  }
  return kept.length < FEWEST_TICKS ? evenTicks(low, high, count) : kept;
}

/** 1 and 3 of every decade, both signs, and zero. */
function decadeTicks(low: number, high: number): number[] {
  const size = Math.max(Math.abs(low), Math.abs(high));
  const top = Math.ceil(Math.log10(size));
  const positive: number[] = [];
  for (let decade = top - 7; decade <= top; decade++) positive.push(10 ** decade, 3 * 10 ** decade);
  return [...positive.map((t) => -t).reverse(), 0, ...positive].filter((t) => t >= low && t <= high);
}

/** A power of ten to divide flux by, so that the axis shows plain numbers; 0 when they are plain already. */
export function commonExponent(high: number): number {
  const exponent = Math.floor(Math.log10(Math.abs(high) || 1));
  return exponent < -2 || exponent > 4 ? exponent : 0;
}

/** Text of a tick, at most four significant digits and no trailing zeros. */
export const tickText = (flux: number, exponent: number) => String(Number((flux / 10 ** exponent).toPrecision(4))).replace('-', '−');

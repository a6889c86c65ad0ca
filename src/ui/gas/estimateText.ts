import type { Estimate, WithErr } from '../../plasma/index.ts';
import { fixed, powerText, withError } from '../figures.ts';
import { words } from '../words.ts';

/** Digits that an interval leaves of a number: as many decimals as show two figures of its smaller side. */
function roundedTo(value: number, side: number): string {
  const step = 10 ** Math.floor(Math.log10(Math.max(side, 1e-12)) - 1);
  return step >= 1 ? String(Math.round(value / step) * step) : fixed(value, Math.ceil(-Math.log10(step)));
}

/** "11340 +30 −20", "< 380", or why there is nothing. */
export function estimateText(estimate: Estimate, unit: string): string {
  switch (estimate.ended) {
    case 'value': {
      const { value, low, high } = estimate;
      if (high === low) return `${Math.round(value)} ${unit}`;
      const side = Math.min(high - value, value - low) || high - low;
      return `${roundedTo(value, side)} +${roundedTo(high - value, side)} −${roundedTo(value - low, side)} ${unit}`;
    }
    case 'below':
      return `< ${Number(estimate.limit.toPrecision(2))} ${unit}`;
    case 'above':
      return `> ${powerText(estimate.limit, 2)} ${unit}`;
    case 'none':
      return words.gas.noValue;
  }
}

export const errText = (quantity: WithErr | undefined, otherwise = 3): string =>
  quantity ? withError(quantity.value, quantity.err > 0 ? quantity.err : undefined, otherwise) : '–';

/** An abundance with its interval on one power of ten: "2.64 +0.02 −0.01 × 10⁻⁴". */
export function abundanceText(value: number, low: number, high: number): string {
  const exponent = Math.floor(Math.log10(value));
  const unit = 10 ** exponent;
  const side = Math.max(Math.min(high - value, value - low) / unit, 1e-3);
  const digits = Math.max(1, Math.ceil(-Math.log10(side)) + 1);
  const part = (x: number) => fixed(x / unit, Math.min(digits, 3));
  return `${part(value)} +${part(high - value)} −${part(value - low)} × ${powerText(10 ** exponent, 1).replace(/^1 × /, '')}`;
}

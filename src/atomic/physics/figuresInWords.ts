const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
/** Plain figures between these read better than powers of ten. */
const SMALLEST_PLAIN = 0.01;
const LARGEST_PLAIN = 1000;

/** 71000 -> "7.1 × 10⁴", two figures; plain between 0.01 and 1000. */
export function powerOfTen(value: number): string {
  const rounded = Number(value.toPrecision(2));
  if (rounded === 0 || (rounded >= SMALLEST_PLAIN && rounded < LARGEST_PLAIN)) return String(rounded);
  const [mantissa, exponent] = value.toExponential(1).split('e');
  const digits = String(Math.abs(Number(exponent)));
  return `${mantissa} × 10${Number(exponent) < 0 ? '⁻' : ''}${Array.from(digits, (d) => SUPERSCRIPTS[Number(d)]).join('')}`;
}

const UNITS: readonly (readonly [number, string])[] = [
  [31_557_600, 'year'],
  [86_400, 'day'],
  [3600, 'hour'],
  [60, 'minute'],
  [1, 'second'],
  [1e-3, 'millisecond'],
  [1e-6, 'microsecond'],
  [1e-9, 'nanosecond'],
];

/** 36.9 -> "37 seconds", 15000 -> "4.2 hours"; two figures. */
export function duration(seconds: number): string {
  const [size, word] = UNITS.find(([unit]) => seconds >= unit) ?? UNITS[UNITS.length - 1];
  const count = Number((seconds / size).toPrecision(2));
  return `${powerOfTen(count)} ${word}${count === 1 ? '' : 's'}`;
}

/** Decimal places a file may print; more than six do no harm to a centroid. */
const MOST_DECIMALS = 6;
/** An axis agrees with a regular one when no sample is further off than this share of the last printed place. */
const AGREES = 0.55;

/**
 * The wavelengths a rounded axis was made from: files print a regular axis with few digits, and the rounding of a few hundredths of a sample is more than the
 * centroid error of a strong line.
 *
 * @param x Angstrom, ascending
 * @returns the linear or log-linear axis that the printed one agrees with to its last place; undefined when it agrees with neither or is printed finely
 */
export function regularAxis(x: Float64Array): Float64Array | undefined {
  if (x.length < 20) return undefined;
  const place = lastPlace(x);
  if (place === undefined) return undefined;
  const tolerance = AGREES * place;
  return linearAxis(x, tolerance) ?? logLinearAxis(x, tolerance);
}

/** Size of the last printed decimal place that any sample uses; undefined when more than six are used. */
function lastPlace(x: Float64Array): number | undefined {
  let decimals = 0;
  let unit = 1;
  for (let i = 0; i < x.length; i++) {
    while (Math.abs(x[i] * unit - Math.round(x[i] * unit)) >= 1e-6 * Math.max(1, (x[i] * unit) / 1e4)) {
      decimals++;
      if (decimals > MOST_DECIMALS) return undefined;
      unit *= 10;
    }
  }
  return 1 / unit;
}

/** The slope is found from about this many samples: the rounding of their mean is nothing beside that of one. */
const TELLING_SAMPLES = 4000;

function linearAxis(x: Float64Array, tolerance: number): Float64Array | undefined {
  const { start, step } = lineThrough(x, (v) => v);
  const n = x.length;
  if (!(Math.abs(start - x[0]) <= tolerance) || !(Math.abs(start + step * (n - 1) - x[n - 1]) <= tolerance)) return undefined;
  const axis = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    axis[i] = start + step * i;
    if (!(Math.abs(axis[i] - x[i]) <= tolerance)) return undefined;
  }
  return axis;
}

/** A product of ratios is taken up anew from the exponential after so many samples: its rounding stays in the last digits. */
const ANEW = 256;

function logLinearAxis(x: Float64Array, tolerance: number): Float64Array | undefined {
  if (!(x[0] > 0)) return undefined;
  const { start, step } = lineThrough(x, Math.log);
  const n = x.length;
  const ratio = Math.exp(step);
  const axis = new Float64Array(n);
  let value = 0;
  for (let i = 0; i < n; i++) {
    value = i % ANEW === 0 ? Math.exp(start + step * i) : value * ratio;
    axis[i] = value;
    if (!(Math.abs(value - x[i]) <= tolerance)) return undefined;
  }
  return axis;
}

/** Least-squares line through `to` of every few samples: value at sample 0 and growth a sample. */
function lineThrough(x: Float64Array, to: (v: number) => number): { start: number; step: number } {
  const stride = Math.max(1, Math.floor(x.length / TELLING_SAMPLES));
  const used = Math.floor((x.length - 1) / stride) + 1;
  const centre = ((used - 1) * stride) / 2;
  let mean = 0;
  let step = 0;
  let square = 0;
  for (let k = 0; k < used; k++) {
    const value = to(x[k * stride]);
    mean += value / used;
    step += (k * stride - centre) * value;
    square += (k * stride - centre) ** 2;
  }
  step /= square;
  return { start: mean - step * centre, step };
}

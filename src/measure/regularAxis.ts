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
  const place = lastPlace(x);
  if (place === undefined || x.length < 20) return undefined;
  return (
    agreeing(
      x,
      place,
      (v) => v,
      (v) => v,
    ) ?? agreeing(x, place, Math.log, Math.exp)
  );
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

function agreeing(x: Float64Array, place: number, to: (v: number) => number, from: (v: number) => number): Float64Array | undefined {
  const n = x.length;
  const middle = (n - 1) / 2;
  const stride = Math.max(1, Math.floor(n / TELLING_SAMPLES));
  const used = Math.floor((n - 1) / stride) + 1;
  const centre = ((used - 1) * stride) / 2;
  let mean = 0;
  let slope = 0;
  let square = 0;
  for (let k = 0; k < used; k++) {
    const value = to(x[k * stride]);
    mean += value / used;
    slope += (k * stride - centre) * value;
    square += (k * stride - centre) ** 2;
  }
  slope /= square;
  const at = (i: number) => from(mean + slope * (i - centre));
  const agrees = (i: number) => Math.abs(at(i) - x[i]) <= AGREES * place;
  // most axes that do not agree show it here
  if (!agrees(0) || !agrees(n - 1) || !agrees(Math.round(middle))) return undefined;
  const axis = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    axis[i] = at(i);
    if (!(Math.abs(axis[i] - x[i]) <= AGREES * place)) return undefined;
  }
  return axis;
}

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
  for (let decimals = 0; decimals <= MOST_DECIMALS; decimals++) {
    const unit = 10 ** -decimals;
    if (x.every((v) => Math.abs(v / unit - Math.round(v / unit)) < 1e-6 * Math.max(1, v / unit / 1e4))) return unit;
  }
  return undefined;
}

function agreeing(x: Float64Array, place: number, to: (v: number) => number, from: (v: number) => number): Float64Array | undefined {
  const n = x.length;
  const middle = (n - 1) / 2;
  let mean = 0;
  let slope = 0;
  let square = 0;
  for (let i = 0; i < n; i++) {
    mean += to(x[i]) / n;
    slope += (i - middle) * to(x[i]);
    square += (i - middle) ** 2;
  }
  slope /= square;
  const axis = Float64Array.from(x, (_, i) => from(mean + slope * (i - middle)));
  return axis.every((v, i) => Math.abs(v - x[i]) <= AGREES * place) ? axis : undefined;
}

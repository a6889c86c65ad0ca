/** Terms of the rational series; 32 give 1e-12 in the upper half plane. */
const TERMS = 32;
const L = Math.sqrt(TERMS / Math.SQRT2);
const coefficients = seriesOf(TERMS);

/**
 * Real and imaginary part of the Faddeeva function w(x + iy) = exp(-z^2) erfc(-iz), y >= 0, by Weideman's rational series (1994, SIAM J. Numer. Anal. 31, 1497).
 * The Voigt profile of unit area is Re w(z) / (sigma sqrt(2 pi)) with z = (x - centre + i gamma) / (sigma sqrt 2).
 */
export function faddeeva(x: number, y: number): readonly [number, number] {
  // L + i z, L - i z with z = x + i y
  const upRe = L - y;
  const upIm = x;
  const downRe = L + y;
  const downIm = -x;
  const norm = downRe * downRe + downIm * downIm;
  const zRe = (upRe * downRe + upIm * downIm) / norm;
  const zIm = (upIm * downRe - upRe * downIm) / norm;
  let pRe = 0;
  let pIm = 0;
  for (let k = 0; k < TERMS; k++) {
    const re = pRe * zRe - pIm * zIm + coefficients[k];
    pIm = pRe * zIm + pIm * zRe;
    pRe = re;
  }
  // 2 p / (L - i z)^2 + 1 / (sqrt(pi) (L - i z))
  const squareRe = (downRe * downRe - downIm * downIm) / (norm * norm);
  const squareIm = (-2 * downRe * downIm) / (norm * norm);
  const rootPi = Math.sqrt(Math.PI);
  return [
    2 * (pRe * squareRe - pIm * squareIm) + downRe / (norm * rootPi),
    2 * (pRe * squareIm + pIm * squareRe) - downIm / (norm * rootPi),
  ];
}

/** Fourier coefficients of the series, highest power first. */
function seriesOf(terms: number): Float64Array {
  const m = 2 * terms;
  const f = new Float64Array(2 * m);
  for (let k = 1 - m; k < m; k++) {
    const t = L * Math.tan((k * Math.PI) / m / 2);
    f[k + m] = Math.exp(-t * t) * (L * L + t * t);
  }
  return Float64Array.from({ length: terms }, (_, n) => {
    const order = terms - n;
    let sum = 0;
    for (let j = 0; j < 2 * m; j++) sum += f[(j + m) % (2 * m)] * Math.cos((Math.PI * order * j) / m);
    return sum / (2 * m);
  });
}

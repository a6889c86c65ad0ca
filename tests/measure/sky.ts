import { erfc, seededRandom } from '../../src/numeric/index.ts';
import type { Spectrum } from '../../src/spectrum/index.ts';

/** The truth of one line. */
export interface TrueLine {
  readonly centre: number;
  readonly flux: number;
}

/** A spectrum with its truth, from a line of words: `R 8000; 4959 33; 5007 100; noise 1; seed 3; from 4900; to 5100`. Continuum 100 unless said; no errors with `bare`; `wings 0.03` puts Lorentzian wings under every line, `fwhm 1.2` gives all lines one width in Angstrom, `smooth 3` averages the noise over so many samples, `clip 900` cuts everything above. */
export function sky(words: string): { spectrum: Spectrum; lines: TrueLine[]; fwhmAt: (w: number) => number } {
  const said = new Map<string, number>();
  const lines: TrueLine[] = [];
  for (const part of words.split(';').map((p) => p.trim().split(/\s+/))) {
    if (/^-?[\d.]+$/.test(part[0])) lines.push({ centre: Number(part[0]), flux: Number(part[1]) });
    else said.set(part[0], part.length > 1 ? Number(part[1]) : 1);
  }
  const word = (name: string, other: number) => said.get(name) ?? other;
  const [from, to, r, noise] = [word('from', 4900), word('to', 5100), word('R', 8000), word('noise', 1)];
  const step = word('step', from / r / 3);
  const n = Math.floor((to - from) / step) + 1;
  const random = seededRandom(word('seed', 1));
  const wavelength = Float64Array.from({ length: n }, (_, i) => from + i * step);
  const smooth = word('smooth', 1);
  const rough = Float64Array.from({ length: n + smooth }, () => noise * random.normal());
  const flux = Float64Array.from(wavelength, (w, i) => {
    let f = word('continuum', 100) + word('wave', 0) * Math.sin(w / 37);
    for (const { centre, flux: total } of lines) {
      const sigma = word('fwhm', centre / r) / 2.3548;
      const peak = total / (sigma * Math.sqrt(2 * Math.PI));
      // a detector collects over a whole sample
      const edge = (side: number) => 0.5 * erfc((w + side * step - centre) / (sigma * Math.SQRT2));
      f += (total * (edge(-0.5) - edge(0.5))) / step;
      // scattered light: Lorentzian wings of this share of the peak
      f += (peak * word('wings', 0)) / (1 + ((w - centre) / (2 * sigma)) ** 2);
    }
    let here = 0;
    for (let k = 0; k < smooth; k++) here += rough[i + k] / smooth;
    return Math.min(word('clip', Number.POSITIVE_INFINITY), f + here);
  });
  const spike = said.get('spike');
  if (spike !== undefined) flux[Math.round((spike - from) / step)] += 60 * noise;
  return {
    spectrum: {
      name: 'made here',
      wavelength,
      flux,
      ...(said.has('bare') ? {} : { fluxErr: new Float64Array(n).fill(noise) }),
      masked: new Uint8Array(n),
      medium: 'air',
      fluxUnit: '',
    },
    lines: lines.sort((a, b) => a.centre - b.centre),
    fwhmAt: (w) => w / r,
  };
}

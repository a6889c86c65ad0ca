import type { SamplesView } from '../../engine/index.ts';

/** The samples as they are drawn: masked ones are gaps. */
export interface PlotSamples {
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly model: Float64Array;
  readonly continuum: Float64Array;
  /** Data minus fit over one sigma. */
  readonly residual: Float64Array;
  /** Masked stretches, Angstrom, half a sample wider on both sides: low, high, low, high ... ascending. */
  readonly masked: Float64Array;
  /** Median of the noise: the flux below which a logarithm means nothing. */
  readonly typicalNoise: number;
}

const NOISE_PROBES = 2001;

const made = new WeakMap<SamplesView, PlotSamples>();

/** The samples as they are drawn, made once for each reading. */
export function plotSamplesOf(samples: SamplesView): PlotSamples {
  const known = made.get(samples) ?? plotSamples(samples);
  made.set(samples, known);
  return known;
}

function plotSamples(samples: SamplesView): PlotSamples {
  const n = samples.wavelength.length;
  const flux = new Float64Array(n);
  const residual = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    flux[i] = samples.masked[i] ? Number.NaN : samples.flux[i];
    residual[i] = (flux[i] - samples.model[i]) / samples.noise[i];
  }
  const { wavelength, model, continuum } = samples;
  return { wavelength, flux, model, continuum, residual, masked: maskedStretches(samples), typicalNoise: typical(samples.noise) };
}

function maskedStretches({ wavelength, masked }: SamplesView): Float64Array {
  const n = wavelength.length;
  const between = (i: number) => (wavelength[Math.max(i - 1, 0)] + wavelength[Math.min(i, n - 1)]) / 2;
  const ends: number[] = [];
  for (let i = 0; i < n; i++) {
    if (!masked[i]) continue;
    const first = i;
    while (i + 1 < n && masked[i + 1]) i++;
    ends.push(between(first), between(i + 1));
  }
  return Float64Array.from(ends);
}

/** Median of at most some two thousand values, positive. */
function typical(values: Float64Array): number {
  const step = Math.max(1, Math.floor(values.length / NOISE_PROBES));
  const probes: number[] = [];
  for (let i = 0; i < values.length; i += step) if (values[i] > 0 && Number.isFinite(values[i])) probes.push(values[i]);
  probes.sort((a, b) => a - b);
  return probes[probes.length >> 1] ?? 1;
}

import type { Place } from '../problems/index.ts';
import { count, type Notes, note, warn } from './notes.ts';

/** Samples in any order. */
export interface Samples {
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly fluxErr?: Float64Array;
  readonly flagged?: Uint8Array;
}

/**
 * Samples with strictly ascending wavelengths: those without a positive finite wavelength are left out, falling order is turned round, any
 * other order sorted, and samples of equal wavelength are averaged (weighted by their errors). Every such step is remarked on.
 */
export function sortAndJoin(samples: Samples, notes: Notes, place: Place): Samples {
  const kept = dropUnplaced(samples, notes, place);
  const { wavelength } = kept;
  const n = wavelength.length;
  let rises = 0;
  let falls = 0;
  let equal = 0;
  for (let i = 1; i < n; i++) {
    if (wavelength[i] > wavelength[i - 1]) rises++;
    else if (wavelength[i] < wavelength[i - 1]) falls++;
    else equal++;
  }
  let ordered = kept;
  if (falls > 0 && rises === 0) {
    ordered = pick(
      kept,
      Uint32Array.from({ length: n }, (_, i) => n - 1 - i),
    );
    note(notes, 'falling-wavelengths', 'the wavelengths fall: the samples were turned round', { where: place });
  } else if (falls > 0) {
    const order = Uint32Array.from({ length: n }, (_, i) => i).sort((a, b) => wavelength[a] - wavelength[b] || a - b);
    ordered = pick(kept, order);
    warn(notes, 'unsorted-wavelengths', `the wavelengths go backwards at ${count(falls, 'place')}: the samples were sorted`, {
      where: place,
      doThis: 'If parts of the spectrum overlap, their samples now alternate: read them one at a time if you can.',
    });
  }
  if (equal > 0 || falls > 0) return joinEqual(ordered, notes, place);
  return ordered;
}

function dropUnplaced(samples: Samples, notes: Notes, place: Place): Samples {
  const { wavelength } = samples;
  let good = 0;
  for (let i = 0; i < wavelength.length; i++) if (isPlaced(wavelength[i])) good++;
  if (good === wavelength.length) return samples;
  const order = new Uint32Array(good);
  let k = 0;
  for (let i = 0; i < wavelength.length; i++) if (isPlaced(wavelength[i])) order[k++] = i;
  const lost = wavelength.length - good;
  warn(
    notes,
    'samples-without-wavelength',
    `${count(lost, 'sample')} ${lost === 1 ? 'has' : 'have'} no wavelength (missing, zero or negative): left out`,
    { where: place },
  );
  return pick(samples, order);
}

const isPlaced = (w: number) => w > 0 && w < 1e30;

function pick({ wavelength, flux, fluxErr, flagged }: Samples, order: Uint32Array): Samples {
  const take = (from: Float64Array) => {
    const out = new Float64Array(order.length);
    for (let i = 0; i < order.length; i++) out[i] = from[order[i]];
    return out;
  };
  return {
    wavelength: take(wavelength),
    flux: take(flux),
    ...(fluxErr ? { fluxErr: take(fluxErr) } : {}),
    ...(flagged ? { flagged: Uint8Array.from(order, (i) => flagged[i]) } : {}),
  };
}

function joinEqual(samples: Samples, notes: Notes, place: Place): Samples {
  const { wavelength, flux, fluxErr, flagged } = samples;
  const n = wavelength.length;
  const order = new Uint32Array(n);
  let m = 0;
  for (let i = 0; i < n; i++) if (i === 0 || wavelength[i] !== wavelength[i - 1]) order[m++] = i;
  if (m === n) return samples;
  const joined = pick(samples, order.subarray(0, m));
  for (let k = 0; k < m; k++) {
    const start = order[k];
    const end = k + 1 < m ? order[k + 1] : n;
    if (end - start < 2) continue;
    const usable: number[] = [];
    for (let i = start; i < end; i++) if (Number.isFinite(flux[i]) && !flagged?.[i] && (!fluxErr || fluxErr[i] > 0)) usable.push(i);
    if (usable.length === 0) continue;
    let weights = 0;
    let sum = 0;
    for (const i of usable) {
      const weight = fluxErr ? 1 / fluxErr[i] ** 2 : 1;
      weights += weight;
      sum += weight * flux[i];
    }
    if (!(weights > 0 && Number.isFinite(weights))) continue;
    joined.flux[k] = sum / weights;
    if (joined.fluxErr) joined.fluxErr[k] = 1 / Math.sqrt(weights);
    if (joined.flagged) joined.flagged[k] = 0;
  }
  warn(
    notes,
    'duplicate-wavelengths',
    `${count(n - m, 'sample')} ${n - m === 1 ? 'repeats' : 'repeat'} the wavelength of another: samples of equal wavelength were averaged`,
    { where: place },
  );
  return joined;
}

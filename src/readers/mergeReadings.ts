import { count, type Notes, noteFact, warn } from './notes.ts';
import type { Reading, ReadingChoices } from './reading.ts';

/**
 * One spectrum out of several that touch or overlap: each overlap is cut at its middle, nothing is resampled or scaled.
 *
 * @param parts at least one, in any order
 */
export function mergeReadings(parts: readonly Reading[], what: string, notes: Notes, taken: ReadingChoices): Reading {
  const useful = parts.filter((p) => p.spectrum.masked.some((m) => m === 0));
  const sorted = (useful.length ? useful : parts).toSorted((a, b) => middle(a) - middle(b));
  const bounds = sorted.slice(1).map((part, k) => {
    const left = usableEnds(sorted[k]);
    const right = usableEnds(part);
    return (Math.max(left.high, right.low) + Math.min(left.high, right.low)) / 2;
  });
  const pieces = sorted.map((part, k) => {
    const { wavelength } = part.spectrum;
    const low = k === 0 ? Number.NEGATIVE_INFINITY : bounds[k - 1];
    const high = k === sorted.length - 1 ? Number.POSITIVE_INFINITY : bounds[k];
    const from = wavelength.findIndex((w) => w >= low);
    const to = wavelength.findLastIndex((w) => w < high) + 1;
    return { part, from: from < 0 ? wavelength.length : from, to: Math.max(to, from < 0 ? wavelength.length : from) };
  });
  const total = pieces.reduce((sum, { from, to }) => sum + to - from, 0);
  const wavelength = new Float64Array(total);
  const flux = new Float64Array(total);
  const masked = new Uint8Array(total);
  const hasErrors = sorted.every((p) => p.spectrum.fluxErr);
  const fluxErr = hasErrors ? new Float64Array(total) : undefined;
  let at = 0;
  for (const { part, from, to } of pieces) {
    const s = part.spectrum;
    for (let i = from; i < to; i++) {
      if (at > 0 && !(s.wavelength[i] > wavelength[at - 1])) continue;
      wavelength[at] = s.wavelength[i];
      flux[at] = s.flux[i];
      masked[at] = s.masked[i];
      if (fluxErr && s.fluxErr) fluxErr[at] = s.fluxErr[i];
      at++;
    }
  }
  const [first] = sorted;
  const how = first.how.filter((f) => f.fact !== 'samples');
  notes.how.push(...how);
  notes.remarks.push(...uniqueRemarks(sorted));
  noteFact(notes, 'merged', what, 'chosen by you; overlaps are cut at their middle, nothing is resampled');
  noteFact(notes, 'samples', String(at), 'counted');
  if (parts.length > useful.length && useful.length)
    warn(notes, 'empty-parts', `${count(parts.length - useful.length, 'part')} without usable samples left out`);
  return {
    ...first,
    spectrum: {
      ...first.spectrum,
      wavelength: wavelength.slice(0, at),
      flux: flux.slice(0, at),
      masked: masked.slice(0, at),
      ...(fluxErr ? { fluxErr: fluxErr.slice(0, at) } : { fluxErr: undefined }),
    },
    how: notes.how,
    remarks: notes.remarks,
    offers: notes.offers,
    choices: { ...taken, ...(first.choices.medium ? { medium: first.choices.medium } : {}) },
  };
}

const middle = ({ spectrum: { wavelength } }: Reading) => wavelength[wavelength.length >> 1];

function usableEnds({ spectrum: { wavelength, masked } }: Reading): { low: number; high: number } {
  const first = masked.indexOf(0);
  const last = masked.lastIndexOf(0);
  return first < 0 ? { low: wavelength[0], high: wavelength[wavelength.length - 1] } : { low: wavelength[first], high: wavelength[last] };
}

function uniqueRemarks(parts: readonly Reading[]) {
  const seen = new Set<string>();
  return parts.flatMap((p) => p.remarks).filter(({ code }) => !seen.has(code) && seen.add(code));
}

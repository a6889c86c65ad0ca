import type { Place } from '../problems/index.ts';
import { count, type Notes, note, warn } from './notes.ts';
import type { Samples } from './sortAndJoin.ts';

/** No flux in any unit in use is so large: values beyond are markers for "no measurement". */
const MARKER = 1e30;
/** Runs of exact zeros at least so long at the ends, or inside, are taken for "no measurement". */
const ZEROS_AT_END = 3;
const ZEROS_INSIDE = 8;
/** Numbers often used as markers; named to the user when they repeat, never masked unless declared. */
const USUAL_MARKERS = [-999, -9999, -99, -99999, 999, 9999, -1000, -32768];

/** Mask (1 = must not be used) with the reasons remarked on; errors are kept as they are. */
export function maskMissing(
  { wavelength, flux, fluxErr, flagged }: Samples,
  missingValues: readonly number[],
  notes: Notes,
  place: Place,
): { masked: Uint8Array; keptErr?: Float64Array } {
  const n = wavelength.length;
  const masked = new Uint8Array(n);
  const tally = { absent: 0, declared: 0, huge: 0, unerring: 0, flagged: 0 };
  const isDeclared = declaredTest(missingValues);
  for (let i = 0; i < n; i++) {
    const f = flux[i];
    if (!Number.isFinite(f)) tally.absent++;
    else if (isDeclared(f)) tally.declared++;
    else if (Math.abs(f) > MARKER) tally.huge++;
    else if (fluxErr && !(fluxErr[i] > 0)) tally.unerring++;
    else if (flagged?.[i]) tally.flagged++;
    else continue;
    masked[i] = 1;
  }
  const say = (k: number, why: string) => {
    if (k) note(notes, 'masked-samples', `${count(k, 'sample')} masked: ${why}`, { where: place });
  };
  say(tally.absent, 'the flux is missing or not a number');
  say(tally.declared, `the flux is ${missingValues.join(' or ')}, which stands for "no measurement"`);
  if (tally.huge)
    warn(
      notes,
      'marker-values',
      `${count(tally.huge, 'sample')} masked: the flux is beyond 1e30 in size, a marker or damage rather than a measurement`,
      { where: place },
    );
  say(tally.unerring, 'there is no usable uncertainty');
  say(tally.flagged, "by the file's flags");
  maskZeroRuns(flux, masked, notes, place);
  remarkOnMarkers(flux, masked, notes, place);
  if (masked.every((m) => m === 1))
    warn(notes, 'all-masked', 'no sample can be used: all are masked', {
      where: place,
      doThis: 'Choose another row, order or part of the file.',
    });
  return { masked, ...(fluxErr ? { keptErr: fluxErr } : {}) };
}

const declaredTest = (values: readonly number[]) => {
  if (values.length === 0) return () => false;
  return (f: number) => values.some((v) => f === v || Math.abs(f - v) <= 1e-6 * Math.abs(v));
};

/** Exact zeros in a row hold no measurement, unless the fluxes are counts, where zeros are measured. */
function maskZeroRuns(flux: Float64Array, masked: Uint8Array, notes: Notes, place: Place): void {
  const n = flux.length;
  let whole = 0;
  let nonzero = 0;
  for (let i = 0; i < n; i++) {
    if (masked[i] || flux[i] === 0) continue;
    nonzero++;
    if (Number.isInteger(flux[i])) whole++;
  }
  const isCounts = nonzero > 0 && whole > 0.9 * nonzero;
  let zeros = 0;
  for (let i = 0; i < n; ) {
    if (flux[i] !== 0) {
      i++;
      continue;
    }
    let end = i + 1;
    while (end < n && flux[end] === 0) end++;
    const needed = i === 0 || end === n ? ZEROS_AT_END : ZEROS_INSIDE;
    if (end - i >= (isCounts && !(i === 0 || end === n) ? Number.POSITIVE_INFINITY : isCounts ? ZEROS_INSIDE : needed)) {
      for (let k = i; k < end; k++) {
        if (!masked[k]) zeros++;
        masked[k] = 1;
      }
    }
    i = end;
  }
  if (zeros)
    note(notes, 'zeros-masked', `${count(zeros, 'sample')} masked: runs of fluxes that are exactly 0 hold no measurement`, {
      where: place,
    });
}

function remarkOnMarkers(flux: Float64Array, masked: Uint8Array, notes: Notes, place: Place): void {
  for (const marker of USUAL_MARKERS) {
    let times = 0;
    for (let i = 0; i < flux.length; i++) if (!masked[i] && flux[i] === marker) times++;
    if (times >= 2) {
      warn(notes, 'possible-marker', `the flux is exactly ${marker} in ${count(times, 'sample')}: perhaps a marker for "no measurement"`, {
        where: place,
        doThis: `If it is, say that ${marker} means missing.`,
      });
      notes.offers.push({ label: `take ${marker} for "no measurement"`, adds: true, choices: { missingValue: marker } });
    }
  }
}

import { type AtomicData, linesBetween, type Nature } from '../atomic/index.ts';
import type { LineKey } from '../session/index.ts';
import { fromVacuum, type Medium } from '../spectrum/index.ts';

/** A key is kept with this many decimals of a vacuum wavelength in Angstrom ... */
const KEY_DECIMALS = 3;
/** ... and found again this near, Angstrom: a new edition of the list may move a wavelength by its error. */
const KEY_REACH_A = 0.3;

/** The ion in the trade's brackets: permitted `O II`, intercombination `O III]`, forbidden `[O III]`. */
export function bracketed(ion: string, nature: Nature): string {
  if (nature === 'forbidden') return `[${ion}]`;
  return nature === 'intercombination' ? `${ion}]` : ion;
}

export const ionLabel = (data: AtomicData, line: number): string =>
  bracketed(data.lines.ions[data.lines.ion[line]].name, data.lines.nature(line));

/** "[O III] 5006.84" */
export function lineLabel(data: AtomicData, line: number, medium: Medium): string {
  return `${ionLabel(data, line)} ${fromVacuum(data.lines.wavelengthVac[line], medium).toFixed(2)}`;
}

/** The key under which a verdict remembers a transition. */
export function lineKey(data: AtomicData, line: number): LineKey {
  return `${data.lines.ions[data.lines.ion[line]].name} ${data.lines.wavelengthVac[line].toFixed(KEY_DECIMALS)}`;
}

/** The transition a key means in this edition of the list; undefined when it holds none of that ion near that wavelength. */
export function lineOfKey(data: AtomicData, key: LineKey): number | undefined {
  const cut = key.lastIndexOf(' ');
  const ion = key.slice(0, cut);
  const wavelength = Number(key.slice(cut + 1));
  const [first, end] = linesBetween(data.lines, wavelength - KEY_REACH_A, wavelength + KEY_REACH_A);
  let best: number | undefined;
  for (let line = first; line < end; line++) {
    if (data.lines.ions[data.lines.ion[line]].name !== ion) continue;
    if (best === undefined || Math.abs(data.lines.wavelengthVac[line] - wavelength) < Math.abs(data.lines.wavelengthVac[best] - wavelength))
      best = line;
  }
  return best;
}

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

/** What tells a line of the sky from the same transition in the object. */
const SKY_PREFIX = 'sky ';
const isOfSky = (data: AtomicData, line: number) => ['sky', 'telluric'].includes(data.lines.nature(line));

/** The key under which a verdict remembers a transition: `O III 5008.240`; `sky O I 5578.887` for one of the sky. */
export function lineKey(data: AtomicData, line: number): LineKey {
  const key = `${data.lines.ions[data.lines.ion[line]].name} ${data.lines.wavelengthVac[line].toFixed(KEY_DECIMALS)}`;
  return isOfSky(data, line) ? `${SKY_PREFIX}${key}` : key;
}

/** The transition a key means in this edition of the list; undefined when it holds none of that ion near that wavelength. */
export function lineOfKey(data: AtomicData, key: LineKey): number | undefined {
  const ofSky = key.startsWith(SKY_PREFIX);
  const cut = key.lastIndexOf(' ');
  const ion = key.slice(ofSky ? SKY_PREFIX.length : 0, cut);
  const wavelength = Number(key.slice(cut + 1));
  const [first, end] = linesBetween(data.lines, wavelength - KEY_REACH_A, wavelength + KEY_REACH_A);
  const named = Array.from({ length: Math.max(0, end - first) }, (_, k) => first + k).filter(
    (line) => data.lines.ions[data.lines.ion[line]].name === ion,
  );
  // keys from before lines of the sky had a mark of their own may mean either
  const meant = named.filter((line) => isOfSky(data, line) === ofSky);
  const away = (line: number) => Math.abs(data.lines.wavelengthVac[line] - wavelength);
  return (meant.length > 0 ? meant : named).reduce<number | undefined>(
    (best, line) => (best === undefined || away(line) < away(best) ? line : best),
    undefined,
  );
}

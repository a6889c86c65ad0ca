import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { kinOf } from './companions.ts';
import { factsOf } from './lineFacts.ts';
import { nameMarks } from './nameMarks.ts';
import { DEFAULT_NAMING_SETTINGS, type Mark } from './naming.ts';

/** The optical range, vacuum Angstrom, and how many of its strongest lines stand for a spectrum. */
const LOW = 3500;
const HIGH = 9500;
const MARKS = 60;
/** Runs until the code is compiled, about. */
const RUNS = 3;

/** Makes what naming needs of a bundle and runs it on a spectrum of the strongest lines, so that the first spectrum of the user does not wait for it. */
export function prepareNaming(data: AtomicData): void {
  const { lines } = data;
  const facts = factsOf(data);
  kinOf(data);
  const [first, end] = linesBetween(lines, LOW, HIGH);
  const strongest = Array.from({ length: end - first }, (_, k) => first + k)
    .filter((line) => facts.local[line] === 0)
    .sort((a, b) => facts.logStrength[b] - facts.logStrength[a])
    .slice(0, MARKS);
  const marks = strongest.map((line): Mark => {
    const flux = 10 ** facts.logStrength[line];
    const wavelength = lines.wavelengthVac[line];
    return { wavelength, wavelengthErr: wavelength * 1e-5, flux, fluxErr: 0.03 * flux, fwhm: wavelength * 1e-4 };
  });
  for (let run = 0; run < RUNS; run++) nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []);
}

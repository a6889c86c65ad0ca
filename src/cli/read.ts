import { readSpectrum } from '../engine/index.ts';
import { ProblemError, wordProblem } from '../problems/index.ts';
import { parseArguments, UsageError } from './arguments.ts';
import { withFile } from './files.ts';

/** Samples written at once, so that a large file does not become one huge text. */
const ROWS_A_WRITE = 20_000;

/** Prints the samples as CSV on stdout and how the file was read, one JSON line, on stderr. */
export async function readCommand(args: readonly string[]): Promise<number> {
  try {
    const { words, settings } = parseArguments(args);
    if (words.length !== 1) throw new UsageError('read takes one file');
    const reading = await withFile(words[0], (source) => readSpectrum(source, settings.reading));
    const { wavelength, flux, fluxErr, masked, medium, fluxUnit } = reading.spectrum;
    let text = 'wavelength,flux,flux_err,masked\n';
    for (let i = 0; i < wavelength.length; i++) {
      text += `${wavelength[i]},${blankUnlessFinite(flux[i])},${fluxErr ? blankUnlessFinite(fluxErr[i]) : ''},${masked[i]}\n`;
      if (i % ROWS_A_WRITE === ROWS_A_WRITE - 1) {
        process.stdout.write(text);
        text = '';
      }
    }
    process.stdout.write(text);
    const { how, offers, remarks, mediumStated, choices } = reading;
    process.stderr.write(
      `${JSON.stringify({ samples: wavelength.length, medium, mediumStated, fluxUnit, how, choices, offers, remarks })}\n`,
    );
    return 0;
  } catch (error) {
    if (error instanceof UsageError) {
      process.stderr.write(`linewright: ${error.message}\n`);
      return 2;
    }
    if (!(error instanceof ProblemError)) throw error;
    process.stderr.write(`linewright: ${wordProblem(error.problem)}\n`);
    return 1;
  }
}

const blankUnlessFinite = (value: number) => (Number.isFinite(value) ? String(value) : '');

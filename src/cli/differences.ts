import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import { createEngine, type FeatureView } from '../engine/index.ts';
import { ProblemError, wordProblem } from '../problems/index.ts';
import { compareSessions, readSession, type SessionDocument } from '../session/index.ts';
import { openAtomicData, withFile } from './files.ts';

/**
 * Prints in what two session files on one spectrum differ: a second opinion. With the spectrum at hand every difference says how probable the names are, by the settings of
 * the first session and nobody's verdicts. Exit code 0 when they agree, 1 when they differ or cannot be read, 2 without two files.
 */
export async function differences(args: readonly string[]): Promise<number> {
  const [first, second, spectrum, ...more] = args;
  if (first === undefined || second === undefined || more.length > 0) {
    process.stderr.write('linewright: differences needs two session files, and takes the spectrum as a third\n');
    return 2;
  }
  try {
    const [one, other] = [open(first), open(second)];
    const found = compareSessions(one, other, spectrum === undefined ? [] : await weighed(spectrum, one));
    if (!found.sameSource)
      process.stderr.write('linewright: the sessions are about different files; verdicts are compared by wavelength all the same\n');
    for (const { at, sentence } of found.verdicts) process.stdout.write(`${at.toFixed(3)} A (vacuum): ${sentence}\n`);
    for (const { key, first: one, second: other } of found.settings)
      process.stdout.write(`${key}: ${one} in the first, ${other} in the second\n`);
    process.stderr.write(`${found.agreeing} verdicts agree, ${found.verdicts.length} differ\n`);
    return found.verdicts.length + found.settings.length > 0 ? 1 : 0;
  } catch (error) {
    if (!(error instanceof ProblemError)) throw error;
    process.stderr.write(`linewright: ${wordProblem(error.problem)}\n`);
    return 1;
  }
}

async function weighed(path: string, { source, settings }: SessionDocument): Promise<readonly FeatureView[]> {
  const engine = createEngine(openAtomicData(), () => 0);
  return withFile(path, async (bytes) => {
    await engine.open(bytes, source?.kind ?? 'guess');
    return (await engine.analyse(settings, [])).features;
  });
}

function open(path: string): SessionDocument {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (error) {
    throw new ProblemError({ code: 'no-file', where: { file: path }, found: error instanceof Error ? error.message : String(error) });
  }
  return readSession(text, basename(path)).document;
}

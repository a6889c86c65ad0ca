import { ProblemError } from '../../problems/index.ts';
import type { Notes } from '../notes.ts';
import type { Hdu } from './hdus.ts';

/** @throws ProblemError when a chosen number is not among 1 ... n */
export function requireChoice(chosen: number, n: number, noun: string, code: string, hdu: Hdu, notes: Notes): void {
  if (Number.isInteger(chosen) && chosen >= 1 && chosen <= n) return;
  throw new ProblemError({
    code: `no-such-${code}`,
    where: { file: notes.file, hdu: hdu.index },
    found: `no ${noun} ${chosen}`,
    expected: n === 1 ? `only ${noun} 1` : `${noun}s 1 to ${n}`,
    doThis: `Choose one of the ${noun}s that are there.`,
  });
}

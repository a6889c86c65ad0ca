import type { ErrorValues } from '../errorValues.ts';
import { noteFact } from '../notes.ts';
import type { FitsFile } from './candidate.ts';
import type { Hdu } from './hdus.ts';
import { imageLine } from './imageLine.ts';

/** Bands of a stack: the third axis, or a second one whose BANDID cards say so. */
export interface Bands {
  readonly axis: number;
  readonly n: number;
  readonly names: readonly string[];
}

/** The bands of a stack; `others` = the axes but that of the samples. */
export function bandsOf(hdu: Hdu, others: readonly { n: number; axis: number }[]): Bands | undefined {
  const names = (n: number) => Array.from({ length: n }, (_, k) => String(hdu.header.cards.get(`BANDID${k + 1}`)?.value ?? '').trim());
  const third = others.find((o) => o.axis === 3);
  if (third && third.n <= 10 && (hdu.axes[0] ?? 0) > 1) return { axis: 3, n: third.n, names: names(third.n) };
  const second = others.find((o) => o.axis === 2);
  if (second && others.length === 1 && second.n <= 10 && second.n > 1 && names(second.n).every((b) => b !== ''))
    return { axis: 2, n: second.n, names: names(second.n) };
  return undefined;
}

/** Errors from the band that is called sigma or error. */
export async function bandErrors(
  { source, notes }: FitsFile,
  hdu: Hdu,
  along: number,
  at: readonly number[],
  bands: Bands,
): Promise<ErrorValues | undefined> {
  const k = bands.names.findIndex((name) => /\b(sigma|error|err|uncertainty|noise|variance|ivar)\b/i.test(name.split(' - ')[0]));
  if (k < 0) return undefined;
  const word = bands.names[k].split(' - ')[0];
  const meaning = /ivar|inverse/i.test(word) ? 'ivar' : /variance/i.test(word) ? 'variance' : 'sigma';
  noteFact(
    notes,
    'uncertainty',
    `band ${k + 1}, taken as ${meaning === 'sigma' ? 'one sigma' : meaning === 'ivar' ? 'inverse variance' : 'variance'}`,
    `BANDID${k + 1} = ${bands.names[k]}`,
  );
  return {
    values: await imageLine(
      source,
      hdu,
      along,
      at.map((p, j) => (j === bands.axis - 1 ? k : p)),
      notes,
    ),
    meaning,
    label: `band ${k + 1}`,
  };
}

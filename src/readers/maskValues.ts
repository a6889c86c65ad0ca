import type { Place } from '../problems/index.ts';
import type { Column } from './columns.ts';
import { type Notes, noteFact, warn } from './notes.ts';
import type { ReadingChoices } from './reading.ts';

/**
 * Bad samples by a mask column, 1 = bad. Whether 0 or the other values are bad is the user's word, else what marks the smaller part
 * (a mask that marks most of a spectrum as bad is read the other way round where it is logical, and else left aside).
 */
export async function flaggedBy(mask: Column, choices: ReadingChoices, notes: Notes, place: Place): Promise<Uint8Array | undefined> {
  const values = await mask.read();
  let nonzero = 0;
  for (const v of values) if (v !== 0 && !Number.isNaN(v)) nonzero++;
  const share = nonzero / values.length;
  const meansGood = /good|ok|usable|valid/i.test(mask.name);
  let meaning = choices.maskMeaning ?? (meansGood ? 'zero-bad' : undefined);
  if (!meaning) {
    const isTwoValued = mask.kind === 'logical' || values.every((v) => v === 0 || v === 1 || Number.isNaN(v));
    if (share <= 0.5) meaning = 'nonzero-bad';
    else if (isTwoValued) meaning = 'zero-bad';
    else {
      warn(notes, 'mask-left-aside', `column ${mask.name} flags ${Math.round(share * 100)} % of the samples: it is not used`, {
        where: place,
        doThis: `Choose ${mask.name} as mask if its flags mean "do not use".`,
      });
      return undefined;
    }
  }
  noteFact(
    notes,
    'mask',
    `column ${mask.name}: ${meaning === 'zero-bad' ? 'samples with 0 are masked' : 'samples with a flag other than 0 are masked'}`,
    choices.maskMeaning ? 'chosen by you' : meansGood ? 'its name says which are good' : 'so most samples remain',
  );
  return Uint8Array.from(values, (v) => ((meaning === 'zero-bad' ? v === 0 : v !== 0) || Number.isNaN(v) ? 1 : 0));
}

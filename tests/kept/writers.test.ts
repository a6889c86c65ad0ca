import { describe, expect, test } from 'vitest';
import { PRESETS, TABLE_FORMATS } from '../../src/report/index.ts';
import { blend, oIII, table } from '../report/someTable.ts';

// What the writers print today, to be read in a review: `npx vitest run tests/kept -u` writes the files anew. No proof of correctness: tests/report reads every
// format back by a foreign program.
const nameless = {
  ...blend,
  feature: 3,
  wavelengthObs: 5411.2,
  ion: undefined,
  wavelengthLab: undefined,
  verdict: 'unidentified' as const,
  note: '',
};
const rows = table(oIII, { ...blend, verdict: 'accepted' }, nameless);
const readable = (written: string | Uint8Array) =>
  typeof written === 'string'
    ? written
    : (new TextDecoder('latin1').decode(written.subarray(0, written.length - 2880)).match(/.{80}/g) ?? [])
        .map((card) => card.trimEnd())
        .filter((card) => card !== '')
        .join('\n');

describe.each(Object.entries(TABLE_FORMATS))('%s', (name, { write, ending, isPrinted }) => {
  if (isPrinted) {
    test.each(Object.entries(PRESETS))(`is printed by the design "%s" as it was kept`, async (design, choices) => {
      await expect(readable(write(rows, choices))).toMatchFileSnapshot(`writers/${name}-${design}.${ending}`);
    });
  } else {
    test('is printed as it was kept', async () => {
      await expect(readable(write(rows))).toMatchFileSnapshot(`writers/${name}.${name === 'fits' || name === 'json' ? 'txt' : ending}`);
    });
  }
});

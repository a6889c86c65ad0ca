import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  accept,
  type Change,
  changeSettings,
  declare,
  EMPTY_DOCUMENT,
  type History,
  make,
  readSession,
  redo,
  reject,
  reopen,
  startHistory,
  undo,
  writeNote,
  writeSession,
} from '../../src/session/index.ts';

// One action of the user on one of five features.
const action = fc.record({
  what: fc.constantFrom('accept', 'reject', 'unidentified', 'artefact', 'reopen', 'note', 'settings'),
  feature: fc.integer({ min: 0, max: 4 }),
  name: fc.integer({ min: 0, max: 2 }),
  text: fc.string(),
});
type Action = typeof action extends fc.Arbitrary<infer T> ? T : never;

function changeOf(history: History, { what, feature: k, name: n, text }: Action): Change {
  const { document } = history;
  const feature = { at: 4000 + 10 * k, atErr: 0.05, label: `feature ${k}` };
  const name = { label: `name ${n}`, keys: [`X ${n}.000`] };
  switch (what) {
    case 'accept':
      return accept(document, feature, name);
    case 'reject':
      return reject(document, feature, name);
    case 'unidentified':
    case 'artefact':
      return declare(document, feature, what);
    case 'reopen':
      return reopen(document, feature);
    case 'note':
      return writeNote(document, feature, text);
    default:
      return changeSettings(document, { ...document.settings, naming: { toleranceKms: 10 + n } }, 'set the tolerance');
  }
}

test('undoing everything leads back to the start, redoing everything to the end', () => {
  fc.assert(
    fc.property(fc.array(action, { maxLength: 30 }), (actions) => {
      const end = actions.reduce((history, a) => make(history, changeOf(history, a)), startHistory(EMPTY_DOCUMENT));
      let back = end;
      while (back.past.length > 0) back = undo(back);
      expect(back.document).toEqual(EMPTY_DOCUMENT);
      let forth = back;
      while (forth.future.length > 0) forth = redo(forth);
      expect(forth.document).toEqual(end.document);
    }),
    { seed: 41 },
  );
});

test('any history is read back from its file unchanged', () => {
  fc.assert(
    fc.property(fc.array(action, { maxLength: 20 }), (actions) => {
      const history = actions.reduce((h, a) => make(h, changeOf(h, a)), startHistory(EMPTY_DOCUMENT));
      expect(readSession(writeSession(history), 'law.json')).toEqual(JSON.parse(JSON.stringify(history)));
    }),
    { seed: 42 },
  );
});

import { describe, expect, test } from 'vitest';
import { ProblemError } from '../../src/problems/index.ts';
import {
  accept,
  changeSettings,
  EMPTY_DOCUMENT,
  type History,
  make,
  openSource,
  readSession,
  startHistory,
  undo,
  writeSession,
} from '../../src/session/index.ts';

function worked(): History {
  let history = startHistory(EMPTY_DOCUMENT);
  history = make(history, openSource(history.document, { kind: 'spectrum', name: 'lantern.csv', size: 1000 }));
  history = make(
    history,
    accept(history.document, { at: 5008.24, atErr: 0.02, label: 'feature 1' }, { label: '[O III] 5006.84', keys: ['O III 5008.240'] }),
  );
  history = make(history, changeSettings(history.document, { ...history.document.settings, naming: { z: 0.01 } }, 'set z'));
  return undo(history);
}

describe('the session file', () => {
  test('gives back document, past and future', () => {
    const history = worked();
    expect(readSession(writeSession(history), 'a.json')).toEqual(history);
  });

  const broken: [string, string, string][] = [
    ['no JSON', 'wavelength,flux', 'session-not-json'],
    ['another JSON file', '{"a":1}', 'session-no-magic'],
    ['another version', writeSession(worked()).replace('"version": 1', '"version": 7'), 'session-version'],
    ['a cut document', writeSession(worked()).replace('"verdicts"', '"verdict"'), 'session-broken'],
  ];
  test.each(broken)('%s is refused in words that name the file', (_, text, code) => {
    try {
      readSession(text, 'mine.json');
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(ProblemError);
      expect((error as ProblemError).problem.code).toBe(code);
      expect((error as ProblemError).message).toContain('mine.json');
    }
  });

  test('an unknown version is refused in words that say both versions', () => {
    expect(() => readSession(writeSession(worked()).replace('"version": 1', '"version": 7'), 'x')).toThrow(/version 7.*version 1/);
  });
});

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
  readSessionRecord,
  sameBytes,
  sessionRecord,
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

  test('holds the hash of the source', () => {
    const source = { kind: 'spectrum', name: 'lantern.csv', size: 1000, sha256: 'ab'.repeat(32) } as const;
    const history = make(startHistory(EMPTY_DOCUMENT), openSource(EMPTY_DOCUMENT, source));
    expect(readSession(writeSession(history), 'a.json').document.source).toEqual(source);
  });

  test('is also kept as a record, checked in the same way', () => {
    expect(readSessionRecord(sessionRecord(worked()), 'browser')).toEqual(worked());
    expect(() => readSessionRecord({ ...sessionRecord(worked()), document: {} }, 'the browser')).toThrow(/the browser/);
  });

  const broken: [string, string, string][] = [
    ['no JSON', 'wavelength,flux', 'session-not-json'],
    ['another JSON file', '{"a":1}', 'session-no-magic'],
    ['another version', writeSession(worked()).replace('"version": 2', '"version": 7'), 'session-version'],
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

  test('of version 1, which knew no hashes, is opened as it was', () => {
    const old = writeSession(worked()).replace('"version": 2', '"version": 1');
    expect(readSession(old, 'old.json')).toEqual(worked());
  });

  test('an unknown version is refused in words that say both versions', () => {
    expect(() => readSession(writeSession(worked()).replace('"version": 2', '"version": 7'), 'x')).toThrow(/version 7.*version 2/);
  });
});

describe('sources', () => {
  test('are the same bytes by their hashes, and by their size where one has none', () => {
    const a = { size: 10, sha256: 'aa' };
    expect(sameBytes(a, { size: 10, sha256: 'bb' })).toBe(false);
    expect(sameBytes(a, { size: 11, sha256: 'aa' })).toBe(true);
    expect(sameBytes(a, { size: 10 })).toBe(true);
    expect(sameBytes(a, { size: 11 })).toBe(false);
  });
});

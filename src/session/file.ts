import * as v from 'valibot';
import { ProblemError } from '../problems/index.ts';
import type { History } from './history.ts';
import { startHistory } from './history.ts';

const MAGIC = 'linewright-session';
const VERSION = 2;

/** What turns a file of one version into one of the next; a file goes through all from its own to the present one. */
const MIGRATIONS: Readonly<Record<number, (file: object) => object>> = {
  // version 1 knew a source by name and size: its sources stay without a hash and are compared as before
  1: (file) => ({ ...file, version: 2 }),
};

const keys = v.array(v.string());
const verdictShape = v.object({
  at: v.number(),
  atErr: v.nullable(v.number()),
  decision: v.optional(v.picklist(['accepted', 'rejected', 'unidentified', 'artefact'])),
  accepted: v.optional(keys),
  turnedDown: v.optional(v.array(keys)),
  note: v.optional(v.string()),
});
const settingsShape = v.object({
  reading: v.record(v.string(), v.unknown()),
  measure: v.record(v.string(), v.unknown()),
  naming: v.record(v.string(), v.unknown()),
  gas: v.optional(v.record(v.string(), v.unknown())),
  paper: v.optional(v.record(v.string(), v.unknown())),
  ownLines: v.optional(v.object({ name: v.string(), text: v.string() })),
});
const sourceShape = v.object({
  kind: v.picklist(['spectrum', 'line-list']),
  name: v.string(),
  size: v.number(),
  sha256: v.optional(v.string()),
});
const shelfShape = v.array(v.object({ source: sourceShape, settings: settingsShape, verdicts: v.array(verdictShape) }));
const documentShape = v.object({
  source: v.optional(sourceShape),
  settings: settingsShape,
  verdicts: v.array(verdictShape),
  shelf: v.optional(shelfShape),
});
const stepShape = v.variant('on', [
  v.object({ on: v.literal('verdict'), before: v.optional(verdictShape), after: v.optional(verdictShape) }),
  v.object({ on: v.literal('settings'), before: settingsShape, after: settingsShape }),
  v.object({ on: v.literal('source'), before: v.optional(sourceShape), after: v.optional(sourceShape) }),
  v.object({ on: v.literal('shelf'), before: v.optional(shelfShape), after: v.optional(shelfShape) }),
]);
const changesShape = v.array(v.object({ sentence: v.string(), steps: v.array(stepShape) }));
const fileShape = v.object({
  magic: v.literal(MAGIC),
  version: v.literal(VERSION),
  document: documentShape,
  past: changesShape,
  future: changesShape,
});

/** The history as the text of a session file (JSON with a magic word and a version). */
export function writeSession(history: History): string {
  return `${JSON.stringify(sessionRecord(history), null, 1)}\n`;
}

/**
 * A session file's text -> the history it holds.
 *
 * @throws ProblemError when the text is no session file, is of another version, or does not hold together
 */
export function readSession(text: string, file: string): History {
  const fail = (code: string, found: string, doThis: string): never => {
    throw new ProblemError({ code, where: { file }, found, expected: `a ${MAGIC} file of version ${VERSION}`, doThis });
  };
  let raw: unknown;
  try {
    raw = JSON.parse(text);
  } catch {
    return fail('session-not-json', 'the text is not JSON', 'Open a file that was saved by "Save session".');
  }
  return checked(raw, fail);
}

/** What is kept of a session outside a file: plain data with the same magic word and version. */
export const sessionRecord = ({ document, past, future }: History): object => ({ magic: MAGIC, version: VERSION, document, past, future });

/**
 * A record of `sessionRecord`, of this or an earlier release -> the history it holds.
 *
 * @throws ProblemError as `readSession`
 */
export function readSessionRecord(record: unknown, where: string): History {
  return checked(record, (code, found, doThis) => {
    throw new ProblemError({ code, where: { file: where }, found, expected: `a ${MAGIC} record of version ${VERSION}`, doThis });
  });
}

function checked(raw: unknown, fail: (code: string, found: string, doThis: string) => never): History {
  const head = v.safeParse(v.object({ magic: v.literal(MAGIC), version: v.number() }), raw);
  if (!head.success)
    return fail('session-no-magic', 'the file does not call itself a session', 'Open a file that was saved by "Save session".');
  let file: object = raw as object;
  for (let { version } = head.output; version !== VERSION; version++) {
    const migrate = MIGRATIONS[version];
    if (!migrate) return fail('session-version', `version ${head.output.version}`, 'Open it with the release that wrote it.');
    file = migrate(file);
  }
  const parsed = v.safeParse(fileShape, file);
  if (!parsed.success) {
    const issue = parsed.issues[0];
    return fail(
      'session-broken',
      `${v.getDotPath(issue) ?? 'the file'}: ${issue.message}`,
      'The file was changed or cut: use another copy.',
    );
  }
  // valibot has checked the shape; settings are open records on purpose, since every release adds some and the engine ignores what it does not know.
  const { document, past, future } = parsed.output as unknown as History;
  return { ...startHistory(document), past, future };
}

import * as v from 'valibot';
import { ProblemError } from '../problems/index.ts';
import type { History } from './history.ts';
import { startHistory } from './history.ts';

const MAGIC = 'linewright-session';
const VERSION = 1;

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
  ownLines: v.optional(v.object({ name: v.string(), text: v.string() })),
});
const sourceShape = v.object({ kind: v.picklist(['spectrum', 'line-list']), name: v.string(), size: v.number() });
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
  return `${JSON.stringify({ magic: MAGIC, version: VERSION, document: history.document, past: history.past, future: history.future }, null, 1)}\n`;
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
  const head = v.safeParse(v.object({ magic: v.literal(MAGIC), version: v.number() }), raw);
  if (!head.success)
    return fail('session-no-magic', 'the file does not call itself a session', 'Open a file that was saved by "Save session".');
  if (head.output.version !== VERSION)
    return fail('session-version', `version ${head.output.version}`, 'Open it with the release that wrote it.');
  const parsed = v.safeParse(fileShape, raw);
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

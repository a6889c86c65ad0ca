import { type DBSchema, type IDBPDatabase, openDB } from 'idb';
import { EMPTY_DOCUMENT, type History, readSessionRecord, type Source, sessionRecord, startHistory } from '../session/index.ts';
import type { KeptView } from './desk/fates.ts';
import { words } from './words.ts';

/** What is kept in the browser after every action. */
export interface KeptDesk {
  readonly history: History;
  readonly view: KeptView;
}

interface Schema extends DBSchema {
  desk: { key: string; value: { readonly session?: object; readonly history?: object; readonly view: KeptView } };
  /** Bytes of every source the history speaks of, by `sourceKey`. */
  files: { key: string; value: Blob };
}

const NAME = 'linewright';
const VERSION = 1;
const CURRENT = 'current';
const SET_ASIDE = 'set aside';

/** What tells one source from another; those kept by the first release have no hash. */
export const sourceKey = (source: Source) => `${source.kind}|${source.name}|${source.sha256 ?? source.size}`;

let opened: Promise<IDBPDatabase<Schema>> | undefined;

function database(): Promise<IDBPDatabase<Schema>> {
  opened ??= openDB<Schema>(NAME, VERSION, {
    upgrade(db) {
      db.createObjectStore('desk');
      db.createObjectStore('files');
    },
  });
  return opened;
}

export async function keepDesk({ history, view }: KeptDesk): Promise<void> {
  await (await database()).put('desk', { session: sessionRecord(history), view }, CURRENT);
}

/**
 * What was kept, by this or an earlier release.
 *
 * @throws ProblemError when it does not hold together: it is set aside, so that the desk starts all the same
 */
export async function keptDesk(): Promise<KeptDesk | undefined> {
  const db = await database();
  const kept = await db.get('desk', CURRENT);
  if (!kept) return undefined;
  try {
    // the first release kept the bare history
    const record = kept.session ?? { ...sessionRecord(startHistory(EMPTY_DOCUMENT)), ...kept.history, version: 1 };
    return { history: readSessionRecord(record, words.keptWork), view: kept.view };
  } catch (error) {
    await db.put('desk', kept, SET_ASIDE);
    await db.delete('desk', CURRENT);
    throw error;
  }
}

export async function keepFile(source: Source, file: Blob): Promise<void> {
  await (await database()).put('files', file, sourceKey(source));
}

export async function keptFile(source: Source): Promise<Blob | undefined> {
  return (await database()).get('files', sourceKey(source));
}

/** Forgets the bytes of sources the history no longer speaks of. */
export async function pruneFiles(history: History): Promise<void> {
  const spoken = new Set<string>();
  const note = (source: Source | undefined) => source && spoken.add(sourceKey(source));
  note(history.document.source);
  for (const change of [...history.past, ...history.future]) {
    for (const step of change.steps) {
      if (step.on === 'source') {
        note(step.before);
        note(step.after);
      }
    }
  }
  const db = await database();
  for (const key of await db.getAllKeys('files')) if (!spoken.has(key)) await db.delete('files', key);
}

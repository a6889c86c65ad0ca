import { type DBSchema, type IDBPDatabase, openDB } from 'idb';
import type { History, Source } from '../session/index.ts';
import type { KeptView } from './desk/fates.ts';

/** What is kept in the browser after every action. */
export interface KeptDesk {
  readonly history: History;
  readonly view: KeptView;
}

interface Schema extends DBSchema {
  desk: { key: string; value: KeptDesk };
  /** Bytes of every source the history speaks of, by `sourceKey`. */
  files: { key: string; value: Blob };
}

const NAME = 'linewright';
const VERSION = 1;
const CURRENT = 'current';

/** What tells one source from another. */
export const sourceKey = (source: Source) => `${source.kind}|${source.name}|${source.size}`;

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

export async function keepDesk(desk: KeptDesk): Promise<void> {
  await (await database()).put('desk', desk, CURRENT);
}

export async function keptDesk(): Promise<KeptDesk | undefined> {
  return (await database()).get('desk', CURRENT);
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

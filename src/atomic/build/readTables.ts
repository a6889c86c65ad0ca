import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** Text of every file of `src/atomic/tables`, by name, and the SHA-256 of them all. */
export interface TableFiles {
  readonly files: ReadonlyMap<string, string>;
  readonly hash: string;
}

export function readTables(): TableFiles {
  const folder = fileURLToPath(new URL('../tables/', import.meta.url));
  const names = readdirSync(folder)
    .filter((name) => name.endsWith('.csv') || name.endsWith('.bib'))
    .sort();
  const hash = createHash('sha256');
  const files = new Map<string, string>();
  for (const name of names) {
    const text = readFileSync(`${folder}${name}`, 'utf8');
    files.set(name, text);
    hash.update(`${name}\n${text.length}\n${text}`);
  }
  return { files, hash: hash.digest('hex') };
}

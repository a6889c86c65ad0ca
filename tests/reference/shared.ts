import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

/** Folder of reference material that is not ours to ship, named by the environment variable SHARED. */
export const shared = process.env.SHARED;

/** Whether the material is there; tests on it are skipped otherwise, and `npm test` counts and reports them. */
export const hasShared = (path: string) => shared !== undefined && existsSync(join(shared, path));

export const sharedText = (path: string) => readFileSync(join(shared ?? '', path), 'utf8');

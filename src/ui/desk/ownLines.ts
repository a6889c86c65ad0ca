import { wordProblem } from '../../problems/index.ts';
import { words } from '../words.ts';
import { set } from './decisions.ts';
import { listClient, tell } from './engineRuns.ts';

const { list: label } = words;

/**
 * Adds the lines of a CSV to the list, all of them or none.
 *
 * @returns what has to be mended, one sentence a row; nothing when the lines were added
 */
export async function addOwnLines(file: File): Promise<readonly string[]> {
  try {
    const own = { name: file.name, text: await file.text() };
    const { count, problems } = await listClient().checkLines(own);
    if (problems.length > 0) return problems.map(wordProblem);
    set((settings) => ({ ...settings, ownLines: own }), label.ownAdded(count, file.name));
  } catch (error) {
    tell(error);
  }
  return [];
}

export const removeOwnLines = () => set((settings) => ({ ...settings, ownLines: undefined }), label.ownRemoved);

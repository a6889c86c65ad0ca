import { type AtomicData, readUserLines } from '../atomic/index.ts';
import type { Problem, Remark } from '../problems/index.ts';
import type { OwnLines } from '../session/index.ts';

/** What would come of the user's own lines: how many there are, or a problem for every bad row and none of them. */
export function checkOwnLines(
  data: AtomicData,
  own: OwnLines,
): { readonly count: number; readonly problems: readonly Problem[]; readonly remarks: readonly Remark[] } {
  const reading = readUserLines(own.text, own.name, data.lines);
  return reading.ended === 'read'
    ? { count: reading.lines.length, problems: [], remarks: reading.remarks }
    : { count: 0, problems: reading.problems, remarks: [] };
}

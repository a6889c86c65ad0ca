import type { AtomicData } from '../atomic/index.ts';
import type { FixedName } from '../identify/index.ts';
import type { LineKey, Verdict } from '../session/index.ts';
import { lineOfKey } from './lineNames.ts';

/**
 * The user's verdicts in the words of the inference. A key that the line list does not know any more is left out: its verdict stays in the document.
 *
 * @param byMark the verdict of each mark, or undefined
 */
export function fixedNames(byMark: readonly (Verdict | undefined)[], data: AtomicData): FixedName[] {
  const fixed: FixedName[] = [];
  byMark.forEach((verdict, mark) => {
    if (!verdict) return;
    if (verdict.decision === 'unidentified' || verdict.decision === 'artefact') fixed.push({ mark, none: true });
    const lines = verdict.decision === 'accepted' ? known(verdict.accepted ?? [], data) : undefined;
    if (lines) fixed.push({ mark, lines });
    const not = (verdict.turnedDown ?? []).map((keys) => known(keys, data)).filter((lines) => lines !== undefined);
    if (not.length > 0) fixed.push({ mark, not });
  });
  return fixed;
}

/** The lines of `keys`, or undefined when any is unknown. */
function known(keys: readonly LineKey[], data: AtomicData): number[] | undefined {
  const lines = keys.map((key) => lineOfKey(data, key)).filter((line) => line !== undefined);
  return lines.length > 0 && lines.length === keys.length ? lines : undefined;
}

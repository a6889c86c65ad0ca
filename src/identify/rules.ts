import type { FixedName } from './naming.ts';

/** What the user's verdicts say of one mark. */
export interface Rule {
  readonly lines?: readonly number[];
  readonly not: readonly (readonly number[])[];
  readonly none: boolean;
}

/** One rule a mark. */
export function rulesOf(count: number, fixed: readonly FixedName[]): Rule[] {
  const rules: { lines?: readonly number[]; not: (readonly number[])[]; none: boolean }[] = Array.from({ length: count }, () => ({
    not: [],
    none: false,
  }));
  for (const f of fixed) {
    if ('lines' in f) rules[f.mark].lines = f.lines;
    else if ('not' in f) rules[f.mark].not.push(...f.not);
    else rules[f.mark].none = true;
  }
  return rules;
}

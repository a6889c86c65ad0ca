import { describe, expect, test } from 'vitest';
import { latexText, TABLE_FORMATS, withError } from '../../src/report/index.ts';
import { blend, oIII, table } from './someTable.ts';

describe('the LaTeX table', () => {
  const text = TABLE_FORMATS.latex.write(table(oIII, blend));

  test('is balanced: environments, braces and dollars close', () => {
    expect(text.match(/\\begin\{/g)?.length).toBe(text.match(/\\end\{/g)?.length);
    const bare = text.replaceAll(/\\[{}$%&#_]/g, '');
    expect(bare.match(/\{/g)?.length).toBe(bare.match(/\}/g)?.length);
    expect((bare.match(/\$/g)?.length ?? 0) % 2).toBe(0);
  });

  test('has as many cells in every row as columns', () => {
    const rows = text.split('\n').filter((line) => line.endsWith('\\\\') && !line.startsWith('\\'));
    for (const row of rows) expect(row.replaceAll('\\&', '').split('&')).toHaveLength(8);
    expect(rows).toHaveLength(4);
  });

  test('prints the ion in small capitals with its brackets, a ring for thin gas, decimals by the error', () => {
    expect(text).toContain('[O\\,\\textsc{iii}]$^{\\circ}$');
    expect(text).toContain('$5007.363 \\pm 0.012$');
    expect(text).toContain('$31.20 \\pm 0.70$');
    expect(text).toContain('$7.1\\times10^{5}$');
    expect(text).toContain('H\\,\\textsc{i} + He\\,\\textsc{i}');
  });

  test('makes special characters of names and notes harmless', () => {
    expect(text).toContain('lantern\\_nebula.csv');
    expect(text).toContain('50 \\% \\& more');
    expect(latexText('a\\b^c~d{e}')).toBe('a\\textbackslash{}b\\textasciicircum{}c\\textasciitilde{}d\\{e\\}');
  });
});

describe('a value with its error', () => {
  test.each([
    [5006.84231, 0.0123, '$5006.842 \\pm 0.012$'],
    [985.2, 31, '$985 \\pm 31$'],
    [1.234e-14, 2.1e-16, '$(1.234 \\pm 0.021)\\times10^{-14}$'],
    [12.3, undefined, '$12.30$'],
    [undefined, 1, ''],
  ])('%s with error %s is printed as %s', (value, error, expected) => {
    expect(withError(value, error)).toBe(expected);
  });
});

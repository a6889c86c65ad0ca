import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { latexText, PRESETS, TABLE_FORMATS } from '../../src/report/index.ts';
import { blend, oIII, table } from './someTable.ts';

const asText = (written: string | Uint8Array) => (typeof written === 'string' ? written : '');
const rows = table(
  oIII,
  { ...blend, verdict: 'accepted' },
  { ...blend, feature: 3, ion: undefined, wavelengthLab: undefined, verdict: 'unidentified', note: '' },
);
const WRITTEN = (['latex', 'deluxetable'] as const).flatMap((format) =>
  Object.entries(PRESETS).map(([name, design]) => [format, name, asText(TABLE_FORMATS[format].write(rows, design)), design] as const),
);

describe.each(WRITTEN)('%s by the design "%s"', (format, _, text, design) => {
  test('is balanced: environments, braces and dollars close', () => {
    expect(text.match(/\\begin\{/g)?.length).toBe(text.match(/\\end\{/g)?.length);
    const bare = text.replaceAll(/\\[{}$%&#_]/g, '');
    expect(bare.match(/\{/g)?.length).toBe(bare.match(/\}/g)?.length);
    expect((bare.match(/\$/g)?.length ?? 0) % 2).toBe(0);
  });

  test('has as many cells in every row as columns', () => {
    const body =
      format === 'latex' ? text.slice(text.indexOf('\\endlastfoot')) : text.slice(text.indexOf('\\startdata'), text.indexOf('\\enddata'));
    const lines = body.split('\n').filter((line) => line.includes(' & '));
    expect(lines.length).toBeGreaterThanOrEqual(2);
    for (const line of lines) expect(line.replaceAll('\\&', '').split('&')).toHaveLength(design.columns.length);
  });
});

describe('the LaTeX table', () => {
  const text = asText(TABLE_FORMATS.latex.write(rows));

  test('prints the ion in small capitals with its brackets, a ring for thin gas, decimals by the error', () => {
    expect(text).toContain('[O~\\textsc{iii}]$^{\\circ}$');
    expect(text).toContain('5007.363 $\\pm$ 0.012');
    expect(text).toContain('31.20 $\\pm$ 0.70');
    expect(text).toContain('7.1 $\\times$ 10$^{5}$');
    expect(text).toContain('H~\\textsc{i} + He~\\textsc{i}');
    expect(text).toContain('unidentified');
  });

  test('makes special characters of names and notes harmless', () => {
    expect(text).toContain('lantern\\_nebula.csv');
    expect(text).toContain('50 \\% \\& more');
    expect(latexText('a\\b^c~d{e}')).toBe('a\\textbackslash{}b\\textasciicircum{}c\\textasciitilde{}d\\{e\\}');
  });
});

const has = (...command: string[]) => {
  const run = spawnSync(command[0], command.slice(1), { encoding: 'utf8' });
  return run.status === 0 && run.stdout.trim() !== '';
};
const hasLatex = has('pdflatex', '--version');
const hasAastex = hasLatex && has('kpsewhich', 'aastex631.cls');

/** Compiles a document; the log when it fails. */
function compile(document: string): string | undefined {
  const folder = mkdtempSync(join(tmpdir(), 'linewright-tex-'));
  writeFileSync(join(folder, 'table.tex'), document);
  const run = spawnSync('pdflatex', ['-interaction=nonstopmode', '-halt-on-error', 'table.tex'], { cwd: folder, encoding: 'utf8' });
  return run.status === 0
    ? undefined
    : readFileSync(join(folder, 'table.log'), 'utf8')
        .split('\n')
        .filter((line) => line.startsWith('!'))
        .join('\n') || run.stdout;
}

describe.skipIf(!hasLatex)('compiled by a real LaTeX (skipped: needs pdflatex)', () => {
  test.each(Object.entries(PRESETS))('longtable by the design "%s"', { timeout: 60_000 }, (_, design) => {
    const body = asText(TABLE_FORMATS.latex.write(rows, design));
    const document = `\\documentclass{article}\\usepackage[landscape]{geometry}\\usepackage{longtable}\\usepackage{booktabs}\\begin{document}\n${body}\\end{document}\n`;
    expect(compile(document)).toBeUndefined();
  });

  test.skipIf(!hasAastex).each(Object.entries(PRESETS))('deluxetable by the design "%s"', { timeout: 60_000 }, (_, design) => {
    const body = asText(TABLE_FORMATS.deluxetable.write(rows, design));
    expect(compile(`\\documentclass{aastex631}\\begin{document}\n${body}\\end{document}\n`)).toBeUndefined();
  });
});

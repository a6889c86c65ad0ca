import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { basename, extname, join } from 'node:path';
import { type Analysis, createEngine, type Engine, type SourceKind } from '../engine/index.ts';
import { ProblemError, wordProblem } from '../problems/index.ts';
import { gasCsv, PRESETS, TABLE_FORMATS, type TableDesign, withoutArtefacts } from '../report/index.ts';
import type { Settings } from '../session/index.ts';
import { archiveOf } from './archive.ts';
import { type Arguments, parseArguments, UsageError } from './arguments.ts';
import { openAtomicData, withFile } from './files.ts';

/** What is written of each file. */
type Product = 'table' | 'gas' | 'paper';

export const tableCommand = (args: readonly string[]) => tables(args, 'spectrum', 'table');
export const nameCommand = (args: readonly string[]) => tables(args, 'line-list', 'table');
export const paperCommand = (args: readonly string[]) => tables(args, 'guess', 'paper');
export const gasCommand = (args: readonly string[]) => tables(args, 'guess', 'gas');

/** Exit code: 0 all done, 1 some file could not be read, 2 the command line could not be understood. */
async function tables(args: readonly string[], kind: SourceKind | 'guess', product: Product): Promise<number> {
  let options: Arguments;
  try {
    options = parseArguments(args);
    if (options.words.length === 0) throw new UsageError('no file was named');
    if (options.words.length > 1 && options.out === undefined) throw new UsageError('several files need --out DIR');
    if (product === 'gas' && options.format !== 'csv') throw new UsageError('gas is written as csv only');
    if (product === 'paper' && options.out === undefined) throw new UsageError('paper needs --out DIR');
    refuseOverwriting(options, product);
  } catch (error) {
    if (!(error instanceof UsageError)) throw error;
    process.stderr.write(`linewright: ${error.message}\n`);
    return 2;
  }
  const engine = createEngine(openAtomicData(), () => performance.now() / 1000);
  if (options.out !== undefined) mkdirSync(options.out, { recursive: true });
  const settings = withOwnLines(options);
  if (!settings) return 1;
  let failures = 0;
  for (const path of options.words) failures += (await oneFile(engine, path, kind, product, { ...options, settings })) ? 0 : 1;
  return failures > 0 ? 1 : 0;
}

/** The settings with the user's own lines; undefined when their file cannot be read, which is told on stderr. */
function withOwnLines({ settings, lines }: Arguments): Settings | undefined {
  if (lines === undefined) return settings;
  try {
    return { ...settings, ownLines: { name: basename(lines), text: readFileSync(lines, 'utf8') } };
  } catch (error) {
    process.stderr.write(`linewright: ${lines}: ${error instanceof Error ? error.message : String(error)}\n`);
    return undefined;
  }
}

/** Two inputs of one name would write one file. @throws UsageError */
function refuseOverwriting(options: Arguments, product: Product): void {
  const seen = new Map<string, string>();
  for (const path of options.words) {
    const target = outputName(path, options, product);
    const earlier = seen.get(target);
    if (earlier !== undefined)
      throw new UsageError(`${earlier} and ${path} would both be written to ${target}: give them different names or run them apart`);
    seen.set(target, path);
  }
}

function outputName(path: string, options: Arguments, product: Product): string {
  const stem = basename(path, extname(path));
  if (product === 'paper') return `${stem}-paper.zip`;
  return `${stem}${product === 'gas' ? '-gas' : ''}.${TABLE_FORMATS[options.format].ending}`;
}

/** Whether the file could be read. */
async function oneFile(engine: Engine, path: string, kind: SourceKind | 'guess', product: Product, options: Arguments): Promise<boolean> {
  const tell = progressOnTerminal(basename(path));
  try {
    await withFile(path, async (source) => {
      await engine.open(source, kind);
      const analysis = await engine.analyse(options.settings, [], { progress: ({ stage, share }) => tell(stage, share) });
      tell();
      const content = contentOf(analysis, options, product, source.size);
      if (options.out === undefined) process.stdout.write(content);
      else writeFileSync(join(options.out, outputName(path, options, product)), content);
      const named = analysis.features.filter((f) => f.name).length;
      process.stderr.write(
        `${basename(path)}: ${analysis.features.length} features, ${named} named, z = ${analysis.z.toFixed(6)} +/- ${analysis.zErr.toFixed(6)}\n`,
      );
      for (const remark of analysis.remarks) if (remark.weight === 'warning') process.stderr.write(`  ${wordProblem(remark)}\n`);
      for (const at of options.limits) process.stderr.write(`  ${limitText(engine, at)}\n`);
      if (options.timings) for (const { stage, seconds } of analysis.timings) process.stderr.write(`  ${stage} ${seconds.toFixed(3)} s\n`);
    });
    return true;
  } catch (error) {
    tell();
    if (!(error instanceof ProblemError)) throw error;
    process.stderr.write(`linewright: ${wordProblem(error.problem)}\n`);
    return false;
  }
}

/** Nothing is accepted at the terminal: printed tables hold all lines, and say that their names are proposals. */
function contentOf(analysis: Analysis, options: Arguments, product: Product, size: number): string | Uint8Array {
  const design: TableDesign = { ...PRESETS[options.design], rows: 'all' };
  if (product === 'gas') return gasCsv(analysis.gas);
  if (product === 'table') return TABLE_FORMATS[options.format].write(withoutArtefacts(analysis.table), design);
  return archiveOf(analysis, design, options.settings, size);
}

/** The limit at a wavelength in words; the flux unit is that of the table. */
function limitText(engine: Engine, at: number): string {
  const found = engine.limitAt(at);
  if (!found) return `limit ${at}: too few samples there`;
  return `limit ${at}: flux < ${found.limit.toPrecision(4)} (3 sigma, FWHM ${found.fwhm.toFixed(3)} A); the fits leave ${found.flux.toPrecision(3)} +/- ${found.fluxErr.toPrecision(3)}`;
}

/** A progress line on stderr when a person looks at it; called without arguments it wipes the line. */
function progressOnTerminal(name: string): (stage?: string, share?: number) => void {
  if (!process.stderr.isTTY) return () => {};
  return (stage, share) =>
    process.stderr.write(stage === undefined ? '\r\u001b[K' : `\r\u001b[K${name}: ${stage} ${Math.round(100 * (share ?? 0))} %`);
}

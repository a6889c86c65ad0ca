import { parseArgs } from 'node:util';
import type { ObjectKind } from '../identify/index.ts';
import type { ExtinctionCurve } from '../plasma/index.ts';
import { nearestWord } from '../problems/index.ts';
import { PRESETS, type PresetName, TABLE_FORMATS, type TableFormatName } from '../report/index.ts';
import type { Settings } from '../session/index.ts';
import { redshiftFromVelocity } from '../units/index.ts';

/** The command line could not be understood: one line for stderr, exit 2. */
export class UsageError extends Error {}

const KINDS: readonly ObjectKind[] = ['unknown', 'hii-region', 'planetary-nebula', 'nova-shell', 'shocked-gas', 'narrow-line-galaxy'];

const CURVES: readonly ExtinctionCurve[] = ['ccm89-odonnell94', 'ccm89', 'fitzpatrick99'];

const OPTIONS = {
  out: { type: 'string' },
  format: { type: 'string' },
  design: { type: 'string' },
  z: { type: 'string' },
  velocity: { type: 'string' },
  medium: { type: 'string' },
  resolution: { type: 'string' },
  kind: { type: 'string' },
  width: { type: 'string' },
  threshold: { type: 'string' },
  limit: { type: 'string' },
  te: { type: 'string' },
  ne: { type: 'string' },
  curve: { type: 'string' },
  rv: { type: 'string' },
  chbeta: { type: 'string' },
  hdu: { type: 'string' },
  row: { type: 'string' },
  order: { type: 'string' },
  lines: { type: 'string' },
  timings: { type: 'boolean' },
} as const;

export interface Arguments {
  /** What stands without a dash: files or ions. */
  readonly words: readonly string[];
  readonly out?: string;
  readonly format: TableFormatName;
  /** How printed tables are laid out. */
  readonly design: PresetName;
  /** CSV file with the user's own lines. */
  readonly lines?: string;
  readonly timings: boolean;
  /** Wavelengths at which three-sigma limits are wanted, Angstrom. */
  readonly limits: readonly number[];
  readonly settings: Settings;
  readonly te?: number;
  readonly ne?: number;
}

/** @throws UsageError in words that name the option */
export function parseArguments(args: readonly string[]): Arguments {
  const { values, positionals } = parse(args);
  const format = choice('--format', values.format ?? 'csv', Object.keys(TABLE_FORMATS) as TableFormatName[]);
  if (values.z !== undefined && values.velocity !== undefined)
    throw new UsageError('--z and --velocity say the same thing: give one of them');
  const velocity = number('--velocity', values.velocity);
  const z = number('--z', values.z) ?? (velocity === undefined ? undefined : redshiftFromVelocity(velocity));
  if (z !== undefined && z <= -1) throw new UsageError(`--z ${z}: a redshift is larger than -1`);
  const medium = values.medium === undefined ? undefined : choice('--medium', values.medium, ['air', 'vacuum'] as const);
  const kind = values.kind === undefined ? undefined : choice('--kind', values.kind, KINDS);
  const te = positive('--te', values.te);
  const ne = positive('--ne', values.ne);
  return {
    words: positionals,
    out: values.out,
    format,
    design: choice('--design', values.design ?? 'atlas', Object.keys(PRESETS) as PresetName[]),
    lines: values.lines,
    timings: values.timings === true,
    limits: (values.limit ?? '').split(',').flatMap((text) => (text === '' ? [] : (positive('--limit', text) ?? []))),
    te,
    ne,
    settings: {
      reading: dropAbsent({
        hdu: whole('--hdu', values.hdu, 0),
        row: whole('--row', values.row, 1),
        order: whole('--order', values.order, 1),
        medium,
      }),
      measure: dropAbsent({
        thresholdSigma: positive('--threshold', values.threshold),
        resolvingPower: positive('--resolution', values.resolution),
        instrumentFwhmA: positive('--width', values.width),
      }),
      naming: dropAbsent({ z, kind, te, ne }),
      gas: dropAbsent({
        curve: values.curve === undefined ? undefined : choice('--curve', values.curve, CURVES),
        rV: positive('--rv', values.rv),
        cHbeta: number('--chbeta', values.chbeta),
      }),
    },
  };
}

function parse(args: readonly string[]) {
  try {
    return parseArgs({ args: joinNegatives(args), options: OPTIONS, allowPositionals: true });
  } catch (error) {
    const given = args.find((a) => a.startsWith('--') && !(a.slice(2).split('=')[0] in OPTIONS));
    const near = given && nearestWord(given.slice(2).split('=')[0], Object.keys(OPTIONS));
    if (given) throw new UsageError(`no option ${given}${near ? `: did you mean --${near}?` : ''}`);
    throw new UsageError(error instanceof Error ? error.message : String(error));
  }
}

/** `--velocity -410` is a value, not an option: parseArgs wants `--velocity=-410`. */
function joinNegatives(args: readonly string[]): string[] {
  const joined: string[] = [];
  for (let k = 0; k < args.length; k++) {
    if (/^--[a-z]+$/.test(args[k]) && /^-[\d.]/.test(args[k + 1] ?? '')) joined.push(`${args[k]}=${args[++k]}`);
    else joined.push(args[k]);
  }
  return joined;
}

function number(option: string, text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  const value = Number(text);
  if (text.trim() === '' || !Number.isFinite(value)) throw new UsageError(`${option} ${text}: expected a number`);
  return value;
}

function positive(option: string, text: string | undefined): number | undefined {
  const value = number(option, text);
  if (value !== undefined && value <= 0) throw new UsageError(`${option} ${text}: expected a number above 0`);
  return value;
}

function whole(option: string, text: string | undefined, least: number): number | undefined {
  const value = number(option, text);
  if (value !== undefined && (!Number.isInteger(value) || value < least))
    throw new UsageError(`${option} ${text}: expected a whole number from ${least} on`);
  return value;
}

function choice<Word extends string>(option: string, given: string, words: readonly Word[]): Word {
  const found = words.find((word) => word === given.toLowerCase());
  if (found) return found;
  const near = nearestWord(given, words);
  throw new UsageError(`${option} ${given}: ${near ? `did you mean ${near}? ` : ''}there are ${words.join(', ')}`);
}

function dropAbsent<T extends object>(settings: T): T {
  return Object.fromEntries(Object.entries(settings).filter(([, value]) => value !== undefined)) as T;
}

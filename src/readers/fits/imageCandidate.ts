import { ProblemError } from '../../problems/index.ts';
import { assemble } from '../assemble.ts';
import { roleOf } from '../columnRoles.ts';
import type { Column } from '../columns.ts';
import { columnsToSpectrum, unitOfColumn } from '../columnsToSpectrum.ts';
import { mergeReadings } from '../mergeReadings.ts';
import { count, noteFact, warn } from '../notes.ts';
import type { Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import { spectralUnit, toAngstrom } from '../spectralUnits.ts';
import type { FitsFile, Judged } from './candidate.ts';
import { bandErrors, type Companions, companionErrors, companionMask, companions, imageRole } from './companions.ts';
import { type Hdu, nameHdu } from './hdus.ts';
import { textOf } from './header.ts';
import { headerFacts } from './headerFacts.ts';
import { imageLine } from './imageLine.ts';
import { readOrders } from './orders.ts';
import { requireChoice } from './requireChoice.ts';
import { namesOfRows } from './rowNames.ts';
import { type AxisCards, axisWavelengths, findAxis, isVelocityAxis } from './spectralAxis.ts';
import { watAttributes } from './wat.ts';

/** Images with more lines than this are two-dimensional frames rather than stacks of spectra. */
const FRAME_LINES = 64;
const MOST_OFFERS = 300;
const MOST_MERGED = 500;

/** Judges an image: a spectrum, a stack of spectra, bands or orders, or columns of a table. */
export async function judgeImage(file: FitsFile, hdu: Hdu): Promise<Judged> {
  const { axes } = hdu;
  if (axes.length === 0 || axes.includes(0)) return { whyNot: 'it holds no data' };
  if (hdu.dataBytes === 0) return { whyNot: 'the file ends before its data' };
  const role = imageRole(hdu);
  const axis = findAxis(hdu.header, axes);
  const isMultispec = axis !== undefined && /^MULTISPE/.test(axis.type);
  if (isMultispec || /system=multispec/i.test(String(hdu.header.cards.get('WAT0_001')?.value ?? ''))) {
    const orders = axes[1] ?? 1;
    return {
      candidate: {
        hdu,
        label: `${nameHdu(hdu)}: ${count(orders, 'order')} of ${count(axes[0], 'sample')}`,
        merit: 92,
        reason: 'its WAT cards give the wavelengths of orders',
        read: (choices, control) => readOrders(file, hdu, choices, control),
      },
    };
  }
  const rows = await namesOfRows(file, hdu);
  if (rows)
    return {
      candidate: {
        hdu,
        label: `${nameHdu(hdu)}: image rows ${rows.names.join(', ')}`,
        merit: 93,
        reason: rows.reason,
        read: (choices, control) => readRowsAsColumns(file, hdu, rows.names, rows.axis, axis, choices, control),
      },
    };
  const found = companions(file, hdu);
  const lines = linesOf(axes, axis?.axis ?? 1);
  const lesser =
    role === 'flux' ||
    (role === 'other' &&
      (hdu.name === '' ||
        hdu.index === 0 ||
        !/sky|back|cont|resid|norm|tell?uric|resol|model|cross|scatter|profile|wht|weight/i.test(hdu.name)))
      ? 0
      : -60;
  if (axis || found.wavelength) {
    const merit =
      (lines > FRAME_LINES ? 45 : lines > 1 ? 84 : 90) +
      lesser +
      (axis && isVelocityAxis(axis) ? -30 : 0) +
      (axis && !found.wavelength && (axes[axis.axis - 1] ?? 0) < 10 ? -50 : 0);
    return {
      candidate: {
        hdu,
        label: `${nameHdu(hdu)}: image, ${lines > 1 ? `${lines} spectra of ` : ''}${count(found.wavelength ? axes[0] : axes[(axis?.axis ?? 1) - 1], 'sample')}`,
        merit,
        reason: found.wavelength ? `${nameHdu(found.wavelength)} holds its wavelengths` : 'its header gives a wavelength axis',
        read: (choices, control) => readLine(file, hdu, axis, found, choices, control),
      },
    };
  }
  return {
    whyNot:
      axes.length >= 2 && lines > 1
        ? 'its image has no wavelength axis (a picture or a raw frame?)'
        : 'its image has no wavelength axis (no CRVAL1 and CDELT1 or CD1_1)',
  };
}

const linesOf = (axes: readonly number[], axis: number) => axes.reduce((product, n, k) => (k === axis - 1 ? product : product * n), 1);

/** Rows (or columns) of the image are the columns of a table. */
function readRowsAsColumns(
  file: FitsFile,
  hdu: Hdu,
  names: readonly string[],
  along: number,
  axis: AxisCards | undefined,
  choices: ReadingChoices,
  _control: ReadingControl,
): Promise<Reading> {
  const { source, notes } = file;
  const across = along === 1 ? 2 : 1;
  const n = hdu.axes[along - 1];
  noteFact(notes, 'layout', `image whose ${along === 1 ? 'rows' : 'columns'} are ${names.join(', ')}`, nameHdu(hdu));
  const columns: Column[] = names.map((name, k) => ({
    name,
    unit: '',
    kind: 'real',
    samples: n,
    read: () => imageLine(source, hdu, along, across === 2 ? [0, k] : [k, 0], notes),
  }));
  const hasWave = columns.some((c) => roleOf(c).role === 'wavelength');
  const all: Column[] =
    hasWave || !axis
      ? columns
      : [
          ...columns,
          {
            name: 'wavelength',
            unit: 'Angstrom',
            kind: 'real',
            samples: n,
            read: async () => axisWavelengths(axis, hdu.header, n, choices, notes, hdu.index).wavelength,
          },
        ];
  const row = choices.row ?? choices.order;
  if (row !== undefined) requireChoice(row, names.length, 'row', 'row', hdu, notes);
  const flux = choices.fluxColumn ?? (row === undefined ? undefined : names[row - 1]);
  return columnsToSpectrum(
    all,
    { name: notes.file, place: { hdu: hdu.index }, taken: { hdu: hdu.index }, ...unitOfWat(hdu), ...headerFacts(hdu, file.hdus[0], notes) },
    { ...choices, ...(flux ? { fluxColumn: flux } : {}) },
    notes,
  );
}

/** The unit of wavelengths in WAT cards or CUNIT1 holds for a row of wavelengths too. */
function unitOfWat(hdu: Hdu) {
  for (const [words, evidence] of [
    [watAttributes(hdu.header, 1).units ?? '', 'units in WAT1_001'],
    [textOf(hdu.header, 'CUNIT1'), 'CUNIT1'],
  ]) {
    const unit = words === '' ? undefined : spectralUnit(words);
    if (unit && !unit.log && unit.quantity === 'wavelength') return { spectralUnit: { unit, evidence } };
  }
  return {};
}

/** One line of an image, with wavelengths from the axis or from another unit. */
async function readLine(
  file: FitsFile,
  hdu: Hdu,
  axis: AxisCards | undefined,
  found: Companions,
  choices: ReadingChoices,
  control: ReadingControl,
): Promise<Reading> {
  const { source, notes } = file;
  const along = found.wavelength ? 1 : (axis?.axis ?? 1);
  const others = hdu.axes.map((n, k) => ({ n, axis: k + 1 })).filter(({ n, axis: a }) => a !== along && n > 1);
  const bands = bandsOf(hdu, others);
  const lineAxes = bands ? others.filter((o) => o.axis !== bands.axis) : others;
  const lines = lineAxes.reduce((product, { n }) => product * n, 1);
  if (choices.merge && lines > 1 && lines <= MOST_MERGED) {
    const parts: Reading[] = [];
    for (let row = 1; row <= lines; row++) {
      control.signal?.throwIfAborted();
      control.progress?.(row / lines);
      parts.push(
        await readLine(
          { ...file, notes: { ...notes, how: [], remarks: [], offers: [] } },
          hdu,
          axis,
          found,
          { ...choices, merge: false, row },
          {},
        ),
      );
    }
    return mergeReadings(parts, `rows 1 to ${lines}`, notes, { hdu: hdu.index, merge: true });
  }
  const band = choices.band ?? (bands && lines === 1 ? (choices.order ?? choices.row) : undefined) ?? 1;
  if (bands) requireChoice(band, bands.n, 'band', 'band', hdu, notes);
  const chosen = choices.row ?? (bands && lines === 1 ? undefined : choices.order);
  const row = lines > 1 ? (chosen ?? (await firstFilled(file, hdu, along, lineAxes, lines))) : bands ? 1 : (chosen ?? 1);
  requireChoice(row, lines, 'row', 'row', hdu, notes);
  const at = placesOf(hdu.axes.length, lineAxes, row, bands && { axis: bands.axis, band });
  noteFact(
    notes,
    'layout',
    `image of ${hdu.axes.join(' x ')}${lines > 1 ? `, row ${row} of ${lines}` : ''}${bands ? `, band ${band} of ${bands.n}${bands.names[band - 1] ? `: ${bands.names[band - 1]}` : ''}` : ''}`,
    nameHdu(hdu),
  );

  const n = hdu.axes[along - 1];
  const flux = await imageLine(source, hdu, along, at, notes);
  const wavelengths = found.wavelength
    ? await wavelengthsOf(file, found.wavelength, at, n, choices)
    : axis
      ? axisWavelengths(axis, hdu.header, n, choices, notes, hdu.index)
      : undefined;
  if (!wavelengths)
    throw new ProblemError({
      code: 'no-wavelength-axis',
      where: { file: notes.file, hdu: hdu.index },
      found: 'no wavelengths',
      expected: 'a wavelength axis',
      doThis: 'Choose another unit of the file.',
    });
  const facts = headerFacts(hdu, file.hdus[0], notes);
  noteFact(notes, 'flux unit', facts.fluxUnit?.unit ?? 'unknown', facts.fluxUnit?.evidence ?? 'the file states none');
  const isFlux = band === 1;
  const error =
    choices.errorColumn === 'none' || !isFlux
      ? undefined
      : ((bands && (await bandErrors(file, hdu, along, at, bands))) ?? (await companionErrors(file, found, along, at, choices)));
  if (!error)
    noteFact(notes, 'uncertainty', 'none', choices.errorColumn === 'none' ? 'chosen by you' : 'no band or other unit of the file holds it');
  const flagged = await companionMask(file, found, along, at, choices);
  offerLines(file, hdu, lines, row, bands, band, chosen === undefined);
  const medium = wavelengths.medium ?? facts.medium;
  return assemble(
    {
      ...facts,
      name: notes.file,
      place: { hdu: hdu.index, ...(lines > 1 ? { row } : {}) },
      wavelength: wavelengths.wavelength,
      flux,
      fluxUnit: facts.fluxUnit?.unit ?? '',
      ...(error ? { error } : {}),
      ...(flagged ? { flagged } : {}),
      ...(medium ? { medium } : {}),
    },
    choices,
    {
      hdu: hdu.index,
      ...(lines > 1 ? { row } : {}),
      ...(bands ? { [lines > 1 ? 'band' : 'order']: band } : {}),
      ...(choices.errorColumn ? { errorColumn: choices.errorColumn } : {}),
    },
    notes,
  );
}

async function wavelengthsOf(
  file: FitsFile,
  hdu: Hdu,
  at: readonly number[],
  n: number,
  choices: ReadingChoices,
): Promise<{ wavelength: Float64Array; medium?: undefined }> {
  const { source, notes } = file;
  const lines = hdu.axes.length > 1 ? hdu.axes.map((m, k) => Math.min(at[k] ?? 0, Math.max(0, m - 1))) : [0];
  const stored = await imageLine(source, hdu, 1, lines, notes);
  if (stored.length !== n)
    throw new ProblemError({
      code: 'lengths-differ',
      where: { file: notes.file, hdu: hdu.index },
      found: `${stored.length} wavelengths for ${n} samples`,
      expected: 'as many of both',
      doThis: 'Choose another unit of the file.',
    });
  const column: Column = { name: hdu.name || 'wavelength', unit: textOfUnit(hdu), kind: 'real', samples: n, read: async () => stored };
  noteFact(notes, 'wavelength', nameHdu(hdu), 'an image of wavelengths beside that of fluxes');
  return { wavelength: toAngstrom(stored, unitOfColumn(column, stored, { place: { hdu: hdu.index } }, choices, notes)) };
}

const textOfUnit = (hdu: Hdu) => String(hdu.header.cards.get('BUNIT')?.value ?? '').trim();

/** Bands of a stack: the third axis, or a second one whose BANDID cards say so. */
export interface Bands {
  readonly axis: number;
  readonly n: number;
  readonly names: readonly string[];
}

function bandsOf(hdu: Hdu, others: readonly { n: number; axis: number }[]): Bands | undefined {
  const names = (n: number) => Array.from({ length: n }, (_, k) => String(hdu.header.cards.get(`BANDID${k + 1}`)?.value ?? '').trim());
  const third = others.find((o) => o.axis === 3);
  if (third && third.n <= 10 && (hdu.axes[0] ?? 0) > 1) return { axis: 3, n: third.n, names: names(third.n) };
  const second = others.find((o) => o.axis === 2);
  if (second && others.length === 1 && second.n <= 10 && second.n > 1 && names(second.n).every((b) => b !== ''))
    return { axis: 2, n: second.n, names: names(second.n) };
  return undefined;
}

function placesOf(
  rank: number,
  lineAxes: readonly { n: number; axis: number }[],
  row: number,
  band: { axis: number; band: number } | undefined,
): number[] {
  const at = new Array<number>(rank).fill(0);
  let rest = row - 1;
  for (const { n, axis } of lineAxes) {
    at[axis - 1] = rest % n;
    rest = Math.floor(rest / n);
  }
  if (band) at[band.axis - 1] = band.band - 1;
  return at;
}

/** Lines looked at for one that is not empty. */
const LOOKED_AT = 100;

async function firstFilled(
  file: FitsFile,
  hdu: Hdu,
  along: number,
  lineAxes: readonly { n: number; axis: number }[],
  lines: number,
): Promise<number> {
  for (let row = 1; row <= Math.min(lines, LOOKED_AT); row++) {
    const flux = await imageLine(file.source, hdu, along, placesOf(hdu.axes.length, lineAxes, row, undefined), {
      ...file.notes,
      how: [],
      remarks: [],
      offers: [],
    });
    if (!flux.some((f) => f !== 0 && Number.isFinite(f))) continue;
    if (row > 1)
      warn(file.notes, 'empty-rows', `row${row > 2 ? `s 1 to ${row - 1} hold` : ' 1 holds'} no data; row ${row} is the first that does`, {
        where: { hdu: hdu.index },
      });
    return row;
  }
  return 1;
}

function offerLines(
  { notes }: FitsFile,
  hdu: Hdu,
  lines: number,
  row: number,
  bands: Bands | undefined,
  band: number,
  proposed: boolean,
): void {
  for (let r = 1; lines > 1 && r <= Math.min(lines, MOST_OFFERS); r++)
    if (r !== row) notes.offers.push({ label: `row ${r} of ${nameHdu(hdu)}`, choices: { hdu: hdu.index, row: r } });
  for (let b = 1; bands && b <= bands.n; b++)
    if (b !== band)
      notes.offers.push({
        label: `band ${b}${bands.names[b - 1] ? `: ${bands.names[b - 1]}` : ''}`,
        choices: { hdu: hdu.index, ...(lines > 1 ? { row, band: b } : { order: b }) },
      });
  if (lines > FRAME_LINES)
    warn(
      notes,
      'two-dimensional',
      `the image has ${lines} lines: it looks like a two-dimensional frame rather than extracted spectra; line ${row} is shown`,
      { where: { hdu: hdu.index }, doThis: 'Extract the spectrum first, or choose another row.' },
    );
  else if (lines > 1 && proposed)
    warn(notes, 'several-spectra', `the image holds ${lines} spectra; row ${row} is shown`, {
      where: { hdu: hdu.index },
      doThis: 'Choose another row.',
    });
}

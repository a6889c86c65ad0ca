import { ProblemError } from '../../problems/index.ts';
import { assemble } from '../assemble.ts';
import type { Column } from '../columns.ts';
import { unitOfColumn } from '../columnsToSpectrum.ts';
import { mergeReadings } from '../mergeReadings.ts';
import { noteFact, warn } from '../notes.ts';
import type { Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import { toAngstrom } from '../spectralUnits.ts';
import type { AxisCards } from './axisCards.ts';
import { type Bands, bandErrors, bandsOf } from './bands.ts';
import type { FitsFile } from './candidate.ts';
import { type Companions, companionErrors, companionMask } from './companions.ts';
import { type Hdu, nameHdu } from './hdus.ts';
import { textOf } from './header.ts';
import { headerFacts } from './headerFacts.ts';
import { imageLine } from './imageLine.ts';
import { requireChoice } from './requireChoice.ts';
import { axisWavelengths } from './spectralAxis.ts';

/** Images with more lines than this are two-dimensional frames rather than stacks of spectra. */
export const FRAME_LINES = 64;
const MOST_OFFERS = 300;
const MOST_MERGED = 500;

/** One line of an image, with wavelengths from the axis or from another unit. */
export async function readImageLine(
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
        await readImageLine(
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
  // rows with wavelengths of their own are orders of one spectrum, not different objects
  if (lines > 1 && lines <= FRAME_LINES && (found.wavelength?.axes.length ?? 0) > 1)
    notes.offers.push({ label: `all ${lines} rows as one spectrum`, choices: { hdu: hdu.index, merge: true } });
  const medium = facts.medium ?? wavelengths.medium;
  if (facts.medium && wavelengths.medium && facts.medium.medium !== wavelengths.medium.medium) {
    warn(
      notes,
      'medium-contradiction',
      `the axis says ${wavelengths.medium.medium} (${wavelengths.medium.evidence}), but ${facts.medium.evidence}: ${facts.medium.medium} is taken`,
      { where: { hdu: hdu.index }, doThis: 'Say whether the wavelengths are in air or in vacuum.' },
    );
  }
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
  const column: Column = {
    name: hdu.name || 'wavelength',
    unit: textOf(hdu.header, 'BUNIT'),
    kind: 'real',
    samples: n,
    read: async () => stored,
  };
  noteFact(notes, 'wavelength', nameHdu(hdu), 'an image of wavelengths beside that of fluxes');
  return { wavelength: toAngstrom(stored, unitOfColumn(column, stored, { place: { hdu: hdu.index } }, choices, notes)) };
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

import { roleOf } from '../columnRoles.ts';
import type { Column } from '../columns.ts';
import { columnsToSpectrum } from '../columnsToSpectrum.ts';
import { count, noteFact } from '../notes.ts';
import type { Reading, ReadingChoices } from '../reading.ts';
import { spectralUnit } from '../spectralUnits.ts';
import { type AxisCards, findAxis, isVelocityAxis } from './axisCards.ts';
import type { FitsFile, Judged } from './candidate.ts';
import { companions, imageRole } from './companions.ts';
import { type Hdu, nameHdu } from './hdus.ts';
import { textOf } from './header.ts';
import { headerFacts } from './headerFacts.ts';
import { imageLine } from './imageLine.ts';
import { FRAME_LINES, readImageLine } from './imageSpectrum.ts';
import { readOrders } from './orders.ts';
import { requireChoice } from './requireChoice.ts';
import { namesOfRows } from './rowNames.ts';
import { axisWavelengths } from './spectralAxis.ts';
import { watAttributes } from './wat.ts';

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
        read: (choices) => readRowsAsColumns(file, hdu, rows.names, rows.axis, axis, choices),
      },
    };
  const found = companions(file, hdu);
  const lines = linesOf(axes, axis?.axis ?? 1);
  const isAside =
    /sky|back|bkg|cont|resid|norm|tell?uric|resol|model|cross|scatter|profile|wht|weight|blaze/i.test(hdu.name) && hdu.index !== 0;
  const lesser = (role === 'flux' || role === 'other') && !isAside ? 0 : -60;
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
        read: (choices, control) => readImageLine(file, hdu, axis, found, choices, control),
      },
    };
  }
  return {
    whyNot:
      axes.length >= 2 && lines > 1
        ? 'its image has no wavelength axis (a picture or a raw frame?)'
        : 'its image has no wavelength axis (CRVAL1 and CDELT1 or CD1_1 are missing, or count pixels)',
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

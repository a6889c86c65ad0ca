import { ProblemError } from '../../problems/index.ts';
import { assemble } from '../assemble.ts';
import { mergeReadings } from '../mergeReadings.ts';
import { noteFact, warn } from '../notes.ts';
import type { Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import { likelyUnit, type SpectralUnit, spectralUnit, toAngstrom, unitNamed } from '../spectralUnits.ts';
import { bandErrors } from './bands.ts';
import type { FitsFile } from './candidate.ts';
import { type Hdu, nameHdu } from './hdus.ts';
import { textOf } from './header.ts';
import { headerFacts } from './headerFacts.ts';
import { imageLine } from './imageLine.ts';
import { orderWavelengths, parseOrder } from './multispec.ts';
import { requireChoice } from './requireChoice.ts';
import { watAttributes } from './wat.ts';

const MOST_OFFERS = 300;

/** Reads one order (or all, merged) of an image whose WAT cards give every order its own dispersion. @throws ProblemError */
export async function readOrders(file: FitsFile, hdu: Hdu, choices: ReadingChoices, control: ReadingControl): Promise<Reading> {
  const { notes } = file;
  const orders = Math.max(1, hdu.axes[1] ?? 1);
  if (choices.merge && orders > 1) {
    const parts: Reading[] = [];
    for (let order = 1; order <= orders; order++) {
      control.signal?.throwIfAborted();
      control.progress?.(order / orders);
      parts.push(
        await readOrders({ ...file, notes: { ...notes, how: [], remarks: [], offers: [] } }, hdu, { ...choices, merge: false, order }, {}),
      );
    }
    return mergeReadings(parts, `orders 1 to ${orders}`, notes, { hdu: hdu.index, merge: true });
  }
  const chosen = choices.order ?? choices.row;
  const order = chosen ?? 1;
  requireChoice(order, orders, 'order', 'order', hdu, notes);
  const bandCount = Math.max(1, hdu.axes[2] ?? 1);
  const band = choices.band ?? (choices.order !== undefined && choices.row !== undefined ? choices.row : 1);
  requireChoice(band, bandCount, 'band', 'band', hdu, notes);
  const names = Array.from({ length: bandCount }, (_, k) => textOf(hdu.header, `BANDID${k + 1}`));
  noteFact(
    notes,
    'layout',
    `image of ${hdu.axes.join(' x ')}: order ${order} of ${orders}${bandCount > 1 ? `, band ${band} of ${bandCount}${names[band - 1] ? `: ${names[band - 1]}` : ''}` : ''}`,
    nameHdu(hdu),
  );

  const n = hdu.axes[0];
  const dispersion = dispersionOf(file, hdu, order);
  const physical = orderWavelengths(dispersion, n, notes.file, hdu.index, order);
  const unit = unitOf(file, hdu, physical, choices);
  const wavelength = toAngstrom(physical, unit);
  const filled = dispersion.samples > 0 && dispersion.samples < n ? dispersion.samples : n;
  for (let i = filled; i < n; i++) wavelength[i] = Number.NaN;
  noteFact(
    notes,
    'wavelength',
    `${['linear', 'log-linear', 'a function of the pixel'][dispersion.type] ?? 'unknown'} dispersion of aperture ${dispersion.aperture}, beam ${dispersion.beam}`,
    `spec${order} in the WAT2 cards`,
  );
  const at = [0, order - 1, band - 1].slice(0, Math.max(2, hdu.axes.length));
  const flux = await imageLine(file.source, hdu, 1, at, notes);
  const facts = headerFacts(hdu, file.hdus[0], notes);
  const error =
    band === 1 && bandCount > 1 && choices.errorColumn !== 'none'
      ? await bandErrors(file, hdu, 1, at, { axis: 3, n: bandCount, names })
      : undefined;
  if (!error) noteFact(notes, 'uncertainty', 'none', 'no band holds it');
  offer(file, hdu, orders, order, bandCount, band, names, chosen === undefined);
  return assemble(
    {
      ...facts,
      name: notes.file,
      place: { hdu: hdu.index, row: order },
      wavelength,
      flux,
      fluxUnit: facts.fluxUnit?.unit ?? '',
      ...(error ? { error } : {}),
    },
    choices,
    { hdu: hdu.index, order, ...(bandCount > 1 ? { band } : {}), ...(choices.errorColumn ? { errorColumn: choices.errorColumn } : {}) },
    notes,
  );
}

function dispersionOf({ notes }: FitsFile, hdu: Hdu, order: number) {
  const text = watAttributes(hdu.header, 2)[`spec${order}`];
  const parsed = text === undefined ? undefined : parseOrder(text);
  if (parsed) return parsed;
  throw new ProblemError({
    code: 'no-dispersion',
    where: { file: notes.file, hdu: hdu.index, column: 'WAT2', ...(text ? { excerpt: text.slice(0, 100) } : {}) },
    found: text === undefined ? `no dispersion for order ${order}` : `a dispersion of order ${order} that cannot be understood`,
    expected: `spec${order} = "aperture beam type w1 dw n z ..." in the WAT2 cards`,
    doThis: 'Choose another order.',
  });
}

function unitOf({ notes }: FitsFile, hdu: Hdu, physical: Float64Array, choices: ReadingChoices): SpectralUnit {
  if (choices.wavelengthUnit) {
    noteFact(notes, 'wavelength unit', choices.wavelengthUnit, 'chosen by you');
    return unitNamed(choices.wavelengthUnit);
  }
  const words = watAttributes(hdu.header, 1).units;
  const unit = words ? spectralUnit(words) : undefined;
  if (unit && unit.quantity !== 'velocity') {
    noteFact(notes, 'wavelength unit', unit.name, `units=${words} in WAT1_001`);
    return unit;
  }
  const low = Math.min(physical[0], physical[physical.length - 1]);
  const likely = likelyUnit(low, Math.max(physical[0], physical[physical.length - 1]));
  // a list of pixels is no list of wavelengths
  if (!likely || (physical[0] === 1 && physical[physical.length - 1] === physical.length)) {
    throw new ProblemError({
      code: 'no-wavelength-axis',
      where: { file: notes.file, hdu: hdu.index },
      found: `orders that run from ${physical[0]} to ${physical[physical.length - 1]} in no known unit`,
      expected: 'wavelengths',
      doThis: 'Calibrate the spectrum in wavelength first.',
    });
  }
  warn(notes, 'unit-assumed', `no unit of wavelength is stated; ${likely.unit.name} is assumed: ${likely.reason}`, {
    where: { hdu: hdu.index },
    doThis: 'Choose the unit if this is wrong.',
  });
  return likely.unit;
}

function offer(
  { notes }: FitsFile,
  hdu: Hdu,
  orders: number,
  order: number,
  bandCount: number,
  band: number,
  names: readonly string[],
  proposed: boolean,
): void {
  for (let k = 1; k <= Math.min(orders, MOST_OFFERS); k++)
    if (k !== order) notes.offers.push({ label: `order ${k}`, choices: { hdu: hdu.index, order: k } });
  for (let b = 1; b <= bandCount; b++)
    if (b !== band)
      notes.offers.push({
        label: `band ${b} of order ${order}${names[b - 1] ? `: ${names[b - 1]}` : ''}`,
        choices: { hdu: hdu.index, order, band: b },
      });
  if (orders > 1) {
    notes.offers.push({ label: `all ${orders} orders as one spectrum`, choices: { hdu: hdu.index, merge: true } });
    if (proposed)
      warn(notes, 'several-spectra', `the file holds ${orders} orders; order ${order} is shown`, {
        where: { hdu: hdu.index },
        doThis: 'Choose another order, or all as one.',
      });
  }
}

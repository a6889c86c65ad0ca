import { ProblemError } from '../../problems/index.ts';
import type { Medium } from '../../spectrum/index.ts';
import type { NumberColumn, NumberTable } from '../columns.ts';
import type { ByteSource, Offer, ReadingChoices, ReadingControl } from '../reading.ts';
import { isNumeric, scalarColumns, tableFields, vectorColumns } from './binaryTable.ts';
import { type Hdu, numberCard, readHdus, textCard } from './cards.ts';
import { imageColumns } from './image.ts';

/** A FITS file -> columns of numbers: the first unit that can hold a spectrum, or the one the user chose. */
export async function readFitsTable(source: ByteSource, choices: ReadingChoices, control: ReadingControl): Promise<NumberTable> {
  const hdus = await readHdus(source);
  const able = hdus.filter((hdu) => canHoldSpectrum(hdu));
  if (able.length === 0) {
    throw new ProblemError({
      code: 'no-spectrum',
      where: { file: source.name },
      found: `${hdus.length} header-data units, none with a table or an image of samples`,
      expected: 'a binary table of wavelengths and fluxes, or an image with a wavelength axis',
    });
  }
  const hdu = choices.hdu === undefined ? preferred(able) : hdus[choices.hdu];
  if (!hdu || !able.includes(hdu)) {
    throw new ProblemError({
      code: 'no-such-hdu',
      where: { file: source.name, hdu: choices.hdu },
      found: `no spectrum in HDU ${choices.hdu}`,
      expected: `one of ${able.map((h) => h.index).join(', ')}`,
    });
  }
  const { columns, what, rows } = await columnsOf(source, hdu, choices, control);
  const offers: Offer[] = [
    ...able.filter((h) => h !== hdu).map((h) => ({ label: `HDU ${h.index}: ${describeHdu(h)}`, choices: { hdu: h.index } })),
    ...Array.from({ length: Math.min(rows, 2000) }, (_, k) => k + 1)
      .filter((row) => rows > 1 && row !== (choices.row ?? 1))
      .map((row) => ({ label: `row ${row}`, choices: { hdu: hdu.index, row } })),
  ];
  return {
    file: source.name,
    format: 'FITS',
    hdu: hdu.index,
    columns,
    text: [...hdus[0].comments, ...hdu.comments, ...columns.map((c) => c.name), textCard(hdu, 'CTYPE1')].join('\n'),
    how: [
      { fact: 'format', value: `FITS, ${what}`, reason: 'from its first bytes' },
      {
        fact: 'HDU',
        value: `${hdu.index}: ${describeHdu(hdu)}`,
        reason: choices.hdu === undefined ? 'the first that holds a spectrum' : 'chosen by you',
      },
    ],
    offers,
    remarks: [],
    stated: statedBy(hdus[0], hdu),
  };
}

function canHoldSpectrum(hdu: Hdu): boolean {
  const extension = textCard(hdu, 'XTENSION');
  if (extension === 'BINTABLE') return (numberCard(hdu, 'NAXIS2') ?? 0) > 0 && (numberCard(hdu, 'TFIELDS') ?? 0) > 1;
  return (
    (extension === '' || extension === 'IMAGE') &&
    (numberCard(hdu, 'NAXIS') ?? 0) > 0 &&
    hdu.dataLength > 0 &&
    (numberCard(hdu, 'NAXIS1') ?? 0) > 1 &&
    hasAxis(hdu)
  );
}

const hasAxis = (hdu: Hdu) =>
  numberCard(hdu, 'CRVAL1') !== undefined && (numberCard(hdu, 'CDELT1') ?? numberCard(hdu, 'CD1_1')) !== undefined;

/** Tables that name a wavelength come first, then images with an axis, then any table. */
function preferred(able: readonly Hdu[]): Hdu {
  const namesWavelength = (hdu: Hdu) =>
    [...hdu.cards].some(([key, value]) => /^TTYPE\d+$/.test(key) && /^(wave|lam|loglam|log_?lam|wl)/i.test(String(value).trim()));
  return able.find(namesWavelength) ?? able.find((h) => textCard(h, 'XTENSION') !== 'BINTABLE') ?? able[0];
}

function describeHdu(hdu: Hdu): string {
  const name = textCard(hdu, 'EXTNAME');
  const kind =
    textCard(hdu, 'XTENSION') === 'BINTABLE'
      ? `table of ${numberCard(hdu, 'NAXIS2')} rows`
      : `image of ${numberCard(hdu, 'NAXIS1')} samples`;
  return name ? `${name}, ${kind}` : kind;
}

async function columnsOf(
  source: ByteSource,
  hdu: Hdu,
  choices: ReadingChoices,
  control: ReadingControl,
): Promise<{ columns: NumberColumn[]; what: string; rows: number }> {
  if (textCard(hdu, 'XTENSION') !== 'BINTABLE') return imageColumns(source, hdu, choices);
  const fields = tableFields(source.name, hdu);
  const scalars = fields.filter((f) => isNumeric(f) && f.repeat === 1).length;
  const vectors = fields.filter((f) => isNumeric(f) && f.repeat > 1).length;
  const rows = numberCard(hdu, 'NAXIS2') ?? 0;
  if (vectors >= 2 && (rows === 1 || scalars < 2)) {
    const row = (choices.row ?? 1) - 1;
    if (row >= rows)
      throw new ProblemError({
        code: 'no-such-row',
        where: { file: source.name, hdu: hdu.index, row: row + 1 },
        found: `no row ${row + 1}`,
        expected: `1 to ${rows}`,
      });
    return { columns: await vectorColumns(source, hdu, fields, row), what: 'binary table, one spectrum a row', rows };
  }
  return {
    columns: await scalarColumns(source, hdu, fields, control.progress, control.signal),
    what: 'binary table, one sample a row',
    rows: 1,
  };
}

function statedBy(primary: Hdu, hdu: Hdu): NumberTable['stated'] {
  const medium = mediumBy(primary, hdu);
  const resolvingPower = numberCard(hdu, 'SPEC_RP') ?? numberCard(primary, 'SPEC_RP');
  const fluxUnit = textCard(hdu, 'BUNIT') || textCard(primary, 'BUNIT');
  const fromImage = textCard(hdu, 'XTENSION') !== 'BINTABLE';
  return {
    ...(medium ? { medium } : {}),
    ...(resolvingPower && resolvingPower > 0 ? { resolvingPower } : {}),
    ...(fluxUnit && fromImage ? { fluxUnit } : {}),
  };
}

function mediumBy(primary: Hdu, hdu: Hdu): Medium | undefined {
  const type = textCard(hdu, 'CTYPE1').toUpperCase();
  if (type.startsWith('AWAV')) return 'air';
  if (type.startsWith('WAVE') && type !== 'WAVELENGTH') return 'vacuum';
  for (const unit of [hdu, primary]) {
    const vacuum = unit.cards.get('VACUUM');
    if (vacuum === true || vacuum === 1) return 'vacuum';
    if (vacuum === false || vacuum === 0) return 'air';
    const word = textCard(unit, 'AIRORVAC').toLowerCase();
    if (word.startsWith('vac')) return 'vacuum';
    if (word.startsWith('air')) return 'air';
  }
  const ucds = [...hdu.cards].filter(([key]) => key.startsWith('TUCD')).map(([, value]) => String(value).toLowerCase());
  if (ucds.some((u) => u.includes('obs.atmos') || u.includes('em.wl;obs.air'))) return 'air';
  return undefined;
}

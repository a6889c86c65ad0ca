import { decimals } from '../columns.ts';
import type { TableDesign } from '../design.ts';
import { type Inline, type InlineText, ionInline } from '../inline.ts';
import type { LineRow, LineTable } from '../lineTable.ts';
import { chosenRows } from '../paperTable.ts';
import type { AtlasInput } from './atlas.ts';
import type { FeatureFitInput } from './featureFit.ts';

/** The samples that a figure is drawn from, one value a sample; wavelengths in Angstrom in the medium of the table. */
export interface FigureSamples {
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly masked: Uint8Array;
  readonly continuum: Float64Array;
  readonly model: Float64Array;
  readonly noise: Float64Array;
}

/** Half width of the picture of one fit, in FWHM. */
const HALF_FWHM = 6;
const FEWEST_SAMPLES = 24;

/** The atlas of the lines that a design takes. */
export function atlasInput(table: LineTable, samples: FigureSamples, design: Pick<TableDesign, 'rows'>): AtlasInput {
  const rows = chosenRows(table, { rows: design.rows, order: 'wavelength' });
  return {
    title: table.title,
    ...samples,
    medium: table.medium,
    fluxUnit: table.fluxUnit,
    labels: rows.filter((row) => row.ion).map((row) => ({ at: row.wavelengthObs, text: labelOf(row), weight: Math.abs(row.flux) })),
  };
}

/** The fit of one feature; undefined when it lies outside the samples. */
export function featureFitInput(table: LineTable, samples: FigureSamples, feature: number): FeatureFitInput | undefined {
  const row = table.rows.find((each) => each.feature === feature);
  if (!row) return undefined;
  const { wavelength } = samples;
  const half = HALF_FWHM * (row.fwhm ?? 3);
  let first = wavelength.findIndex((w) => w >= row.wavelengthObs - half);
  if (first < 0) return undefined;
  let last = first;
  while (last + 1 < wavelength.length && wavelength[last + 1] <= row.wavelengthObs + half) last++;
  const short = Math.ceil((FEWEST_SAMPLES - (last - first + 1)) / 2);
  if (short > 0) [first, last] = [Math.max(0, first - short), Math.min(wavelength.length - 1, last + short)];
  const cut = (of: Float64Array) => of.subarray(first, last + 1);
  const inside = table.rows.filter(
    (each) => !each.artefact && each.wavelengthObs >= wavelength[first] && each.wavelengthObs <= wavelength[last],
  );
  return {
    name: `feature-${feature}`,
    title: [...labelOf(row), `  ${decimals(row.wavelengthObs, 2)} Å`],
    wavelength: cut(wavelength),
    flux: cut(samples.flux),
    noise: cut(samples.noise),
    masked: samples.masked.subarray(first, last + 1),
    model: cut(samples.model),
    continuum: cut(samples.continuum),
    components: inside.map((each) => ({ at: each.wavelengthObs, text: labelOf(each) })),
    medium: table.medium,
    fluxUnit: table.fluxUnit,
  };
}

/** `[O III] 5006.84`, with a ring for thin gas; `He I 5875.62 +` for a blend. */
function labelOf(row: LineRow): InlineText {
  if (!row.ion) return ['unidentified'];
  const ring: readonly Inline[] = row.thinGas ? [{ sup: '○' }] : [];
  const parts = row.ion.split('+');
  // a blend is called by its first part: there is room for one name
  return [...ionInline(parts[0]), ` ${decimals(row.wavelengthLab?.[0], 2)}`, ...ring, ...(parts.length > 1 ? [' +'] : [])];
}

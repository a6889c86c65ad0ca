import type { Gas } from '../plasma/index.ts';
import type { ArchiveFiles } from './archive.ts';
import { DEFAULT_DESIGN, type TableDesign } from './design.ts';
import { atlasFigures } from './figures/atlas.ts';
import { densityLadderFigure } from './figures/densityLadder.ts';
import { featureFitFigure } from './figures/featureFit.ts';
import type { ColumnWidth, Figure } from './figures/figure.ts';
import { atlasInput, type FigureSamples, featureFitInput } from './figures/inputs.ts';
import { temperatureDensityFigure } from './figures/temperatureDensity.ts';
import { TABLE_FORMATS, type TableFormatName } from './formats.ts';
import { gasCsv } from './gasCsv.ts';
import type { LineTable } from './lineTable.ts';
import { citedMethods, type MethodFacts, methodsText } from './methods.ts';
import { chosenRows } from './paperTable.ts';
import { provenanceJson } from './provenance.ts';
import { bibtex, type References } from './references.ts';

/** All that goes into the archive of a paper. */
export interface PaperMaterial {
  readonly table: LineTable;
  readonly design?: TableDesign;
  readonly methods: MethodFacts;
  /** The paragraph as its authors edited it; absent = as generated. */
  readonly methodsEdited?: string;
  readonly references: References;
  readonly samples?: FigureSamples;
  readonly figures: { readonly width: ColumnWidth; readonly panels: number };
  /** Numbers of the features whose fits are drawn. */
  readonly fits: readonly number[];
  readonly gas?: Gas;
  /** The session file. */
  readonly session?: string;
  /** Further files, such as figures as pixels. */
  readonly more?: ArchiveFiles;
  /** ISO 8601 of the export; absent = left out. */
  readonly date?: string;
}

/** The rows that a design takes, as a table of their own. */
export const designedRows = (table: LineTable, design: TableDesign): LineTable => ({ ...table, rows: chosenRows(table, design) });

/** Table in every format, figures, session, provenance, methods paragraph and references, by path. The same material gives the same bytes. */
export function paperFiles(material: PaperMaterial): ArchiveFiles {
  const { table, design = DEFAULT_DESIGN, methods } = material;
  const rows = designedRows(table, design);
  const files: Record<string, string | Uint8Array> = {};
  for (const name of Object.keys(TABLE_FORMATS) as TableFormatName[]) {
    const { ending, write } = TABLE_FORMATS[name];
    files[`tables/lines.${ending}`] = write(rows, design);
  }
  for (const { name, svg } of paperFigures(material)) files[`figures/${name}.svg`] = svg;
  if (material.gas) files['tables/gas.csv'] = gasCsv(material.gas);
  files['methods.txt'] = `${material.methodsEdited ?? methodsText(methods)}\n`;
  files['references.bib'] = bibtex(material.references, methods.citations, citedMethods(methods));
  files['provenance.json'] = provenanceJson(methods, material.date);
  if (material.session) files['session.linewright.json'] = material.session;
  return { ...files, ...material.more };
}

/** Every figure of a paper: the atlas, the fits asked for, the density ladder, the plane of temperature and density. */
export function paperFigures({ table, design = DEFAULT_DESIGN, samples, figures, fits, gas }: FigureMaterial): Figure[] {
  const drawn = samples ? [...atlasFigures(atlasInput(table, samples, design), figures)] : [];
  for (const feature of fits) {
    const input = samples && featureFitInput(table, samples, feature);
    if (input) drawn.push(featureFitFigure(input));
  }
  const ofGas = gas ? [densityLadderFigure(gas.ladder, 'single'), temperatureDensityFigure(gas, 'single')] : [];
  return [...drawn, ...ofGas.filter((figure) => figure !== undefined)];
}

/** What figures are drawn from. */
export type FigureMaterial = Pick<PaperMaterial, 'table' | 'design' | 'samples' | 'figures' | 'fits' | 'gas'>;

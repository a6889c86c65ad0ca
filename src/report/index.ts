// The finished line table and its writers; one file a format. A writer sees the table and nothing else.
// Deliberately not here: any measuring, naming or physics. Standards: RFC 4180 (CSV), CDS 2.0 (MRT), VOTable 1.4, ECSV 1.0, FITS 4.0.
export { type ArchiveFiles, zipArchive } from './archive.ts';
export { COLUMNS, type Column, decimals, significant } from './columns.ts';
export {
  DEFAULT_DESIGN,
  type FluxScale,
  type PaperColumnKey,
  PRESETS,
  type PresetName,
  type RowChoice,
  type RowOrder,
  type TableDesign,
} from './design.ts';
export { type AtlasChoices, atlasFigures } from './figures/atlas.ts';
export { densityLadderFigure } from './figures/densityLadder.ts';
export { featureFitFigure } from './figures/featureFit.ts';
export { COLUMN_WIDTHS_MM, type ColumnWidth, type Figure } from './figures/figure.ts';
export { atlasInput, type FigureSamples, featureFitInput } from './figures/inputs.ts';
export { temperatureDensityFigure } from './figures/temperatureDensity.ts';
export { withResolution } from './figures/withResolution.ts';
export { TABLE_FORMATS, type TableFormat, type TableFormatName } from './formats.ts';
export { gasCsv } from './gasCsv.ts';
export { type Inline, type InlineText, plainText } from './inline.ts';
export { knownDesign } from './knownDesign.ts';
export { latexText } from './latex.ts';
export { acceptedRows, type LineRow, type LineTable, withoutArtefacts } from './lineTable.ts';
export { citedMethods, type MethodFacts, methodsText } from './methods.ts';
export { PAPER_COLUMNS } from './paperColumns.ts';
export { designedRows, type PaperMaterial, paperFigures, paperFiles } from './paperFiles.ts';
export { chosenRows, type PaperTable, paperTable } from './paperTable.ts';
export { PROGRAM } from './program.ts';
export { provenanceJson } from './provenance.ts';
export { bibtex, type MethodReference, type References } from './references.ts';
export { spreadsheetSafe } from './spreadsheetSafe.ts';

import { decimals, significant } from './columns.ts';
import type { MethodReference } from './references.ts';

/** What was really done to a spectrum, as plain data: the methods paragraph and the provenance are made from it. Wavelengths in Angstrom. */
export interface MethodFacts {
  readonly program: string;
  readonly lineList: {
    readonly edition: string;
    readonly inputsHash: string;
    readonly lines: number;
    readonly ions: number;
    readonly ownLines: number;
  };
  readonly source: {
    readonly name: string;
    readonly sha256: string;
    readonly kind: 'spectrum' | 'line-list';
    readonly samples: number;
    readonly maskedSamples: number;
    readonly medium: 'air' | 'vacuum';
    readonly mediumStated: boolean;
    readonly range?: readonly [number, number];
    readonly how: readonly { readonly fact: string; readonly value: string; readonly reason: string }[];
  };
  /** Absent for a list of lines measured elsewhere. */
  readonly measuring?: {
    readonly errorsFrom: 'file' | 'scatter';
    readonly noiseFactor?: number;
    readonly noiseCorrelation: number;
    readonly continuumHalfPeriodA: number;
    readonly pins: number;
    readonly excluded: number;
    readonly thresholdSigma: number;
    readonly expectedFalse: number;
    readonly resolvingPower: number;
    readonly resolvingPowerFrom: 'user' | 'file' | 'lines' | 'sampling';
    readonly widthForm: 'constant-resolving-power' | 'constant-width' | 'linear';
    readonly edits: number;
    /** Features measured as a Voigt profile or as two Gaussians. */
    readonly reshaped: number;
    readonly tied: number;
    readonly absorption: boolean;
  };
  readonly naming: {
    readonly z: number;
    readonly zErr: number;
    readonly zGiven: boolean;
    readonly dispersionKms: number;
    readonly toleranceKms: number;
    readonly toleranceSigma: number;
    readonly kind: string;
    readonly te: number;
    readonly ne: number;
  };
  readonly gas?: {
    readonly curve: 'ccm89' | 'ccm89-odonnell94' | 'fitzpatrick99';
    readonly rV: number;
    readonly cHbeta?: number;
    readonly cHbetaErr?: number;
    readonly given: boolean;
    readonly hydrogenLines: number;
    readonly zones: readonly { readonly zone: string; readonly te: string; readonly ne: string }[];
  };
  readonly counts: {
    readonly features: number;
    readonly accepted: number;
    readonly unidentified: number;
    readonly rejected: number;
    readonly open: number;
    readonly artefacts: number;
  };
  /** Every setting that differs from the program's own, as key and value. */
  readonly settings: readonly { readonly key: string; readonly value: string }[];
  readonly remarks: readonly string[];
  /** Citations of the atomic data behind the names in force. */
  readonly citations: readonly string[];
}

/** A paragraph for the paper's methods section, in plain English, from what was done. Meant to be edited by its authors. */
export function methodsText(facts: MethodFacts): string {
  return [
    sourceSentence(facts),
    ...measuringSentences(facts),
    ...namingSentences(facts),
    ...gasSentences(facts),
    countSentence(facts),
  ].join(' ');
}

/** The works that the paragraph cites. */
export function citedMethods({ measuring, gas, source }: MethodFacts): MethodReference[] {
  const cited: MethodReference[] = [];
  if (source.medium === 'air') cited.push('Ciddor (1996)');
  if (measuring) cited.push('Eilers (2003)', 'Marquardt (1963)', 'Schwarz (1978)');
  if (measuring?.errorsFrom === 'scatter') cited.push('Stoehr et al. (2008)');
  cited.push('Osterbrock & Ferland (2006)');
  if (gas?.cHbeta !== undefined) {
    cited.push('Storey & Hummer (1995)', gas.curve === 'fitzpatrick99' ? 'Fitzpatrick (1999)' : 'Cardelli, Clayton & Mathis (1989)');
    if (gas.curve === 'ccm89-odonnell94') cited.push("O'Donnell (1994)");
  }
  return cited;
}

function sourceSentence({ program, source }: MethodFacts): string {
  const medium = `wavelengths are in ${source.medium === 'air' ? 'standard air' : 'vacuum'}${source.mediumStated ? '' : ' (assumed: the file does not say)'}`;
  const air = source.medium === 'air' ? ' and were taken to vacuum for the identification with the refractive index of Ciddor (1996)' : '';
  const what =
    source.kind === 'spectrum'
      ? `Lines were measured and identified with ${program} on the spectrum ${source.name} (${source.samples} samples${source.range ? `, ${decimals(source.range[0], 0)}-${decimals(source.range[1], 0)} A` : ''})`
      : `The lines of ${source.name} (${source.samples} measured elsewhere) were identified with ${program}`;
  return `${what}; ${medium}${air}.`;
}

function measuringSentences({ measuring, counts }: MethodFacts): string[] {
  if (!measuring) return [];
  const said: string[] = [];
  const pinned = [
    measuring.pins > 0 ? `${measuring.pins} pins` : '',
    measuring.excluded > 0 ? `${measuring.excluded} excluded stretches` : '',
  ].filter(Boolean);
  said.push(
    `The continuum was drawn by penalised least squares (Eilers 2003) through the samples free of lines, following detail of ${decimals(measuring.continuumHalfPeriodA, 0)} A by half${pinned.length > 0 ? `, with ${pinned.join(' and ')}` : ''}.`,
  );
  if (measuring.errorsFrom === 'scatter')
    said.push('The noise was estimated from the scatter of neighbouring samples (Stoehr et al. 2008).');
  else if (measuring.noiseFactor !== undefined && Math.abs(measuring.noiseFactor - 1) > 0.1)
    said.push(
      `The flux errors of the file were multiplied by ${significant(measuring.noiseFactor, 3)}, the scatter of the residuals about the continuum.`,
    );
  if (measuring.noiseCorrelation > 1)
    said.push(
      `Errors were increased by a further factor ${significant(measuring.noiseCorrelation, 3)} since neighbouring samples share their noise.`,
    );
  said.push(
    `Features were sought by a matched filter above ${significant(measuring.thresholdSigma, 2)} sigma${measuring.absorption ? ', in emission and absorption' : ' in emission'} (${significant(measuring.expectedFalse, 2)} expected from noise alone) and overlapping ones fitted together with Gaussian profiles by least squares (Marquardt 1963); the number of components was decided by the Bayesian information criterion (Schwarz 1978).`,
  );
  said.push(widthSentence(measuring));
  if (measuring.tied > 0)
    said.push(
      `${measuring.tied} blended ${measuring.tied === 1 ? 'line was' : 'lines were'} tied in velocity and width to an unblended line of the same pair.`,
    );
  if (measuring.reshaped > 0)
    said.push(
      `${measuring.reshaped} ${measuring.reshaped === 1 ? 'feature was' : 'features were'} measured as a Voigt profile or a sum of two Gaussians instead of a single Gaussian.`,
    );
  if (measuring.edits > 0)
    said.push(`${measuring.edits} ${measuring.edits === 1 ? 'change was' : 'changes were'} made to the fits by hand.`);
  if (counts.artefacts > 0) said.push(`${counts.artefacts} features were set aside as artefacts.`);
  return said;
}

function widthSentence({ resolvingPower, resolvingPowerFrom, widthForm }: NonNullable<MethodFacts['measuring']>): string {
  const from = { user: 'as given', file: 'as the file states', lines: 'as isolated lines show', sampling: 'as the sampling suggests' }[
    resolvingPowerFrom
  ];
  const form = {
    'constant-resolving-power': 'in proportion to wavelength',
    'constant-width': 'the same in wavelength everywhere',
    linear: 'growing linearly with wavelength',
  }[widthForm];
  return `The usual line width corresponds to lambda/FWHM = ${decimals(resolvingPower, 0)} at the middle of the spectrum, ${from}, and was taken ${form}.`;
}

function namingSentences({ naming, lineList }: MethodFacts): string[] {
  const z = `z = ${decimals(naming.z, 6)}${naming.zGiven ? ' (given)' : ` +/- ${decimals(naming.zErr, 6)}`}`;
  const own = lineList.ownLines > 0 ? ` and ${lineList.ownLines} lines of our own` : '';
  return [
    `All features were identified together at ${z} against ${lineList.lines} lines of ${lineList.ions} ions (edition ${lineList.edition})${own}: each candidate was weighed by wavelength (tolerance ${significant(naming.toleranceKms, 3)} km/s or ${significant(naming.toleranceSigma, 2)} errors), strength, companion lines and width against the alternatives and against no identification.`,
    `Critical densities count collisions to all other levels (Osterbrock & Ferland 2006) at Te = ${significant(naming.te, 3)} K.`,
  ];
}

function gasSentences({ gas }: MethodFacts): string[] {
  if (gas?.cHbeta === undefined) return ['Fluxes were not corrected for reddening.'];
  const curve = {
    ccm89: 'Cardelli, Clayton & Mathis (1989)',
    'ccm89-odonnell94': "Cardelli, Clayton & Mathis (1989) with O'Donnell (1994) in the optical",
    fitzpatrick99: 'Fitzpatrick (1999)',
  }[gas.curve];
  const value = `c(Hbeta) = ${significant(gas.cHbeta, 3)}${gas.cHbetaErr === undefined ? '' : ` +/- ${significant(gas.cHbetaErr, 1)}`}`;
  const from = gas.given
    ? `${value}, as given`
    : `${value}, from ${gas.hydrogenLines} hydrogen lines against case B (Storey & Hummer 1995)`;
  const zones = gas.zones.map(({ zone, te, ne }) => `${zone}: Te = ${te}, ne = ${ne}`).join('; ');
  return [
    `Fluxes were corrected for reddening with the curve of ${curve} for R_V = ${significant(gas.rV, 3)} and ${from}.`,
    ...(zones ? [`Electron temperatures and densities from line ratios: ${zones}.`] : []),
  ];
}

function countSentence({ counts }: MethodFacts): string {
  const parts = [
    counts.accepted > 0 ? `${counts.accepted} were accepted by the authors` : '',
    counts.unidentified > 0 ? `${counts.unidentified} remain unidentified` : '',
    counts.open > 0 ? `${counts.open} were not decided on` : '',
  ].filter(Boolean);
  return `Of ${counts.features} features ${parts.length > 0 ? parts.join(', ') : 'none was decided on'}.`;
}

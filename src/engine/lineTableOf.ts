import type { Gas, WithErr } from '../plasma/index.ts';
import type { LineRow, LineTable } from '../report/index.ts';
import { fromVacuum, toVacuum } from '../spectrum/index.ts';
import { kmsFromWidth } from '../units/index.ts';
import type { CandidateView, FeatureView, TransitionView } from './analysis.ts';

/** What the table needs beside the features. */
export type TableFacts = Omit<LineTable, 'rows'>;

/** H beta, air Angstrom: the line every flux is compared with. */
const H_BETA_AIR_A = 4861.33;
const MOST_ALTERNATIVES = 5;

/** The finished table: one row a feature in the order of `features`. */
export function lineTableOf(features: readonly FeatureView[], facts: TableFacts, gas: Pick<Gas, 'intensities' | 'hBeta'>): LineTable {
  const intensities = new Map(gas.intensities?.map((each) => [each.feature, each]));
  const named = features.find((f) => f.name?.transitions[0].ion === 'H I' && isHBeta(f.name.transitions[0], facts) && f.measured.flux > 0);
  const hBeta = gas.hBeta ? { flux: gas.hBeta.value, fluxErr: gas.hBeta.err } : named?.measured;
  return {
    ...facts,
    rows: features.map((feature) => ({ ...rowOf(feature, facts, hBeta), ...intensityCells(intensities.get(feature.number)) })),
  };
}

interface HBeta {
  readonly flux: number;
  readonly fluxErr: number;
}

const isHBeta = (t: TransitionView, facts: TableFacts) =>
  Math.abs(t.wavelengthLab - fromVacuum(toVacuum(H_BETA_AIR_A, 'air'), facts.medium)) < 0.5;

function rowOf(feature: FeatureView, facts: TableFacts, hBeta: HBeta | undefined): LineRow {
  const m = feature.measured;
  const listed = Number.isNaN(m.continuum);
  return {
    feature: feature.number,
    wavelengthObs: feature.centroid,
    wavelengthObsErr: known(feature.centroidErr),
    wavelengthRestObs: fromVacuum(toVacuum(feature.centroid, facts.medium) / (1 + facts.z), facts.medium),
    flux: m.flux,
    fluxErr: known(m.fluxErr),
    fwhm: known(m.fwhm),
    fwhmErr: known(m.fwhmErr),
    fwhmKms: known(m.intrinsicFwhmKms ?? (Number.isFinite(m.fwhm) ? kmsFromWidth(m.fwhm, feature.centroid) : undefined)),
    ew: listed ? undefined : known(m.ew),
    ewErr: listed ? undefined : known(m.ewErr),
    snr: known(m.snr),
    ...nameCells(feature.name),
    ...hBetaCells(m.flux, m.fluxErr, hBeta),
    alternatives: feature.candidates
      .filter((candidate) => candidate !== feature.name)
      .slice(0, MOST_ALTERNATIVES)
      .map((c) => ({ ion: ionsOf(c), wavelengthLab: c.transitions.map((t) => t.wavelengthLab), probability: c.probability })),
    verdict: feature.verdict?.decision ?? 'open',
    artefact: m.artefact !== undefined,
    note: notesOf(feature),
  };
}

const known = (value: number | undefined) => (value !== undefined && Number.isFinite(value) ? value : undefined);

const ionsOf = (name: CandidateView) => name.transitions.map((t) => t.ion).join('+');

function nameCells(name: CandidateView | undefined): Partial<LineRow> {
  if (!name) return {};
  const [main] = name.transitions;
  return {
    ion: ionsOf(name),
    wavelengthLab: name.transitions.map((t) => t.wavelengthLab),
    lower: main.lower,
    upper: main.upper,
    nature: natureCell(main.nature),
    velocity: known(name.velocityKms),
    velocityErr: known(name.velocityErrKms),
    probability: name.probability,
    thinGas: main.thinGas !== undefined,
    lifetimeS: known(main.thinGas?.lifetimeS),
    nCrit: known(main.thinGas?.nCrit),
  };
}

/** The four words of the table: Raman-scattered and interstellar lines are permitted transitions, the note says what else they are. */
function natureCell(nature: string): LineRow['nature'] {
  if (nature === 'sky' || nature === 'telluric') return 'sky';
  return nature === 'forbidden' || nature === 'intercombination' ? nature : 'permitted';
}

/** On the scale H beta = 100; the error of H beta itself is carried into every other line's. */
function hBetaCells(flux: number, fluxErr: number, hBeta: HBeta | undefined): Partial<LineRow> {
  if (!hBeta) return {};
  const scaled = (100 * flux) / hBeta.flux;
  const relativeErr = hBeta.flux === flux ? fluxErr / flux : Math.hypot(fluxErr / flux, hBeta.fluxErr / hBeta.flux);
  const fluxHbeta100Err = known(Math.abs(scaled * relativeErr));
  return { fluxHbeta100: scaled, fluxHbeta100Err };
}

/** Corrected for reddening; the error carries that of c(H beta). */
const intensityCells = (found: WithErr | undefined): Partial<LineRow> =>
  found ? { intensityHbeta100: known(found.value), intensityHbeta100Err: known(found.err) } : {};

function notesOf(feature: FeatureView): string {
  const notes: string[] = [];
  if (feature.measured.artefact) notes.push(`artefact: ${feature.measured.artefact}`);
  const nature = feature.name?.transitions[0].nature;
  if (nature === 'raman') notes.push('Raman-scattered');
  if (nature === 'interstellar') notes.push('interstellar absorption');
  if (nature === 'telluric') notes.push('telluric');
  if (feature.measured.byHand) notes.push(feature.measured.byHand);
  notes.push(...feature.measured.notes);
  const { fit } = feature.measured;
  if (fit.ended === 'at-bound') notes.push(`fit: ${fit.which} at its bound`);
  if (fit.ended === 'no-uncertainty') notes.push('fit: no uncertainty');
  if (fit.ended === 'failed') notes.push(`fit failed: ${fit.reason}`);
  if (feature.verdict?.note) notes.push(feature.verdict.note);
  return notes.join('; ');
}

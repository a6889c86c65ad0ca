import type { AtomicData } from '../atomic/index.ts';
import { linesBetween } from '../atomic/index.ts';
import { PLANCK_ERG_S, SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { hBetaEmissivity } from './hBetaEmissivity.ts';
import type { LineFlux } from './lineFluxes.ts';
import { transitionsOf } from './measuredRatios.ts';
import { emissionGrid, type PlasmaGrid, type Stencil, stencilAt, valueAt } from './populationGrid.ts';
import type { ZoneState } from './solveZones.ts';
import { type Zone, zoneOf } from './zones.ts';

const HC_ERG_CM = PLANCK_ERG_S * SPEED_OF_LIGHT_KMS * 1e5;
/** Lines below this share of the ion's strongest one do not count: mostly auroral ones, which hang on the temperature. Our choice. */
const LEAST_SHARE = 0.1;
/** Scatter allowed between lines of one ion beyond their errors. Our choice. */
const LINE_SCATTER = 0.03;

/** Lines of one ion excited by collisions, ready for abundances. */
export interface CollisionalIon {
  readonly ion: string;
  readonly zone: Zone;
  readonly parts: readonly { readonly index: number; readonly grid: PlasmaGrid; readonly weight: number }[];
}

/** Ions with collisionally excited lines whose atoms are in the tables. */
export function collisionalIons(data: AtomicData, fluxes: readonly LineFlux[]): CollisionalIon[] {
  const byIon = new Map<string, number[]>();
  fluxes.forEach((flux, index) => {
    const ion = data.lines.ions[data.lines.ion[flux.lines[0]]].name;
    if (flux.doubt !== undefined || data.lines.mechanism(flux.lines[0]) !== 'collisional') return;
    const known = byIon.get(ion);
    if (known) known.push(index);
    else byIon.set(ion, [index]);
  });
  return [...byIon].flatMap(([ion, indices]) => {
    const model = data.levelModel(ion);
    const facts = data.lines.ions.find((each) => each.name === ion);
    if (!model || !facts || model.collisions.lower.length === 0) return [];
    const strongest = Math.max(...indices.map((index) => fluxes[index].flux));
    const parts = indices.flatMap((index) => {
      const flux = fluxes[index];
      const pairs = transitionsOf(data, flux, ion);
      if (!pairs || flux.flux < LEAST_SHARE * strongest) return [];
      const grid = emissionGrid(model, pairs);
      const weight = 1 / ((flux.fluxErr / flux.flux) ** 2 + LINE_SCATTER ** 2);
      return grid.values.every(Number.isFinite) ? [{ index, grid, weight }] : [];
    });
    return parts.length > 0 ? [{ ion, zone: zoneOf(facts.creationEv, facts.charge), parts }] : [];
  });
}

/** A zone's place on the grids and its H beta, for all its ions. */
export interface ZonePlace {
  readonly stencil: Stencil;
  readonly hBeta: number;
}

export const zonePlace = ({ te, ne }: ZoneState): ZonePlace => ({ stencil: stencilAt(te, ne), hBeta: hBetaEmissivity(te) });

/** N(ion)/N(H+), mean of the ion's lines. `perHbeta(index)` = I/I(H beta) of a flux. */
export function abundanceOf({ parts }: CollisionalIon, perHbeta: (index: number) => number, { stencil, hBeta }: ZonePlace): number {
  let sum = 0;
  let total = 0;
  for (const { index, grid, weight } of parts) {
    sum += weight * perHbeta(index) * Math.exp(-valueAt(grid, stencil));
    total += weight;
  }
  return ((sum / total) * hBeta) / HC_ERG_CM;
}

/** What recombination lines say of the ion that recombines. */
export interface RecombinationAbundance {
  /** The recombining ion: `O III` for lines of O II. */
  readonly ion: string;
  readonly abundance: number;
  /** One sigma: of the fluxes and of the coefficients. */
  readonly abundanceErr: number;
  readonly lines: readonly string[];
}

/** He+ from the lines that collisions and self-absorption touch least, vacuum Angstrom: 4471, 5876, 6678; common practice, no source. */
const HELIUM_LINES_VAC = [4472.74, 5877.25, 6679.99];
const HELIUM_REACH_A = 0.8;
/** N(He++)/N(H+) of the reference nebula of the line list; its ion has no lines of its own, so the list does not hold it. */
const REFERENCE_HE_III = 0.01;
const ROMAN = ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII', 'VIII'];
const RECOMBINATION_ELEMENTS = new Set(['He', 'C', 'N', 'O', 'Ne']);
/** Components of a multiplet nearer than this many FWHM are measured together. */
const TOGETHER_FWHM = 0.6;

/**
 * N(ion)/N(H+) from recombination lines of He, C, N, O and Ne, by the strengths of the list (at 10^4 K; their ratio to H beta changes by less than 15 % from 5000 to 20000 K).
 *
 * @param perHbeta I/I(H beta) of a flux; `perHbetaErr` its relative error
 */
export function recombinationAbundances(
  data: AtomicData,
  fluxes: readonly LineFlux[],
  perHbeta: (index: number) => number,
  relativeErr: (index: number) => number,
): RecombinationAbundance[] {
  const { lines } = data;
  const found = new Map<string, { value: number; err: number; common: number; label: string }[]>();
  fluxes.forEach((flux, index) => {
    const [line] = flux.lines;
    const ion = lines.ions[lines.ion[line]];
    const sameIon = flux.lines.every((each) => lines.ion[each] === lines.ion[line] && lines.mechanism(each) === 'recombination');
    if (flux.doubt !== undefined || !sameIon || !RECOMBINATION_ELEMENTS.has(ion.element)) return;
    if (ion.name === 'He I' && !HELIUM_LINES_VAC.some((w) => Math.abs(w - lines.wavelengthVac[line]) < HELIUM_REACH_A)) return;
    const recombining = `${ion.element} ${ROMAN[ion.charge + 1]}`;
    const reference = referenceOf(data, recombining);
    const strength = strengthTogether(data, flux);
    if (!(reference > 0) || !(strength > 0)) return;
    const entry = {
      value: ((100 * perHbeta(index)) / strength) * reference,
      err: relativeErr(index),
      common: lines.strengthErrDex[line] * Math.LN10,
      label: flux.label,
    };
    const known = found.get(recombining);
    if (known) known.push(entry);
    else found.set(recombining, [entry]);
  });
  return [...found].map(([ion, entries]) => {
    const weights = entries.map(({ err, common }) => 1 / (err ** 2 + common ** 2));
    const total = weights.reduce((sum, w) => sum + w, 0);
    const lnMean = entries.reduce((sum, { value }, k) => sum + weights[k] * Math.log(value), 0) / total;
    // coefficients of one ion are wrong together: their error does not shrink with the number of lines
    const least = Math.min(...entries.map(({ common }) => common));
    const abundance = Math.exp(lnMean);
    return { ion, abundance, abundanceErr: abundance * Math.hypot(1 / Math.sqrt(total), least), lines: entries.map(({ label }) => label) };
  });
}

function referenceOf(data: AtomicData, ion: string): number {
  if (ion === 'He III') return REFERENCE_HE_III;
  const index = data.lines.ions.findIndex((each) => each.name === ion);
  return index < 0 ? Number.NaN : data.referenceAbundance[index];
}

/** Strength (H beta = 100) of all recombination lines of the ion that are measured with this one. */
function strengthTogether(data: AtomicData, flux: LineFlux): number {
  const { lines } = data;
  const [main] = flux.lines;
  const reach = TOGETHER_FWHM * (flux.fwhmA ?? 1);
  const places = flux.lines.map((line) => lines.wavelengthVac[line]);
  const [first, end] = linesBetween(lines, Math.min(...places) - reach, Math.max(...places) + reach);
  let sum = 0;
  for (let line = first; line < end; line++)
    if (lines.ion[line] === lines.ion[main] && lines.mechanism(line) === 'recombination') sum += 10 ** lines.logStrength[line];
  return sum;
}

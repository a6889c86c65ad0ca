import type { AtomicData, LevelModel } from '../atomic/index.ts';
import { DIAGNOSTICS, type Diagnostic } from './diagnostics.ts';
import type { LineFlux } from './lineFluxes.ts';
import { emissionGrid, type PlasmaGrid, ratioGrid, type Transition } from './populationGrid.ts';
import { type Zone, zoneOfIon } from './zones.ts';

/** A diagnostic whose lines were measured. */
export interface MeasuredRatio {
  readonly diagnostic: Diagnostic;
  readonly zone: Zone;
  /** Places in the list of fluxes. */
  readonly over: readonly number[];
  readonly under: readonly number[];
  /** ln of the ratio over Te and ne, for the lines that were measured. */
  readonly grid: PlasmaGrid;
}

/** A diagnostic that cannot be used although its lines are there. */
export interface UnusedRatio {
  readonly label: string;
  readonly reason: string;
}

/** The wavelength of a diagnostic's line may be off by this share from the level pair it means. */
const PAIR_REACH = 1e-3;

/** Pair of levels nearest to a vacuum wavelength. @throws RangeError when the atom has none there: a slip in the table of diagnostics */
function pairAt(model: LevelModel, vacuum: number): Transition {
  const { lower, upper } = model.radiative;
  let best: Transition = [0, 0];
  let nearest = Number.POSITIVE_INFINITY;
  for (let k = 0; k < lower.length; k++) {
    const off = Math.abs(1e8 / (model.levels[upper[k]].energyCm1 - model.levels[lower[k]].energyCm1) - vacuum);
    if (off < nearest) {
      nearest = off;
      best = [upper[k], lower[k]];
    }
  }
  if (nearest > PAIR_REACH * vacuum) throw new RangeError(`${model.ion} has no decay near ${vacuum} A`);
  return best;
}

const same = ([u, l]: Transition, [v, m]: Transition) => u === v && l === m;

/** Level pairs of a flux in the atom of `ion`; undefined when a part of it is of another ion or outside the atom. */
export function transitionsOf(data: AtomicData, flux: LineFlux, ion: string): Transition[] | undefined {
  const pairs: Transition[] = [];
  for (const line of flux.lines) {
    const [u, l] = [data.lines.upperLevel[line], data.lines.lowerLevel[line]];
    if (data.lines.ions[data.lines.ion[line]].name !== ion || u <= 0 || l < 0) return undefined;
    pairs.push([u, l]);
  }
  return pairs;
}

/** The diagnostics the fluxes allow, and those they would allow but for a fault. */
export function measuredRatios(data: AtomicData, fluxes: readonly LineFlux[]): { ratios: MeasuredRatio[]; unused: UnusedRatio[] } {
  const ratios: MeasuredRatio[] = [];
  const unused: UnusedRatio[] = [];
  for (const diagnostic of DIAGNOSTICS) {
    const { label, ion } = diagnostic;
    const model = data.levelModel(ion);
    const parts = fluxes.flatMap((flux, index) => {
      const pairs = transitionsOf(data, flux, ion);
      return pairs ? [{ index, flux, pairs }] : [];
    });
    if (!model || parts.length < 2) continue;
    const side = (wavelengths: readonly number[]) => {
      const wanted = wavelengths.map((w) => pairAt(model, w));
      return parts.filter(({ pairs }) => pairs.every((pair) => wanted.some((each) => same(each, pair))));
    };
    const [over, under] = [side(diagnostic.over), side(diagnostic.under)];
    if (over.length === 0 || under.length === 0) continue;
    if (model.collisions.lower.length === 0) {
      unused.push({ label, reason: `no collision strengths of ${ion} are in the tables` });
      continue;
    }
    const sound = (found: typeof over) => found.filter(({ flux }) => flux.doubt === undefined);
    const [soundOver, soundUnder] = [sound(over), sound(under)];
    if (soundOver.length === 0 || soundUnder.length === 0) {
      const bad = [...over, ...under].find(({ flux }) => flux.doubt !== undefined);
      unused.push({ label, reason: `${bad?.flux.label}: ${bad?.flux.doubt}` });
      continue;
    }
    const emission = (found: typeof over) =>
      emissionGrid(
        model,
        found.flatMap(({ pairs }) => pairs),
      );
    ratios.push({
      diagnostic,
      zone: zoneOfIon(data, ion),
      over: soundOver.map(({ index }) => index),
      under: soundUnder.map(({ index }) => index),
      grid: ratioGrid(emission(soundOver), emission(soundUnder)),
    });
  }
  return { ratios, unused };
}

import type { AtomicData } from '../atomic/index.ts';
import { median, robustSigma } from '../numeric/index.ts';
import type { AbundanceResult, JumpResult } from './gas.ts';
import type { LineFlux } from './lineFluxes.ts';

/** What is left of a spectrum when its fitted lines are taken off. */
export interface Continuum {
  /** Levels of the usable samples between two vacuum wavelengths of the rest frame, per observed Angstrom; undefined when the spectrum does not reach over both. */
  readonly levels: (from: number, to: number) => readonly number[] | undefined;
  readonly z: number;
}

interface Jump {
  readonly label: string;
  /** Windows on the blue and the red side, vacuum Angstrom. */
  readonly blue: readonly [number, number];
  readonly red: readonly [number, number];
  readonly line: readonly [number, number];
  /** Te = scale (1 + a He+ + b He++) (jump/I(line))^power. */
  readonly scale: number;
  readonly a: number;
  readonly b: number;
  readonly power: number;
  readonly source: string;
}

/** Liu et al. 2001, MNRAS 327, 141 (Balmer); Fang & Liu 2011, MNRAS 415, 181 (Paschen); both from memory. */
const JUMPS: readonly Jump[] = [
  {
    label: 'Balmer jump',
    blue: [3610, 3645],
    red: [3675, 3700],
    line: [2, 11],
    scale: 368,
    a: 0.259,
    b: 3.409,
    power: -1.5,
    source: 'Liu et al. 2001',
  },
  {
    label: 'Paschen jump',
    blue: [8150, 8200],
    red: [8255, 8275],
    line: [3, 11],
    scale: 8.72,
    a: 0.52,
    b: 4.4,
    power: -1.77,
    source: 'Fang & Liu 2011',
  },
];
const LEAST_SAMPLES = 8;
const LEAST_SIGMA = 5;
/** Outside these no ionised gas cools in equilibrium: the step has another cause. Common practice, no source. */
const COOLEST_TE = 1_000;
const HOTTEST_TE = 40_000;

/** Te from the jumps that stand out of the continuum; none where a window is outside the spectrum or the jump is below five sigma. */
export function jumpResults(
  data: AtomicData,
  fluxes: readonly LineFlux[],
  continuum: Continuum,
  c: number,
  f: (wavelength: number) => number,
  abundances: readonly AbundanceResult[],
): JumpResult[] {
  const helium = (ion: string) => abundances.find((each) => each.ion === ion && each.from === 'recombination')?.abundance ?? 0;
  return JUMPS.flatMap((jump): JumpResult[] => {
    const line = data.hydrogenicLine('H I', jump.line[0], jump.line[1]);
    const flux = fluxes.find((each) => each.lines.length === 1 && each.lines[0] === line && each.doubt === undefined);
    const blue = levelIn(continuum, jump.blue);
    const red = levelIn(continuum, jump.red);
    if (!flux || !blue || !red) return [];
    const corrected = (level: number, window: readonly [number, number]) => level * 10 ** (c * f((window[0] + window[1]) / 2));
    const drop = corrected(blue.level, jump.blue) - corrected(red.level, jump.red);
    const dropErr = Math.hypot(corrected(blue.err, jump.blue), corrected(red.err, jump.red));
    if (!(drop > LEAST_SIGMA * dropErr)) return [];
    // a continuum per observed Angstrom against a flux: the rest-frame jump is (1 + z) times higher
    const value = (drop * (1 + continuum.z)) / (flux.flux * 10 ** (c * f(flux.restVac)));
    const relative = Math.hypot(dropErr / drop, flux.fluxErr / flux.flux);
    const te = jump.scale * (1 + jump.a * helium('He II') + jump.b * helium('He III')) * value ** jump.power;
    const spread = Math.abs(jump.power) * relative;
    return [
      {
        label: jump.label,
        ratio: { value, err: value * relative },
        result:
          te > COOLEST_TE && te < HOTTEST_TE
            ? { ended: 'value', value: te, low: te / (1 + spread), high: te * (1 + spread) }
            : { ended: 'none', reason: `the step would mean ${Math.round(te)} K: it is not that of ionised hydrogen alone` },
        assumption: `Drop between ${jump.blue.join('–')} and ${jump.red.join('–')} Å over H ${jump.line[1]} (${jump.source}); everything else in the continuum is smooth there.`,
      },
    ];
  });
}

function levelIn(
  { levels }: Continuum,
  [from, to]: readonly [number, number],
): { readonly level: number; readonly err: number } | undefined {
  const values = levels(from, to);
  if (!values || values.length < LEAST_SAMPLES) return undefined;
  // error of a median: 1.25 times that of a mean
  return { level: median(values), err: (1.2533 * robustSigma(values)) / Math.sqrt(values.length) };
}

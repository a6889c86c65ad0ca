import { type AtomicData, duration, isInsideRange, isMetastable, powerOfTen, radiativeLifetime } from '../atomic/index.ts';
import { densityEffects, densityWhereLeft, LADDER_LOG_NE, survivalAt } from './densityEffects.ts';
import type { LineFlux } from './lineFluxes.ts';
import type { NamedLine } from './namedLine.ts';
import { type Zone, zoneOfIon } from './zones.ts';

/** Gases people know, and how many particles a cm^3 of them holds: common practice, no source (the lamp: an ideal gas at 1 mbar and 300 K). */
const FAMILIAR_GASES = [
  { name: 'H II region', densityCm3: 1e3 },
  { name: 'dense shell', densityCm3: 1e8 },
  { name: 'chromosphere', densityCm3: 1e12 },
  { name: 'laboratory lamp at 1 mbar', densityCm3: 2.4e16 },
  { name: 'air at sea level', densityCm3: 2.5e19 },
] as const;
const LAMP_CM3 = 2.4e16;

/** A tenth of the light left: beyond that density the ion would have to be ten times as abundant to make up for it. Our choice. */
const CEILING_SHARE = 0.1;

/** One thin-gas line on the ladder. */
export interface Rung {
  /** Numbers of its features, as shown. */
  readonly features: readonly number[];
  readonly label: string;
  readonly ion: string;
  readonly zone: Zone;
  readonly accepted: boolean;
  readonly lifetimeS: number;
  /** cm^-3; absent = no collision data. */
  readonly nCrit?: number;
  /** At the densities of `logNe`; absent = no collision data. */
  readonly survival?: Float64Array;
  /** cm^-3: half and a tenth of the light left; absent where it never falls so far. */
  readonly halfAt?: number;
  readonly tenthAt?: number;
  /** Collisions one atom suffers in one lifetime in each of the familiar gases. */
  readonly collisions?: readonly number[];
  /** Whether a laboratory could show it. */
  readonly laboratory: string;
  readonly insideRange: boolean;
}

export interface DensityLadder {
  /** K, of critical densities and survival. */
  readonly te: number;
  /** Gases people know, for comparison. */
  readonly gases: readonly { readonly name: string; readonly densityCm3: number }[];
  /** Densities at which survival is tabulated, log10 cm^-3, even steps. */
  readonly logNe: readonly number[];
  /** Ascending critical density; lines without one last. */
  readonly rungs: readonly Rung[];
  /** Above it some line would have less than a tenth of its light. */
  readonly ceiling?: { readonly densityCm3: number; readonly label: string };
  /** Where lines and a measured density do not go together. */
  readonly contradictions: readonly string[];
}

/** A density that was measured, at its lower one-sigma end. */
export interface MeasuredDensity {
  readonly label: string;
  readonly lowCm3: number;
}

/**
 * The thin-gas lines among the fluxes, ordered by critical density.
 *
 * @param te K
 * Collisions in one lifetime: density over critical density, as if every particle struck like an electron.
 */
export function densityLadder(
  data: AtomicData,
  named: readonly NamedLine[],
  fluxes: readonly LineFlux[],
  te: number,
  measured: readonly MeasuredDensity[],
): DensityLadder {
  const rungs = fluxes
    .flatMap((flux) => rungOf(data, named, flux, te))
    .sort((a, b) => (a.nCrit ?? Number.POSITIVE_INFINITY) - (b.nCrit ?? Number.POSITIVE_INFINITY));
  const accepted = rungs.filter((rung) => rung.accepted);
  // where nothing was accepted yet the best names speak
  const speaking = accepted.length > 0 ? accepted : rungs;
  const setter = speaking
    .filter((rung) => rung.tenthAt !== undefined)
    .reduce<Rung | undefined>((best, rung) => ((rung.tenthAt ?? 0) < (best?.tenthAt ?? Number.POSITIVE_INFINITY) ? rung : best), undefined);
  return {
    te,
    gases: FAMILIAR_GASES,
    logNe: LADDER_LOG_NE,
    rungs,
    ...(setter?.tenthAt === undefined ? {} : { ceiling: { densityCm3: setter.tenthAt, label: setter.label } }),
    contradictions: measured.flatMap((density) => contradictionsOf(speaking, density)),
  };
}

function rungOf(data: AtomicData, named: readonly NamedLine[], flux: LineFlux, te: number): Rung[] {
  const { lines } = data;
  const [line] = flux.lines;
  const nature = lines.nature(line);
  const level = lines.upperLevel[line];
  const ion = lines.ions[lines.ion[line]].name;
  if (nature !== 'forbidden' && nature !== 'intercombination') return [];
  const model = data.levelModel(ion);
  const members = flux.from.map((k) => named[k]);
  const common = {
    features: members.map(({ feature }) => feature),
    label: flux.label,
    ion,
    zone: zoneOfIon(data, ion),
    accepted: members.some(({ accepted }) => accepted),
  };
  if (!model || level <= 0) {
    const a = lines.aValue[line];
    if (nature === 'intercombination' && model) return [];
    return [{ ...common, lifetimeS: a > 0 ? 1 / a : Number.NaN, laboratory: unknownCollisions(flux.label), insideRange: true }];
  }
  if (!isMetastable(model, level)) return [];
  const lifetimeS = radiativeLifetime(model, level);
  const { curves, critical } = densityEffects(model, te);
  const nCrit = critical[level];
  if (!Number.isFinite(nCrit)) return [{ ...common, lifetimeS, laboratory: unknownCollisions(flux.label), insideRange: true }];
  const survival = curves[level];
  const halfAt = densityWhereLeft(survival, 1 / 2);
  const tenthAt = densityWhereLeft(survival, CEILING_SHARE);
  return [
    {
      ...common,
      lifetimeS,
      nCrit,
      survival,
      ...(Number.isFinite(halfAt) ? { halfAt } : {}),
      ...(Number.isFinite(tenthAt) ? { tenthAt } : {}),
      collisions: FAMILIAR_GASES.map(({ densityCm3 }) => densityCm3 / nCrit),
      laboratory: laboratoryOf(flux.label, lifetimeS, nCrit, survival),
      insideRange: isInsideRange(model, level, te),
    },
  ];
}

const unknownCollisions = (label: string) =>
  `Whether a laboratory could show ${label} cannot be said: its collision rates are not in the tables.`;

/** Collisions in one lifetime up to which a line keeps a tenth of its light, about. */
const FEW = 10;

function laboratoryOf(label: string, lifetimeS: number, nCrit: number, survival: Float64Array): string {
  const struck = LAMP_CM3 / nCrit;
  const left = survivalAt(survival, LAMP_CM3);
  const waits = `${label} waits ${duration(lifetimeS)}`;
  if (struck <= 1) return `${waits}: a lamp at 1 mbar can show it, a collision there comes later than the light.`;
  const times = `in a lamp at 1 mbar its atom is struck ${powerOfTen(struck)} times before it would radiate`;
  if (struck <= FEW || left >= CEILING_SHARE) return `${waits}: ${times}, so it can be seen there, but faded.`;
  const thin =
    Math.log10(nCrit) >= LOWEST_LAMP_LOG
      ? ' A discharge thinner than a thousandth of a mbar could show it.'
      : ' No laboratory gas is thin enough.';
  return `${waits}: ${times}, so no such lamp shows it.${thin}`;
}

/** log10 of the particles per cm^3 at a thousandth of a mbar, about the thinnest gas that still glows in a tube. */
const LOWEST_LAMP_LOG = 13;

function contradictionsOf(rungs: readonly Rung[], { label, lowCm3 }: MeasuredDensity): string[] {
  return rungs.flatMap((rung) => {
    if (!rung.survival) return [];
    const left = survivalAt(rung.survival, lowCm3);
    if (!(left < CEILING_SHARE)) return [];
    const percent = Number((100 * left).toPrecision(1));
    return [
      `${label} asks for at least ${powerOfTen(lowCm3)} electrons per cm³, where ${rung.label} keeps ${percent < 0.1 ? 'less than 0.1' : percent} % of its light: it comes from thinner gas, or one of the names is wrong.`,
    ];
  });
}

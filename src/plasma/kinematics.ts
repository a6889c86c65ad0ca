import type { AtomicData } from '../atomic/index.ts';
import { median, robustSigma } from '../numeric/index.ts';
import type { NamedLine } from './namedLine.ts';

/** A value with its error against energy or wavelength. */
export interface KinematicPoint {
  /** Number of its feature, as shown. */
  readonly feature: number;
  readonly label: string;
  readonly ion: string;
  /** Energy to make the ion (recombination lines: the recombining one), eV. */
  readonly energyEv: number;
  readonly restVac: number;
  readonly velocityKms: number;
  readonly velocityErrKms: number;
  readonly fwhmKms?: number;
  readonly fwhmErrKms?: number;
}

/** Weighted straight line y = at + slope (x - about). */
export interface Trend {
  readonly slope: number;
  readonly slopeErr: number;
  readonly at: number;
  readonly about: number;
  readonly points: number;
}

/** Mean of one ion's lines; errors inflated by their scatter where that is more. */
export interface IonMean {
  readonly ion: string;
  readonly energyEv: number;
  readonly count: number;
  readonly velocityKms: number;
  readonly velocityErrKms: number;
  readonly fwhmKms?: number;
  readonly fwhmErrKms?: number;
}

export interface Kinematics {
  readonly points: readonly KinematicPoint[];
  readonly ions: readonly IonMean[];
  /** km/s per eV. */
  readonly velocityByEnergy?: Trend;
  readonly widthByEnergy?: Trend;
  /** km/s per Angstrom. */
  readonly velocityByWavelength?: Trend;
  readonly widthByWavelength?: Trend;
  /** What the trends mean, each a sentence. */
  readonly findings: readonly string[];
}

const LEAST_POINTS = 5;
const CLIP_SIGMA = 4;
const SIGNIFICANT_SIGMA = 3;

/** Velocities and widths of single named lines against ionisation energy and wavelength. */
export function kinematicsOf(data: AtomicData, named: readonly NamedLine[]): Kinematics {
  const points = named.flatMap((line) => pointOf(data, line));
  const velocities = points.map((p) => ({ ...p, y: p.velocityKms, err: p.velocityErrKms }));
  const widths = points.flatMap((p) =>
    p.fwhmKms !== undefined && p.fwhmKms > 0 && p.fwhmErrKms !== undefined && p.fwhmErrKms > 0
      ? [{ ...p, y: p.fwhmKms, err: p.fwhmErrKms }]
      : [],
  );
  const byEnergy = (p: KinematicPoint) => p.energyEv;
  const byWavelength = (p: KinematicPoint) => p.restVac;
  const trends = {
    velocityByEnergy: trendOf(velocities, byEnergy),
    widthByEnergy: trendOf(widths, byEnergy),
    velocityByWavelength: trendOf(velocities, byWavelength),
    widthByWavelength: trendOf(widths, byWavelength),
  };
  return { points, ions: ionMeans(points), ...trends, findings: findingsOf(trends) };
}

function pointOf(data: AtomicData, line: NamedLine): KinematicPoint[] {
  if (line.lines.length !== 1 || line.doubt !== undefined || !(line.velocityErrKms > 0) || !Number.isFinite(line.velocityKms)) return [];
  const [index] = line.lines;
  const ion = data.lines.ions[data.lines.ion[index]];
  return [
    {
      feature: line.feature,
      label: line.label,
      ion: ion.name,
      energyEv: data.lines.mechanism(index) === 'recombination' ? ion.ionizationEv : ion.creationEv,
      restVac: line.restVac,
      velocityKms: line.velocityKms,
      velocityErrKms: line.velocityErrKms,
      ...(line.fwhmKms === undefined ? {} : { fwhmKms: line.fwhmKms }),
      ...(line.fwhmErrKms === undefined ? {} : { fwhmErrKms: line.fwhmErrKms }),
    },
  ];
}

type Valued = KinematicPoint & { readonly y: number; readonly err: number };

/** Weighted straight line; what the points scatter beyond their errors is added to these, what lies 4 sigma off is left out. */
function trendOf(all: readonly Valued[], x: (p: KinematicPoint) => number): Trend | undefined {
  const centre = median(all.map((p) => p.y));
  const spread = excessScatter(
    all.map((p) => p.y - centre),
    all.map((p) => p.err),
  );
  const points = all.filter((p) => Math.abs(p.y - centre) <= CLIP_SIGMA * Math.hypot(spread, p.err));
  if (points.length < LEAST_POINTS) return undefined;
  const w = points.map((p) => 1 / (p.err ** 2 + spread ** 2));
  const total = w.reduce((sum, each) => sum + each, 0);
  const about = points.reduce((sum, p, k) => sum + w[k] * x(p), 0) / total;
  const at = points.reduce((sum, p, k) => sum + w[k] * p.y, 0) / total;
  const lever = points.reduce((sum, p, k) => sum + w[k] * (x(p) - about) ** 2, 0);
  if (!(lever > 0)) return undefined;
  const slope = points.reduce((sum, p, k) => sum + w[k] * (x(p) - about) * p.y, 0) / lever;
  const chi2 = points.reduce((sum, p, k) => sum + w[k] * (p.y - at - slope * (x(p) - about)) ** 2, 0);
  return { slope, slopeErr: Math.sqrt((1 / lever) * Math.max(1, chi2 / (points.length - 2))), at, about, points: points.length };
}

const BISECTIONS = 40;

/** Scatter that has to be added to the errors for the values to scatter as they do (median absolute deviation); 0 where the errors explain it. */
function excessScatter(offsets: readonly number[], errs: readonly number[]): number {
  const excess = (scatter: number) => robustSigma(offsets.map((offset, k) => offset / Math.hypot(errs[k], scatter))) > 1;
  if (!excess(0)) return 0;
  let [low, high] = [0, Math.max(...offsets.map(Math.abs))];
  for (let step = 0; step < BISECTIONS; step++) {
    const middle = (low + high) / 2;
    if (excess(middle)) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

function ionMeans(points: readonly KinematicPoint[]): IonMean[] {
  const byIon = groupByIon(points);
  return [...byIon]
    .map(([ion, members]): IonMean => {
      const velocity = meanOf(members.map((p) => ({ y: p.velocityKms, err: p.velocityErrKms })));
      const widths = members.flatMap((p) =>
        p.fwhmKms !== undefined && p.fwhmErrKms !== undefined && p.fwhmErrKms > 0 ? [{ y: p.fwhmKms, err: p.fwhmErrKms }] : [],
      );
      const width = widths.length > 0 ? meanOf(widths) : undefined;
      return {
        ion,
        energyEv: members[0].energyEv,
        count: members.length,
        velocityKms: velocity.y,
        velocityErrKms: velocity.err,
        ...(width ? { fwhmKms: width.y, fwhmErrKms: width.err } : {}),
      };
    })
    .sort((a, b) => a.energyEv - b.energyEv || a.ion.localeCompare(b.ion));
}

function groupByIon(points: readonly KinematicPoint[]): Map<string, KinematicPoint[]> {
  const groups = new Map<string, KinematicPoint[]>();
  for (const point of points) {
    const known = groups.get(point.ion);
    if (known) known.push(point);
    else groups.set(point.ion, [point]);
  }
  return groups;
}

function meanOf(values: readonly { readonly y: number; readonly err: number }[]): { readonly y: number; readonly err: number } {
  const total = values.reduce((sum, v) => sum + 1 / v.err ** 2, 0);
  const y = values.reduce((sum, v) => sum + v.y / v.err ** 2, 0) / total;
  const chi2 = values.reduce((sum, v) => sum + ((v.y - y) / v.err) ** 2, 0);
  const inflation = values.length > 1 ? Math.max(1, chi2 / (values.length - 1)) : 1;
  return { y, err: Math.sqrt(inflation / total) };
}

function findingsOf(
  trends: Pick<Kinematics, 'velocityByEnergy' | 'widthByEnergy' | 'velocityByWavelength' | 'widthByWavelength'>,
): string[] {
  const { velocityByEnergy: v, widthByEnergy: w, velocityByWavelength: drift, widthByWavelength: widening } = trends;
  return [
    ...say(v, 10, (slope) => `Velocity changes by ${slope} km/s per 10 eV of ionisation energy: the zones move differently.`),
    ...say(w, 10, (slope) => `Width changes by ${slope} km/s per 10 eV of ionisation energy: an accelerated or layered flow does that.`),
    ...say(drift, 1000, (slope) => `Velocity changes by ${slope} km/s per 1000 Å: gas cannot do that, the wavelength calibration can.`),
    ...say(
      widening,
      1000,
      (slope) => `Width changes by ${slope} km/s per 1000 Å: the instrument's own width may not have been taken out rightly.`,
    ),
  ];
}

function say(trend: Trend | undefined, unit: number, sentence: (slope: string) => string): string[] {
  if (!trend || Math.abs(trend.slope) < SIGNIFICANT_SIGMA * trend.slopeErr) return [];
  const err = unit * trend.slopeErr;
  const digits = Math.max(0, 1 - Math.floor(Math.log10(err)));
  return [sentence(`${(unit * trend.slope).toFixed(digits)} ± ${err.toFixed(digits)}`)];
}

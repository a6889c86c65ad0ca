import type { AtomicData } from '../atomic/index.ts';
import { abundanceResults, discrepanciesOf } from './abundanceResults.ts';
import { bandOf } from './bands.ts';
import { densityLadder, type MeasuredDensity } from './densityLadder.ts';
import { diagnosticResults, zoneResults } from './diagnosticResults.ts';
import { drawGas, lnIntensity } from './drawGas.ts';
import type { DiagnosticResult, Gas } from './gas.ts';
import type { GasSettings } from './gasSettings.ts';
import { correctionOf, intensitiesOf } from './intensities.ts';
import { collisionalIons } from './ionAbundances.ts';
import { type Continuum, jumpResults } from './jumps.ts';
import { kinematicsOf } from './kinematics.ts';
import { type LineFlux, lineFluxes } from './lineFluxes.ts';
import { measuredRatios } from './measuredRatios.ts';
import type { NamedLine } from './namedLine.ts';
import { curveOf } from './reddening.ts';
import { reddeningView } from './reddeningView.ts';
import { settleGas } from './settleGas.ts';

/** What the gas is described from, beside its lines. */
export interface GasContext {
  readonly data: AtomicData;
  readonly settings: GasSettings;
  /** Te (K) and ne (cm^-3) where nothing is known. */
  readonly startTe: number;
  readonly startNe: number;
  /** Absent for a list of lines. */
  readonly continuum?: Continuum;
  readonly draws?: number;
  readonly seed?: number;
}

const DRAWS = 200;
const SEED = 1;
/** The ladder's temperature goes in steps, so that its curves need not be solved anew for every verdict, K. */
const LADDER_TE_STEP = 100;

/**
 * What the named emission lines of an object say of its gas: reddening, temperature and density by zone, abundances, density ladder, kinematics.
 *
 * @param named emission lines of the object, rest frame; features without a name only get an intensity
 * Errors: draws of the noise of all fluxes at once (seeded, repeatable); intensities by linear propagation.
 */
export function describeGas(named: readonly NamedLine[], context: GasContext): Gas {
  const { data, settings } = context;
  const fluxes = lineFluxes(named, settings.calibrationErr);
  const { ratios, unused } = measuredRatios(data, fluxes);
  const curve = curveOf(settings);
  const f = Float64Array.from(fluxes, (flux) => curve(flux.restVac));
  const zoneSettings = { te: settings.te, ne: settings.ne, startTe: context.startTe, startNe: context.startNe };

  const { reddening, solved, ln, c, te, ne } = settleGas(data, fluxes, ratios, f, settings, zoneSettings);
  const { fit, shares } = reddening;
  const { zones } = solved;
  const correction = correctionOf(named, fluxes, fit, settings.cHbeta);
  const hBetaLine = data.hydrogenicLine('H I', 2, 4);
  const isHelium = (line: number) => data.lines.ions[data.lines.ion[line]].name === 'He II';
  const hBetaIndex = fluxes.findIndex(
    ({ lines }) => lines.includes(hBetaLine) && lines.every((line) => line === hBetaLine || isHelium(line)),
  );
  const hBeta = hBetaIndex < 0 ? undefined : hBetaIndex;
  // from here on Balmer lines count with their stellar absorption filled, H beta also without the He II under it
  const hydrogen = fluxes.map((flux, k) => scaled(flux, (k === hBeta ? shares.get(k)?.pure : shares.get(k)?.filled) ?? 1));
  const ions = collisionalIons(data, fluxes);
  const drawn = drawGas({
    fluxes: hydrogen,
    f,
    c,
    cSlopes: Float64Array.from(fluxes, ({ from }) => (correction ? from.reduce((sum, k) => sum + correction.slopes[k], 0) : 0)),
    hBeta,
    ratios,
    ions,
    solved,
    settings: zoneSettings,
    seed: context.seed ?? SEED,
    draws: context.draws ?? DRAWS,
  });
  const numbers = (indices: readonly number[]) => indices.flatMap((index) => fluxes[index].from.map((k) => named[k].feature));
  const diagnostics = diagnosticResults(ratios, ln, solved, drawn, numbers);
  const ladderTe = LADDER_TE_STEP * Math.round(zones.medium.te / LADDER_TE_STEP);
  const lnI = hydrogen.map(({ flux }, k) => lnIntensity(flux, c, f[k]));
  const abundances = hBeta === undefined ? [] : abundanceResults({ data, fluxes: hydrogen, lnI, hBeta, ions, zones, drawn });
  const intensities =
    correction && hBeta !== undefined
      ? intensitiesOf(filledLines(named, hydrogen), hydrogen[hBeta], correction, settings.calibrationErr, curve)
      : undefined;
  return {
    settings,
    accepted: named.filter((line) => line.lines.length > 0 && line.accepted).length,
    probable: named.filter((line) => line.lines.length > 0 && !line.accepted).length,
    withoutErr: named.filter((line) => line.lines.length > 0 && !(line.fluxErr > 0)).length,
    ...(hBeta === undefined ? {} : { hBeta: { value: fluxes[hBeta].flux, err: fluxes[hBeta].fluxErr, features: numbers([hBeta]) } }),
    reddening: reddeningView(data, named, fluxes, reddening, settings, te, ne),
    ...(intensities ? { intensities } : {}),
    diagnostics,
    unused,
    zones: zoneResults(ratios, solved, drawn, zoneSettings),
    bands: ratios.map((ratio, k) => bandOf(ratio, ln[k])),
    jumps: context.continuum ? jumpResults(data, fluxes, context.continuum, c, curve, abundances) : [],
    abundances,
    discrepancies: discrepanciesOf(abundances),
    ladder: densityLadder(data, named, fluxes, ladderTe, measuredDensities(diagnostics)),
    kinematics: kinematicsOf(data, named),
    draws: context.draws ?? DRAWS,
  };
}

const scaled = (flux: LineFlux, share: number): LineFlux => ({ ...flux, flux: flux.flux * share, fluxErr: flux.fluxErr * share });

/** The lines with their stellar absorption filled: each as its flux was. H beta counts as the pure hydrogen line. */
function filledLines(named: readonly NamedLine[], fluxes: readonly LineFlux[]): NamedLine[] {
  const lines = [...named];
  fluxes.forEach(({ from, flux }) => {
    const measured = from.reduce((sum, k) => sum + named[k].flux, 0);
    for (const k of from)
      lines[k] = { ...named[k], flux: (named[k].flux * flux) / measured, fluxErr: (named[k].fluxErr * flux) / measured };
  });
  return lines;
}

function measuredDensities(diagnostics: readonly DiagnosticResult[]): MeasuredDensity[] {
  return diagnostics.flatMap(({ label, tells, result }) =>
    tells === 'density' && result.ended === 'value'
      ? [{ label, lowCm3: result.low }]
      : tells === 'density' && result.ended === 'above'
        ? [{ label, lowCm3: result.limit }]
        : [],
  );
}

import type { AtomicData } from '../atomic/index.ts';
import { lnIntensity, lnRatioOf } from './drawGas.ts';
import type { GasSettings } from './gasSettings.ts';
import type { LineFlux } from './lineFluxes.ts';
import type { MeasuredRatio } from './measuredRatios.ts';
import { type ReddeningResult, reddeningOf } from './reddening.ts';
import { type LnRatio, solveZones, type ZoneSettings, type ZonesSolved } from './solveZones.ts';

/** Reddening, temperatures and densities that go together. */
export interface SettledGas {
  readonly reddening: ReddeningResult;
  readonly solved: ZonesSolved;
  /** Corrected ratios, one a diagnostic. */
  readonly ln: readonly LnRatio[];
  /** c(H beta) used: never negative. */
  readonly c: number;
  /** K and cm^-3 of the case-B intensities. */
  readonly te: number;
  readonly ne: number;
}

/** Case B hangs on Te and ne by a few per cent at most: it settles at once. */
const ROUNDS = 3;

/**
 * Takes turns between c(H beta), which needs Te and ne for case B, and the zones, whose ratios need c(H beta).
 *
 * @param f A(lambda)/A(H beta) - 1, one a flux
 */
export function settleGas(
  data: AtomicData,
  fluxes: readonly LineFlux[],
  ratios: readonly MeasuredRatio[],
  f: Float64Array,
  settings: GasSettings,
  zoneSettings: ZoneSettings,
): SettledGas {
  const attempt = (te: number, ne: number): SettledGas => {
    const reddening = reddeningOf(data, fluxes, settings, te, ne);
    const c = Math.max(0, settings.cHbeta ?? reddening.fit?.cHbeta ?? 0);
    const cErr = settings.cHbeta === undefined ? (reddening.fit?.cHbetaErr ?? 0) : 0;
    const lnI = fluxes.map(({ flux }, k) => lnIntensity(flux, c, f[k]));
    const ln = ratios.map((ratio): LnRatio => {
      const reach = Math.LN10 * cErr * (f[ratio.over[0]] - f[ratio.under[0]]);
      return { value: lnRatioOf(ratio, lnI), err: Math.hypot(relativeErr(fluxes, ratio.over), relativeErr(fluxes, ratio.under), reach) };
    });
    return { reddening, solved: solveZones(ratios, ln, zoneSettings), ln, c, te, ne };
  };
  let settled = attempt(settings.te ?? zoneSettings.startTe, settings.ne ?? zoneSettings.startNe);
  // most of the hydrogen shines in the medium zone
  for (let round = 1; round < ROUNDS; round++) settled = attempt(settled.solved.zones.medium.te, settled.solved.zones.medium.ne);
  return settled;
}

function relativeErr(fluxes: readonly LineFlux[], indices: readonly number[]): number {
  const sum = indices.reduce((total, index) => total + fluxes[index].flux, 0);
  return Math.hypot(...indices.map((index) => fluxes[index].fluxErr / sum));
}

import type { AtomicData } from '../atomic/index.ts';
import type { Drawn } from './drawGas.ts';
import { estimateOf } from './estimate.ts';
import type { AbundanceResult, Discrepancy } from './gas.ts';
import { abundanceOf, type CollisionalIon, recombinationAbundances, zonePlace } from './ionAbundances.ts';
import type { LineFlux } from './lineFluxes.ts';
import type { ZoneStates } from './solveZones.ts';
import { zoneOfIon } from './zones.ts';

interface Parts {
  readonly data: AtomicData;
  readonly fluxes: readonly LineFlux[];
  /** ln of corrected intensities, one a flux. */
  readonly lnI: readonly number[];
  /** Place of H beta. */
  readonly hBeta: number;
  readonly ions: readonly CollisionalIon[];
  readonly zones: ZoneStates;
  readonly drawn: Drawn;
}

/** Ionic abundances from both kinds of lines, by ion. */
export function abundanceResults({ data, fluxes, lnI, hBeta, ions, zones, drawn }: Parts): AbundanceResult[] {
  const perHbeta = (index: number) => Math.exp(lnI[index] - lnI[hBeta]);
  const relativeErr = (index: number) => Math.hypot(fluxes[index].fluxErr / fluxes[index].flux, fluxes[hBeta].fluxErr / fluxes[hBeta].flux);
  const collisional = ions.map((ion, k): AbundanceResult => {
    const state = zones[ion.zone];
    const estimate = estimateOf(abundanceOf(ion, perHbeta, zonePlace(state)), drawn.abundances[k]);
    const { value, low, high } = estimate.ended === 'value' ? estimate : { value: Number.NaN, low: Number.NaN, high: Number.NaN };
    return {
      ion: ion.ion,
      zone: ion.zone,
      from: 'collisional',
      abundance: value,
      low,
      high,
      lines: ion.parts.map(({ index }) => fluxes[index].label),
      assumption: `Te = ${Math.round(state.te)} K, ne = ${Number(state.ne.toPrecision(2))} cm⁻³ all over the ${ion.zone} zone, for H⁺ too.`,
    };
  });
  const recombination = recombinationAbundances(data, fluxes, perHbeta, relativeErr).map(
    ({ ion, abundance, abundanceErr, lines }): AbundanceResult => ({
      ion,
      zone: ion === 'He III' ? 'high' : zoneOfIon(data, ion),
      from: 'recombination',
      abundance,
      low: Math.max(0, abundance - abundanceErr),
      high: abundance + abundanceErr,
      lines,
      assumption: 'Coefficients at 10⁴ K; no fluorescence, sublevels filled by weight.',
    }),
  );
  return [...collisional, ...recombination].sort((a, b) => order(data, a.ion) - order(data, b.ion) || a.from.localeCompare(b.from));
}

function order(data: AtomicData, ion: string): number {
  const index = data.lines.ions.findIndex((each) => each.name === ion);
  return index < 0 ? data.lines.ions.findIndex((each) => each.name === 'He II') + 0.5 : index;
}

/** Recombination over collisional abundance, where an ion has both. */
export function discrepanciesOf(abundances: readonly AbundanceResult[]): Discrepancy[] {
  return abundances.flatMap((recombination) => {
    const collisional = abundances.find((each) => each.from === 'collisional' && each.ion === recombination.ion);
    if (recombination.from !== 'recombination' || !collisional || !(collisional.abundance > 0)) return [];
    const factor = recombination.abundance / collisional.abundance;
    const relative = Math.hypot(halfWidth(recombination), halfWidth(collisional));
    return [{ ion: recombination.ion, factor, low: factor / (1 + relative), high: factor * (1 + relative) }];
  });
}

const halfWidth = ({ low, high, abundance }: AbundanceResult) => (high - low) / (2 * abundance);

import { levelPopulations } from '../physics/levelPopulations.ts';
import type { IonEntry } from './assembly.ts';
import type { TableModel } from './modelFromTables.ts';

/** The reference nebula: density cm^-3 (middle, in the logarithm, of 10^3 and 10^4). */
const REFERENCE_NE = 3_000;
/** Electron temperature, K, where helium is at most singly ionized, and where ions made above He+ live (He++ zones of nebulae, shells and shocks are hotter). */
const REFERENCE_TE = 10_000;
export const HOT_REFERENCE_TE = 15_000;
const HELIUM_PLUS_EV = 54.4;
/** Other gas than the reference (temperature as a factor, density in cm^-3): how far a strength moves within the ion between these is two sigma. */
const OTHER_TE_FACTORS = [0.8, 1.4] as const;
const OTHER_NE = [200, 200_000] as const;
/** 4 pi j(H beta) / (ne np), erg cm^3 s^-1, case B at 10^4 K and 10^4 cm^-3: Storey & Hummer 1995. */
const H_BETA_EMISSIVITY = 1.239e-25;
/** h c, erg cm (CODATA 2018, exact constants). */
const HC_ERG_CM = 1.986_445_857e-16;

/** Electron temperature at which the ion's strengths are computed, K. */
export function referenceTe(ion: IonEntry): number {
  return ion.creationEv > HELIUM_PLUS_EV ? HOT_REFERENCE_TE : REFERENCE_TE;
}

/** Fluxes of all decays for H beta = 100 in the reference nebula. */
export function referenceStrengths(ion: IonEntry, { model, decays }: TableModel): number[] {
  const population = levelPopulations(model, referenceTe(ion), REFERENCE_NE);
  return decays.map(({ lower, upper, a }) => {
    const photon = HC_ERG_CM * (model.levels[upper].energyCm1 - model.levels[lower].energyCm1);
    return (100 * ion.abundance * population[upper] * a * photon) / REFERENCE_NE / H_BETA_EMISSIVITY;
  });
}

/** Half of how far each decay moves against decay `reference` when temperature or density is another, dex. */
export function scatterOfGas(ion: IonEntry, { model, decays }: TableModel, reference: number): number[] {
  const relative = (te: number, ne: number): number[] => {
    const population = levelPopulations(model, te, ne);
    const logs = decays.map((d) => Math.log10(Math.max(1e-99, population[d.upper] * d.a)));
    return logs.map((value) => value - logs[reference]);
  };
  const spread = (one: readonly number[], other: readonly number[]): number[] => one.map((value, i) => Math.abs(value - other[i]) / 2);
  const te = referenceTe(ion);
  const byTe = spread(relative(OTHER_TE_FACTORS[0] * te, REFERENCE_NE), relative(OTHER_TE_FACTORS[1] * te, REFERENCE_NE));
  const byNe = spread(relative(te, OTHER_NE[0]), relative(te, OTHER_NE[1]));
  return byTe.map((value, i) => Math.hypot(value, byNe[i]));
}

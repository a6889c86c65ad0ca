import type { AtomicData } from '../atomic/index.ts';

/** Where in the gas an ion lives. */
export type Zone = 'neutral' | 'low' | 'medium' | 'high';

/** From the inside out of a cold cloud. */
export const ZONES: readonly Zone[] = ['neutral', 'low', 'medium', 'high'];

/** Upper ends of the zones by the energy that was needed to make the ion, eV: O II, N II, S II, Fe III below; O III, S III, Ne III, Ar IV between; Ne IV, Ar V above. Common practice, no source. */
const LOW_END_EV = 20;
const MEDIUM_END_EV = 45;

export function zoneOf(creationEv: number, charge: number): Zone {
  if (charge === 0) return 'neutral';
  if (creationEv < LOW_END_EV) return 'low';
  return creationEv < MEDIUM_END_EV ? 'medium' : 'high';
}

/** Zone of an ion of the list by its name; low when the list has none of that name. */
export function zoneOfIon(data: AtomicData, name: string): Zone {
  const ion = data.lines.ions.find((each) => each.name === name);
  return ion ? zoneOf(ion.creationEv, ion.charge) : 'low';
}

/** The zones by nearness to one of them, itself first. */
export const nearestZones = (zone: Zone): Zone[] =>
  ZONES.toSorted((a, b) => Math.abs(ZONES.indexOf(a) - ZONES.indexOf(zone)) - Math.abs(ZONES.indexOf(b) - ZONES.indexOf(zone)));

import { airFromVacuum, vacuumFromAir } from '../../units/index.ts';
import { evenTicks } from './evenTicks.ts';

export type Frame = 'observed' | 'rest';
export type AxisMedium = 'air' | 'vacuum';

/** Which wavelengths an axis counts; places on it are always Angstrom as the file has them. */
export interface WaveAxis {
  /** Of the file. */
  readonly medium: AxisMedium;
  /** What the axis shows. */
  readonly shownMedium: AxisMedium;
  readonly frame: Frame;
  readonly z: number;
}

/** Pixels a tick wants. */
export const TICK_PX = 96;

/** Marks of an axis: where they stand, Angstrom of the file, and what they say. */
export interface AxisTicks {
  readonly at: readonly number[];
  readonly text: readonly string[];
}

/** The same light counted in the other frame. */
export const otherAxis = (axis: WaveAxis): WaveAxis => ({ ...axis, frame: axis.frame === 'rest' ? 'observed' : 'rest' });

/** A wavelength of the file as the axis counts it. The redshift divides vacuum wavelengths only: air has another refractive index at each of the two. */
export function shownWavelength({ medium, shownMedium, frame, z }: WaveAxis, place: number): number {
  if (frame === 'observed' && medium === shownMedium) return place;
  const observed = medium === 'air' ? vacuumFromAir(place) : place;
  const vacuum = frame === 'rest' ? observed / (1 + z) : observed;
  return shownMedium === 'air' ? airFromVacuum(vacuum) : vacuum;
}

/** Where a shown wavelength stands in the file: the inverse of `shownWavelength`. */
export function placeOf({ medium, shownMedium, frame, z }: WaveAxis, shown: number): number {
  if (frame === 'observed' && medium === shownMedium) return shown;
  const vacuum = shownMedium === 'air' ? vacuumFromAir(shown) : shown;
  const observed = frame === 'rest' ? vacuum * (1 + z) : vacuum;
  return medium === 'air' ? airFromVacuum(observed) : observed;
}

/** Round shown wavelengths between two places of the file, at most about `count`. */
export function axisTicks(axis: WaveAxis, from: number, to: number, count: number): AxisTicks {
  const shown = evenTicks(shownWavelength(axis, from), shownWavelength(axis, to), count);
  return { at: shown.map((tick) => placeOf(axis, tick)), text: shown.map(String) };
}

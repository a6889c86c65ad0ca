import { airFromVacuum, vacuumFromAir } from '../units/index.ts';
import type { Medium } from './spectrum.ts';

/** Wavelength stated in `medium` -> vacuum, Angstrom. */
export const toVacuum = (wavelength: number, medium: Medium): number => (medium === 'air' ? vacuumFromAir(wavelength) : wavelength);

/** Vacuum wavelength -> the wavelength stated in `medium`, Angstrom. */
export const fromVacuum = (vacuum: number, medium: Medium): number => (medium === 'air' ? airFromVacuum(vacuum) : vacuum);

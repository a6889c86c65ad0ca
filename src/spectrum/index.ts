// The spectrum noun: samples, medium, mask. Not here: reading it from bytes (readers), measuring it (measure).
export { fromVacuum, toVacuum } from './medium.ts';
export { countUsable, type Medium, type Spectrum } from './spectrum.ts';

/** The registry of branded quantities: every brand name stands here once, and only the constructors below make one. */
declare const brand: unique symbol;
type Branded<Name extends string> = number & { readonly [brand]: Name };

export type VacuumAngstrom = Branded<'VacuumAngstrom'>;
export type AirAngstrom = Branded<'AirAngstrom'>;
export type KmPerS = Branded<'KmPerS'>;
export type Kelvin = Branded<'Kelvin'>;
export type PerCm3 = Branded<'PerCm3'>;

export const vacuumAngstrom = (value: number) => value as VacuumAngstrom;
export const airAngstrom = (value: number) => value as AirAngstrom;
export const kmPerS = (value: number) => value as KmPerS;
export const kelvin = (value: number) => value as Kelvin;
export const perCm3 = (value: number) => value as PerCm3;

/** The registry of branded quantities: every brand name stands here once, and only the constructors below make one. */
declare const brand: unique symbol;
type Branded<Name extends string> = number & { readonly [brand]: Name };

export type VacuumAngstrom = Branded<'VacuumAngstrom'>;
export type AirAngstrom = Branded<'AirAngstrom'>;

export const vacuumAngstrom = (value: number) => value as VacuumAngstrom;
export const airAngstrom = (value: number) => value as AirAngstrom;

/** Temperatures (K) at which every collision strength is kept. */
export const UPSILON_TE = [2_000, 3_000, 5_000, 7_500, 10_000, 12_500, 15_000, 20_000, 30_000] as const;

/** One level of an ion. */
export interface Level {
  /** Configuration and term as the trade prints them: `2p2 1D`, odd terms with a trailing o. */
  readonly configuration: string;
  readonly term: string;
  readonly j: number;
  readonly energyCm1: number;
  readonly energyErrCm1: number;
  readonly parity: 'even' | 'odd';
}

/** Levels, radiative and collisional rates of one ion, level 0 = ground, ascending energy. Arrays are parallel, one value a pair of levels. */
export interface LevelModel {
  /** `O III` */
  readonly ion: string;
  readonly levels: readonly Level[];
  readonly radiative: {
    readonly lower: Uint8Array;
    readonly upper: Uint8Array;
    /** s^-1, multipoles summed. */
    readonly a: Float64Array;
  };
  readonly collisions: {
    readonly lower: Uint8Array;
    readonly upper: Uint8Array;
    /** Effective collision strengths, pair by pair, each at the temperatures of `UPSILON_TE`; NaN where the source has none. */
    readonly upsilon: Float32Array;
    /** Temperatures the source tabulates, K, per pair; NaN = a fit without a stated range. */
    readonly teLow: Float32Array;
    readonly teHigh: Float32Array;
  };
  /** Citations: energies, A values, collision strengths. */
  readonly sources: { readonly energies: readonly string[]; readonly radiative: readonly string[]; readonly collisions: readonly string[] };
}

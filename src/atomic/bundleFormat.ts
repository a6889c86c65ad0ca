/** First bytes of `public/atomic.bin`. */
export const BUNDLE_MAGIC = 'LWATOMS\n';
/** Rises whenever the layout changes; a reader refuses other numbers. */
export const BUNDLE_SCHEMA = 1;

export const NATURES = ['permitted', 'intercombination', 'forbidden', 'raman', 'sky', 'telluric', 'interstellar'] as const;
export const MECHANISMS = ['recombination', 'collisional', 'fluorescence'] as const;
/** published: printed coefficients; computed: level populations from printed rates; estimate: a rule of ours; unknown: no strength. */
export const STRENGTH_BASES = ['published', 'computed', 'estimate', 'unknown'] as const;
export type StrengthBasis = (typeof STRENGTH_BASES)[number];

/** Fixed-point scales: stored integer = quantity x scale. */
export const LOG_STRENGTH_SCALE = 1000;
export const LOG_A_SCALE = 1500;
export const LOG_UPSILON_SCALE = 4000;
export const ERR_DEX_SCALE = 100;
/** Wavelength errors: 0.001 A x 10^(k / 40), k = 0 ... 255: steps of 6 %, floor 0.001 A, the place to which Ritz values are usually printed. */
export const WAVELENGTH_ERR_FLOOR = 0.001;
export const WAVELENGTH_ERR_STEPS_PER_DEX = 40;
/** Integer that stands for "unknown" in 16-bit sections. */
export const UNKNOWN_16 = -32_768;
/** No level: a line without level labels (sky lines). */
export const NO_LEVEL = 0xffff;

export type SectionType = 'u8' | 'i8' | 'u16' | 'i16' | 'u32' | 'f32' | 'f64' | 'text';

export interface BundleHeader {
  readonly schema: number;
  /** SHA-256 of all input tables, hex. */
  readonly inputsHash: string;
  readonly counts: { readonly lines: number; readonly ions: number; readonly levels: number; readonly modelIons: number };
  /** Byte offset from the first section, and number of elements (bytes for text). */
  readonly sections: Readonly<Record<string, { readonly type: SectionType; readonly offset: number; readonly count: number }>>;
}

import type { Evidence, NamingSettings, RedshiftHypothesis } from '../identify/index.ts';
import type { Feature, Group, MeasureSettings } from '../measure/index.ts';
import type { Gas, GasSettings } from '../plasma/index.ts';
import type { Remark } from '../problems/index.ts';
import type { Offer, Reading, ReadingChoices } from '../readers/index.ts';
import type { LineTable, MethodFacts } from '../report/index.ts';
import type { LineKey, Verdict } from '../session/index.ts';
import type { Medium } from '../spectrum/index.ts';

/** How the file was read, as plain data. */
export interface ReadingView {
  readonly name: string;
  readonly kind: 'spectrum' | 'line-list';
  readonly medium: Medium;
  readonly mediumStated: boolean;
  readonly fluxUnit: string;
  readonly samples: number;
  readonly maskedSamples: number;
  readonly how: readonly { readonly fact: string; readonly value: string; readonly reason: string }[];
  readonly offers: readonly Offer[];
  /** Columns to choose from; absent when the file has none. */
  readonly columns?: Reading['columns'];
  readonly choices: ReadingChoices;
  readonly remarks: readonly Remark[];
}

/** Samples and what was made of them, one value a sample; absent for a list of lines. Angstrom in the medium of the reading. */
export interface SamplesView {
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly masked: Uint8Array;
  readonly continuum: Float64Array;
  readonly model: Float64Array;
  readonly noise: Float64Array;
}

/** Why a thin-gas line needs thin gas. */
export interface ThinGasView {
  readonly lifetimeS: number;
  /** cm^-3 at the analysis' electron temperature; absent = no collision data. */
  readonly nCrit?: number;
  readonly sentence: string;
}

/** One transition, ready to be shown; wavelengths in Angstrom in the medium of the reading. */
export interface TransitionView {
  readonly key: LineKey;
  /** With the trade's brackets: `[O III]`. */
  readonly ion: string;
  readonly wavelengthLab: number;
  readonly wavelengthLabErr: number;
  readonly lower: string;
  readonly upper: string;
  readonly nature: string;
  /** eV: energy that was needed to make the ion (recombination lines: the recombining ion); the lane of its mark. */
  readonly excitationEv: number;
  readonly thinGas?: ThinGasView;
  readonly sources: readonly string[];
}

/** A companion's place and fate; wavelengths in the medium of the reading. */
export interface CompanionView {
  /** "[O III] 4958.91" */
  readonly label: string;
  readonly expectedAt: number;
  readonly predictedFlux: number;
  readonly outcome: 'seen' | 'wrong-ratio' | 'absent' | 'hidden' | 'outside' | 'too-faint';
  /** Position in `Analysis.features` of the feature taken for it. */
  readonly feature?: number;
}

export interface CandidateView {
  /** "[O III] 5006.84"; blend parts joined by " + ". */
  readonly label: string;
  readonly keys: readonly LineKey[];
  readonly transitions: readonly TransitionView[];
  readonly shares: readonly number[];
  readonly probability: number;
  readonly velocityKms: number;
  readonly velocityErrKms: number;
  readonly evidence: readonly Evidence[];
  readonly companions: readonly CompanionView[];
}

/** One feature with its case and its verdict; the same order as the rows of the table. */
export interface FeatureView {
  /** The number shown, from 1. */
  readonly number: number;
  /** Angstrom, medium of the reading. */
  readonly centroid: number;
  readonly centroidErr: number;
  /** Where a verdict is pinned: vacuum Angstrom and its error. */
  readonly at: number;
  readonly atErr: number;
  readonly measured: Feature;
  readonly candidates: readonly CandidateView[];
  readonly noneProbability: number;
  readonly verdict?: Verdict;
  /** The name in force: the accepted one, else the best candidate if it beats "none of these" and the user has not said otherwise. */
  readonly name?: CandidateView;
}

/** What the observer's own surroundings put into a spectrum; Angstrom in the medium of the reading. */
export interface SkyView {
  /** Absorption bands of the Earth's atmosphere, ascending, apart from each other. */
  readonly bands: readonly { readonly species: string; readonly low: number; readonly high: number }[];
  /** Lines of the night sky and of lamps, ascending; `strength` only compares them with each other. */
  readonly lines: readonly { readonly at: number; readonly strength: number }[];
}

/** A name that a step brought, took or moved without deciding on it. */
export interface NameChange {
  /** Position in `Analysis.features`. */
  readonly feature: number;
  /** Absent: the feature had no name, or has none now. */
  readonly from?: { readonly label: string; readonly probability: number };
  readonly to?: { readonly label: string; readonly probability: number };
}

/** Everything derived from source, settings and verdicts. */
export interface Analysis {
  readonly reading: ReadingView;
  /** Absent for a list of lines. */
  readonly samples?: SamplesView;
  readonly sky: SkyView;
  readonly groups: readonly Group[];
  readonly resolvingPower?: number;
  readonly resolvingPowerFrom?: 'user' | 'file' | 'lines' | 'sampling';
  readonly noiseFactor?: number;
  /** FWHM of a usual line at the middle of the spectrum, Angstrom, and how it goes along it. */
  readonly lineWidth?: { readonly fwhmA: number; readonly form: 'constant-resolving-power' | 'constant-width' | 'linear' };
  /** Detail of this period is followed by half in the continuum, Angstrom. */
  readonly continuumHalfPeriodA?: number;
  readonly expectedFalse?: number;
  readonly features: readonly FeatureView[];
  readonly redshifts: readonly RedshiftHypothesis[];
  readonly z: number;
  readonly zErr: number;
  readonly dispersionKms: number;
  /** What was really used, defaults filled in. */
  readonly settings: { readonly measure: MeasureSettings; readonly naming: NamingSettings; readonly gas: GasSettings };
  /** What the names in force say of the gas. */
  readonly gas: Gas;
  /** Strong lines that the names predict and that are not there; what each would imply, a sentence. */
  readonly missing: readonly {
    readonly label: string;
    readonly expectedAt: number;
    readonly predictedFlux: number;
    readonly implies: string;
  }[];
  /** Features left without a name, by position in `features`; what each would imply, a sentence. */
  readonly unnamed: readonly { readonly feature: number; readonly implies: string }[];
  /** What the last step changed in names that it did not decide on. */
  readonly changes: readonly NameChange[];
  readonly remarks: readonly Remark[];
  /** Verdicts that found no feature any more. */
  readonly lostVerdicts: readonly Verdict[];
  readonly table: LineTable;
  /** What was done, for methods paragraph and provenance. */
  readonly methods: MethodFacts;
  /** Seconds spent in each stage. */
  readonly timings: readonly { readonly stage: string; readonly seconds: number }[];
}

/** Progress of a running analysis. */
export interface Progress {
  /** "measuring", "naming" ... as shown to the user. */
  readonly stage: string;
  /** Share done in [0, 1]. */
  readonly share: number;
}

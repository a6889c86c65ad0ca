import { create } from 'zustand';
import type { Analysis, SamplesView } from '../../engine/index.ts';
import { EMPTY_DOCUMENT, type History, startHistory } from '../../session/index.ts';
import type { ScaleKind } from '../plot/fluxScale.ts';
import type { Range } from '../plot/viewRange.ts';
import type { AxisMedium, Frame } from '../plot/waveAxis.ts';
import type { RowFilter } from '../table/rowFilter.ts';
import type { Sorting } from '../table/sortRows.ts';
import type { DeskRow } from './deskRows.ts';

export type Tab = 'case' | 'gas' | 'paper' | 'settings' | 'reading' | 'list' | 'history' | 'keys';
export type GasView = 'ladder' | 'reddening' | 'plasma' | 'motion';
export type PaperSheetName = 'table' | 'figures' | 'methods' | 'opinion';

/** How the figures of the paper are drawn. */
export interface PaperFigures {
  readonly width: 'single' | 'double';
  readonly panels: number;
  /** Whether the archive holds a picture of the fit of every accepted feature. */
  readonly fits: boolean;
}

export type Theme = 'system' | 'light' | 'dark';
export type ShownAnalysis = Omit<Analysis, 'samples'>;

export interface Alert {
  readonly id: number;
  readonly text: string;
}

/** A run of the engine that is going on. */
export interface Run {
  readonly what: 'opening' | 'analysing';
  readonly name: string;
  readonly stage: string;
  /** In [0, 1]. */
  readonly share: number;
}

/** The state of the desk; fates.ts says what becomes of each field on reload. */
export interface DeskFields {
  readonly history: History;
  /** `starting` until the browser's storage was asked; `awaiting`: the document's file is not at hand. */
  readonly stage: 'starting' | 'empty' | 'awaiting' | 'desk';
  readonly analysis?: ShownAnalysis;
  readonly samples?: SamplesView;
  readonly rows: readonly DeskRow[];
  readonly run?: Run;
  /** The analysis on screen belongs to an earlier document: the run was stopped. */
  readonly outOfDate: boolean;
  readonly alerts: readonly Alert[];
  /** A newer build is on this machine and waits for a reload. */
  readonly newBuild: boolean;
  /** What happened last, a sentence for the status line and the screen reader. */
  readonly status: string;
  /** Vacuum Angstrom of the chosen feature: survives a refit. */
  readonly chosenAt?: number;
  /** Numbers of the features picked in the table. */
  readonly picked: readonly number[];
  /** Where picking began; absent = at the chosen feature. */
  readonly pickedFrom?: number;
  /** Observed Angstrom; absent = the whole spectrum. */
  readonly range?: Range;
  readonly scale: ScaleKind;
  /** Height of the flux axis, 1 = all that is in view fits. */
  readonly gain: number;
  readonly frame: Frame;
  /** What the wavelength axis shows; absent = as in the file. */
  readonly axisMedium?: AxisMedium;
  readonly tab: Tab;
  readonly gasView: GasView;
  readonly paperSheet: PaperSheetName;
  readonly paperFigures: PaperFigures;
  /** Density tried on the ladder, log10 cm^-3; absent = none. */
  readonly ladderLogNe?: number;
  /** Redshift while the ruler of rest wavelengths is dragged. */
  readonly draggedZ?: number;
  /** A place on the spectrum that something is to be done at by hand, Angstrom of the file. */
  readonly handPlace?: number;
  readonly filter: RowFilter;
  readonly sorting: Sorting;
  readonly theme: Theme;
  readonly singleKeys: boolean;
  /** Exports hold all lines, not only those decided on. */
  readonly exportAll: boolean;
  /** Keys of columns the table leaves out. */
  readonly hiddenColumns: readonly string[];
  /** Step of the tour, from 0; absent = it is not on. */
  readonly guide?: number;
  /** The tour was ended once: it does not come up by itself again. */
  readonly guideSeen: boolean;
  /** A verdict brings up the next open feature. */
  readonly goOn: boolean;
}

const START: DeskFields = {
  history: startHistory(EMPTY_DOCUMENT),
  stage: 'starting',
  rows: [],
  outOfDate: false,
  alerts: [],
  picked: [],
  newBuild: false,
  status: '',
  scale: 'asinh',
  gain: 1,
  frame: 'observed',
  tab: 'case',
  gasView: 'ladder',
  paperSheet: 'table',
  paperFigures: { width: 'double', panels: 5, fits: false },
  filter: {},
  sorting: { column: 'wavelength', direction: 'ascending' },
  theme: 'system',
  singleKeys: true,
  exportAll: false,
  hiddenColumns: [],
  guideSeen: false,
  goOn: true,
};

export const useDesk = create<DeskFields>()(() => START);

export const desk = () => useDesk.getState();
export const setDesk = (fields: Partial<DeskFields>) => useDesk.setState(fields);

let alertCount = 0;

export function raiseAlert(text: string): void {
  if (desk().alerts.some((alert) => alert.text === text)) return;
  setDesk({ alerts: [...desk().alerts, { id: ++alertCount, text }] });
}

export function dismissAlert(id: number): void {
  setDesk({ alerts: desk().alerts.filter((alert) => alert.id !== id) });
}

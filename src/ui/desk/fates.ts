import type { DeskFields } from './deskStore.ts';

/** What becomes of a field of the state: part of the session (file and browser), kept in the browser only, or gone on reload. */
export type Fate = 'session' | 'browser' | 'gone';

/** A new field of the state does not compile without its row. */
export const FATES = {
  history: 'session',
  chosenAt: 'browser',
  range: 'browser',
  scale: 'browser',
  gain: 'browser',
  frame: 'browser',
  axisMedium: 'browser',
  tab: 'browser',
  paperSheet: 'browser',
  paperFigures: 'browser',
  gasView: 'browser',
  ladderLogNe: 'browser',
  filter: 'browser',
  sorting: 'browser',
  theme: 'browser',
  singleKeys: 'browser',
  exportAll: 'browser',
  hiddenColumns: 'browser',
  guide: 'browser',
  guideSeen: 'browser',
  goOn: 'browser',
  stage: 'gone',
  analysis: 'gone',
  samples: 'gone',
  rows: 'gone',
  run: 'gone',
  outOfDate: 'gone',
  handPlace: 'gone',
  draggedZ: 'gone',
  alerts: 'gone',
  picked: 'gone',
  pickedFrom: 'gone',
  newBuild: 'gone',
  status: 'gone',
} as const satisfies Record<keyof DeskFields, Fate>;

type BrowserField = { [Key in keyof DeskFields]-?: (typeof FATES)[Key] extends 'browser' ? Key : never }[keyof DeskFields];

/** The part of the state that is kept in the browser beside the history. */
export type KeptView = Pick<DeskFields, BrowserField>;

export const KEPT_FIELDS = (Object.keys(FATES) as (keyof typeof FATES)[]).filter((key): key is BrowserField => FATES[key] === 'browser');

/** The part of the state that is kept. */
export function keptOf(state: DeskFields): KeptView {
  const kept: Partial<KeptView> = {};
  const keep = <Key extends BrowserField>(key: Key) => {
    kept[key] = state[key];
  };
  KEPT_FIELDS.forEach(keep);
  return kept as KeptView;
}

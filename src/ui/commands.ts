import { acceptAll, declareAll, rejectAll, reopenAll } from './desk/bulkDecisions.ts';
import { chooseNextOpen, chosenRow, walkFeatures, walkTable } from './desk/chosen.ts';
import { acceptCandidate, declareRow, redoNext, rejectCandidate, reopenRow, undoLast } from './desk/decisions.ts';
import type { DeskRow } from './desk/deskRows.ts';
import { desk, setDesk, type Tab } from './desk/deskStore.ts';
import { copyRows, saveTable } from './desk/files.ts';
import { focusFilter, focusNote } from './desk/focus.ts';
import { addAtPointer, deleteFeature, isPointing, splitFeature } from './desk/handEdits.ts';
import { closeIn, nextScale, otherFrame, otherMedium, wholeSpectrum, zoomBy } from './desk/looking.ts';
import { pickFile } from './desk/pickFile.ts';
import { pickAll, pickFurther, pickNone, rowsInHand } from './desk/picking.ts';
import { words } from './words.ts';

/** One thing the desk can do: menu, keyboard and help read this one list. */
export interface Command {
  readonly name: string;
  readonly label: string;
  readonly group: keyof typeof words.commandGroups;
  /** As `keyOf` spells a key stroke; "Mod" is Ctrl or ⌘. The first is shown. */
  readonly keys: readonly string[];
  /** Not in the help: a member of a row of alike commands. */
  readonly hidden?: boolean;
  readonly canRun: () => boolean;
  readonly run: () => void;
}

const { commands: label } = words;
const always = () => true;
const atDesk = () => desk().stage === 'desk';
const withRow = () => atDesk() && chosenRow() !== undefined;
const withFit = () => withRow() && desk().samples !== undefined;
const candidate = (n: number) => chosenRow()?.candidates[n];

const show = (name: Tab, key: string): Command => ({
  name: `show-${name}`,
  label: name === 'history' ? words.tabs.history : label[name],
  group: 'desk',
  keys: [key],
  canRun: name === 'keys' ? always : atDesk,
  run: () => setDesk({ tab: name }),
});

const acceptNth = (n: number): Command => ({
  name: `accept-${n}`,
  label: label.acceptNth(n),
  group: 'decide',
  keys: [String(n)],
  hidden: n > 1,
  canRun: () => withRow() && candidate(n - 1) !== undefined,
  run: () => {
    const row = chosenRow();
    if (row) acceptCandidate(row, candidate(n - 1), 'go-on');
  },
});

export const COMMANDS: readonly Command[] = [
  { name: 'next-feature', label: label.nextFeature, group: 'walk', keys: ['ArrowRight'], canRun: atDesk, run: () => walkFeatures(1) },
  {
    name: 'previous-feature',
    label: label.previousFeature,
    group: 'walk',
    keys: ['ArrowLeft'],
    canRun: atDesk,
    run: () => walkFeatures(-1),
  },
  { name: 'next-row', label: label.nextRow, group: 'walk', keys: ['ArrowDown'], canRun: atDesk, run: () => walkTable(1) },
  { name: 'previous-row', label: label.previousRow, group: 'walk', keys: ['ArrowUp'], canRun: atDesk, run: () => walkTable(-1) },
  { name: 'next-open', label: label.nextOpen, group: 'walk', keys: ['n'], canRun: atDesk, run: chooseNextOpen },
  { name: 'pick-next', label: label.pickNext, group: 'walk', keys: ['Shift+ArrowDown'], canRun: atDesk, run: () => pickFurther(1) },
  { name: 'pick-previous', label: label.pickPrevious, group: 'walk', keys: ['Shift+ArrowUp'], canRun: atDesk, run: () => pickFurther(-1) },
  { name: 'pick-all', label: label.pickAll, group: 'walk', keys: ['Mod+a'], canRun: atDesk, run: pickAll },
  { name: 'pick-none', label: label.pickNone, group: 'walk', keys: ['Escape'], canRun: () => desk().picked.length > 0, run: pickNone },
  {
    name: 'accept-top',
    label: label.acceptTop,
    group: 'decide',
    keys: ['Enter'],
    canRun: () => hasSeveral() || (withRow() && candidate(0) !== undefined),
    run: () => onRows(acceptAll, (row) => acceptCandidate(row, row.candidates[0], 'go-on')),
  },
  ...[1, 2, 3, 4, 5, 6, 7, 8, 9].map(acceptNth),
  {
    name: 'reject-top',
    label: label.rejectTop,
    group: 'decide',
    keys: ['Backspace'],
    canRun: () => hasSeveral() || (withRow() && candidate(0) !== undefined),
    run: () => onRows(rejectAll, (row) => rejectCandidate(row, row.candidates[0])),
  },
  {
    name: 'unidentified',
    label: label.unidentified,
    group: 'decide',
    keys: ['u'],
    canRun: withRow,
    run: () =>
      onRows(
        (rows) => declareAll(rows, 'unidentified'),
        (row) => declareRow(row, 'unidentified', 'go-on'),
      ),
  },
  {
    name: 'artefact',
    label: label.artefact,
    group: 'decide',
    keys: ['x'],
    canRun: withRow,
    run: () =>
      onRows(
        (rows) => declareAll(rows, 'artefact'),
        (row) => declareRow(row, 'artefact', 'go-on'),
      ),
  },
  {
    name: 'reopen',
    label: label.reopen,
    group: 'decide',
    keys: ['r'],
    canRun: () => rowsInHand().some((row) => row.standing !== 'open'),
    run: () => onRows(reopenAll, reopenRow),
  },
  { name: 'note', label: label.note, group: 'decide', keys: ['m'], canRun: withRow, run: focusNote },
  {
    name: 'add-feature',
    label: label.addFeature,
    group: 'decide',
    keys: ['a'],
    canRun: () => atDesk() && isPointing(),
    run: addAtPointer,
  },
  { name: 'split-feature', label: label.splitFeature, group: 'decide', keys: ['t'], canRun: withFit, run: () => onRow(splitFeature) },
  {
    name: 'delete-feature',
    label: label.deleteFeature,
    group: 'decide',
    keys: ['Delete'],
    canRun: withFit,
    run: () => onRow(deleteFeature),
  },
  { name: 'undo', label: label.undo, group: 'decide', keys: ['Mod+z'], canRun: () => desk().history.past.length > 0, run: undoLast },
  {
    name: 'redo',
    label: label.redo,
    group: 'decide',
    keys: ['Mod+Shift+z', 'Mod+y'],
    canRun: () => desk().history.future.length > 0,
    run: redoNext,
  },
  { name: 'zoom-in', label: label.zoomIn, group: 'look', keys: ['+', '='], canRun: atDesk, run: () => zoomBy(1 / 1.5) },
  { name: 'zoom-out', label: label.zoomOut, group: 'look', keys: ['-'], canRun: atDesk, run: () => zoomBy(1.5) },
  { name: 'whole', label: label.whole, group: 'look', keys: ['w'], canRun: atDesk, run: wholeSpectrum },
  { name: 'centre', label: label.centre, group: 'look', keys: ['c'], canRun: withRow, run: closeIn },
  { name: 'scale', label: label.scale, group: 'look', keys: ['y'], canRun: atDesk, run: nextScale },
  { name: 'frame', label: label.frame, group: 'look', keys: ['f'], canRun: atDesk, run: otherFrame },
  { name: 'axis-medium', label: label.axisMedium, group: 'look', keys: ['v'], canRun: atDesk, run: otherMedium },
  { name: 'filter', label: label.filter, group: 'desk', keys: ['/'], canRun: atDesk, run: focusFilter },
  {
    name: 'copy-rows',
    label: label.copyRows,
    group: 'desk',
    keys: ['Mod+c'],
    // marked text is copied by the browser
    canRun: () => rowsInHand().length > 0 && document.getSelection()?.isCollapsed !== false,
    run: () => void copyRows(rowsInHand()),
  },
  show('case', 'd'),
  show('gas', 'g'),
  show('paper', 'p'),
  show('settings', 's'),
  show('reading', 'i'),
  show('list', 'l'),
  show('history', 'h'),
  show('keys', '?'),
  { name: 'open', label: label.open, group: 'desk', keys: ['o'], canRun: always, run: pickFile },
  { name: 'export-csv', label: label.exportCsv, group: 'desk', keys: ['e'], canRun: atDesk, run: () => void saveTable('csv') },
];

const hasSeveral = () => rowsInHand().length > 1;

/** On all picked rows at once, else on the chosen one. */
function onRows(several: (rows: readonly DeskRow[]) => void, one: (row: DeskRow) => void): void {
  if (hasSeveral()) several(rowsInHand());
  else onRow(one);
}

function onRow(act: (row: DeskRow) => void): void {
  const row = chosenRow();
  if (row) act(row);
}

/** The command of that name, for buttons. */
export function commandNamed(name: string): Command {
  const found = COMMANDS.find((command) => command.name === name);
  if (!found) throw new RangeError(`no command ${name}`);
  return found;
}

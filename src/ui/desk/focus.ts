import { flushSync } from 'react-dom';
import { setDesk } from './deskStore.ts';

/** Elements that a command puts the focus on. */
export const FILTER_ID = 'table-filter';
export const NOTE_ID = 'case-note';

const focusOn = (id: string) => document.getElementById(id)?.focus();

export const focusFilter = () => focusOn(FILTER_ID);

/** At once: the next letters that are typed are the note. */
export function focusNote(): void {
  flushSync(() => setDesk({ tab: 'case' }));
  focusOn(NOTE_ID);
}

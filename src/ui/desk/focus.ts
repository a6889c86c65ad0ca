import { setDesk } from './deskStore.ts';

/** Elements that a command puts the focus on. */
export const FILTER_ID = 'table-filter';
export const NOTE_ID = 'case-note';

const focusSoon = (id: string) => requestAnimationFrame(() => document.getElementById(id)?.focus());

export const focusFilter = () => focusSoon(FILTER_ID);

export function focusNote(): void {
  setDesk({ tab: 'case' });
  focusSoon(NOTE_ID);
}

import { useMemo } from 'react';
import { knownDesign, type TableDesign } from '../../report/index.ts';
import type { PaperSettings } from '../../session/index.ts';
import { set } from '../desk/decisions.ts';
import { useDesk } from '../desk/deskStore.ts';

/** Changes the paper's settings as one undoable step; undefined leaves one to the program. */
export function setPaper(change: Partial<PaperSettings>, sentence: string): void {
  set((settings) => {
    const paper = Object.fromEntries(Object.entries({ ...settings.paper, ...change }).filter(([, value]) => value !== undefined));
    return { ...settings, paper: Object.keys(paper).length > 0 ? paper : undefined };
  }, sentence);
}

/** The design in force. */
export function useDesign(): TableDesign {
  const stored = useDesk((state) => state.history.document.settings.paper?.design);
  return useMemo(() => knownDesign(stored), [stored]);
}

export const setDesign = (design: TableDesign, change: Partial<TableDesign>, sentence: string) =>
  setPaper({ design: { ...design, ...change } }, sentence);

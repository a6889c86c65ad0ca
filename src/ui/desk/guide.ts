import { words } from '../words.ts';
import { type DeskFields, desk, setDesk, useDesk } from './deskStore.ts';

type Before = Pick<DeskFields, 'chosenAt' | 'history' | 'range' | 'picked' | 'filter'>;

/** Whether the reader has just done what a step asks for; steps without one wait for "Next step". Same order as the sentences. */
const DONE: readonly (((after: DeskFields, before: Before) => boolean) | undefined)[] = [
  (after, before) => after.chosenAt !== undefined && before.chosenAt !== undefined && after.chosenAt !== before.chosenAt,
  undefined,
  (after, before) => after.history.past.length > before.history.past.length && after.history.document.verdicts.length > 0,
  (after) => after.history.future.length > 0,
  (after, before) => after.range !== before.range,
  (after, before) => after.picked.length > 1 || after.filter !== before.filter,
  undefined,
];
const LAST = words.guide.steps.length - 1;

export const startGuide = () => setDesk({ guide: 0 });
/** Ends the tour for good: it does not come up by itself again. */
export const endGuide = () => setDesk({ guide: undefined, guideSeen: true });
export const guideTo = (step: number) => (step > LAST ? endGuide() : setDesk({ guide: Math.max(step, 0) }));

/** With the first spectrum ever opened in this browser the tour begins by itself. */
export function offerGuide(): void {
  const { guide, guideSeen } = desk();
  if (guide === undefined && !guideSeen) startGuide();
}

/** Goes on when the step at hand was done. */
export function followGuide(): void {
  useDesk.subscribe((after, before) => {
    const { guide, stage } = after;
    if (guide === undefined || guide !== before.guide || stage !== 'desk' || before.stage !== 'desk') return;
    if (DONE[guide]?.(after, before)) guideTo(guide + 1);
  });
}

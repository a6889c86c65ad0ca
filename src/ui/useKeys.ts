import { useEffect } from 'react';
import { COMMANDS } from './commands.ts';
import { desk } from './desk/deskStore.ts';
import { belongsTo, strokeName, takesText } from './keyStrokes.ts';

/** Leaves a field as it is: a search field would be emptied. */
function leave(event: KeyboardEvent): void {
  event.preventDefault();
  if (event.target instanceof HTMLElement) event.target.blur();
}

/** Runs the command of a key stroke, unless the stroke belongs to what has the focus. */
export function useKeys(): void {
  useEffect(() => {
    const hear = (event: KeyboardEvent) => {
      if (event.defaultPrevented) return;
      const stroke = strokeName(event);
      const single = !stroke.startsWith('Mod+');
      if (takesText(event.target)) {
        if (event.key === 'Escape') leave(event);
        return;
      }
      if (single && !desk().singleKeys && event.key.length === 1) return;
      if (belongsTo(event.target, event.key)) return;
      const command = COMMANDS.find(({ keys }) => keys.includes(stroke));
      if (!command?.canRun()) return;
      event.preventDefault();
      command.run();
    };
    window.addEventListener('keydown', hear);
    return () => window.removeEventListener('keydown', hear);
  }, []);
}

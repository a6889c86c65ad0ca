import { useMemo } from 'react';
import { useDesk } from '../desk/deskStore.ts';
import { fadingOf } from './fading.ts';

/** What the density tried on the ladder leaves of each feature, by number; undefined while the ladder is not shown or none is tried. */
export function useFading(): ReadonlyMap<number, number> | undefined {
  const gas = useDesk((state) => state.analysis?.gas);
  const log = useDesk((state) => state.ladderLogNe);
  const isShown = useDesk((state) => state.tab === 'gas' && state.gasView === 'ladder');
  return useMemo(() => (gas && isShown && log !== undefined ? fadingOf(gas, log) : undefined), [gas, isShown, log]);
}

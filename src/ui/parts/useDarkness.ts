import { useSyncExternalStore } from 'react';
import { useDesk } from '../desk/deskStore.ts';

const query = window.matchMedia('(prefers-color-scheme: dark)');

function subscribe(changed: () => void): () => void {
  query.addEventListener('change', changed);
  return () => query.removeEventListener('change', changed);
}

/** Whether the dark tokens are in force. */
export function useDarkness(): boolean {
  const theme = useDesk((state) => state.theme);
  const system = useSyncExternalStore(subscribe, () => query.matches);
  return theme === 'system' ? system : theme === 'dark';
}

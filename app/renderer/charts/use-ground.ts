import { useSyncExternalStore } from 'react';
import { useWindowState } from '../state/window-context';
import type { Ground } from './palette';

const DARK_WANTED = '(prefers-color-scheme: dark)';

function subscribe(listener: () => void): () => void {
  const query = matchMedia(DARK_WANTED);
  query.addEventListener('change', listener);
  return () => query.removeEventListener('change', listener);
}

/** Light or dark: what was chosen, or else what the system wants. */
export function useGround(): Ground {
  const theme = useWindowState(({ view }) => view.theme);
  const isSystemDark = useSyncExternalStore(subscribe, () => matchMedia(DARK_WANTED).matches);
  if (theme === 'system') return isSystemDark ? 'dark' : 'light';
  return theme;
}

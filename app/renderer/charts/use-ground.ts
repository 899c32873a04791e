import { useMedia } from '../controls/use-media';
import { useWindowState } from '../state/window-context';
import type { Ground } from './palette';

/** Light or dark: what was chosen, or else what the system wants. */
export function useGround(): Ground {
  const theme = useWindowState(({ view }) => view.theme);
  const isSystemDark = useMedia('(prefers-color-scheme: dark)');
  if (theme === 'system') return isSystemDark ? 'dark' : 'light';
  return theme;
}

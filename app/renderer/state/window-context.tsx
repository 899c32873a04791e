import { createContext, type ReactNode, use, useSyncExternalStore } from 'react';
import type { WindowController } from './controller';
import type { Store } from './store';
import type { WindowState } from './window-state';

interface WindowParts {
  readonly store: Store;
  readonly controller: WindowController;
}

const Parts = createContext<WindowParts | undefined>(undefined);

export function WindowProvider({
  store,
  controller,
  children,
}: WindowParts & { readonly children: ReactNode }) {
  return <Parts value={{ store, controller }}>{children}</Parts>;
}

function useParts(): WindowParts {
  const parts = use(Parts);
  if (parts === undefined) throw new Error('used outside of WindowProvider');
  return parts;
}

export const useController = (): WindowController => useParts().controller;

/** A slice of the window's state; the component renders again only when the slice changes. */
export function useWindowState<T>(select: (state: WindowState) => T): T {
  const { store } = useParts();
  return useSyncExternalStore(store.subscribe, () => select(store.get()));
}

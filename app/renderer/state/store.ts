import type { Action } from './reducer';
import { reduce } from './reducer';
import type { WindowState } from './window-state';

export interface Store {
  get(): WindowState;
  dispatch(action: Action): void;
  /** returns the function that ends the subscription */
  subscribe(listener: () => void): () => void;
}

export function createStore(initial: WindowState): Store {
  let state = initial;
  const listeners = new Set<() => void>();
  return {
    get: () => state,
    dispatch(action) {
      const next = reduce(state, action);
      if (next === state) return;
      state = next;
      for (const listener of listeners) listener();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

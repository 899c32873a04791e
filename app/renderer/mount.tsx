import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import type { HostConnection } from '../contract/requests';
import { saveFile } from './files/save-file';
import { Window } from './panels/window';
import { WindowController } from './state/controller';
import { localMemory } from './state/remembered';
import { createStore } from './state/store';
import { WindowProvider } from './state/window-context';
import { INITIAL_STATE } from './state/window-state';

/** Typing rests this long before it is judged. */
const TYPING_REST_MS = 250;

/** Shows the window in `place`, on whatever host. */
export function mountWindow(place: HTMLElement, host: HostConnection): void {
  const store = createStore(INITIAL_STATE);
  const controller = new WindowController(store, {
    host,
    memory: localMemory(localStorage),
    afterTyping: (callback) => setTimeout(callback, TYPING_REST_MS),
    onNextFrame: (callback) => requestAnimationFrame(callback),
    saveFile,
  });
  createRoot(place).render(
    <StrictMode>
      <WindowProvider store={store} controller={controller}>
        <Window />
      </WindowProvider>
    </StrictMode>,
  );
  void controller.begin();
}

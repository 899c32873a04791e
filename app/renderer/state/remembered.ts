import type { StudyDraft } from './draft';
import type { View } from './window-state';

/** What outlives the window: what was typed, and how numbers are shown. */
export interface Remembered {
  readonly draft?: StudyDraft;
  readonly view?: Pick<View, 'energyUnit' | 'lengthUnit' | 'energyReference' | 'showsVibration' | 'theme'>;
}

/** Changes with the shape of what is kept, so that an older program's memory is left aside. */
const KEY = 'farwell/window/2';

export interface Memory {
  load(): Remembered;
  save(remembered: Remembered): void;
}

/** The browser's local storage; without it (private windows, full disks) nothing is remembered. */
export function localMemory(storage: Pick<Storage, 'getItem' | 'setItem'>): Memory {
  return {
    load() {
      try {
        return JSON.parse(storage.getItem(KEY) ?? '{}') as Remembered;
      } catch {
        return {};
      }
    },
    save(remembered) {
      try {
        storage.setItem(KEY, JSON.stringify(remembered));
      } catch {
        // remembering is a comfort: without it the window works as before
      }
    },
  };
}

import { Worker } from 'node:worker_threads';
import { allowHelpers, type SharedKernelMemory } from '#engine';
import { HELPER_FILE } from './program';

/** What a computing thread posts when it has enough to do for others to take part. */
export interface HelpWanted {
  readonly kind: 'helpWanted';
  readonly memory: SharedKernelMemory;
  readonly control: SharedArrayBuffer;
}

/** What a helping thread is started with. */
export interface HelperStart extends Omit<HelpWanted, 'kind'> {
  /** which of the helpers it is, from 0 */
  readonly helper: number;
}

/** The threads that help one computing thread. */
export interface Helpers {
  /** how many may take part from now on; they are started when they are first wanted */
  allow(count: number): void;
  wanted(request: HelpWanted): void;
  /** ends them at once */
  end(): void;
}

export type StartHelper = (start: HelperStart, onDeath: (reason: string) => void) => { end(): void };

/** Starts a helper as a thread of this process, from the built file. */
export const startHelperThread: StartHelper = (start, onDeath) => {
  const thread = new Worker(HELPER_FILE, { workerData: start });
  let reason: string | undefined;
  thread.on('error', (error) => {
    reason = error.message;
  });
  thread.on('exit', (code) => onDeath(reason ?? `it ended with status ${code}`));
  return { end: () => void thread.terminate() };
};

/**
 * @param onDeath - called when a helper dies: the computing thread may then wait for ever for what the helper had taken
 */
export function openHelpers(
  onDeath: (reason: string) => void,
  start: StartHelper = startHelperThread,
): Helpers {
  const running: { end(): void }[] = [];
  let allowed = 0;
  let request: HelpWanted | undefined;
  let isOver = false;
  const update = () => {
    if (!request || isOver) return;
    const { memory, control } = request;
    while (running.length < allowed) {
      const helper = running.length;
      running.push(
        start({ memory, control, helper }, (reason) => {
          if (!isOver) onDeath(`a helping thread ended: ${reason}`);
        }),
      );
    }
    allowHelpers(control, allowed);
  };
  return {
    allow(count) {
      allowed = count;
      update();
    },
    wanted(given) {
      request = given;
      update();
    },
    end() {
      isOver = true;
      for (const helper of running) helper.end();
    },
  };
}

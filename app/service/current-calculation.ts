import type { PreparedStudy } from '#engine';
import { cacheSettings } from '../calculation/cache-settings';
import { affordableWorkers } from '../calculation/memory';
import type { Progress } from '../calculation/progress';
import { runStudy } from '../calculation/run-study';
import { serializeError } from './answer';
import type { Post } from './service';

/** At most one calculation at a time: it has all cores, and the window shows one study. */
export interface CurrentCalculation {
  /** Cancels the one before. @returns the number under which its events are posted */
  start(prepared: PreparedStudy): number;
  /** @returns whether it was still running */
  cancel(id: number): boolean;
  dispose(): void;
}

export function createCurrentCalculation(workers: number, post: Post): CurrentCalculation {
  const cache = cacheSettings();
  let lastId = 0;
  let running: { readonly id: number; readonly abort: AbortController } | undefined;

  /** Says so at once, and lets nothing that is still on its way be posted afterwards. */
  function cancelRunning(): void {
    if (running === undefined) return;
    const { id, abort } = running;
    running = undefined;
    abort.abort();
    post('calculation:finished', { id, outcome: { kind: 'cancelled' } });
  }

  async function run(id: number, prepared: PreparedStudy, signal: AbortSignal): Promise<void> {
    const outcome = await runStudy(
      { prepared },
      {
        workers: affordableWorkers(prepared, workers).count,
        ...(cache && { cache }),
        signal,
        onPoint: (index, { result }) => {
          // the window draws the study's own basis while it runs; further ones come with the results
          const isOwn = index < prepared.coordinates.length;
          if (isOwn && !signal.aborted) post('calculation:point', { id, index, point: result });
        },
        onProgress: seldom((progress) => {
          if (!signal.aborted) post('calculation:progress', { id, ...progress });
        }),
      },
    ).catch((error: unknown) => ({ kind: 'failed', error: serializeError(error) }) as const);
    if (signal.aborted) return;
    running = undefined;
    post('calculation:finished', { id, outcome });
  }

  return {
    start(prepared) {
      cancelRunning();
      lastId += 1;
      const abort = new AbortController();
      running = { id: lastId, abort };
      void run(lastId, prepared, abort.signal);
      return lastId;
    },
    cancel(id) {
      if (running?.id !== id) return false;
      cancelRunning();
      return true;
    },
    dispose: cancelRunning,
  };
}

/** Faster than this nobody reads, and a window that draws each step falls behind. */
const PROGRESS_EVERY_MS = 50;

/** Lets through what begins or ends a stage, and of the rest what comes after a pause. */
function seldom(tell: (progress: Progress) => void): (progress: Progress) => void {
  let last = Number.NEGATIVE_INFINITY;
  return (progress) => {
    const { done, total } = progress;
    const now = performance.now();
    if (done > 0 && done < total && now - last < PROGRESS_EVERY_MS) return;
    last = now;
    tell(progress);
  };
}

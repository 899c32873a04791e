import type { PointResult } from '#engine';
import type { Events, HostConnection } from '../../contract/requests';

export interface FeedListener {
  advanced(
    points: readonly { readonly index: number; readonly point: PointResult }[],
    progress: Events['calculation:progress'] | undefined,
  ): void;
  finished(outcome: Events['calculation:finished']['outcome']): void;
}

/**
 * Follows one calculation at a time. Events are gathered and handed on once per frame, so that a fast
 * calculation cannot flood the window; events that arrive before the host has told the calculation's number
 * wait for it; events of earlier calculations are dropped.
 */
export class CalculationFeed {
  readonly #listener: FeedListener;
  readonly #onNextFrame: (callback: () => void) => void;
  #following: number | undefined;
  #isAwaitingNumber = false;
  #early: { readonly id: number; readonly replay: () => void }[] = [];
  #points: { readonly index: number; readonly point: PointResult }[] = [];
  #progress: Events['calculation:progress'] | undefined;
  #isFlushScheduled = false;

  constructor(
    host: Pick<HostConnection, 'subscribe'>,
    listener: FeedListener,
    onNextFrame: (callback: () => void) => void,
  ) {
    this.#listener = listener;
    this.#onNextFrame = onNextFrame;
    host.subscribe('calculation:point', (event) =>
      this.#whenFollowed(event.id, () => {
        this.#points.push({ index: event.index, point: event.point });
        this.#scheduleFlush();
      }),
    );
    host.subscribe('calculation:progress', (event) =>
      this.#whenFollowed(event.id, () => {
        this.#progress = event;
        this.#scheduleFlush();
      }),
    );
    host.subscribe('calculation:finished', (event) =>
      this.#whenFollowed(event.id, () => {
        this.#flush();
        this.#following = undefined;
        this.#listener.finished(event.outcome);
      }),
    );
  }

  /** Number of the calculation being followed. */
  get following(): number | undefined {
    return this.#following;
  }

  /** A calculation has been asked for: its events may come before its number. */
  expect(): void {
    this.stop();
    this.#isAwaitingNumber = true;
  }

  follow(id: number): void {
    this.#following = id;
    this.#isAwaitingNumber = false;
    const early = this.#early;
    this.#early = [];
    for (const event of early) if (event.id === id) event.replay();
  }

  /** Nothing of the calculation followed so far is handed on any more. */
  stop(): void {
    this.#following = undefined;
    this.#isAwaitingNumber = false;
    this.#early = [];
    this.#points = [];
    this.#progress = undefined;
  }

  #whenFollowed(id: number, handle: () => void): void {
    if (id === this.#following) handle();
    else if (this.#isAwaitingNumber) this.#early.push({ id, replay: () => this.#whenFollowed(id, handle) });
  }

  #scheduleFlush(): void {
    if (this.#isFlushScheduled) return;
    this.#isFlushScheduled = true;
    this.#onNextFrame(() => this.#flush());
  }

  #flush(): void {
    this.#isFlushScheduled = false;
    if (this.#points.length === 0 && this.#progress === undefined) return;
    const points = this.#points;
    const progress = this.#progress;
    this.#points = [];
    this.#progress = undefined;
    this.#listener.advanced(points, progress);
  }
}

export type Stage = 'points' | 'neighbours' | 'minima' | 'limit';

export interface Progress {
  readonly stage: Stage;
  /** of a study in several bases, which one this is of; absent for what concerns all of them */
  readonly basis?: BasisOfMany;
  readonly done: number;
  readonly total: number;
  /** absent as long as it cannot be estimated */
  readonly secondsLeft?: number;
}

export interface BasisOfMany {
  readonly name: string;
  /** counted from 1 */
  readonly number: number;
  readonly of: number;
}

/** Begins to follow a stage of so many pieces. */
export type Track = (stage: Stage, total: number, done?: number) => ProgressTracker;

/** Follows one stage of a calculation. */
export interface ProgressTracker {
  /** @param seconds - that one more piece took on one worker */
  finished(seconds: number): void;
  stop(): void;
}

/** So that the time left keeps running down while a long piece is computed. */
const HEARTBEAT_MS = 1000;

/** Tells `onProgress` at once, at every finished piece, and every second in between. */
export function trackProgress(
  {
    stage,
    total,
    done,
    workers,
    basis,
  }: Pick<Progress, 'stage' | 'total' | 'done' | 'basis'> & { readonly workers: number },
  onProgress: (progress: Progress) => void = () => undefined,
): ProgressTracker {
  const timeLeft = estimateTimeLeft(workers);
  const report = () => {
    const secondsLeft = timeLeft.secondsLeft(total - done);
    onProgress({
      stage,
      done,
      total,
      ...(basis && { basis }),
      ...(secondsLeft !== undefined && { secondsLeft }),
    });
  };
  const heartbeat = setInterval(report, HEARTBEAT_MS);
  report();
  return {
    finished(seconds) {
      done++;
      timeLeft.finished(seconds);
      report();
    },
    stop: () => clearInterval(heartbeat),
  };
}

/** Tells how long a stage will still take, from how long its finished pieces took. */
interface TimeLeft {
  /** @param seconds - that one piece took on one worker */
  finished(seconds: number): void;
  /** undefined until a piece is finished, and while the pieces under way take longer than those before */
  secondsLeft(remaining: number): number | undefined;
}

/**
 * Assumes that what remains costs as much as what is finished did on average: points of a scan differ little.
 *
 * @param workers - that share the pieces
 * @param now - clock in milliseconds
 */
export function estimateTimeLeft(workers: number, now: () => number = () => performance.now()): TimeLeft {
  let pieces = 0;
  let total = 0;
  let lastFinished = 0;
  return {
    finished(seconds) {
      pieces++;
      total += seconds;
      lastFinished = now();
    },
    secondsLeft(remaining) {
      if (remaining === 0) return 0;
      if (pieces === 0) return undefined;
      const atLastFinished = ((total / pieces) * remaining) / Math.min(workers, remaining);
      const seconds = atLastFinished - (now() - lastFinished) / 1000;
      return seconds >= 0 ? seconds : undefined;
    },
  };
}

import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { estimateTimeLeft, type Progress, trackProgress } from '../../../app/calculation/progress';

describe('estimateTimeLeft', () => {
  it('knows nothing before the first piece is finished', () => {
    expect(estimateTimeLeft(2, () => 0).secondsLeft(10)).toBeUndefined();
  });

  it('shares what remains among the workers, but not among more than there are pieces', () => {
    const timeLeft = estimateTimeLeft(4, () => 0);
    timeLeft.finished(2);
    timeLeft.finished(4);
    expect(timeLeft.secondsLeft(8)).toBe(6);
    expect(timeLeft.secondsLeft(2)).toBe(3);
    expect(timeLeft.secondsLeft(0)).toBe(0);
  });

  it('runs down between pieces, and gives up when a piece takes longer than those before', () => {
    let now = 0;
    const timeLeft = estimateTimeLeft(1, () => now);
    timeLeft.finished(10);
    now = 4000;
    expect(timeLeft.secondsLeft(1)).toBe(6);
    now = 10_001;
    expect(timeLeft.secondsLeft(1)).toBeUndefined();
  });
});

describe('trackProgress', () => {
  beforeEach(() => void vi.useFakeTimers());
  afterEach(() => void vi.useRealTimers());

  it('tells at once, at every piece, every second, and nothing after the stop', () => {
    const told: Progress[] = [];
    const tracker = trackProgress({ stage: 'points', total: 3, done: 1, workers: 1 }, (progress) =>
      told.push(progress),
    );
    expect(told).toEqual([{ stage: 'points', done: 1, total: 3 }]);
    tracker.finished(5);
    expect(told.at(-1)).toEqual({ stage: 'points', done: 2, total: 3, secondsLeft: 5 });
    vi.advanceTimersByTime(2000);
    expect(told).toHaveLength(4);
    expect(told.at(-1)?.secondsLeft).toBe(3);
    tracker.stop();
    vi.advanceTimersByTime(5000);
    expect(told).toHaveLength(4);
  });
});

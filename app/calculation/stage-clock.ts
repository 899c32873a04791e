import type { Stage, StageListener } from '#engine';

/** Seconds that went into one stage itself, without the stages inside it. */
export interface StageTime {
  /** `rest`: what belongs to no stage */
  readonly stage: Exclude<Stage, { level: string }> | 'rest';
  /** absent: what all levels share */
  readonly level?: string;
  readonly seconds: number;
}

export interface StageClock {
  readonly listener: StageListener;
  /** what was counted since the last time */
  take(): readonly StageTime[];
}

/**
 * Keeps the time of nested stages.
 *
 * @param now - clock in milliseconds
 */
export function startStageClock(now: () => number = () => performance.now()): StageClock {
  const open: Stage[] = [];
  let counted = new Map<string, { -readonly [K in keyof StageTime]: StageTime[K] }>();
  let last = now();

  function countSince(): void {
    const before = last;
    last = now();
    const innermost = open.at(-1);
    const stage = typeof innermost === 'string' ? innermost : 'rest';
    const level = open.findLast((part) => typeof part !== 'string')?.level;
    const key = `${stage} ${level}`;
    const time = counted.get(key) ?? { stage, ...(level !== undefined && { level }), seconds: 0 };
    time.seconds += (last - before) / 1000;
    counted.set(key, time);
  }

  return {
    listener(stage, moment) {
      countSince();
      if (moment === 'begins') open.push(stage);
      else open.pop();
    },
    take() {
      countSince();
      const times = [...counted.values()];
      counted = new Map();
      return times;
    },
  };
}

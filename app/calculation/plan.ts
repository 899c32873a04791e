import type { PointCarry } from '#engine';
import type { FinishedPoint } from './messages';

/**
 * Points in a run: inside it each point starts from the orbitals of the one before, across runs from nothing. A
 * constant, so that the numbers depend neither on how many workers there are nor on where a run was interrupted.
 */
export const RUN_LENGTH = 4;

/** Neighbouring points that one worker computes in turn. */
export interface Run {
  readonly indices: readonly number[];
  /** of the finished point just before the first one, if that belongs to the same run */
  readonly guess?: PointCarry | undefined;
}

/** Cuts a scan into runs and leaves out what is finished. */
export function planRuns(points: number, finished: ReadonlyMap<number, FinishedPoint>): readonly Run[] {
  const runs: { indices: number[]; guess: PointCarry | undefined }[] = [];
  for (let index = 0; index < points; index++) {
    if (finished.has(index)) continue;
    const startsRun = index % RUN_LENGTH === 0;
    const current = runs.at(-1);
    if (!startsRun && current?.indices.at(-1) === index - 1) {
      current.indices.push(index);
      continue;
    }
    runs.push({ indices: [index], guess: startsRun ? undefined : finished.get(index - 1)?.carry });
  }
  return runs;
}

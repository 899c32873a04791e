import type { PointCarry, PreparedStudy } from '#engine';
import type { FinishedPoint } from './messages';

/** As many as keep the search for scale factors in one minimum of neighbouring points. */
const SCALED_RUN_LENGTH = 4;

/**
 * Points in a run: inside it each point starts from what the one before left, across runs from nothing. It depends on
 * the study alone, so that the numbers depend neither on how many workers there are nor on where a run was interrupted.
 *
 * One, so that all points are independent, for workers and for the cache: what orbitals of a neighbour lead to is seen
 * afterwards, from both sides (continuous-curves.ts). Scale factors are not followed there.
 */
export function runLengthOf({ scalable }: PreparedStudy): number {
  return scalable ? SCALED_RUN_LENGTH : 1;
}

/** Neighbouring points that one worker computes in turn. */
export interface Run {
  readonly indices: readonly number[];
  /** of the finished point just before the first one, if that belongs to the same run */
  readonly guess?: PointCarry | undefined;
}

/** Cuts a scan into runs and leaves out what is finished. */
export function planRuns(
  points: number,
  finished: ReadonlyMap<number, FinishedPoint>,
  runLength: number,
): readonly Run[] {
  const runs: { indices: number[]; guess: PointCarry | undefined }[] = [];
  for (let index = 0; index < points; index++) {
    if (finished.has(index)) continue;
    const startsRun = index % runLength === 0;
    const current = runs.at(-1);
    if (!startsRun && current?.indices.at(-1) === index - 1) {
      current.indices.push(index);
      continue;
    }
    runs.push({ indices: [index], guess: startsRun ? undefined : finished.get(index - 1)?.carry });
  }
  return runs;
}

import type { LevelFindings, PreparedStudy, SolutionCrossing } from '#engine';
import { makeCurvesContinuous } from './continuous-curves';
import { coordinateText } from './coordinate-text';
import type { FinishedPoint } from './messages';
import { planRuns, type Run, runLengthOf } from './plan';
import type { Track } from './progress';
import type { Task, WorkerPool } from './worker-pool';

/** A study as it is to be computed in one of its bases. */
export interface BasisTask {
  readonly prepared: PreparedStudy;
  /** 0 for the study's own basis, then the further ones in its order */
  readonly basis: number;
  readonly pool: WorkerPool;
  /** points known from before, by index */
  readonly finished: ReadonlyMap<number, FinishedPoint>;
  readonly onPoint: (index: number, point: FinishedPoint) => void;
  readonly track: Track;
}

/** A study computed in one basis. */
export interface CurvesInBasis {
  readonly points: readonly FinishedPoint[];
  readonly findings: Readonly<Record<string, LevelFindings>>;
  readonly crossings: readonly SolutionCrossing[];
}

/** First the points, then what their neighbours' solutions lead to, then what is read off each level's curve. */
export async function runInBasis(task: BasisTask): Promise<CurvesInBasis> {
  const { points, crossings } = await makeCurvesContinuous({
    ...task,
    points: await computePoints(task),
    onImproved: task.onPoint,
    onRound: (total) => task.track('neighbours', total),
  });
  return { points, crossings, findings: await readCurves(task, points) };
}

async function computePoints(task: BasisTask): Promise<readonly FinishedPoint[]> {
  const { prepared, pool, finished, onPoint, track } = task;
  const total = prepared.coordinates.length;
  const results = Array.from({ length: total }, (_, index) => finished.get(index));
  const progress = track('points', total, finished.size);
  const accept = (index: number, point: FinishedPoint, seconds: number) => {
    results[index] = point;
    onPoint(index, point);
    progress.finished(seconds);
  };
  try {
    await pool.perform(
      planRuns(total, finished, runLengthOf(prepared)).map((run) => pointsTask(task, run, accept)),
    );
  } finally {
    progress.stop();
  }
  return results.map((result) => result ?? unreachable());
}

/** Takes over after a worker's death at the point that the worker left. */
function pointsTask(
  { prepared, basis }: BasisTask,
  run: Run,
  accept: (index: number, point: FinishedPoint, seconds: number) => void,
): Task {
  const indices = [...run.indices];
  let { guess } = run;
  return {
    request: () => ({ kind: 'points', basis, indices, guess }),
    accept: (finding) => {
      if (finding.kind !== 'point') return;
      const { index, seconds, result, carry } = finding;
      indices.shift();
      guess = carry;
      accept(index, { result, carry }, seconds);
    },
    current: () => {
      const coordinate = prepared.coordinates[indices[0] ?? -1] ?? null;
      return coordinate === null ? 'the point' : `the point at ${coordinateText(prepared.study, coordinate)}`;
    },
  };
}

async function readCurves(
  { prepared, basis, pool, track }: BasisTask,
  finished: readonly FinishedPoint[],
): Promise<Readonly<Record<string, LevelFindings>>> {
  const { levels } = prepared.study;
  const points = finished.map(({ result }) => result);
  const left = finished.map(({ carry }) => carry);
  const found = new Map<string, LevelFindings>();
  const progress = track('minima', levels.length);
  const tasks = levels.map(
    (level): Task => ({
      request: () => ({ kind: 'minimum', basis, level, points, left }),
      accept: (finding) => {
        if (finding.kind !== 'minimum') return;
        found.set(level, finding.findings);
        progress.finished(finding.seconds);
      },
      current: () => `the minimum of the ${level} curve`,
    }),
  );
  try {
    await pool.perform(tasks);
  } finally {
    progress.stop();
  }
  return Object.fromEntries(levels.map((level) => [level, found.get(level) ?? unreachable()]));
}

/** A worker says that it is free only after it has answered everything. */
function unreachable(): never {
  throw new Error('A worker left a part of its task out.');
}

import { availableParallelism } from 'node:os';
import {
  describeBasisUsed,
  type LevelFindings,
  measuredFor,
  type PointResult,
  type PreparedStudy,
  type SolutionCrossing,
  type StudyResults,
  studyCautions,
} from '#engine';
import type { SerializedError } from '../contract/requests';
import type { CacheSettings } from './cache-settings';
import { makeCurvesContinuous } from './continuous-curves';
import { coordinateText } from './coordinate-text';
import type { Finding, FinishedPoint, WorkerStart } from './messages';
import { planRuns, type Run } from './plan';
import { PROGRAM } from './program';
import { type Progress, trackProgress } from './progress';
import type { StageTime } from './stage-clock';
import { crossingCautions, stateCurves } from './state-curves';
import { CalculationFailure, openPool, PoolClosed, type Task, type WorkerPool } from './worker-pool';
import { type StartWorker, startWorkerThread } from './worker-thread';

export interface RunInput {
  readonly prepared: PreparedStudy;
  /** text of the basis-set file, if the study names one: every worker prepares the study for itself */
  readonly basisFileText?: string;
}

export interface RunOptions {
  /** threads that compute at the same time; default: one for every core */
  readonly workers?: number;
  /**
   * called for every point as it is computed, in no particular order, not for those in `finished`; again for a
   * point that a neighbour's orbitals led to a lower solution
   */
  readonly onPoint?: (index: number, point: FinishedPoint) => void;
  /** called at every step, and every second in between */
  readonly onProgress?: (progress: Progress) => void;
  /** ends the calculation at once, in the middle of a point */
  readonly signal?: AbortSignal;
  /** points known from before, by index: they are not computed again */
  readonly finished?: ReadonlyMap<number, FinishedPoint>;
  readonly startWorker?: StartWorker;
  /** where points are looked up and kept; absent: nowhere */
  readonly cache?: CacheSettings;
  /** given where the time went in every finding, on whichever worker */
  readonly onTimes?: (kind: Finding['kind'], times: readonly StageTime[]) => void;
}

export type RunOutcome =
  | {
      readonly kind: 'done';
      readonly results: StudyResults;
      /** points that the cache had */
      readonly keptPoints: number;
    }
  | { readonly kind: 'cancelled' }
  | { readonly kind: 'failed'; readonly error: SerializedError };

/**
 * Computes a study on all cores: first the points, then what their neighbours' solutions lead to, then each level's
 * minimum.
 *
 * The results depend neither on the number of workers nor on which points were known before (see plan.ts).
 *
 * @throws whatever `onPoint` throws
 */
export async function runStudy(
  { prepared, basisFileText }: RunInput,
  { workers = availableParallelism(), startWorker = startWorkerThread, signal, ...options }: RunOptions = {},
): Promise<RunOutcome> {
  if (signal?.aborted) return { kind: 'cancelled' };
  const start: WorkerStart = {
    study: prepared.study,
    ...(basisFileText !== undefined && { basisFileText }),
    memoryLimit: prepared.memoryLimit,
    ...(options.cache && { cache: options.cache }),
    isTimed: options.onTimes !== undefined,
  };
  let keptPoints = 0;
  const pool = openPool(
    workers,
    () => startWorker(start),
    ({ kind, isKept, stages }) => {
      if (kind === 'point' && isKept) keptPoints++;
      if (stages) options.onTimes?.(kind, stages);
    },
  );
  signal?.addEventListener('abort', pool.close, { once: true });
  try {
    const computed = await computePoints(prepared, pool, workers, options);
    const { points, crossings } = await makeCurvesContinuous({
      prepared,
      points: computed,
      pool,
      onImproved: (index, point) => options.onPoint?.(index, point),
      onRound: (total) => trackProgress({ stage: 'neighbours', total, done: 0, workers }, options.onProgress),
    });
    const results = points.map(({ result }) => result);
    const findings = await findMinima(prepared, points, pool, workers, options.onProgress);
    return { kind: 'done', results: assemble(prepared, results, findings, crossings), keptPoints };
  } catch (error) {
    if (error instanceof PoolClosed) return { kind: 'cancelled' };
    if (error instanceof CalculationFailure) return { kind: 'failed', error: error.error };
    throw error;
  } finally {
    signal?.removeEventListener('abort', pool.close);
    pool.close();
  }
}

async function computePoints(
  prepared: PreparedStudy,
  pool: WorkerPool,
  workers: number,
  { onPoint, onProgress, finished = new Map() }: Pick<RunOptions, 'onPoint' | 'onProgress' | 'finished'>,
): Promise<readonly FinishedPoint[]> {
  const total = prepared.coordinates.length;
  const results = Array.from({ length: total }, (_, index) => finished.get(index));
  const progress = trackProgress({ stage: 'points', total, done: finished.size, workers }, onProgress);
  const accept = (index: number, point: FinishedPoint, seconds: number) => {
    results[index] = point;
    onPoint?.(index, point);
    progress.finished(seconds);
  };
  try {
    await pool.perform(planRuns(total, finished).map((run) => pointsTask(prepared, run, accept)));
  } finally {
    progress.stop();
  }
  return results.map((result) => result ?? unreachable());
}

/** Takes over after a worker's death at the point that the worker left. */
function pointsTask(
  prepared: PreparedStudy,
  run: Run,
  accept: (index: number, point: FinishedPoint, seconds: number) => void,
): Task {
  const indices = [...run.indices];
  let { guess } = run;
  return {
    request: () => ({ kind: 'points', indices, guess }),
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

async function findMinima(
  prepared: PreparedStudy,
  finished: readonly FinishedPoint[],
  pool: WorkerPool,
  workers: number,
  onProgress: RunOptions['onProgress'],
): Promise<Readonly<Record<string, LevelFindings>>> {
  const { levels } = prepared.study;
  const points = finished.map(({ result }) => result);
  const left = finished.map(({ carry }) => carry);
  const found = new Map<string, LevelFindings>();
  const progress = trackProgress({ stage: 'minima', total: levels.length, done: 0, workers }, onProgress);
  const tasks = levels.map(
    (level): Task => ({
      request: () => ({ kind: 'minimum', level, points, left }),
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

function assemble(
  prepared: PreparedStudy,
  points: readonly PointResult[],
  findings: Readonly<Record<string, LevelFindings>>,
  crossings: readonly SolutionCrossing[],
): StudyResults {
  const measured = measuredFor(prepared.study);
  const curves = stateCurves(prepared.study.levels, points);
  return {
    format: 'farwell/results',
    version: 1,
    study: prepared.study,
    program: { ...PROGRAM, date: new Date().toISOString().slice(0, 'YYYY-MM-DD'.length) },
    basis: describeBasisUsed(prepared),
    points,
    findings,
    curves,
    ...(measured && { measured }),
    cautions: [...studyCautions(prepared, points, crossings, findings), ...crossingCautions(points, curves)],
  };
}

/** A worker says that it is free only after it has answered everything. */
function unreachable(): never {
  throw new Error('A worker left a part of its task out.');
}

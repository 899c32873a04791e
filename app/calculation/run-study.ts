import {
  describeBasisUsed,
  measuredFor,
  type PreparedStudy,
  type StudyResults,
  studyCautions,
  studyInBasis,
} from '#engine';
import type { SerializedError } from '../contract/requests';
import type { CacheSettings } from './cache-settings';
import { findBasisSetLimit } from './find-basis-set-limit';
import type { Finding, FinishedPoint, WorkerStart } from './messages';
import { PROGRAM } from './program';
import { type Progress, type Track, trackProgress } from './progress';
import { type CurvesInBasis, runInBasis } from './run-in-basis';
import type { StageTime } from './stage-clock';
import { crossingCautions, stateCurves } from './state-curves';
import { CalculationFailure, openPool, PoolClosed, type WorkerPool } from './worker-pool';
import { type StartWorker, startWorkerThread } from './worker-thread';
import { usualWorkers } from './workers';

export interface RunInput {
  readonly prepared: PreparedStudy;
  /** text of the basis-set file, if the study names one: every worker prepares the study for itself */
  readonly basisFileText?: string;
}

export interface RunOptions {
  /** threads that compute at the same time; default: as usual */
  readonly workers?: number;
  /**
   * called for every point as it is computed, in no particular order, not for those in `finished`; again for a
   * point that a neighbour's orbitals led to a lower solution. Indices count on through the further bases of a study
   */
  readonly onPoint?: (index: number, point: FinishedPoint) => void;
  /** called at every step, and every second in between */
  readonly onProgress?: (progress: Progress) => void;
  /** ends the calculation at once, in the middle of a point */
  readonly signal?: AbortSignal;
  /** points known from before, by the same index: they are not computed again */
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
 * Computes a study on all cores, in one basis after the other.
 *
 * The results depend neither on the number of workers nor on which points were known before (see plan.ts).
 *
 * @throws whatever `onPoint` throws
 */
export async function runStudy(
  { prepared, basisFileText }: RunInput,
  { workers = usualWorkers(), startWorker = startWorkerThread, signal, ...options }: RunOptions = {},
): Promise<RunOutcome> {
  if (signal?.aborted) return { kind: 'cancelled' };
  const start: WorkerStart = {
    study: prepared.study,
    ...(basisFileText !== undefined && { basisFileText }),
    memoryLimit: prepared.memoryLimit,
    ...(options.cache && { cache: options.cache }),
    isTimed: options.onTimes !== undefined,
    helpers: workers - 1,
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
    const bases = [prepared, ...prepared.furtherBases];
    const computed: CurvesInBasis[] = [];
    for (const [basis, inBasis] of bases.entries()) {
      const ofMany = { name: inBasis.basisSet.name, number: basis + 1, of: bases.length };
      const first = basis * prepared.coordinates.length;
      computed.push(
        await runInBasis({
          prepared: inBasis,
          basis,
          pool,
          finished: pointsFrom(first, options.finished, inBasis),
          onPoint: (index, point) => options.onPoint?.(first + index, point),
          track: (stage, total, done = 0) =>
            trackProgress(
              { stage, total, done, workers, ...(bases.length > 1 && { basis: ofMany }) },
              options.onProgress,
            ),
        }),
      );
    }
    const track: Track = (stage, total, done = 0) =>
      trackProgress({ stage, total, done, workers }, options.onProgress);
    return { kind: 'done', results: await assemble(prepared, computed, pool, track), keptPoints };
  } catch (error) {
    if (error instanceof PoolClosed) return { kind: 'cancelled' };
    if (error instanceof CalculationFailure) return { kind: 'failed', error: error.error };
    throw error;
  } finally {
    signal?.removeEventListener('abort', pool.close);
    pool.close();
  }
}

/** Points of one basis among those of all, by their index in that basis. */
function pointsFrom(
  first: number,
  finished: ReadonlyMap<number, FinishedPoint> = new Map(),
  { coordinates }: PreparedStudy,
): ReadonlyMap<number, FinishedPoint> {
  const own = coordinates.flatMap((_, index): [number, FinishedPoint][] => {
    const point = finished.get(first + index);
    return point ? [[index, point]] : [];
  });
  return new Map(own);
}

async function assemble(
  prepared: PreparedStudy,
  computed: readonly CurvesInBasis[],
  pool: WorkerPool,
  track: Track,
): Promise<StudyResults> {
  const bases = [prepared, ...prepared.furtherBases];
  const [own, ...further] = computed.map((curves, basis) => readingOf(bases[basis] ?? prepared, curves));
  if (!own) throw new RangeError('A study has a basis of its own.');
  const studies = [own, ...further].map(({ inBasis }) => inBasis);
  const measured = measuredFor(prepared.study);
  return {
    format: 'farwell/results',
    version: 1,
    study: prepared.study,
    program: { ...PROGRAM, date: new Date().toISOString().slice(0, 'YYYY-MM-DD'.length) },
    basis: own.inBasis.basis,
    points: own.points,
    findings: own.inBasis.findings,
    curves: own.curves,
    ...(further.length > 0 && {
      furtherBases: studies.slice(1),
      basisSetLimit: await findBasisSetLimit(studies, computed, pool, track),
    }),
    ...(measured && { measured }),
    cautions: own.inBasis.cautions,
  };
}

/** What the results say of the study in one basis. */
function readingOf(prepared: PreparedStudy, { points: finished, findings, crossings }: CurvesInBasis) {
  const { study } = prepared;
  const points = finished.map(({ result }) => result);
  const curves = stateCurves(study.levels, points);
  const cautions = [
    ...studyCautions(prepared, points, crossings, findings),
    ...crossingCautions(points, curves),
  ];
  return {
    points,
    curves,
    inBasis: studyInBasis({ study, basis: describeBasisUsed(prepared), points, findings, cautions }),
  };
}

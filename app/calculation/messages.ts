import type {
  CompleteStudy,
  CurveInBasis,
  FollowedNeighbours,
  LevelFindings,
  LevelLimit,
  PointCarry,
  PointResult,
} from '#engine';
import type { SerializedError } from '../contract/requests';
import type { CacheSettings } from './cache-settings';
import type { StageTime } from './stage-clock';

/** What a worker is started with. */
export interface WorkerStart {
  readonly study: CompleteStudy;
  /** text of the basis-set file, if the study names one */
  readonly basisFileText?: string;
  /** bytes that one point may take; default: the engine's */
  readonly memoryLimit?: number;
  /** absent: nothing is looked up or kept */
  readonly cache?: CacheSettings;
  /** whether findings are to say where their time went */
  readonly isTimed?: boolean;
  /** threads that may ever help this one; default none */
  readonly helpers?: number;
}

/** What a worker is asked for. */
export type WorkerRequest = RequestInBasis | LimitRequest;

/** `basis`: 0 for the study's own, then the further ones in its order */
export type RequestInBasis = {
  readonly basis: number;
} /** points in this order, each starting from the one before it, the first from `guess` */ & (
  | { readonly kind: 'points'; readonly indices: readonly number[]; readonly guess?: PointCarry | undefined }
  /** the neighbours' solutions at a point that is known already */
  | {
      readonly kind: 'follow';
      readonly index: number;
      readonly own?: PointCarry | undefined;
      readonly neighbours: readonly PointCarry[];
    }
  | ({ readonly kind: 'minimum'; readonly level: string } & ComputedCurve)
);

/** What the curves of one level in all bases of the study tend to. */
export interface LimitRequest {
  readonly kind: 'limit';
  readonly level: string;
  readonly curves: readonly CurveInBasis[];
}

/** The points of a study in one basis. */
export interface ComputedCurve {
  readonly points: readonly PointResult[];
  /** what each of them left */
  readonly left: readonly (PointCarry | undefined)[];
}

/** A computed point with what its neighbour starts from, if it gave something to start from. */
export interface FinishedPoint {
  readonly result: PointResult;
  readonly carry?: PointCarry | undefined;
}

export type Finding = {
  readonly seconds: number;
  /** found in the cache, not computed */
  readonly isKept?: boolean;
  /** where the seconds went, if that was asked for */
  readonly stages?: readonly StageTime[];
} & (
  | ({ readonly kind: 'point'; readonly index: number } & FinishedPoint)
  | { readonly kind: 'followed'; readonly index: number; readonly followed: FollowedNeighbours }
  | { readonly kind: 'minimum'; readonly level: string; readonly findings: LevelFindings }
  | { readonly kind: 'limit'; readonly level: string; readonly limit: LevelLimit | undefined }
);

/** What a worker answers: findings as they come, then that it is free again or why it gave up. */
export type WorkerReply =
  | Finding
  | { readonly kind: 'free' }
  | { readonly kind: 'failed'; readonly error: SerializedError };

import { type FollowedState, followStates, placesByKind, stateReader } from './follow-states';
import { curveThrough, type LevelCurve, type LevelPoints } from './level-curve';
import type { CorrelatedState, PointResult, SinglesState } from './result';

type State = CorrelatedState | SinglesState;

/** The curve of one state of a level, with the state itself. */
export interface CurveOfState {
  /** index among the curves of the level in the results */
  readonly index: number;
  readonly followed: FollowedState;
  readonly curve: LevelCurve;
  /** at one end of the scan or both the state is not among those computed */
  readonly isPartial: boolean;
  /** the state at a point of `LevelPoints.all()`; undefined where it is not among those computed */
  stateAt(index: number): State | undefined;
}

/** The curves of a level's states along the study's points; points computed later join them. */
export function curvesOfStates(points: LevelPoints): readonly CurveOfState[] {
  const { level, scanned } = points;
  const scan = points.all().slice(0, scanned);
  const read = stateReader(level);
  const alongScan = followStates(scan, level, read);
  let known: readonly (FollowedState | undefined)[] = [];
  let knownPoints = -1;
  const followedNow = () => {
    if (points.all().length !== knownPoints) {
      const all = followStates(points.all(), level, read);
      known = alongScan.map((followed) => all.find((other) => agree(followed, other, scanned)));
      knownPoints = points.all().length;
    }
    return known;
  };
  const placeByKind = placesByKind(scan, read);
  return alongScan.map((followed, index) => {
    const placeAt = (point: number): number | null | undefined => {
      if (point < scanned) return followed.states[point];
      const place = placeByKind(followed, points.all()[point], point);
      return place === undefined ? followedNow()[index]?.states[point] : place;
    };
    const stateAt = (point: number) => {
      const place = placeAt(point);
      return place == null ? undefined : statesOf(points.all()[point], level)[place];
    };
    const curve = curveThrough(points, (point) => stateAt(point)?.energy);
    const reach = reachOf(curve);
    const energyAt = (x: number) => (x > reach.from && x < reach.to ? curve.energyAt(x) : undefined);
    return { index, followed, curve: { ...curve, energyAt }, isPartial: reach.isPartial, stateAt };
  });
}

/**
 * Between which scanned values a state may be found: beyond the first where it is not among those computed no point
 * is worth computing.
 */
function reachOf({ scan }: LevelCurve): { from: number; to: number; isPartial: boolean } {
  const known = scan.flatMap(({ x, energy }) => (energy === undefined ? [] : [x]));
  const [first, last] = [Math.min(...known), Math.max(...known)];
  const from = Math.max(...scan.flatMap(({ x }) => (x < first ? [x] : [])));
  const to = Math.min(...scan.flatMap(({ x }) => (x > last ? [x] : [])));
  return { from, to, isPartial: Number.isFinite(from) || Number.isFinite(to) };
}

/** Whether both are the same curve at the points of the scan. */
function agree(one: FollowedState, other: FollowedState, scanned: number): boolean {
  return one.states.slice(0, scanned).every((place, point) => place === other.states[point]);
}

/** States of a level that can be trusted. */
export function statesOf({ levels }: PointResult, level: string): readonly State[] {
  const result = levels[level];
  const hasStates = result?.kind === 'correlated' || result?.kind === 'singles';
  return hasStates && result.converged ? result.states : [];
}

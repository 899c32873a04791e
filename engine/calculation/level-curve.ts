import { bohrPerUnit } from '../molecule/build-molecule';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { LevelResult, PointResult } from './result';

/** Scan values nearer than this, in the study's unit, are one geometry. */
const SAME_PLACE = 1e-9;

/** All points of a scan of a bond at which one level is known; another is computed when it is first asked for. */
export interface LevelPoints {
  readonly level: string;
  readonly bohrPerUnit: number;
  /** number of the study's own points */
  readonly scanned: number;
  /** the study's points in its order, then those computed since, with this level alone */
  all(): readonly PointResult[];
  /** makes sure that there is a point at x; not once the run is cancelled */
  compute(x: number): void;
}

/** Where a state lies at one value of the scan coordinate. */
export interface PlaceOnCurve {
  /** study unit */
  readonly x: number;
  /** hartree; undefined where the level did not converge */
  readonly energy: number | undefined;
}

/** The curve of one state of a level. */
export interface LevelCurve {
  readonly level: string;
  readonly bohrPerUnit: number;
  /** points of the scan as they were given */
  readonly scan: readonly PlaceOnCurve[];
  /** all points so far that converged, by rising distance */
  points(): readonly { readonly x: number; readonly energy: number }[];
  /** computes the point if need be; undefined where the level does not converge, and once the run is cancelled */
  energyAt(x: number): number | undefined;
}

/**
 * @param points - the study's computed points
 * @param left - what each of them left: new points start from their nearest neighbour's solution, so that they stay on
 * its curve
 */
export function levelPoints(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  left: readonly (PointCarry | undefined)[],
  control?: RunControl,
): LevelPoints {
  const known: PointResult[] = [...points];
  const carries = left.flatMap((carry, index) =>
    carry ? [{ x: points[index].coordinate ?? Number.NaN, carry }] : [],
  );
  return {
    level,
    bohrPerUnit: bohrPerUnit(prepared.study.molecule.unit),
    scanned: points.length,
    all: () => known,
    compute: (x) => {
      if (placeOf(known, x) >= 0 || control?.isCancelled()) return;
      const guess = nearest(carries, x)?.carry;
      const options = { guess, levels: [level], describesStates: false, control };
      const { result, carry } = computePoint(prepared, x, options);
      if (carry) carries.push({ x, carry });
      known.push(result);
    },
  };
}

/** @param energyOf - energy of the curve's state at a point, by its index in `points.all()` */
export function curveThrough(
  points: LevelPoints,
  energyOf: (index: number) => number | undefined,
): LevelCurve {
  const places = (): PlaceOnCurve[] =>
    points.all().map(({ coordinate }, index) => ({ x: coordinate ?? Number.NaN, energy: energyOf(index) }));
  return {
    level: points.level,
    bohrPerUnit: points.bohrPerUnit,
    scan: places().slice(0, points.scanned),
    points: () =>
      places()
        .flatMap(({ x, energy }) => (energy === undefined ? [] : [{ x, energy }]))
        .sort((a, b) => a.x - b.x),
    energyAt: (x) => {
      points.compute(x);
      const index = placeOf(points.all(), x);
      return index < 0 ? undefined : energyOf(index);
    },
  };
}

/** The curve of a level's lowest state. */
export function lowestCurve(points: LevelPoints): LevelCurve {
  return curveThrough(points, (index) => groundEnergy(points.all()[index].levels[points.level]));
}

function placeOf(points: readonly PointResult[], x: number): number {
  return points.findIndex(({ coordinate }) => Math.abs((coordinate ?? Number.NaN) - x) < SAME_PLACE);
}

function nearest<T extends { readonly x: number }>(places: readonly T[], x: number): T | undefined {
  return places.reduce<T | undefined>(
    (best, place) => (best && Math.abs(best.x - x) <= Math.abs(place.x - x) ? best : place),
    undefined,
  );
}

/** Energy of the lowest state where it can be trusted. */
export function groundEnergy(result: LevelResult | undefined): number | undefined {
  if (!result?.converged) return undefined;
  return 'energy' in result ? result.energy : undefined;
}

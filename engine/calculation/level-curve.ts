import { bohrPerUnit } from '../molecule/build-molecule';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { LevelResult, PointResult } from './result';

/** Scan values nearer than this, in the study's unit, are one geometry. */
const SAME_PLACE = 1e-9;

/** Where the lowest state of a level lies at one value of the scan coordinate. */
export interface PlaceOnCurve {
  /** study unit */
  readonly x: number;
  /** hartree; undefined where the level did not converge */
  readonly energy: number | undefined;
}

/** One level's curve along the scan of a bond; a point of it is computed when it is first asked for. */
export interface LevelCurve {
  readonly level: string;
  readonly bohrPerUnit: number;
  /** points of the scan as they were given */
  readonly scan: readonly PlaceOnCurve[];
  /** all points so far that converged, by rising distance */
  points(): readonly { readonly x: number; readonly energy: number }[];
  /** undefined where the level does not converge, and once the run is cancelled */
  energyAt(x: number): number | undefined;
}

/**
 * @param points - the study's computed points
 * @param left - what each of them left: new points start from their nearest neighbour's solution, so that they stay on
 * its curve
 */
export function levelCurve(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  left: readonly (PointCarry | undefined)[],
  control?: RunControl,
): LevelCurve {
  const scan = points.map(({ coordinate, levels }) => ({
    x: coordinate ?? Number.NaN,
    energy: groundEnergy(levels[level]),
  }));
  const known: PlaceOnCurve[] = [...scan];
  const carries = left.flatMap((carry, index) => (carry ? [{ x: scan[index].x, carry }] : []));
  return {
    level,
    bohrPerUnit: bohrPerUnit(prepared.study.molecule.unit),
    scan,
    points: () =>
      known
        .flatMap(({ x, energy }) => (energy === undefined ? [] : [{ x, energy }]))
        .sort((a, b) => a.x - b.x),
    energyAt: (x) => {
      const before = known.find((place) => Math.abs(place.x - x) < SAME_PLACE);
      if (before) return before.energy;
      if (control?.isCancelled()) return undefined;
      const guess = nearest(carries, x)?.carry;
      const { result, carry } = computePoint(prepared, x, { guess, levels: [level], control });
      if (carry) carries.push({ x, carry });
      const energy = groundEnergy(result.levels[level]);
      known.push({ x, energy });
      return energy;
    },
  };
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

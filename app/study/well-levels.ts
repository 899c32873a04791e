import type { PointResult, StudyResults } from '#engine';
import { HARTREE_IN_WAVENUMBERS } from '../../engine/constants';
import { energyColumns } from './energy-columns';

/** A vibrational level as a figure draws it: a line across the well. */
export interface WellLevel {
  /** quantum number */
  readonly v: number;
  /** hartree, absolute */
  readonly energy: number;
  /** classical turning points, study unit; the end of the scan where the curve does not reach the level within it */
  readonly from: number;
  readonly to: number;
}

/**
 * The levels without rotation of a level's curve, from the lowest; none where none were found. Turning points are
 * those of the curve as figures draw it, straight from point to point, its minimum among them.
 */
export function wellLevels(
  { study, points, findings }: Pick<StudyResults, 'study' | 'points' | 'findings'>,
  level: string,
): readonly WellLevel[] {
  const { minimum, vibration } = findings[level] ?? {};
  if (minimum?.kind !== 'found' || vibration?.kind !== 'found') return [];
  const bottom = { x: minimum.equilibriumDistance, energy: minimum.energy };
  const curve = [...convergedPoints(study, points, level), bottom].sort((a, b) => a.x - b.x);
  const middle = curve.indexOf(bottom);
  const inwards = curve.slice(0, middle + 1).reverse();
  const outwards = curve.slice(middle);
  return vibration.levels.map(({ v, energyPerCm }) => {
    const energy = minimum.energy + energyPerCm / HARTREE_IN_WAVENUMBERS;
    return { v, energy, from: turningPoint(inwards, energy), to: turningPoint(outwards, energy) };
  });
}

interface CurvePoint {
  readonly x: number;
  readonly energy: number;
}

function convergedPoints(
  study: StudyResults['study'],
  points: readonly PointResult[],
  level: string,
): readonly CurvePoint[] {
  const column = energyColumns({ study, points }).find((one) => one.level === level && !one.isExcited);
  return points.flatMap((point) => {
    const entry = column?.entryAt(point);
    return entry?.converged && point.coordinate !== null
      ? [{ x: point.coordinate, energy: entry.energy }]
      : [];
  });
}

/** Where the curve first rises to the energy, going from its minimum; its end where it does not. */
function turningPoint(curve: readonly CurvePoint[], energy: number): number {
  const above = curve.findIndex((point) => point.energy >= energy);
  const high = curve[above];
  const low = curve[above - 1];
  if (!high || !low) return curve.at(-1)!.x;
  return low.x + ((high.x - low.x) * (energy - low.energy)) / (high.energy - low.energy);
}

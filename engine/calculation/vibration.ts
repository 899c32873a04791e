import { HARTREE_IN_WAVENUMBERS } from '../constants';
import {
  FEWEST_POINTS,
  type InterpolatedCurve,
  interpolateCurve,
  pointsToAdd,
} from '../curves/curve-interpolation';
import { vibrationalLevels } from '../curves/vibrational-levels';
import type { Diatomic } from './diatomic';
import type { LevelCurve } from './level-curve';
import type { Vibration } from './result';

/** Points computed for the levels of one curve, at most. */
const MOST_POINTS_ADDED = 30;
/** No point is added to a curve of which one takes longer, seconds as estimated: it is taken as it is. */
const MOST_SECONDS_A_POINT = 2;
/** Wanted largest error of the curve between its points. */
const INTERPOLATION_TOLERANCE_PER_CM = 0.01;
/** Three or four are enough for energies converged to 1e-10 hartree, a few more for a wall that is not there yet. */
const ROUNDS = 8;
/** A curve known between its points no better than this, in cm⁻¹, has a kink or gaps: levels on it would be invented. */
const LARGEST_USABLE_ERROR_PER_CM = 50;
/** How far the next point inwards is, in units of the first distance. */
const INWARD_STEP = 0.92;

/**
 * All bound vibrational levels (J = 0) on one level's curve: through the points that are there, and more where the
 * interpolation wants them, as long as points are cheap.
 *
 * @param minimumEnergy - hartree
 * @param limit - energy of the separate fragments, hartree; absent: the curve ends at its last point
 * @param secondsPerPoint - estimated cost of one point of the level
 */
export function vibrationOf(
  molecule: Diatomic,
  curve: LevelCurve,
  minimumEnergy: number,
  limit: number | undefined,
  secondsPerPoint: number,
): Vibration {
  const interpolate = () =>
    interpolateCurve(
      curve.points().map(({ x, energy }) => ({ distance: x * curve.bohrPerUnit, energy })),
      limit,
    );
  let interpolated = interpolate();
  if (!interpolated) return none(`Fewer than ${FEWEST_POINTS} points of this level converged.`);
  const pointsAtFirst = curve.points().length;
  let left = secondsPerPoint <= MOST_SECONDS_A_POINT ? MOST_POINTS_ADDED : 0;
  for (let round = 0; round < ROUNDS && left > 0; round++) {
    const wanted = usefulPoints(interpolated, limit).slice(0, left);
    if (wanted.length === 0) break;
    for (const distance of wanted) curve.energyAt(distance / curve.bohrPerUnit);
    left -= wanted.length;
    interpolated = interpolate() ?? interpolated;
  }
  const error = errorBelow(interpolated, topOf(interpolated, limit));
  if (!(error <= LARGEST_USABLE_ERROR_PER_CM)) {
    return none(
      `Between its points the curve is known to ${error.toPrecision(2)} cm⁻¹ only: it has a kink, or too few points.`,
    );
  }
  const solved = vibrationalLevels(interpolated, molecule.reducedMass);
  // where the curve tends to a limit above its fragments, as in RHF, the levels between are none of the molecule's
  const levels = solved.levels.filter(({ energy }) => limit === undefined || energy < limit);
  if (levels.length === 0) return none('The well is too shallow for a bound level.');
  // an interpolant that dips below the computed minimum has left the curve
  if (levels[0].energy <= minimumEnergy) return none('The curve has a kink; levels on it would be invented.');
  const abovePerCm = (energy: number) => (energy - minimumEnergy) * HARTREE_IN_WAVENUMBERS;
  return {
    kind: 'found',
    levels: levels.map((state) => ({
      v: state.quantumNumber,
      energyPerCm: abovePerCm(state.energy),
      rotationalConstantPerCm: state.rotationalConstantPerCm,
      uncertaintyPerCm: state.uncertaintyPerCm,
    })),
    zeroPointPerCm: abovePerCm(levels[0].energy),
    boundLevels: levels.length < solved.levels.length ? levels.length : solved.boundLevels,
    converged: solved.converged,
    beyondComputedRange: solved.beyondComputedRange.filter((v) => v < levels.length),
    interpolationErrorPerCm: error,
    pointsAdded: curve.points().length - pointsAtFirst,
    reducedMassDalton: molecule.reducedMassDalton,
  };
}

function none(reason: string): Vibration {
  return { kind: 'none', reason };
}

/** The energy up to which levels are listed: of the curve's limit and its fragments' the lower. */
function topOf(curve: InterpolatedCurve, limit = curve.limit): number {
  return Math.min(curve.limit, limit);
}

/**
 * Between the points and outwards as the interpolation asks, inwards until the wall stands one well depth above the
 * limit. A curve that does not tend to its limit gets no better from points further out.
 */
function usefulPoints(curve: InterpolatedCurve, limit: number | undefined): readonly number[] {
  const { points, outer, computed } = curve;
  const top = topOf(curve, limit);
  const ceiling = top + top - Math.min(...points.map(({ energy }) => energy));
  const wanted = pointsToAdd(curve, INTERPOLATION_TOLERANCE_PER_CM, ceiling);
  const within = outer.form === 'constant' ? wanted.filter((distance) => distance < computed.to) : wanted;
  return points[0].energy < ceiling ? [INWARD_STEP * computed.from, ...within] : within;
}

function errorBelow({ errorsPerCm, points }: InterpolatedCurve, top: number): number {
  return errorsPerCm.reduce(
    (largest, error, k) =>
      Math.min(points[k].energy, points[k + 1].energy) <= top ? Math.max(largest, error) : largest,
    0,
  );
}

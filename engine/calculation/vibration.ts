import { HARTREE_IN_WAVENUMBERS } from '../constants';
import { centrifugalDistortions } from '../curves/centrifugal-distortion';
import {
  FEWEST_POINTS,
  type InterpolatedCurve,
  interpolateCurve,
  pointsToAdd,
} from '../curves/curve-interpolation';
import { type VibrationalLevel, vibrationalLevels } from '../curves/vibrational-levels';
import type { Diatomic } from './diatomic';
import type { RotatingLevel, RotatingLevels } from './further-findings';
import type { LevelCurve } from './level-curve';
import type { Vibration } from './result';

/** Points computed for the levels of one curve, at most. */
const MOST_POINTS_ADDED = 30;
/** No point is added to a curve of which one takes longer, seconds as estimated: it is taken as it is. */
export const MOST_SECONDS_A_POINT = 2;
/** Wanted largest error of the curve between its points. */
const INTERPOLATION_TOLERANCE_PER_CM = 0.01;
/** Three or four are enough for energies converged to 1e-10 hartree, a few more for a wall that is not there yet. */
const ROUNDS = 8;
/** A curve known between its points no better than this, in cm⁻¹, has a kink or gaps: levels on it would be invented. */
const LARGEST_USABLE_ERROR_PER_CM = 50;
/** How far the next point inwards is, in units of the first distance. */
const INWARD_STEP = 0.92;

/** A curve that levels can be solved for on, with any masses and any rotation. */
export interface SolvableCurve {
  readonly kind: 'found';
  readonly curve: InterpolatedCurve;
  /** hartree */
  readonly minimumEnergy: number;
  /** energy of the separate fragments, hartree; undefined: the curve ends at its last point */
  readonly limit: number | undefined;
  readonly interpolationErrorPerCm: number;
  readonly pointsAdded: number;
}

export type WithoutLevels = Extract<Vibration, { readonly kind: 'none' }>;

/**
 * A curve through the points that are there, and through more where the interpolation wants them, as long as points are
 * cheap.
 *
 * @param minimumEnergy - hartree
 * @param limit - energy of the separate fragments, hartree; absent: the curve ends at its last point
 * @param secondsPerPoint - estimated cost of one point of the level
 */
export function solvableCurve(
  curve: LevelCurve,
  minimumEnergy: number,
  limit: number | undefined,
  secondsPerPoint: number,
): SolvableCurve | WithoutLevels {
  const interpolate = () =>
    interpolateCurve(
      curve.points().map(({ x, energy }) => ({ distance: x * curve.bohrPerUnit, energy })),
      limit,
    );
  let interpolated = interpolate();
  if (!interpolated) return doubtful(`Fewer than ${FEWEST_POINTS} points of this level converged.`);
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
    return doubtful(
      `Between its points the curve is known to ${error.toPrecision(2)} cm⁻¹ only: it has a kink, or too few points.`,
    );
  }
  return {
    kind: 'found',
    curve: interpolated,
    minimumEnergy,
    limit,
    interpolationErrorPerCm: error,
    pointsAdded: curve.points().length - pointsAtFirst,
  };
}

/**
 * All bound vibrational levels without rotation, and those of the rotations asked for.
 *
 * @param rotations - J or N above 0
 * @param lambda - Λ of the state; rotations below it do not exist and are left out
 */
export function vibrationOn(
  solvable: SolvableCurve | WithoutLevels,
  molecule: Pick<Diatomic, 'reducedMass' | 'reducedMassDalton'>,
  rotations: readonly number[] = [],
  lambda = 0,
): Vibration {
  if (solvable.kind === 'none') return solvable;
  const { curve, minimumEnergy, limit } = solvable;
  if (minimumEnergy >= topOf(curve, limit)) {
    return none('The minimum lies above the limit: its levels are held by a barrier only, and decay.');
  }
  const solved = vibrationalLevels(curve, molecule.reducedMass);
  const levels = solved.levels.filter(isBelow(limit));
  if (levels.length === 0) return none('The well is too shallow for a bound level.');
  // an interpolant that dips below the computed minimum has left the curve
  if (levels[0].energy <= minimumEnergy)
    return doubtful('The curve has a kink; levels on it would be invented.');
  const distortions = centrifugalDistortions(
    curve,
    molecule.reducedMass,
    levels.length,
    levels.map(({ energy }) => energy),
  );
  const place = placeAbove(minimumEnergy);
  const rotating = rotations
    .filter((rotation) => rotation >= lambda)
    .map((rotation) => rotatingLevels(solvable, molecule.reducedMass, rotation, lambda));
  return {
    kind: 'found',
    levels: levels.map((level, v) => ({
      ...place(level),
      rotationalConstantPerCm: level.rotationalConstantPerCm,
      ...(distortions[v] !== undefined && { centrifugalDistortionPerCm: distortions[v] }),
    })),
    ...(rotating.length > 0 && { rotating }),
    zeroPointPerCm: place(levels[0]).energyPerCm,
    boundLevels: levels.length < solved.levels.length ? levels.length : solved.boundLevels,
    converged: solved.converged,
    beyondComputedRange: solved.beyondComputedRange.filter((v) => v < levels.length),
    interpolationErrorPerCm: solvable.interpolationErrorPerCm,
    pointsAdded: solvable.pointsAdded,
    reducedMassDalton: molecule.reducedMassDalton,
  };
}

function rotatingLevels(
  { curve, minimumEnergy, limit }: SolvableCurve,
  mass: number,
  rotation: number,
  lambda: number,
): RotatingLevels {
  // the centrifugal term is J(J + 1) − Λ²
  const effective = Math.sqrt(rotation * (rotation + 1) - lambda ** 2 + 0.25) - 0.5;
  const { levels, quasiBound, barrier, converged } = vibrationalLevels(curve, mass, { rotation: effective });
  const place = placeAbove(minimumEnergy);
  // a curve with a limit above its fragments has no barrier of the molecule's
  const hasLimit = limit === undefined || limit >= curve.limit;
  return {
    rotation,
    levels: levels.filter(isBelow(limit)).map(place),
    quasiBound: hasLimit
      ? quasiBound.map((level) => ({ ...place(level), widthPerCm: level.widthPerCm }))
      : [],
    ...(hasLimit &&
      barrier !== undefined && { barrierPerCm: (barrier - minimumEnergy) * HARTREE_IN_WAVENUMBERS }),
    converged,
  };
}

/** Where a curve tends to a limit above its fragments, as in RHF, the levels between are none of the molecule's. */
const isBelow =
  (limit: number | undefined) =>
  ({ energy }: VibrationalLevel): boolean =>
    limit === undefined || energy < limit;

const placeAbove =
  (minimumEnergy: number) =>
  ({ quantumNumber, energy, uncertaintyPerCm }: VibrationalLevel): RotatingLevel => ({
    v: quantumNumber,
    energyPerCm: (energy - minimumEnergy) * HARTREE_IN_WAVENUMBERS,
    uncertaintyPerCm,
  });

function none(reason: string): WithoutLevels {
  return { kind: 'none', reason };
}

function doubtful(reason: string): WithoutLevels {
  return { kind: 'none', reason, isDoubtful: true };
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

import { HARTREE_IN_WAVENUMBERS } from '../constants';
import { type EnergyPoint, type InnerTail, innerTail, type OuterTail, outerTail } from './curve-tails';
import type { RadialCurve } from './radial-range';
import { predictFromOthers, rationalInterpolant } from './rational-interpolant';

/** What the interpolation runs in: r itself, its logarithm, or (r − re)/(r + re). */
export type InterpolationVariable = 'distance' | 'logarithm' | 'ratio';

/** A smooth curve through computed points, with its own estimate of how far to trust it. */
export interface InterpolatedCurve extends RadialCurve {
  readonly points: readonly EnergyPoint[];
  readonly variable: InterpolationVariable;
  /** degree of the blended polynomials */
  readonly degree: number;
  /** estimated error between each point and the next, cm⁻¹; n − 1 values */
  readonly errorsPerCm: readonly number[];
  readonly inner: InnerTail;
  readonly outer: OuterTail;
  /** how far the last point is from where the tail through the points before it would have it, cm⁻¹ */
  readonly outerErrorPerCm: number;
}

/** Points needed to tell anything: a fit of the tail, one more to check it, and some in the well. */
export const FEWEST_POINTS = 8;
/** Points closer than this, bohr, are one point computed twice: their difference would be noise over nothing. */
const SAME_DISTANCE = 1e-4;
/** How far the next point outwards is, in units of the last distance. */
const OUTWARD_STEP = 1.15;
const VARIABLES: readonly InterpolationVariable[] = ['distance', 'logarithm', 'ratio'];
const DEGREES: readonly number[] = [3, 4, 5, 6, 7, 8, 9, 10];

/**
 * Interpolates a curve for the radial equation.
 *
 * Variable and degree are those that best predict each point from all others, and how badly they do is the error
 * estimate. Leaving a point out doubles the gap around it, so the estimate is many times too large where the curve is
 * well resolved; it may be too small where points are so few that it is far above 0.01 cm⁻¹ anyway.
 *
 * @param points - at least `FEWEST_POINTS` at different distances, any order
 * @param limit - energy of the separated atoms, hartree; absent: the energy at the largest distance
 * @returns undefined with fewer points
 */
export function interpolateCurve(
  points: readonly EnergyPoint[],
  limit?: number,
): InterpolatedCurve | undefined {
  const sorted = [...points]
    .sort((a, b) => a.distance - b.distance)
    .filter(({ distance }, k, all) => k === 0 || distance - all[k - 1].distance > SAME_DISTANCE);
  if (sorted.length < FEWEST_POINTS) return undefined;
  const lowest = sorted.reduce((a, b) => (b.energy < a.energy ? b : a));
  // counted from the lowest point: rounding of a large total energy would otherwise grow with the degree
  const energies = sorted.map(({ energy }) => energy - lowest.energy);
  const candidates = VARIABLES.flatMap((variable) => {
    const map = mapTo(variable, lowest.distance);
    const abscissas = sorted.map(({ distance }) => map(distance));
    return DEGREES.filter((degree) => degree < sorted.length - 2).map((degree) => {
      const residuals = leaveOneOut(abscissas, energies, degree);
      return { variable, map, abscissas, degree, residuals, score: scoreOf(residuals, energies) };
    });
  });
  const best = candidates.reduce((a, b) => (b.score < a.score ? b : a));
  const between = rationalInterpolant(best.abscissas, energies, best.degree);
  const inner = innerTail(sorted);
  const outer = outerTail(sorted, limit);
  const [first, last] = [sorted[0].distance, sorted[sorted.length - 1].distance];
  const before = outerTail(sorted.slice(0, -1), limit);
  return {
    energyAt: (distance) => {
      if (distance < first) return inner.energyAt(distance);
      return distance > last ? outer.energyAt(distance) : lowest.energy + between(best.map(distance));
    },
    limit: outer.limit,
    computed: { from: first, to: last },
    points: sorted,
    variable: best.variable,
    degree: best.degree,
    errorsPerCm: errorsBetween(best.residuals),
    inner,
    outer,
    outerErrorPerCm:
      Math.abs(before.energyAt(last) - sorted[sorted.length - 1].energy) * HARTREE_IN_WAVENUMBERS,
  };
}

/**
 * Where more points make the curve better: middles of gaps whose error is above the tolerance, and one point further
 * out where the tail does not predict the last point. Compute them, interpolate anew, and ask again until none is left.
 * Energies with noise of 1e-8 hartree or more cannot be interpolated to 0.01 cm⁻¹ and would ask without end: cap the
 * rounds (converged to 1e-10, three or four are enough).
 *
 * @param tolerancePerCm - wanted largest error
 * @param ceiling - gaps that lie above this energy throughout are left as they are, hartree; absent: one well depth
 * above the limit, where the wave of no bound level has any weight
 * @returns distances in bohr, rising; empty if the curve is good enough
 */
export function pointsToAdd(curve: InterpolatedCurve, tolerancePerCm = 0.01, ceiling?: number): number[] {
  const { points, errorsPerCm, limit, outerErrorPerCm } = curve;
  const lowest = Math.min(...points.map(({ energy }) => energy));
  const top = ceiling ?? limit + (limit - lowest);
  const added = errorsPerCm.flatMap((error, k) => {
    const [left, right] = [points[k], points[k + 1]];
    const matters = error > tolerancePerCm && Math.min(left.energy, right.energy) <= top;
    return matters ? [Math.sqrt(left.distance * right.distance)] : [];
  });
  const last = points[points.length - 1].distance;
  return outerErrorPerCm > tolerancePerCm ? [...added, OUTWARD_STEP * last] : added;
}

function mapTo(variable: InterpolationVariable, equilibrium: number): (distance: number) => number {
  switch (variable) {
    case 'distance':
      return (r) => r;
    case 'logarithm':
      return Math.log;
    case 'ratio':
      return (r) => (r - equilibrium) / (r + equilibrium);
  }
}

/** Error of the prediction of each inner point from all the others; 0 for the two at the ends. */
function leaveOneOut(abscissas: readonly number[], values: readonly number[], degree: number): number[] {
  return predictFromOthers(abscissas, values, degree).map((value, k) => Math.abs(value - values[k]));
}

/** Length of the residuals, without the wall higher than the well is deep, where no wave has weight. */
function scoreOf(residuals: readonly number[], energies: readonly number[]): number {
  const depth = energies[energies.length - 1];
  return Math.hypot(...residuals.map((residual, k) => (energies[k] <= 2 * depth ? residual : 0)));
}

function errorsBetween(residuals: readonly number[]): number[] {
  return residuals
    .slice(0, -1)
    .map((residual, k) => Math.max(residual, residuals[k + 1]) * HARTREE_IN_WAVENUMBERS);
}

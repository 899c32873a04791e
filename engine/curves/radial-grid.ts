/**
 * Points r_i = L(1 + y_i)/(1 − y_i), evenly spaced in y: close together in the well, ever wider outwards, so that
 * a level near dissociation with a tail of hundreds of bohr costs hardly more than a low one.
 *
 * The map is a fractional linear one, whose Schwarzian derivative vanishes: with u(r) = √(dr/dy)·φ(y) the radial
 * equation keeps its form, φ″ + (dr/dy)²k²φ = 0, without a further term. (The variable is that of A. A. Surkus,
 * R. J. Rakauskas, A. B. Bolotin, Chem. Phys. Lett. 105, 291 (1984); mapped radial equations: V. V. Meshkov,
 * A. V. Stolyarov, R. J. Le Roy, Phys. Rev. A 78, 052510 (2008).)
 */
export interface RadialGrid {
  /** spacing in y, dimensionless */
  readonly step: number;
  /** r_i in bohr, rising */
  readonly distances: Float64Array;
  /** dr/dy at r_i, bohr */
  readonly stretch: Float64Array;
}

/** By how much halving the step divides an error of its fourth power, less one: for Richardson's extrapolation. */
export const FOURTH_POWER = 15;

/** dr/dy of the map at a distance; both in bohr. */
export function stretchAt(distance: number, scale: number): number {
  return (distance + scale) ** 2 / (2 * scale);
}

/** y of a distance. */
function mappedDistance(distance: number, scale: number): number {
  return (distance - scale) / (distance + scale);
}

/** Fewest intervals of any grid. */
const FEWEST_INTERVALS = 64;

/**
 * Number of steps in which a wave turns by at most so much.
 *
 * @param phase - largest phase per unit of y, radian
 * @param phasePerStep - radian
 */
export function intervalsFor(
  scale: number,
  from: number,
  to: number,
  phase: number,
  phasePerStep: number,
): number {
  const length = mappedDistance(to, scale) - mappedDistance(from, scale);
  return Math.max(FEWEST_INTERVALS, Math.ceil((length * phase) / phasePerStep));
}

/**
 * @param scale - L in bohr, about the equilibrium distance; half of all y lie inside it
 * @param from - first point, bohr, > 0
 * @param to - last point, bohr
 * @param intervals - number of steps; one more point than that
 */
export function radialGrid(scale: number, from: number, to: number, intervals: number): RadialGrid {
  const start = mappedDistance(from, scale);
  const step = (mappedDistance(to, scale) - start) / intervals;
  const distances = new Float64Array(intervals + 1);
  const stretch = new Float64Array(intervals + 1);
  for (let i = 0; i <= intervals; i++) {
    const y = start + i * step;
    distances[i] = (scale * (1 + y)) / (1 - y);
    stretch[i] = stretchAt(distances[i], scale);
  }
  return { step, distances, stretch };
}

import { HARTREE_IN_WAVENUMBERS } from '../constants';
import { boundStates, integrateProduct, integrationWeights, radialEquation } from './radial-equation';
import { intervalsFor, radialGrid } from './radial-grid';
import { type RadialCurve, radialRange } from './radial-range';

/** Phase a step, radian: D is right to some millionths of itself. */
const PHASE_PER_STEP = 0.05;
/** J(J + 1) of the difference, in units of (lowest binding or vibrational interval)/B. */
const RELATIVE_ROTATION = 1e-3;
/** Rotation by that much must be smaller than this fraction of a level's binding energy. */
const SMALL_AGAINST_BINDING = 1e-2;

/**
 * Centrifugal distortion constants D_v of the levels without rotation: E(v, J) = E(v) + B_v·J(J + 1) − D_v·[J(J + 1)]².
 *
 * B is the derivative of a level by J(J + 1) exactly (Hellmann–Feynman theorem), so that D is −½ of the derivative of
 * B, which is taken between J(J + 1) = ±x with small x.
 *
 * @param mass - reduced mass, electron masses
 * @param mostLevels - from the lowest
 * @param known - the levels as far as they are known, hartree, with the curve's zero
 * @returns cm⁻¹, for each level; undefined for one that lies too close to the limit for an expansion in J(J + 1)
 */
export function centrifugalDistortions(
  curve: RadialCurve,
  mass: number,
  mostLevels: number,
  known: readonly number[] = [],
): readonly (number | undefined)[] {
  const { from, to, centre, phase } = radialRange(curve, mass);
  const grid = radialGrid(centre, from, to, intervalsFor(centre, from, to, phase, PHASE_PER_STEP));
  const inverseMoment = integrationWeights(grid, (r) => 1 / (2 * mass * r * r));
  const atRest = radialEquation(grid, (r) => curve.energyAt(r) - curve.limit, mass, 0);
  const solve = (rotation: number, guesses: readonly number[]) =>
    boundStates(
      {
        ...atRest,
        potential: atRest.potential.map((value, i) => value + rotation / (2 * mass * grid.distances[i] ** 2)),
      },
      0,
      mostLevels,
      0,
      guesses,
    ).states.map((state) => ({
      energy: state.energy,
      constant: integrateProduct(state, state, inverseMoment),
    }));
  const still = solve(
    0,
    known.map((energy) => energy - curve.limit),
  );
  if (still.length === 0) return [];
  const interval = (still[1]?.energy ?? 0) - still[0].energy;
  const rotation = (RELATIVE_ROTATION * interval) / still[0].constant;
  const [more, less] = [rotation, -rotation].map((term) =>
    solve(
      term,
      still.map(({ energy, constant }) => energy + term * constant),
    ),
  );
  return still.map(({ energy, constant }, v) => {
    if (!more[v] || !less[v] || rotation * constant > SMALL_AGAINST_BINDING * -energy) return undefined;
    return ((less[v].constant - more[v].constant) / (4 * rotation)) * HARTREE_IN_WAVENUMBERS;
  });
}

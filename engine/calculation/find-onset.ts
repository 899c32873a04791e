import { findZeroCrossing } from '../curves/zero-crossing';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { InstabilityOnset, LevelResult, PointResult } from './result';

/** How far the onset may be off, in the study's unit or degrees: 1e-3 Å is asked for, half of it is kept. */
const TOLERANCE = 5e-4;

/**
 * Where along the scan RHF stops being a minimum among determinants with different orbitals for the two spins: the
 * lowest eigenvalue of the triplet orbital Hessian becomes negative as the coordinate rises. Computes some more points;
 * of several such places the last one counts, from which RHF stays unstable as the bond is pulled on.
 *
 * @param points - the study's computed points
 *
 * Source: J. Čížek, J. Paldus, J. Chem. Phys. 47, 3976 (1967); R. Seeger, J. A. Pople, J. Chem. Phys. 66, 3045 (1977).
 */
export function findInstabilityOnset(
  prepared: PreparedStudy,
  points: readonly PointResult[],
  control?: RunControl,
): InstabilityOnset {
  const sides = points
    .flatMap(({ coordinate, levels }) => {
      const value = tripletStability(levels.RHF);
      return coordinate === null || value === undefined ? [] : [{ x: coordinate, value }];
    })
    .sort((a, b) => a.x - b.x);
  if (sides.length === 0) return none('No point has converged with a stability value.');
  const after = sides.findLastIndex(({ value }, i) => i > 0 && value < 0 && sides[i - 1].value >= 0);
  if (after < 0) {
    const unstable = sides.filter(({ value }) => value < 0).length;
    if (unstable === 0) return none('RHF is stable at every point.');
    return none(
      unstable === sides.length
        ? 'RHF is unstable at every point.'
        : 'RHF is unstable at the beginning of the scan only.',
    );
  }
  let guess: PointCarry | undefined;
  const valueAt = (x: number): number | undefined => {
    if (control?.isCancelled()) return undefined;
    const { result, carry } = computePoint(prepared, x, { guess, levels: ['RHF'], control });
    guess = carry ?? guess;
    return tripletStability(result.levels.RHF);
  };
  const crossing = findZeroCrossing(valueAt, sides[after - 1], sides[after], TOLERANCE);
  return crossing.kind === 'found'
    ? { kind: 'found', coordinate: crossing.x, uncertainty: crossing.uncertainty }
    : none(`RHF did not converge at ${crossing.x}, where the onset was sought.`);
}

function none(reason: string): InstabilityOnset {
  return { kind: 'none', reason };
}

/** Lowest eigenvalue of the triplet Hessian where it can be trusted. */
function tripletStability(result: LevelResult | undefined): number | undefined {
  if (result?.kind !== 'hartreeFock' || !result.converged || !result.stability) return undefined;
  return 'triplet' in result.stability ? result.stability.triplet : undefined;
}

import { type CrossingSide, findZeroCrossing } from '../curves/zero-crossing';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import { lowReferenceWeight } from './reference-weight';
import type { LevelResult, PointResult, ReferenceWeightCrossing, ReferenceWeightFinding } from './result';

/** How far a crossing may be off, in the study's unit or degrees: 1e-3 Å is asked for, half of it is kept. */
const TOLERANCE = 5e-4;

/**
 * Where along the scan the weight c(0)² of the reference determinant in a CI level's lowest state passes the threshold
 * of the study, and from where on it stays below: there a single determinant no longer describes the molecule. Computes
 * some more points between the study's.
 *
 * Where the lowest state or the Hartree–Fock solution gives way to another, the weight jumps; a jump across the
 * threshold is found as well.
 *
 * @param points - the study's computed points
 * @param left - what each of them left: new points start from their nearest neighbour's solution
 */
export function findReferenceWeight(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  left: readonly (PointCarry | undefined)[] = [],
  control?: RunControl,
): ReferenceWeightFinding {
  const threshold = lowReferenceWeight(prepared.study);
  const known = points
    .flatMap(({ coordinate, levels }, index) => {
      const weight = referenceWeight(levels[level]);
      return coordinate === null || weight === undefined
        ? []
        : [{ x: coordinate, value: weight - threshold, carry: left[index] }];
    })
    .sort((a, b) => a.x - b.x);
  const crossings: ReferenceWeightCrossing[] = [];
  const none = (reason: string): ReferenceWeightFinding => ({ kind: 'none', threshold, crossings, reason });
  if (known.length === 0) return none('The level has not converged at any point.');

  for (let i = 1; i < known.length; i++) {
    const [before, after] = [known[i - 1], known[i]];
    if (isBelow(before) === isBelow(after)) continue;
    const valueAt = (x: number): number | undefined => {
      if (control?.isCancelled()) return undefined;
      const guess = (x - before.x < after.x - x ? before : after).carry;
      const options = { guess, levels: [level], describesStates: false, control };
      const weight = referenceWeight(computePoint(prepared, x, options).result.levels[level]);
      return weight === undefined ? undefined : weight - threshold;
    };
    const crossing = findZeroCrossing(valueAt, before, after, TOLERANCE);
    if (crossing.kind === 'undefined') {
      return none(`${level} did not converge at ${crossing.x}, where the threshold was sought.`);
    }
    const { x, uncertainty } = crossing;
    crossings.push({ coordinate: x, uncertainty, direction: isBelow(after) ? 'falling' : 'rising' });
  }

  const last = crossings.at(-1);
  if (last?.direction === 'falling') {
    return {
      kind: 'found',
      threshold,
      crossings,
      coordinate: last.coordinate,
      uncertainty: last.uncertainty,
    };
  }
  if (last) return none(`At the end of the scan the weight is not below ${threshold}.`);
  return none(
    isBelow(known[0])
      ? `The weight is below ${threshold} at every point.`
      : `The weight is not below ${threshold} at any point.`,
  );
}

function isBelow({ value }: CrossingSide): boolean {
  return value < 0;
}

/** Of the lowest state, where it can be trusted. */
function referenceWeight(result: LevelResult | undefined): number | undefined {
  return result?.kind === 'correlated' && result.converged ? result.referenceWeight : undefined;
}

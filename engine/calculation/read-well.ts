import {
  type CurveMinimum,
  findCurveMinimum,
  type LocalMinimum,
  type LowestMinimum,
} from '../curves/minimum';
import { diatomicOf } from './diatomic';
import type { LevelCurve } from './level-curve';
import type { PreparedStudy } from './prepare-study';
import type { HigherMinimum, LevelFindings } from './result';
import type { Study } from './study';
import { type SolvableCurve, solvableCurve, type WithoutLevels } from './vibration';
import { type DescribedWell, describeWell, isKinked } from './well-constants';

/** Spacing of the points computed around a minimum: fine against a well's width, coarse against energy noise. */
const SPACING_ANGSTROM = 0.02;
const SPACING_BOHR = 0.04;

/** The lowest well of a curve; with constants where points were computed in it. */
export interface Well extends Partial<DescribedWell> {
  readonly found: LowestMinimum;
  /** diatomic molecules */
  readonly solvable?: SolvableCurve | WithoutLevels;
}

/** The minimum of a curve as the results have it, and its well if there is one. */
export interface WellReading {
  readonly minimum: LevelFindings['minimum'];
  readonly well?: Well;
}

/** Of the points computed around a minimum, study unit. */
export function minimumSpacing({ molecule }: Pick<Study, 'molecule'>): number {
  return molecule.unit === 'bohr' ? SPACING_BOHR : SPACING_ANGSTROM;
}

/**
 * Computes the further points of the curve that it needs.
 *
 * @param limit - energy of the separate fragments, hartree; undefined: the curve ends at its last point
 * @param secondsPerPoint - estimated cost of one point of the level
 */
export function readWell(
  prepared: PreparedStudy,
  curve: LevelCurve,
  limit: number | undefined,
  secondsPerPoint: number,
): WellReading {
  const spacing = minimumSpacing(prepared.study);
  const found = findCurveMinimum(curve.scan, curve.energyAt, spacing);
  if (found.kind !== 'found') return { minimum: describeMinimum(found) };
  const described = describeWell(prepared, curve, found, spacing);
  const solvable = diatomicOf(prepared.study) && solvableCurve(curve, found.energy, limit, secondsPerPoint);
  const minimum = describeMinimum(found, isKinked(found, described.constants));
  return { minimum, well: { found, ...described, ...(solvable && { solvable }) } };
}

export function describeMinimum(found: CurveMinimum, onKink = false): LevelFindings['minimum'] {
  switch (found.kind) {
    case 'found':
      return {
        kind: 'found',
        ...placeOf(found),
        ...(onKink && { onKink }),
        ...(found.others.length > 0 && { others: found.others.map(placeOf) }),
      };
    case 'atEdge':
      return { kind: 'atEdge', coordinate: found.x };
    case 'none':
      return found;
  }
}

const placeOf = ({ x, energy, uncertainty }: LocalMinimum): HigherMinimum => ({
  equilibriumDistance: x,
  energy,
  uncertainty,
});

import { HARTREE_IN_WAVENUMBERS } from '../constants';
import { interpolateCurve } from '../curves/curve-interpolation';
import { findCurveMinimum } from '../curves/minimum';
import type { LevelCurve } from './level-curve';
import { describeMinimum, type WellReading } from './read-well';
import { solvableCurve } from './vibration';

/** Points of the search around the minimum of the interpolant lie so close, in units of the gap that it lies in. */
const SPACING_IN_GAPS = 0.05;

export interface InterpolatedReading extends WellReading {
  /** of the energy at the minimum, hartree */
  readonly energyUncertainty: number;
}

/**
 * The lowest well of a curve from the points that are there alone. Its derivatives are not read off: those of an
 * interpolant are far less certain than its values.
 *
 * @param limit - energy of the separate fragments, hartree; undefined: the curve ends at its last point
 */
export function interpolatedWell(curve: LevelCurve, limit?: number): InterpolatedReading {
  const toBohr = curve.bohrPerUnit;
  const points = curve.points();
  const interpolated = interpolateCurve(points.map(({ x, energy }) => ({ distance: x * toBohr, energy })));
  if (!interpolated) {
    return {
      minimum: { kind: 'none', reason: 'Too few points of this state for a curve.' },
      energyUncertainty: 0,
    };
  }
  const lowest = points.reduce((best, { energy }, k) => (energy < points[best].energy ? k : best), 0);
  const gap = points[Math.min(lowest + 1, points.length - 1)].x - points[Math.max(0, lowest - 1)].x;
  const found = findCurveMinimum(curve.scan, (x) => interpolated.energyAt(x * toBohr), SPACING_IN_GAPS * gap);
  if (found.kind !== 'found') return { minimum: describeMinimum(found), energyUncertainty: 0 };
  const error =
    Math.max(...interpolated.errorsPerCm.slice(Math.max(0, lowest - 1), lowest + 1)) / HARTREE_IN_WAVENUMBERS;
  // a ripple of that height over the gap moves the minimum by its slope over the curvature
  const shift = (2 * Math.PI * error) / (gap * found.curvature);
  const minimum = { ...found, uncertainty: Math.max(found.uncertainty, shift) };
  return {
    minimum: describeMinimum(minimum),
    well: {
      found: minimum,
      solvable: solvableCurve(curve, found.energy, limit, Number.POSITIVE_INFINITY),
    },
    energyUncertainty: error,
  };
}

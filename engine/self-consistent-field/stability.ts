import { lowestEigenpairs } from '../linear-algebra/davidson';
import type { RunControl } from '../termination';
import type { RestrictedFunctional, RestrictedPoint } from './restricted-functional';

/** The eigenvalue's error is quadratic in this; its sign is what matters. */
const RESIDUAL_TOLERANCE = 1e-4;
const ITERATIONS = 60;
const VECTORS = 40;
/** Excitations with the lowest orbital-energy differences that the search starts from. */
const UNIT_GUESSES = 5;
/** Keeps the preconditioner's denominators off zero, hartree. */
const SMALLEST_DENOMINATOR = 1e-2;

/**
 * Lowest eigenvalue, in hartree, and eigenvector of the real singlet or triplet orbital Hessian A + B of a closed
 * shell; a negative one is a way to a lower determinant, with the same (singlet) or different (triplet) orbitals
 * for the two spins.
 *
 * Source: R. Seeger, J. A. Pople, J. Chem. Phys. 66, 3045 (1977).
 */
export function lowestOrbitalHessian(
  functional: RestrictedFunctional,
  point: RestrictedPoint,
  spin: 'singlet' | 'triplet',
  control: RunControl,
): { readonly value: number; readonly vector: Float64Array } {
  // The functional's curvature is 4(ε_a − ε_i).
  const diagonal = point.curvature.map((value) => value / 4);
  const { values, vectors } = lowestEigenpairs(
    {
      dimension: diagonal.length,
      apply: (vector, product) => product.set(functional.responseProduct(point, vector, spin)),
      precondition: (vector, shift, result) => {
        for (let k = 0; k < vector.length; k++) {
          const denominator = diagonal[k] - shift;
          result[k] =
            vector[k] / (Math.abs(denominator) < SMALLEST_DENOMINATOR ? SMALLEST_DENOMINATOR : denominator);
        }
      },
      guesses: startingVectors(diagonal),
    },
    {
      roots: 1,
      residualTolerance: RESIDUAL_TOLERANCE,
      maximumIterations: ITERATIONS,
      maximumVectors: VECTORS,
      control,
      stage: 'stability',
    },
  );
  return { value: values[0], vector: vectors[0] };
}

/**
 * One vector with a part in every symmetry, since excitations alone span only their own, and the lowest
 * excitations.
 */
function startingVectors(diagonal: Float64Array): Float64Array[] {
  const everySymmetry = diagonal.map((_, k) => Math.cos(1 + k * k));
  const lowest = [...diagonal.keys()].sort((a, b) => diagonal[a] - diagonal[b]).slice(0, UNIT_GUESSES);
  const units = lowest.map((place) => {
    const unit = new Float64Array(diagonal.length);
    unit[place] = 1;
    return unit;
  });
  return diagonal.length > units.length ? [...units, everySymmetry] : units;
}

import { lowestEigenpairs } from '../linear-algebra/davidson';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { inStage } from '../stages';
import type { RunControl } from '../termination';
import type { RotationFunctional, RotationPoint } from './minimiser';

/** The eigenvalue's error is quadratic in this; its sign is what matters. */
const RESIDUAL_TOLERANCE = 1e-4;
const ITERATIONS = 60;
const VECTORS = 40;
/** Excitations with the lowest orbital-energy differences that the search starts from. */
const UNIT_GUESSES = 5;
/** Excitations of which the whole Hessian takes about as many products as the search. */
const FEW_EXCITATIONS = 16;
/** Keeps the preconditioner's denominators off zero, hartree. */
const SMALLEST_DENOMINATOR = 1e-2;

export interface HessianEigenpair {
  readonly value: number;
  readonly vector: Float64Array;
}

/**
 * Lowest eigenvalue (hartree, per pair of spin orbitals) and eigenvector of the orbital Hessian within one kind of
 * Hartree–Fock. A negative one is a way to a lower determinant of this kind.
 *
 * Source: R. Seeger, J. A. Pople, J. Chem. Phys. 66, 3045 (1977).
 */
export function lowestRotationHessian<P extends RotationPoint>(
  functional: RotationFunctional<P>,
  point: P,
  control: RunControl,
): HessianEigenpair {
  const scale = 1 / functional.hessianScale;
  return lowestHessianEigenpair(
    (vector) => functional.hessianProduct(point, vector).map((value) => scale * value),
    point.curvature.map((value) => scale * value),
    control,
  );
}

/**
 * @param apply - the Hessian's product with a vector
 * @param diagonal - orbital-energy differences, hartree
 */
export function lowestHessianEigenpair(
  apply: (vector: Float64Array) => Float64Array,
  diagonal: Float64Array,
  control: RunControl,
): HessianEigenpair {
  if (diagonal.length <= FEW_EXCITATIONS) {
    return inStage(control, 'stability', () => lowestDirectly(apply, diagonal.length));
  }
  const { values, vectors } = inStage(control, 'stability', () =>
    lowestEigenpairs(
      {
        dimension: diagonal.length,
        apply: (vector, product) => product.set(apply(vector)),
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
    ),
  );
  return { value: values[0], vector: vectors[0] };
}

/** The Hessian column by column. */
function lowestDirectly(apply: (vector: Float64Array) => Float64Array, dimension: number): HessianEigenpair {
  const hessian = new Float64Array(dimension * dimension);
  const unit = new Float64Array(dimension);
  for (let k = 0; k < dimension; k++) {
    unit[k] = 1;
    hessian.set(apply(unit), k * dimension);
    unit[k] = 0;
  }
  const { values, vectors } = symmetricEigen(hessian, dimension);
  return { value: values[0], vector: unit.map((_, k) => vectors[k * dimension]) };
}

/**
 * The lowest excitations, and one vector with a part in every symmetry, since excitations alone span only their
 * own.
 */
function startingVectors(diagonal: Float64Array): Float64Array[] {
  const everySymmetry = diagonal.map((_, k) => Math.cos(1 + k * k));
  const lowest = [...diagonal.keys()].sort((a, b) => diagonal[a] - diagonal[b]).slice(0, UNIT_GUESSES);
  const units = lowest.map((place) => {
    const unit = new Float64Array(diagonal.length);
    unit[place] = 1;
    return unit;
  });
  return [...units, everySymmetry];
}

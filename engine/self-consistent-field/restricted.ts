import type { RunControl, Termination } from '../termination';
import { convergeLowest, DESCENT_STEP, INSTABILITY } from './converge';
import { firstColumns, type StartingPoint } from './mean-field';
import {
  DEFAULT_SELF_CONSISTENCY,
  type MeanFieldProblem,
  requireOrbitals,
  type SelfConsistencyOptions,
} from './mean-field-problem';
import { diagonaliseFock } from './orbitals';
import { type Orthogonalisation, orthogonalise } from './orthogonalisation';
import { RestrictedFunctional, type RestrictedPoint } from './restricted-functional';
import { lowestHessianEigenpair } from './stability';

export interface RestrictedSolution {
  readonly energy: number;
  readonly termination: Termination;
  /** of all attempts together */
  readonly iterations: number;
  /** largest element of the commutator in orthonormal functions, hartree */
  readonly residual: number;
  /** n×m, canonical, energies rising */
  readonly coefficients: Float64Array;
  readonly orbitalEnergies: Float64Array;
  readonly orbitalCount: number;
  /** spin-summed, n×n */
  readonly density: Float64Array;
  readonly orthogonalisation: Orthogonalisation;
  /** lowest eigenvalues of the orbital Hessians, hartree; absent where there is nothing to rotate */
  readonly stability?: { readonly singlet: number; readonly triplet: number };
  /** occupied orbitals turned towards a lower determinant with different orbitals for the two spins, n×occupied */
  readonly brokenSpinStart?: { readonly alpha: Float64Array; readonly beta: Float64Array };
}

/**
 * Closed-shell Hartree–Fock: the lowest determinant that the starts lead to, every real singlet instability
 * followed down.
 *
 * @param electrons - even
 * @param starts - at least one
 * @throws EngineError `basis.tooFewFunctions` if the basis cannot hold the electrons
 *
 * Source: C. C. J. Roothaan, Rev. Mod. Phys. 23, 69 (1951); stability: R. Seeger, J. A. Pople, J. Chem. Phys. 66,
 * 3045 (1977).
 */
export function solveRestricted(
  problem: MeanFieldProblem,
  electrons: number,
  starts: readonly StartingPoint[],
  control: RunControl,
  options: SelfConsistencyOptions = DEFAULT_SELF_CONSISTENCY,
): RestrictedSolution {
  const { functionCount: n } = problem;
  const occupied = electrons / 2;
  const orthogonalisation = orthogonalise(problem.overlap, n);
  const { orbitalCount, transformation } = orthogonalisation;
  requireOrbitals(orbitalCount, occupied, electrons);
  const functional = new RestrictedFunctional(problem, occupied, orthogonalisation);
  const { point, stability: singlet, ...found } = convergeLowest(functional, starts, options, control, 'RHF');

  const { coefficients, energies } = diagonaliseFock(point.fock, transformation, n, orbitalCount);
  const triplet =
    singlet === undefined || options.turnsSpinsApart === false
      ? undefined
      : lowestHessianEigenpair(
          (vector) => functional.responseProduct(point, vector, 'triplet'),
          point.curvature.map((value) => value / functional.hessianScale),
          control,
        );
  return {
    energy: point.energy,
    ...found,
    coefficients,
    orbitalEnergies: energies,
    orbitalCount,
    density: point.density.map((value) => 2 * value),
    orthogonalisation,
    ...(singlet !== undefined && triplet && { stability: { singlet, triplet: triplet.value } }),
    ...(triplet &&
      triplet.value < INSTABILITY && { brokenSpinStart: turnSpinsApart(functional, point, triplet.vector) }),
  };
}

/** Alpha orbitals turned one way along a triplet rotation, beta orbitals the other. */
function turnSpinsApart(functional: RestrictedFunctional, point: RestrictedPoint, rotation: Float64Array) {
  const occupiedAfter = (angle: number) =>
    firstColumns(
      functional.rotate(
        point,
        rotation.map((value) => angle * value),
      ),
      functional.problem.functionCount,
      functional.orbitalCount,
      functional.occupied,
    );
  return { alpha: occupiedAfter(DESCENT_STEP), beta: occupiedAfter(-DESCENT_STEP) };
}

import { multiply, multiplyLeftTransposed } from '../linear-algebra/dense';
import type { RunControl, Termination } from '../termination';
import { type Converged, convergeLowest } from './converge';
import { firstColumns, type MeanFieldPoint, type StartingPoint } from './mean-field';
import {
  DEFAULT_SELF_CONSISTENCY,
  type MeanFieldProblem,
  requireOrbitals,
  type SelfConsistencyOptions,
} from './mean-field-problem';
import { type Orthogonalisation, orthogonalise } from './orthogonalisation';
import { RestrictedOpenFunctional } from './restricted-open-functional';
import { halves, UnrestrictedFunctional } from './unrestricted-functional';

/** What both kinds of open-shell Hartree–Fock give; pairs are alpha and beta. */
interface OpenShellSolution {
  readonly energy: number;
  readonly termination: Termination;
  readonly iterations: number;
  readonly residual: number;
  readonly orbitalCount: number;
  /** over functions, n×n */
  readonly densities: readonly [Float64Array, Float64Array];
  readonly sSquared: number;
  readonly orthogonalisation: Orthogonalisation;
  /** lowest eigenvalue of the orbital Hessian, hartree */
  readonly stability?: number;
}

export interface UnrestrictedSolution extends OpenShellSolution {
  /** n×m, energies rising */
  readonly coefficients: readonly [Float64Array, Float64Array];
  readonly orbitalEnergies: readonly [Float64Array, Float64Array];
}

export interface RestrictedOpenSolution extends OpenShellSolution {
  /** n×m: doubly occupied, singly occupied, empty; energies rising within each */
  readonly coefficients: Float64Array;
  /** diagonal of (Fα + Fβ)/2 */
  readonly orbitalEnergies: Float64Array;
}

/**
 * Hartree–Fock with different orbitals for the two spins: the lowest determinant that the starts lead to, every
 * instability within real UHF followed down.
 *
 * @param occupied - alpha and beta electrons
 * @param starts - at least one; where RHF is unstable, one with the spins turned apart leads to the lower solution
 * @throws EngineError `basis.tooFewFunctions` if the basis cannot hold the electrons
 *
 * Source: J. A. Pople, R. K. Nesbet, J. Chem. Phys. 22, 571 (1954).
 */
export function solveUnrestricted(
  problem: MeanFieldProblem,
  occupied: readonly [number, number],
  starts: readonly StartingPoint[],
  control: RunControl,
  options: SelfConsistencyOptions = DEFAULT_SELF_CONSISTENCY,
): UnrestrictedSolution {
  const orthogonalisation = orthonormalFunctions(problem, occupied);
  const functional = new UnrestrictedFunctional(problem, occupied, orthogonalisation);
  const found = convergeLowest(functional, starts, options, control, 'UHF');
  const { point } = found;
  const coefficients = halves(point.coefficients);
  return {
    ...summary(found, orthogonalisation),
    coefficients,
    orbitalEnergies: halves(point.orbitalEnergies),
    densities: halves(point.density),
    sSquared: spinSquared(problem, coefficients, orthogonalisation.orbitalCount, occupied),
  };
}

/**
 * High-spin open-shell Hartree–Fock with one set of orbitals; for closed shells the same as RHF.
 *
 * @param occupied - alpha and beta electrons, alpha ≥ beta
 * @throws EngineError `basis.tooFewFunctions` if the basis cannot hold the electrons
 *
 * Source: C. C. J. Roothaan, Rev. Mod. Phys. 32, 179 (1960).
 */
export function solveRestrictedOpen(
  problem: MeanFieldProblem,
  occupied: readonly [number, number],
  starts: readonly StartingPoint[],
  control: RunControl,
  options: SelfConsistencyOptions = DEFAULT_SELF_CONSISTENCY,
): RestrictedOpenSolution {
  const orthogonalisation = orthonormalFunctions(problem, occupied);
  const functional = new RestrictedOpenFunctional(problem, occupied, orthogonalisation);
  const found = convergeLowest(functional, starts, options, control, 'ROHF');
  const { point } = found;
  const spin = (occupied[0] - occupied[1]) / 2;
  return {
    ...summary(found, orthogonalisation),
    coefficients: point.coefficients,
    orbitalEnergies: point.orbitalEnergies,
    densities: point.densities,
    sSquared: spin * (spin + 1),
  };
}

function orthonormalFunctions(
  problem: MeanFieldProblem,
  [alpha, beta]: readonly [number, number],
): Orthogonalisation {
  const orthogonalisation = orthogonalise(problem.overlap, problem.functionCount);
  requireOrbitals(orthogonalisation.orbitalCount, alpha, alpha + beta);
  return orthogonalisation;
}

function summary<P extends MeanFieldPoint>(found: Converged<P>, orthogonalisation: Orthogonalisation) {
  const { point, ...rest } = found;
  return { energy: point.energy, ...rest, orbitalCount: orthogonalisation.orbitalCount, orthogonalisation };
}

/**
 * ⟨S²⟩ = S(S + 1) + N(β) − Σ |⟨i(α)|j(β)⟩|² over occupied orbitals, S = (N(α) − N(β))/2
 * (Szabo and Ostlund, eq. 2.271).
 */
function spinSquared(
  { overlap, functionCount: n }: MeanFieldProblem,
  coefficients: readonly [Float64Array, Float64Array],
  m: number,
  [alpha, beta]: readonly [number, number],
): number {
  const a = firstColumns(coefficients[0], n, m, alpha);
  const b = firstColumns(coefficients[1], n, m, beta);
  const overlaps = multiplyLeftTransposed(a, multiply(overlap, b, n, n, beta), alpha, n, beta);
  const spin = (alpha - beta) / 2;
  return spin * (spin + 1) + beta - overlaps.reduce((sum, value) => sum + value * value, 0);
}

import { EngineError } from '../errors';
import { congruence, maximumAbsolute, multiply } from '../linear-algebra/dense';
import type { RunControl, Termination } from '../termination';
import { CommutatorExtrapolation } from './convergence-acceleration';
import {
  DEFAULT_SELF_CONSISTENCY,
  type MeanFieldProblem,
  type SelfConsistencyOptions,
} from './mean-field-problem';
import { minimiseOverRotations } from './minimiser';
import { buildDensity, diagonaliseFock, reorthonormalise } from './orbitals';
import { type Orthogonalisation, orthogonalise } from './orthogonalisation';
import { RestrictedFunctional, type RestrictedPoint } from './restricted-functional';
import { lowestOrbitalHessian } from './stability';

/** Where a self-consistent field starts from. */
export type StartingPoint =
  /** spin-summed density, n×n */
  | { readonly kind: 'density'; readonly density: Float64Array }
  /** occupied orbitals, n×occupied row-major, orthonormal in another geometry's overlap */
  | { readonly kind: 'occupiedOrbitals'; readonly coefficients: Float64Array };

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
}

/**
 * An eigenvalue of the singlet Hessian below this is a way down, not rounding.
 */
const INSTABILITY = -1e-5;
/** Times that a way down is followed before the best so far is taken. */
const DESCENTS = 6;
/** First step along an unstable direction, in radians of rotation; large enough to leave the saddle. */
const DESCENT_STEP = 0.2;
/** Of two solutions the later one wins only if it is lower by more than this, hartree. */
const DISTINCT = 1e-9;

/**
 * Closed-shell Hartree–Fock: from each start converges the lowest determinant it leads to, follows every real
 * singlet instability down, and keeps the lowest.
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
  const occupied = electrons / 2;
  const orthogonalisation = orthogonalise(problem.overlap, problem.functionCount);
  const { orbitalCount } = orthogonalisation;
  if (orbitalCount < occupied) {
    throw new EngineError(
      'basis.tooFewFunctions',
      `The basis gives ${orbitalCount} independent orbitals, but ${electrons} electrons need ${occupied}.`,
      'Take a larger basis set, or one made for these elements.',
      { functions: orbitalCount, orbitalsNeeded: occupied },
      'basis',
    );
  }
  const functional = new RestrictedFunctional(problem, occupied, orbitalCount);
  const attempt = new Attempt(functional, orthogonalisation, options, control);

  let best: Converged | undefined;
  for (const start of starts) {
    const solution = attempt.descend(start);
    if (solution && (best === undefined || isBetter(solution, best))) best = solution;
  }
  if (best === undefined) throw new RangeError('solveRestricted: no usable starting point');

  const { coefficients, energies } = diagonaliseFock(
    best.point.fock,
    orthogonalisation.transformation,
    problem.functionCount,
    orbitalCount,
  );
  return {
    energy: best.point.energy,
    termination: best.termination,
    iterations: attempt.iterations,
    residual: best.residual,
    coefficients,
    orbitalEnergies: energies,
    orbitalCount,
    density: best.point.density.map((value) => 2 * value),
    orthogonalisation,
    ...(best.stability && { stability: best.stability }),
  };
}

interface Converged {
  readonly point: RestrictedPoint;
  readonly residual: number;
  readonly termination: Termination;
  readonly stability?: { readonly singlet: number; readonly triplet: number };
}

function isBetter(one: Converged, other: Converged): boolean {
  const converged = one.termination.kind === 'converged';
  if (converged !== (other.termination.kind === 'converged')) return converged;
  return one.point.energy < other.point.energy - DISTINCT;
}

/** Convergence of one problem from several starts, counting iterations over all. */
class Attempt {
  iterations = 0;

  constructor(
    private readonly functional: RestrictedFunctional,
    private readonly orthogonalisation: Orthogonalisation,
    private readonly options: SelfConsistencyOptions,
    private readonly control: RunControl,
  ) {}

  /** From a start to a determinant that no real singlet rotation lowers. */
  descend(start: StartingPoint): Converged | undefined {
    const first = this.firstFock(start);
    if (first === undefined) return undefined;
    let current = this.converge(first);
    for (let descent = 0; descent < DESCENTS; descent++) {
      if (current.termination.kind !== 'converged' || current.point.gradient.length === 0) return current;
      const singlet = lowestOrbitalHessian(this.functional, current.point, 'singlet', this.control);
      const triplet = lowestOrbitalHessian(this.functional, current.point, 'triplet', this.control);
      current = { ...current, stability: { singlet: singlet.value, triplet: triplet.value } };
      if (singlet.value > INSTABILITY) return current;
      const displaced = this.functional.rotate(
        current.point,
        singlet.vector.map((value) => DESCENT_STEP * value),
      );
      const lower = this.minimise(this.functional.evaluate(displaced));
      if (!isBetter(lower, current)) return current;
      current = lower;
    }
    return current;
  }

  private firstFock(start: StartingPoint): Float64Array | undefined {
    const n = this.functional.problem.functionCount;
    if (start.kind === 'density')
      return this.functional.fockAndEnergy(start.density.map((value) => value / 2)).fock;
    const o = this.functional.occupied;
    const orbitals = reorthonormalise(start.coefficients, this.functional.problem.overlap, n, o);
    if (orbitals === undefined) return undefined;
    const density = buildDensity(orbitals, n, o, o);
    return this.functional.fockAndEnergy(density).fock;
  }

  /** Extrapolated iterations; where they do not settle, the minimiser from the lowest determinant met. */
  private converge(firstFock: Float64Array): Converged {
    const { functionCount: n } = this.functional.problem;
    const { transformation, orbitalCount: m } = this.orthogonalisation;
    const extrapolation = new CommutatorExtrapolation();
    let fock = firstFock;
    let lowest: RestrictedPoint | undefined;
    let previousEnergy = Number.POSITIVE_INFINITY;
    for (let iteration = 1; iteration <= this.options.extrapolatedIterations; iteration++) {
      this.iterations++;
      const { coefficients } = diagonaliseFock(fock, transformation, n, m);
      const point = this.functional.evaluate(coefficients);
      const error = this.commutator(point);
      const residual = maximumAbsolute(error);
      this.control.report({ stage: 'RHF', iteration, residual });
      if (!Number.isFinite(point.energy + residual)) {
        return { point, residual, termination: { kind: 'notFinite', quantity: 'energy' } };
      }
      const change = Math.abs(point.energy - previousEnergy);
      if (residual <= this.options.gradientTolerance && change <= this.options.energyTolerance) {
        return { point, residual, termination: { kind: 'converged' } };
      }
      if (this.control.isCancelled()) return { point, residual, termination: { kind: 'cancelled' } };
      if (lowest === undefined || point.energy < lowest.energy) lowest = point;
      previousEnergy = point.energy;
      fock = extrapolation.extrapolate(point.fock, error);
    }
    return this.minimise(lowest!);
  }

  private minimise(start: RestrictedPoint): Converged {
    const { point, iterations, termination } = minimiseOverRotations(
      this.functional,
      start,
      // g = 4F(a,i), the commutator's element in these orbitals is 2F(a,i) at most
      {
        gradientTolerance: 2 * this.options.gradientTolerance,
        maximumIterations: this.options.minimiserIterations,
      },
      this.control,
    );
    this.iterations += iterations;
    return { point, termination, residual: maximumAbsolute(this.commutator(point)) };
  }

  /** FDS − SDF in the orthonormal functions, m×m. */
  private commutator(point: RestrictedPoint): Float64Array {
    const { functionCount: n, overlap } = this.functional.problem;
    const { transformation: x, orbitalCount: m } = this.orthogonalisation;
    const fds = multiply(multiply(point.fock, point.density, n, n, n), overlap, n, n, n);
    const error = new Float64Array(n * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) error[i * n + j] = fds[i * n + j] - fds[j * n + i];
    return congruence(error, x, n, m);
  }
}

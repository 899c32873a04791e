import type { RunControl, Termination } from '../termination';
import { type DavidsonProblem, Subspace } from './subspace';

export interface DavidsonOptions {
  readonly roots: number;
  /** roots above this are not wanted, and need not be converged where their residuals show it; default: all are */
  readonly ceiling?: number;
  /** whether guards keep roots from being missed; default yes */
  readonly guards?: boolean;
  /**
   * whether an estimate of second order tells what cannot come down to the wanted roots, judged by the lowest eigenvector
   * so far; default no
   */
  trustsEstimates?(lowest: Float64Array): boolean;
  /** largest ‖matrix·x − λx‖ of a converged root */
  readonly residualTolerance: number;
  readonly maximumIterations: number;
  /** most basis vectors held at a time, at least one more than the wanted roots; memory: `davidsonVectorCount` */
  readonly maximumVectors: number;
  readonly control: RunControl;
  /** what progress is reported as */
  readonly stage: string;
}

export interface DavidsonResult {
  /** rising; `roots` of them, and those degenerate with the last one; fewer if it ended before there were any */
  readonly values: Float64Array;
  /** orthonormal, one per value; taken from the problem's algebra, and the caller's to give back */
  readonly vectors: readonly Float64Array[];
  readonly residuals: Float64Array;
  readonly iterations: number;
  readonly termination: Termination;
}

/** Roots this close to the last wanted one, in the matrix's unit, are converged along with it. */
export const DEGENERACY_TOLERANCE = 1e-6;
/** What a guard that lies above a missed root is taken to hold of it, at least. */
export const SMALLEST_WEIGHT = 0.05;
/** A value may come down by so many times what second order says. */
const ESTIMATE_FACTOR = 2;
/** Guards improved in one iteration, lowest first: all at once would leave no room between two collapses. */
const GUARDS_AT_ONCE = 4;
/** Stagnated: so many iterations without a new lowest residual or sum of the wanted roots. */
const PATIENCE = 30;
/**
 * After so many of them the residual itself is the new direction: M − θ is indefinite where M has values below θ, and
 * (M − θ)⁻¹r may then have nothing of r and lead nowhere.
 */
const STEPS_TO_DESCENT = 3;
/** Sums of values that differ by less than this fraction are equal. */
const ROUNDING = 1e-12;

/** How many vectors of length `dimension` are held, at most: basis, products, and the eigenvector at work. */
export function davidsonVectorCount(maximumVectors: number): number {
  // of a basis that holds but one vector beside the new one, the eigenvector is that
  return maximumVectors === 2 ? 4 : 2 * maximumVectors + 1;
}

/**
 * Lowest eigenvalues and eigenvectors of a large symmetric matrix by Davidson's method, several at a time.
 *
 * Every iteration diagonalises the matrix within the basis, and adds for each unfinished root x with residual
 * r = (A − θ)x the direction (M − θ)⁻¹r − ε(M − θ)⁻¹x with ε such that it is orthogonal to x. Without the
 * second term a preconditioner that is nearly exact returns x itself; with it, denominators near zero do no harm.
 * At the limit of vectors the basis collapses onto its lowest third and what the wanted roots have last changed by.
 *
 * Missed roots: beside the wanted roots, the next eigenvector of every guess is a guard. When the wanted roots are
 * done, guards are improved like roots until it shows that they lie above the highest of them, λ. This shows
 * - if θ − ‖r‖/√w > λ, w = `SMALLEST_WEIGHT`: a vector that has the weight w or more in an eigenvector of value λ has
 *   ‖r‖ ≥ √w·|θ − λ|. (Without w, D. H. Weinstein's bound, Proc. Natl. Acad. Sci. 20, 529 (1934), only says that some
 *   eigenvalue is near, not that none is lower.) Or,
 * - where estimates are trusted, if θ − f·Σ|r·t| > λ, t the new direction for the shift λ, f = `ESTIMATE_FACTOR`: an
 *   eigenvalue λ below those of the matrix A′ beside x obeys λ = θ − rᵀ(A′ − λ)⁻¹r exactly, and with M in the place of A
 *   the second term is rᵀt (P. O. Löwdin, J. Math. Phys. 3, 969 (1962)).
 * Roots degenerate with the last wanted one count as wanted, so that a cut through a degenerate set gives all of it.
 * The same tells of a wanted root that it lies above the ceiling.
 *
 * Sources: E. R. Davidson, J. Comput. Phys. 17, 87 (1975); the second term: J. Olsen, P. Jørgensen, J. Simons,
 * Chem. Phys. Lett. 169, 463 (1990); the collapse: A. Stathopoulos, Y. Saad, Electron. Trans. Numer. Anal. 7, 163
 * (1998).
 *
 * @throws RangeError if there are fewer guesses than roots
 */
export function lowestEigenpairs(problem: DavidsonProblem, options: DavidsonOptions): DavidsonResult {
  const roots = Math.min(options.roots, problem.dimension);
  const { ceiling = Number.POSITIVE_INFINITY, guards = true, maximumVectors } = options;
  const subspace = new Subspace(problem);
  problem.guesses.forEach((guess, k) => {
    if (subspace.size < maximumVectors) subspace.begin(guess, k);
  });
  if (subspace.size < roots) throw new RangeError('lowestEigenpairs: fewer independent guesses than roots');

  const countWanted = () =>
    Math.min(countThroughDegenerate(subspace.values, roots), Math.max(roots, maximumVectors - 1));
  let bestResidual = Number.POSITIVE_INFINITY;
  let lowestSum = Number.POSITIVE_INFINITY;
  let withoutProgress = 0;
  let room = 1;
  for (let iteration = 1; ; iteration++) {
    const finish = (termination: Termination) => ({
      ...subspace.result(subspace.values.length === 0 ? 0 : countWanted()),
      iterations: iteration,
      termination,
    });
    if (!subspace.diagonalise()) return finish({ kind: 'notFinite', quantity: 'matrix–vector product' });
    const wanted = countWanted();
    if (subspace.size + room > maximumVectors) {
      const most = Math.min(maximumVectors - 1, Math.max(wanted, maximumVectors - room));
      subspace.collapse(wanted, guards ? subspace.guards(wanted) : [], Math.floor(maximumVectors / 3), most);
    }
    const highest = Math.min(subspace.values[wanted - 1], ceiling);
    const limitOf = (k: number) => (k < wanted ? ceiling : highest);
    const trusts = () => options.trustsEstimates?.(subspace.eigenvector(0)) ?? false;
    let worst = 0;
    const isUnfinished = (k: number): boolean => {
      const norm = subspace.residualNorm(k);
      const isConverged = norm <= options.residualTolerance;
      if (!isConverged && liesAbove(subspace, k, norm, limitOf(k), trusts)) return false;
      if (k < wanted) worst = Math.max(worst, norm);
      return !isConverged;
    };
    let unfinished = Array.from({ length: wanted }, (_, k) => k).filter(isUnfinished);
    if (guards && unfinished.length === 0) {
      unfinished = subspace.guards(wanted).filter(isUnfinished).slice(0, GUARDS_AT_ONCE);
    }
    options.control.report({ stage: options.stage, iteration, residual: worst });

    // a root that comes in from above brings a larger residual, but lowers the sum of the values
    const sum = subspace.values.slice(0, roots).reduce((total, value) => total + value, 0);
    const isProgress =
      worst < bestResidual ||
      worst <= options.residualTolerance ||
      sum < lowestSum - ROUNDING * Math.abs(sum);
    lowestSum = Math.min(lowestSum, sum);
    withoutProgress = isProgress ? 0 : withoutProgress + 1;
    bestResidual = Math.min(bestResidual, worst);
    if (unfinished.length === 0) return finish({ kind: 'converged' });
    if (iteration >= options.maximumIterations) return finish({ kind: 'iterationLimit', limit: iteration });
    if (options.control.isCancelled()) return finish({ kind: 'cancelled' });

    // where vectors are few, what the roots change by is worth more than directions for all of them at once
    unfinished = unfinished.slice(0, Math.max(1, Math.floor((maximumVectors - wanted) / 2)));
    room = unfinished.length;
    const isDescent = withoutProgress > 0 && withoutProgress % STEPS_TO_DESCENT === 0;
    let isExtended = false;
    for (const k of unfinished.slice(0, maximumVectors - subspace.size)) {
      const isNew = isDescent
        ? subspace.descend(k)
        : subspace.correct(k, Math.min(subspace.values[k], limitOf(k)));
      if (isNew) isExtended = true;
    }
    if (!isExtended || withoutProgress >= PATIENCE) {
      return finish({ kind: 'stagnated', iterationsWithoutProgress: withoutProgress });
    }
  }
}

/** `count`, or more if further values are degenerate with the last. */
function countThroughDegenerate(values: Float64Array, count: number): number {
  const limit = values[count - 1] + DEGENERACY_TOLERANCE;
  while (count < values.length && values[count] <= limit) count++;
  return count;
}

/** Does eigenvector k, with a residual of this length, show that it has nothing of an eigenvector below the limit? */
function liesAbove(
  subspace: Subspace,
  k: number,
  residual: number,
  limit: number,
  trustsEstimates: () => boolean,
): boolean {
  const gap = subspace.values[k] - limit - DEGENERACY_TOLERANCE;
  if (gap <= 0) return false;
  if (residual / Math.sqrt(SMALLEST_WEIGHT) < gap) return true;
  return trustsEstimates() && ESTIMATE_FACTOR * subspace.formCorrection(k, limit) < gap;
}

/** (diagonal − shift)⁻¹ applied element by element, no denominator smaller in size than `smallest`. */
export function preconditionDiagonally(
  diagonal: Float64Array,
  smallest: number,
): (vector: Float64Array, shift: number, result: Float64Array) => void {
  return (vector, shift, result) => {
    for (let i = 0; i < vector.length; i++) result[i] = vector[i] / offZero(diagonal[i] - shift, smallest);
  };
}

/** The number, moved away from zero to at least `smallest` in size. */
export function offZero(value: number, smallest: number): number {
  if (Math.abs(value) >= smallest) return value;
  return value < 0 ? -smallest : smallest;
}

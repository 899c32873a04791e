import type { RunControl, Termination } from '../termination';
import { addScaledInto, congruence, dot } from './dense';
import { symmetricEigen } from './symmetric-eigen';
import { VectorBlock } from './vector-block';

/** A large symmetric matrix as its action on vectors of length `dimension`. */
export interface DavidsonProblem {
  readonly dimension: number;
  /** product ← matrix·vector */
  apply(vector: Float64Array, product: Float64Array): void;
  /** result ← (M − shift)⁻¹·vector with M near the matrix and denominators kept off zero */
  precondition(vector: Float64Array, shift: number, result: Float64Array): void;
  /** removes what rounding has added against a symmetry of the matrix from a new direction, in place */
  restoreSymmetry?(direction: Float64Array): void;
  /** at least as many as roots, linearly independent */
  readonly guesses: readonly Float64Array[];
  /**
   * the symmetry of each guess, as far as the caller knows: guesses that the matrix may join bear the same number;
   * default: each its own
   */
  readonly groups?: readonly number[];
}

export interface DavidsonOptions {
  readonly roots: number;
  /** roots above this are not wanted, and need not be converged where their residuals show it; default: all are */
  readonly ceiling?: number;
  /** whether guards keep roots from being missed; default yes */
  readonly guards?: boolean;
  /** largest ‖matrix·x − λx‖ of a converged root */
  readonly residualTolerance: number;
  readonly maximumIterations: number;
  /** most basis vectors held at a time, at least twice the wanted roots and groups; memory: `davidsonVectorCount` */
  readonly maximumVectors: number;
  readonly control: RunControl;
  /** what progress is reported as */
  readonly stage: string;
}

export interface DavidsonResult {
  /** rising; `roots` of them, and those degenerate with the last one; fewer if it ended before there were any */
  readonly values: Float64Array;
  /** orthonormal, one per value */
  readonly vectors: readonly Float64Array[];
  readonly residuals: Float64Array;
  readonly iterations: number;
  readonly termination: Termination;
}

/** Roots this close to the last wanted one, in the matrix's unit, are converged along with it. */
export const DEGENERACY_TOLERANCE = 1e-6;
/** A direction of unit length that keeps less than this beside the basis brings nothing but rounding errors. */
const SMALLEST_NEW_DIRECTION = 1e-9;
/** What a guard that lies above a missed root is taken to hold of it, at least. */
const SMALLEST_WEIGHT = 0.05;
/** Guards improved in one iteration, lowest first: all at once would leave no room between two collapses. */
const GUARDS_AT_ONCE = 4;
/** Stagnated: so many iterations without a new lowest residual or sum of the wanted roots. */
const PATIENCE = 30;
/** A difference of squares this small beside them has lost most of its digits. */
const ROUNDED_SQUARE = 1e-11;
/** Sums of values that differ by less than this fraction are equal. */
const ROUNDING = 1e-12;

/** How many vectors of length `dimension` are held: basis, products, and three for the correction. */
export function davidsonVectorCount(maximumVectors: number): number {
  return 2 * maximumVectors + 3;
}

/**
 * Lowest eigenvalues and eigenvectors of a large symmetric matrix by Davidson's method, several at a time.
 *
 * Every iteration diagonalises the matrix within the basis, and adds for each unfinished root x with residual
 * r = (A − θ)x the direction (M − θ)⁻¹r − ε(M − θ)⁻¹x with ε such that it is orthogonal to x. Without the
 * second term a preconditioner that is nearly exact returns x itself; with it, denominators near zero do no harm.
 * At the limit of vectors the basis collapses onto its lowest third.
 *
 * Missed roots: beside the wanted roots, the next eigenvector of every group of guesses is a guard. It is improved
 * like a root until θ − ‖r‖/√w lies above the highest wanted root, w = `SMALLEST_WEIGHT`: a vector that has the
 * weight w or more in an eigenvector of value λ has ‖r‖ ≥ √w·|θ − λ|. (Without w, D. H. Weinstein's bound, Proc.
 * Natl. Acad. Sci. 20, 529 (1934), only says that some eigenvalue is near, not that none is lower.) Roots degenerate with the last wanted
 * one count as wanted, so that a cut through a degenerate set gives all of it. The same bound tells of a wanted root
 * that it lies above the ceiling.
 *
 * Sources: E. R. Davidson, J. Comput. Phys. 17, 87 (1975); the second term: J. Olsen, P. Jørgensen, J. Simons,
 * Chem. Phys. Lett. 169, 463 (1990).
 *
 * @throws RangeError if there are fewer guesses than roots
 */
export function lowestEigenpairs(problem: DavidsonProblem, options: DavidsonOptions): DavidsonResult {
  const roots = Math.min(options.roots, problem.dimension);
  const { ceiling = Number.POSITIVE_INFINITY, guards = true } = options;
  const subspace = new Subspace(problem);
  problem.guesses.forEach((guess, k) => {
    subspace.extend(guess, problem.groups?.[k] ?? k);
  });
  if (subspace.size < roots) throw new RangeError('lowestEigenpairs: fewer independent guesses than roots');

  let bestResidual = Number.POSITIVE_INFINITY;
  let lowestSum = Number.POSITIVE_INFINITY;
  let withoutProgress = 0;
  for (let iteration = 1; ; iteration++) {
    const finish = (termination: Termination) => ({
      ...subspace.result(roots),
      iterations: iteration,
      termination,
    });
    if (!subspace.diagonalise()) return finish({ kind: 'notFinite', quantity: 'matrix–vector product' });
    const wanted = subspace.countThroughDegenerate(roots);
    const highest = subspace.values[wanted - 1];
    let unfinished: number[] = [];
    let worst = 0;
    const pursued = guards ? subspace.pursuable(wanted) : Array.from({ length: wanted }, (_, k) => k);
    for (const k of pursued) {
      const norm = subspace.residualNorm(k);
      const limit = k < wanted ? ceiling : Math.min(highest, ceiling);
      const lowestMissed = subspace.values[k] - norm / Math.sqrt(SMALLEST_WEIGHT);
      if (lowestMissed > limit + DEGENERACY_TOLERANCE) continue;
      if (k < wanted) worst = Math.max(worst, norm);
      if (norm > options.residualTolerance) unfinished.push(k);
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

    const roomFor = unfinished.filter((k) => k < wanted).length + GUARDS_AT_ONCE;
    unfinished = unfinished.slice(0, roomFor);
    if (subspace.size + unfinished.length > options.maximumVectors) {
      unfinished = subspace.collapse(wanted, Math.floor(options.maximumVectors / 3), unfinished);
    }
    const isExtended = subspace.correct(unfinished);
    if (!isExtended || withoutProgress >= PATIENCE) {
      return finish({ kind: 'stagnated', iterationsWithoutProgress: withoutProgress });
    }
  }
}

/** Basis, products of the matrix with it, and the matrix within it. */
class Subspace {
  readonly #problem: DavidsonProblem;
  readonly #basis: VectorBlock;
  readonly #products: VectorBlock;
  readonly #ritz: Float64Array;
  readonly #residual: Float64Array;
  readonly #correction: Float64Array;
  /** size×size, row-major */
  #matrix: Float64Array = new Float64Array(0);
  /** scalar products of the products, size×size */
  #squared: Float64Array = new Float64Array(0);
  /** of the last diagonalisation; columns over the basis as it was then */
  #coefficients: Float64Array = new Float64Array(0);
  #columns = 0;
  /** group of each basis vector */
  #groups: number[] = [];
  /** group of each eigenvector: where most of it lies */
  #groupOfValue: number[] = [];
  /** which eigenvector and residual stand formed, with their residual's length */
  #formed: { readonly k: number; readonly length: number } | undefined;
  values: Float64Array = new Float64Array(0);

  constructor(problem: DavidsonProblem) {
    this.#problem = problem;
    this.#basis = new VectorBlock(problem.dimension);
    this.#products = new VectorBlock(problem.dimension);
    this.#ritz = new Float64Array(problem.dimension);
    this.#residual = new Float64Array(problem.dimension);
    this.#correction = new Float64Array(problem.dimension);
  }

  get size(): number {
    return this.#basis.size;
  }

  /** False if the direction has nothing that the basis lacks. */
  extend(direction: Float64Array, group: number): boolean {
    const size = this.size;
    if (size === this.#problem.dimension) return false;
    const vector = this.#basis.spare();
    vector.set(direction);
    this.#problem.restoreSymmetry?.(vector);
    if (!this.#basis.orthonormalise(vector, SMALLEST_NEW_DIRECTION)) return false;
    this.#basis.append();
    this.#groups.push(group);
    const product = this.#products.append();
    this.#problem.apply(vector, product);

    this.#matrix = border(this.#matrix, size, this.#basis.dots(product));
    this.#squared = border(this.#squared, size, this.#products.dots(product));
    return true;
  }

  /** False if the matrix is not finite. */
  diagonalise(): boolean {
    if (!this.#matrix.every(Number.isFinite)) return false;
    const { values, vectors } = symmetricEigen(this.#matrix, this.size);
    this.values = values;
    this.#coefficients = vectors;
    this.#columns = this.size;
    this.#formed = undefined;
    this.#groupOfValue = Array.from(values, (_, k) => this.#largestGroup(k));
    return true;
  }

  /** `count`, or more if further values are degenerate with the last. */
  countThroughDegenerate(count: number): number {
    const limit = this.values[count - 1] + DEGENERACY_TOLERANCE;
    while (count < this.values.length && this.values[count] <= limit) count++;
    return count;
  }

  #largestGroup(k: number): number {
    const weights = new Map<number, number>();
    this.#groups.forEach((group, i) => {
      const weight = this.#coefficients[i * this.#columns + k] ** 2;
      weights.set(group, (weights.get(group) ?? 0) + weight);
    });
    return [...weights].reduce((best, entry) => (entry[1] > best[1] ? entry : best))[0];
  }

  /** The lowest `wanted` eigenvectors and the next one of every group. */
  pursuable(wanted: number): number[] {
    const guarded = new Set<number>();
    return Array.from(this.values.keys()).filter((k) => {
      if (k < wanted) return true;
      const isNext = !guarded.has(this.#groupOfValue[k]);
      guarded.add(this.#groupOfValue[k]);
      return isNext;
    });
  }

  /**
   * Replaces the basis by what may be pursued in it, and by other low eigenvectors up to `size` of them. Returns
   * the new numbers of the eigenvectors listed.
   */
  collapse(wanted: number, size: number, listed: readonly number[]): number[] {
    const pursuable = new Set(this.pursuable(wanted));
    let others = size - pursuable.size;
    const kept = Array.from(this.values.keys()).filter((k) => pursuable.has(k) || others-- > 0);
    const coefficients = this.#coefficientsOf(kept);
    const count = kept.length;
    this.#formed = undefined;
    this.#basis.rotate(coefficients, this.#columns, count);
    this.#products.rotate(coefficients, this.#columns, count);
    this.#squared = congruence(this.#squared, coefficients, this.#columns, count);
    this.values = Float64Array.from(kept, (k) => this.values[k]);
    this.#groupOfValue = kept.map((k) => this.#groupOfValue[k]);
    this.#groups = this.#groupOfValue.slice();
    this.#columns = count;
    this.#matrix = new Float64Array(count * count);
    this.#coefficients = new Float64Array(count * count);
    for (let k = 0; k < count; k++) {
      this.#matrix[k * count + k] = this.values[k];
      this.#coefficients[k * count + k] = 1;
    }
    return listed.map((k) => kept.indexOf(k));
  }

  /** The listed eigenvectors over the basis, as columns. */
  #coefficientsOf(kept: readonly number[]): Float64Array {
    const coefficients = new Float64Array(this.#columns * kept.length);
    for (let i = 0; i < this.#columns; i++) {
      kept.forEach((k, column) => {
        coefficients[i * kept.length + column] = this.#coefficients[i * this.#columns + k];
      });
    }
    return coefficients;
  }

  /** Length of the residual of eigenvector k, without forming it as long as it is well above rounding: ‖Ax‖² − θ². */
  residualNorm(k: number): number {
    const [square] = congruence(this.#squared, this.#coefficientsOf([k]), this.#columns, 1);
    const estimate = square - this.values[k] ** 2;
    return estimate > ROUNDED_SQUARE * square ? Math.sqrt(estimate) : this.residual(k);
  }

  /** Forms eigenvector k and its residual, unless they stand formed; returns the residual's length. */
  residual(k: number): number {
    if (this.#formed?.k === k) return this.#formed.length;
    const size = this.#columns;
    this.#basis.combineInto(this.#ritz, this.#coefficients, size, size, k);
    this.#products.combineInto(this.#residual, this.#coefficients, size, size, k);
    addScaledInto(this.#residual, -this.values[k], this.#ritz);
    this.#formed = { k, length: Math.sqrt(dot(this.#residual, this.#residual)) };
    return this.#formed.length;
  }

  /** Adds the correction of each listed eigenvector; false if none of them brought anything new. */
  correct(unfinished: readonly number[]): boolean {
    let isExtended = false;
    for (const k of unfinished) {
      this.residual(k);
      this.#problem.precondition(this.#residual, this.values[k], this.#correction);
      const ritz = this.#ritz;
      const scratch = this.#residual;
      this.#formed = undefined;
      this.#problem.precondition(ritz, this.values[k], scratch);
      const overlap = dot(ritz, scratch);
      if (overlap !== 0) addScaledInto(this.#correction, -dot(ritz, this.#correction) / overlap, scratch);
      if (this.extend(this.#correction, this.#groupOfValue[k])) isExtended = true;
    }
    return isExtended;
  }

  /** Ends the use of the subspace: its basis becomes the eigenvectors. */
  result(roots: number): Pick<DavidsonResult, 'values' | 'vectors' | 'residuals'> {
    if (this.values.length === 0) return { values: this.values, vectors: [], residuals: new Float64Array(0) };
    const count = this.countThroughDegenerate(Math.min(roots, this.values.length));
    const residuals = Float64Array.from({ length: count }, (_, k) => this.residual(k));
    const kept = Array.from({ length: count }, (_, k) => k);
    this.#basis.rotate(this.#coefficientsOf(kept), this.#columns, count);
    return {
      values: this.values.slice(0, count),
      vectors: Array.from({ length: count }, (_, k) => this.#basis.at(k)),
      residuals,
    };
  }
}

/** A symmetric matrix with one more row and column. */
function border(matrix: Float64Array, size: number, last: Float64Array): Float64Array {
  const bordered = new Float64Array((size + 1) ** 2);
  for (let i = 0; i < size; i++) {
    bordered.set(matrix.subarray(i * size, (i + 1) * size), i * (size + 1));
  }
  last.forEach((element, i) => {
    bordered[i * (size + 1) + size] = element;
    bordered[size * (size + 1) + i] = element;
  });
  return bordered;
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

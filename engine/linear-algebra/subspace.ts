import { congruence, multiply } from './dense';
import { symmetricEigen } from './symmetric-eigen';
import { plainVectors, type VectorAlgebra } from './vector-algebra';
import { VectorBlock } from './vector-block';

/** A large symmetric matrix as its action on vectors of length `dimension`. */
export interface DavidsonProblem {
  readonly dimension: number;
  /** product ← matrix·vector */
  apply(vector: Float64Array, product: Float64Array): void;
  /** result ← (M − shift)⁻¹·vector with M symmetric, near the matrix, and denominators kept off zero */
  precondition(vector: Float64Array, shift: number, result: Float64Array): void;
  /** removes what rounding has added against a symmetry of the matrix from a new direction, in place */
  restoreSymmetry?(direction: Float64Array): void;
  /** at least as many as roots, linearly independent; one that is a function writes itself into a vector of zeros */
  readonly guesses: readonly (Float64Array | ((into: Float64Array) => void))[];
  /** what handles the vectors; default: plain TypeScript */
  readonly algebra?: VectorAlgebra;
}

/** A direction of unit length that keeps less than this beside the basis brings nothing but rounding errors. */
const SMALLEST_NEW_DIRECTION = 1e-9;
/** A difference of squares this small beside them has lost most of its digits. */
const ROUNDED_SQUARE = 1e-11;

/** Coefficients below this are rounding errors. */
const ROUNDING = 1e-14;
/** What an eigenvector has changed by, beside what it has become, if it is more than this. */
const SMALLEST_CHANGE = 1e-6;

/** Basis, products of the matrix with it, and the matrix within it. Takes its vectors when they are first needed. */
export class Subspace {
  readonly #problem: DavidsonProblem;
  readonly #algebra: VectorAlgebra;
  readonly #basis: VectorBlock;
  readonly #products: VectorBlock;
  #ritz: Float64Array | undefined;
  /** size×size, row-major */
  #matrix: Float64Array = new Float64Array(0);
  /** scalar products of the products, size×size */
  #squared: Float64Array = new Float64Array(0);
  /** of the last diagonalisation; columns over the basis as it was then */
  #coefficients: Float64Array = new Float64Array(0);
  #columns = 0;
  /** coefficients of the lowest eigenvectors at the diagonalisation before, and how many basis vectors there were */
  #before: { readonly coefficients: Float64Array; readonly columns: number } | undefined;
  /** group of each basis vector */
  #groups: number[] = [];
  /** group of each eigenvector: where most of it lies */
  #groupOfValue: number[] = [];
  /** which residual stands formed in the spare product, with its length */
  #formed: { readonly k: number; readonly length: number } | undefined;
  values: Float64Array = new Float64Array(0);

  constructor(problem: DavidsonProblem) {
    this.#problem = problem;
    this.#algebra = problem.algebra ?? plainVectors;
    this.#basis = new VectorBlock(problem.dimension, this.#algebra);
    this.#products = new VectorBlock(problem.dimension, this.#algebra);
  }

  get size(): number {
    return this.#basis.size;
  }

  /** The guess with this number becomes a group of its own. */
  begin(guess: DavidsonProblem['guesses'][number], group: number): boolean {
    if (this.size === this.#problem.dimension) return false;
    const vector = this.#basis.spare();
    if (typeof guess === 'function') guess(vector.fill(0));
    else vector.set(guess);
    return this.#extend(group);
  }

  /** Takes the spare vector into the basis; false if it has nothing that the basis lacks. */
  #extend(group: number): boolean {
    const size = this.size;
    if (size === this.#problem.dimension) return false;
    const vector = this.#basis.spare();
    this.#problem.restoreSymmetry?.(vector);
    if (!this.#basis.orthonormalise(vector, SMALLEST_NEW_DIRECTION)) return false;
    this.#basis.append();
    this.#groups.push(group);
    this.#formed = undefined;
    const product = this.#products.append();
    this.#problem.apply(vector, product);

    const sums = this.#algebra.dots([...this.#basis.members, ...this.#products.members], product);
    this.#matrix = border(this.#matrix, size, sums.subarray(0, size + 1));
    this.#squared = border(this.#squared, size, sums.subarray(size + 1));
    return true;
  }

  /** False if the matrix is not finite. */
  diagonalise(): boolean {
    if (!this.#matrix.every(Number.isFinite)) return false;
    this.#before = { coefficients: this.#coefficients, columns: this.#columns };
    const { values, vectors } = symmetricEigen(this.#matrix, this.size);
    this.values = values;
    this.#coefficients = vectors;
    this.#columns = this.size;
    this.#formed = undefined;
    this.#groupOfValue = Array.from(values, (_, k) => this.#largestGroup(k));
    return true;
  }

  #largestGroup(k: number): number {
    const weights = new Map<number, number>();
    this.#groups.forEach((group, i) => {
      const weight = this.#coefficients[i * this.#columns + k] ** 2;
      weights.set(group, (weights.get(group) ?? 0) + weight);
    });
    return [...weights].reduce((best, entry) => (entry[1] > best[1] ? entry : best))[0];
  }

  /** Beside the lowest `wanted` eigenvectors the next one of every group. */
  guards(wanted: number): number[] {
    const guarded = new Set<number>();
    return Array.from(this.values.keys()).filter((k) => {
      if (k < wanted) return false;
      const isNext = !guarded.has(this.#groupOfValue[k]);
      guarded.add(this.#groupOfValue[k]);
      return isNext;
    });
  }

  /**
   * Replaces the basis by the lowest `wanted` eigenvectors, guards, other low ones up to `size` of them, and what the
   * wanted ones have changed by since the diagonalisation before, up to `most` in all.
   */
  collapse(wanted: number, guards: readonly number[], size: number, most: number): void {
    let others = size - wanted - guards.length;
    const kept = Array.from(this.values.keys())
      .filter((k) => k < wanted || guards.includes(k) || others-- > 0)
      .slice(0, most);
    const changes = this.#changesOf(wanted, kept, most - kept.length);
    const count = kept.length + changes.length;
    const columns = this.#columns;
    const chosen = new Float64Array(columns * count);
    for (let i = 0; i < columns; i++) {
      kept.forEach((k, column) => {
        chosen[i * count + column] = this.#coefficients[i * columns + k];
      });
      changes.forEach(({ change }, c) => {
        chosen[i * count + kept.length + c] = change[i];
      });
    }
    this.#basis.rotate(chosen, count);
    this.#products.rotate(chosen, count);
    this.#matrix = congruence(this.#matrix, chosen, columns, count);
    this.#squared = congruence(this.#squared, chosen, columns, count);
    this.#groups = [
      ...kept.map((k) => this.#groupOfValue[k]),
      ...changes.map(({ root }) => this.#groupOfValue[root]),
    ];
    this.#coefficients = new Float64Array(0);
    this.#columns = 0;
    this.diagonalise();
  }

  /** Over the basis: the lowest eigenvectors of the diagonalisation before, less what lies in those kept; the least converged first. */
  #changesOf(
    wanted: number,
    kept: readonly number[],
    most: number,
  ): { root: number; change: Float64Array }[] {
    const columns = this.#columns;
    const { coefficients, columns: before } = this.#before!;
    const changes: { root: number; change: Float64Array }[] = [];
    const isKept = new Set(kept);
    // roots that are done change by no more than rounding, and must not take the places of others
    const squares = Array.from(
      { length: Math.min(wanted, before) },
      (_, k) => this.#residualSquare(k).estimate,
    );
    const roots = Array.from(squares.keys()).sort((a, b) => squares[b] - squares[a]);
    for (const k of roots) {
      if (changes.length >= most) break;
      const old = Float64Array.from({ length: columns }, (_, i) =>
        i < before ? coefficients[i * before + k] : 0,
      );
      // over the eigenvectors, where those kept are left out
      const part = multiply(old, this.#coefficients, 1, columns, columns).map((c, l) =>
        isKept.has(l) ? 0 : c,
      );
      const change = multiply(this.#coefficients, part, columns, columns, 1);
      const block = new VectorBlock(columns);
      for (const other of changes) block.append().set(other.change);
      if (block.orthonormalise(change, SMALLEST_CHANGE)) changes.push({ root: k, change });
    }
    return changes;
  }

  /** Eigenvector k; stands until the next is formed. */
  eigenvector(k: number): Float64Array {
    const factors = this.#column(k);
    // after a collapse it stands in the basis
    const others = factors.map((factor) => Math.abs(factor)).sort();
    if (others.subarray(0, -1).every((factor) => factor < ROUNDING)) {
      return this.#basis.at(factors.findIndex((factor) => Math.abs(factor) >= ROUNDING));
    }
    this.#ritz ??= this.#algebra.take(this.#problem.dimension);
    this.#algebra.combine(this.#ritz, 0, this.#basis.members.slice(0, this.#columns), factors);
    return this.#ritz;
  }

  #column(k: number): Float64Array {
    return Float64Array.from({ length: this.#columns }, (_, i) => this.#coefficients[i * this.#columns + k]);
  }

  /** Length of the residual of eigenvector k, without forming it as long as it is well above rounding: ‖Ax‖² − θ². */
  residualNorm(k: number): number {
    const { square, estimate } = this.#residualSquare(k);
    return estimate > ROUNDED_SQUARE * square ? Math.sqrt(estimate) : this.#formResidual(k);
  }

  /** ‖Ax‖² of eigenvector k, and ‖Ax‖² − θ², whose rounding errors are those of the former. */
  #residualSquare(k: number): { square: number; estimate: number } {
    const [square] = congruence(this.#squared, this.#column(k), this.#columns, 1);
    return { square, estimate: square - this.values[k] ** 2 };
  }

  /** Leaves the residual of eigenvector k in the spare product, unless it stands there; returns its length. */
  #formResidual(k: number): number {
    if (this.#formed?.k === k) return this.#formed.length;
    const vectors = [
      ...this.#products.members.slice(0, this.#columns),
      ...this.#basis.members.slice(0, this.#columns),
    ];
    const factors = this.#column(k);
    const residual = this.#products.spare();
    const square = this.#algebra.combine(residual, 0, vectors, [
      ...factors,
      ...factors.map((factor) => -this.values[k] * factor),
    ]);
    this.#formed = { k, length: Math.sqrt(square) };
    return this.#formed.length;
  }

  /**
   * Leaves the correction t = (M − shift)⁻¹(r − εx) of eigenvector x = k in the spare vector, ε such that it is
   * orthogonal to x. Returns Σ|r·t| over the elements: by how much it lowers the value, to second order.
   */
  formCorrection(k: number, shift: number): number {
    this.#formResidual(k);
    this.#formed = undefined;
    const residual = this.#products.spare();
    const correction = this.#basis.spare();
    const vector = this.eigenvector(k);
    this.#problem.precondition(vector, shift, correction);
    const [ofVector, ofResidual] = this.#algebra.dots([vector, residual], correction);
    if (ofVector !== 0) this.#algebra.combine(residual, 1, [vector], [-ofResidual / ofVector]);
    this.#problem.precondition(residual, shift, correction);
    let lowering = 0;
    for (let i = 0; i < residual.length; i++) lowering += Math.abs(residual[i] * correction[i]);
    return lowering;
  }

  /** Extends the basis by the correction of eigenvector k; false if that brought nothing new. */
  correct(k: number, shift: number): boolean {
    this.formCorrection(k, shift);
    return this.#extend(this.#groupOfValue[k]);
  }

  /** Extends the basis by the residual of eigenvector k; false if that brought nothing new. */
  descend(k: number): boolean {
    this.#formResidual(k);
    this.#basis.spare().set(this.#products.spare());
    return this.#extend(this.#groupOfValue[k]);
  }

  /** The lowest eigenvectors, in the vectors of the basis; ends the use of the subspace, whose other memory is given back. */
  result(count: number) {
    const residuals = Float64Array.from({ length: count }, (_, k) => this.#formResidual(k));
    const columns = this.#columns;
    const kept = new Float64Array(this.size * count);
    for (let i = 0; i < columns; i++) {
      for (let k = 0; k < count; k++) kept[i * count + k] = this.#coefficients[i * columns + k];
    }
    this.#basis.rotate(kept, count);
    if (this.#ritz) this.#algebra.giveBack(this.#ritz);
    for (const product of this.#products.release()) this.#algebra.giveBack(product);
    return { values: this.values.slice(0, count), vectors: this.#basis.release(), residuals };
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

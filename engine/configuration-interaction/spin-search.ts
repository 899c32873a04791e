import { SMALLEST_WEIGHT } from '../linear-algebra/davidson';
import { addScaledInto, dot } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';

/** How the S² of a space acts, where H keeps the spin of its vectors. */
export interface SpinOperator {
  /** S(S + 1) of every spin that a vector can have, rising */
  readonly values: readonly number[];
  /** product ← S²·vector */
  apply(vector: Float64Array, product: Float64Array): void;
}

/** What holds of the lowest states of one spin before they are converged. */
export interface SpinSearch {
  /** rough vectors of the lowest states, orthonormal; none where the space has no vector of that spin */
  readonly vectors: readonly Float64Array[];
  /** their energies, rising, hartree: none lies below that of the state in its place */
  readonly values: Float64Array;
  /**
   * below the lowest state of the spin, as far as the lowest vector holds `SMALLEST_WEIGHT` of it, hartree; Infinity where
   * there is none
   */
  readonly lowerBound: number;
  /** products with H */
  readonly products: number;
}

/** Steps, at most: they bring out what lies a hundredth of the width of H below the rest. */
const MOST_STEPS = 60;
/** … and at least: before, the start's chance share of higher states can pass for the lowest. */
const FEWEST_STEPS = 24;
/** A step this short, hartree, has nowhere left to go. */
const SHORTEST_STEP = 1e-8;
/** ‖r‖ of the lowest vector, hartree, at which it tells enough. */
const ROUGH_RESIDUAL = 0.03;
/** What a vector may have of other spins, of its own length. */
const PURE = 1e-11;
/** A vector that loses this much of its square in a projection has nothing of that spin. */
const NOTHING_LEFT = 1e-16;

/**
 * The lowest states of one spin, roughly, by the method of Lanczos from a start without any other symmetry. H may have
 * symmetries that no orbital and no determinant shows, as at a stretched multiple bond where the orbitals have broken
 * the molecule's; guesses from determinants can then all lack what the lowest state is made of. An arbitrary start
 * lacks nothing, and Lanczos's method, unlike one with a preconditioner, favours nothing but low energy.
 *
 * Source: C. Lanczos, J. Res. Natl. Bur. Stand. 45, 255 (1950); here with full orthogonalisation.
 *
 * @param start - arbitrary, of the space's length; better with a share of what is known of the lowest states
 * @param value - S(S + 1), one of `spin.values`
 * @param count - rough vectors wanted
 */
export function searchSpin(
  { apply }: { apply(vector: Float64Array, product: Float64Array): void },
  spin: SpinOperator,
  start: Float64Array,
  value: number,
  count: number,
): SpinSearch {
  const first = start.slice();
  projectOnSpin(spin, first, value);
  const square = dot(first, first);
  if (square < NOTHING_LEFT * dot(start, start)) {
    return {
      vectors: [],
      values: new Float64Array(0),
      lowerBound: Number.POSITIVE_INFINITY,
      products: 0,
    };
  }
  const basis = [first.map((element) => element / Math.sqrt(square))];
  const diagonal: number[] = [];
  const beside: number[] = [];
  for (;;) {
    const last = basis[basis.length - 1];
    const next = new Float64Array(last.length);
    apply(last, next);
    diagonal.push(dot(last, next));
    // twice: once leaves what rounding has spared
    for (let pass = 0; pass < 2; pass++) {
      for (const vector of basis) addScaledInto(next, -dot(vector, next), vector);
    }
    // last, as what rounding has left of other spins in the basis comes back with it, and would grow from step to step
    projectOnSpin(spin, next, value);
    const length = Math.sqrt(dot(next, next));
    const size = basis.length;
    const { values, vectors } = symmetricEigen(tridiagonal(diagonal, beside), size);
    const residual = length * Math.abs(vectors[(size - 1) * size]);
    const isEnough = size >= FEWEST_STEPS && residual < ROUGH_RESIDUAL;
    if (isEnough || length < SHORTEST_STEP || size === MOST_STEPS) {
      return {
        vectors: Array.from({ length: Math.min(count, size) }, (_, k) => combine(basis, vectors, k)),
        values: values.slice(0, count),
        lowerBound: values[0] - residual / Math.sqrt(SMALLEST_WEIGHT),
        products: size,
      };
    }
    beside.push(length);
    basis.push(next.map((element) => element / length));
  }
}

/** Leaves of a vector the part of one spin, in place: S² minus the value of every other spin leaves nothing of those. */
export function projectOnSpin({ values, apply }: SpinOperator, vector: Float64Array, value: number): void {
  const product = new Float64Array(vector.length);
  apply(vector, product);
  if (isEigenvector(vector, product, value)) return;
  values
    .filter((other) => other !== value)
    .forEach((other, k) => {
      if (k > 0) apply(vector, product);
      for (let i = 0; i < vector.length; i++) vector[i] = (product[i] - other * vector[i]) / (value - other);
    });
}

function isEigenvector(vector: Float64Array, product: Float64Array, value: number): boolean {
  let apart = 0;
  let square = 0;
  for (let i = 0; i < vector.length; i++) {
    apart += (product[i] - value * vector[i]) ** 2;
    square += vector[i] ** 2;
  }
  return apart <= PURE ** 2 * square;
}

function tridiagonal(diagonal: readonly number[], beside: readonly number[]): Float64Array {
  const size = diagonal.length;
  const matrix = new Float64Array(size * size);
  diagonal.forEach((element, i) => {
    matrix[i * size + i] = element;
  });
  beside.forEach((element, i) => {
    matrix[i * size + i + 1] = element;
    matrix[(i + 1) * size + i] = element;
  });
  return matrix;
}

function combine(basis: readonly Float64Array[], columns: Float64Array, column: number): Float64Array {
  const vector = new Float64Array(basis[0].length);
  basis.forEach((member, i) => {
    addScaledInto(vector, columns[i * basis.length + column], member);
  });
  return vector;
}

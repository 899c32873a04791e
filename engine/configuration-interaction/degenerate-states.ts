import { addScaledInto, dot } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';

/** A run of states first … last − 1 that share their values so far. */
export interface Run {
  readonly first: number;
  readonly last: number;
}

/** Splits runs wherever neighbouring values lie further apart than the tolerance. */
export function splitRuns(runs: readonly Run[], values: ArrayLike<number>, tolerance: number): Run[] {
  const split: Run[] = [];
  for (const { first, last } of runs) {
    let start = first;
    for (let k = first + 1; k <= last; k++) {
      if (k < last && Math.abs(values[k] - values[k - 1]) <= tolerance) continue;
      split.push({ first: start, last: k });
      start = k;
    }
  }
  return split;
}

/**
 * Rotates the vectors of each run among themselves until a second symmetric operator is diagonal within it:
 * an eigensolver returns a degenerate set in any mixture, and only such an operator makes it definite.
 *
 * @param energies - of the vectors; become the expectation values of the rotated ones
 * @returns expectation values of the operator, rising within each run
 */
export function diagonaliseWithin(
  runs: readonly Run[],
  energies: Float64Array,
  vectors: readonly Float64Array[],
  apply: (vector: Float64Array, product: Float64Array) => void,
): Float64Array {
  const expectations = new Float64Array(vectors.length);
  for (const { first, last } of runs) {
    const size = last - first;
    const matrix = new Float64Array(size * size);
    const product = new Float64Array(vectors[first].length);
    for (let i = 0; i < size; i++) {
      apply(vectors[first + i], product);
      for (let j = 0; j < size; j++) matrix[i * size + j] = dot(vectors[first + j], product);
    }
    if (size === 1) {
      expectations[first] = matrix[0];
      continue;
    }
    const { values, vectors: rotation } = symmetricEigen(matrix, size);
    expectations.set(values, first);
    rotate(vectors.slice(first, last), rotation);
    const before = energies.slice(first, last);
    for (let k = 0; k < size; k++) {
      energies[first + k] = before.reduce((sum, energy, i) => sum + rotation[i * size + k] ** 2 * energy, 0);
    }
  }
  return expectations;
}

/** An operator that tells degenerate states apart; expectation values within `tolerance` count as equal. */
export interface DistinguishingOperator {
  readonly tolerance: number;
  apply(vector: Float64Array, product: Float64Array): void;
}

/**
 * Makes the states of every degenerate set eigenvectors of the first operator, those still equal eigenvectors of
 * the second, and so on. In place; energies become expectation values.
 */
export function makeDegenerateStatesDefinite(
  energies: Float64Array,
  vectors: readonly Float64Array[],
  energyTolerance: number,
  operators: readonly DistinguishingOperator[],
): void {
  let runs = splitRuns([{ first: 0, last: vectors.length }], energies, energyTolerance);
  for (const { tolerance, apply } of operators) {
    runs = runs.filter((run) => run.last - run.first > 1);
    if (runs.length === 0) return;
    runs = splitRuns(runs, diagonaliseWithin(runs, energies, vectors, apply), tolerance);
  }
}

function rotate(vectors: readonly Float64Array[], rotation: Float64Array): void {
  const size = vectors.length;
  const before = vectors.map((vector) => vector.slice());
  vectors.forEach((vector, k) => {
    vector.fill(0);
    before.forEach((old, i) => {
      addScaledInto(vector, rotation[i * size + k], old);
    });
  });
}

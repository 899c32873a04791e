import { DEGENERACY_TOLERANCE } from '../linear-algebra/davidson';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import type { LowestStates, SectorProblem } from './sector-problem';

/**
 * The lowest states of a sector by diagonalising the whole of its matrix. A degenerate set that `states` cuts is whole,
 * and its members are in any mixture.
 *
 * Cost: about 5d³ for d basis states.
 */
export function lowestDirectly(
  { dimension, elementsAmong }: Pick<SectorProblem, 'dimension' | 'elementsAmong'>,
  states: number,
): LowestStates {
  const { hamiltonian } = elementsAmong(Int32Array.from({ length: dimension }, (_, place) => place));
  const matrix = new Float64Array(dimension * dimension);
  for (let i = 0; i < dimension; i++) {
    for (let j = 0; j <= i; j++) matrix[i * dimension + j] = hamiltonian(i, j);
  }
  const { values: all, vectors: columns } = symmetricEigen(matrix, dimension);
  const highest = all[Math.min(states, dimension) - 1] + DEGENERACY_TOLERANCE;
  const values = all.filter((value) => value <= highest);
  const vectors = Array.from(values, (_, k) => {
    const vector = new Float64Array(dimension);
    for (let i = 0; i < dimension; i++) vector[i] = columns[i * dimension + k];
    return vector;
  });
  return { values, vectors, iterations: 0, termination: { kind: 'converged' } };
}

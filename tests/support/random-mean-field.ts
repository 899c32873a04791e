import { packedPair } from '../../engine/integrals/orbital-integrals';
import type { MeanFieldProblem } from '../../engine/self-consistent-field/mean-field-problem';
import { randomArray, randomSymmetric, seededRandom } from './random';

/**
 * A mean-field problem that belongs to no molecule: random symmetric core Hamiltonian with spread diagonal,
 * overlap near 1, and a repulsion Σ_P B_P(pq)·B_P(rs), which is positive as a real one is.
 */
export function randomMeanFieldProblem(n: number, seed: number): MeanFieldProblem {
  const random = seededRandom(seed);
  const overlap = randomSymmetric(n, random).map((value, k) => (k % (n + 1) === 0 ? 1 : 0.1 * value));
  const coreHamiltonian = randomSymmetric(n, random).map((value, k) =>
    k % (n + 1) === 0 ? -6 + 1.5 * Math.floor(k / n) : 0.3 * value,
  );
  const pairs = (n * (n + 1)) / 2;
  const vectors = Array.from({ length: 2 * n }, () =>
    randomArray(pairs, random).map((value) => 0.25 * value),
  );
  const repulsion = new Float64Array((pairs * (pairs + 1)) / 2);
  for (let pq = 0; pq < pairs; pq++) {
    for (let rs = 0; rs <= pq; rs++) {
      for (const vector of vectors) repulsion[packedPair(pq, rs)] += vector[pq] * vector[rs];
    }
  }
  return { functionCount: n, overlap, coreHamiltonian, repulsion, nuclearRepulsion: 0.7 };
}

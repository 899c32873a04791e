import { Matrix, solve } from 'ml-matrix';
import { dot } from '../linear-algebra/dense';

/** Fock matrices kept. More adds nothing but near-dependence. */
const HISTORY = 8;

/**
 * Direct inversion in the iterative subspace on the commutator FDS − SDF
 * (P. Pulay, Chem. Phys. Lett. 73, 393 (1980); J. Comput. Chem. 3, 556 (1982)).
 */
export class CommutatorExtrapolation {
  private readonly focks: Float64Array[] = [];
  private readonly errors: Float64Array[] = [];

  /** Takes a Fock matrix with its error and returns the extrapolated Fock matrix. */
  extrapolate(fock: Float64Array, error: Float64Array): Float64Array {
    this.focks.push(fock);
    this.errors.push(error);
    if (this.focks.length > HISTORY) this.forgetOldest();
    while (this.focks.length > 1) {
      const weights = this.weights();
      if (weights) return combine(this.focks, weights);
      this.forgetOldest();
    }
    return fock;
  }

  private forgetOldest(): void {
    this.focks.shift();
    this.errors.shift();
  }

  /** Weights with sum 1 that minimise the norm of the combined error; undefined where they are not determined. */
  private weights(): number[] | undefined {
    const k = this.errors.length;
    const scale = 1 / Math.max(dot(this.errors[k - 1], this.errors[k - 1]), Number.MIN_VALUE);
    const equations = Matrix.zeros(k + 1, k + 1);
    for (let i = 0; i < k; i++) {
      for (let j = 0; j <= i; j++) {
        const product = scale * dot(this.errors[i], this.errors[j]);
        equations.set(i, j, product);
        equations.set(j, i, product);
      }
      equations.set(i, k, 1);
      equations.set(k, i, 1);
    }
    const right = Matrix.zeros(k + 1, 1);
    right.set(k, 0, 1);
    let solution: number[];
    try {
      solution = solve(equations, right).to1DArray().slice(0, k);
    } catch {
      return undefined;
    }
    // Huge weights mean cancellation among nearly equal errors: the extrapolation would be noise.
    return solution.every((weight) => Math.abs(weight) < 1e4) ? solution : undefined;
  }
}

function combine(matrices: readonly Float64Array[], weights: readonly number[]): Float64Array {
  const sum = new Float64Array(matrices[0].length);
  matrices.forEach((matrix, k) => {
    for (let i = 0; i < sum.length; i++) sum[i] += weights[k] * matrix[i];
  });
  return sum;
}

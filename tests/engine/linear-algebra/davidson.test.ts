import { describe, expect, it } from 'vitest';
import {
  type DavidsonOptions,
  davidsonVectorCount,
  lowestEigenpairs,
  preconditionDiagonally,
} from '../../../engine/linear-algebra/davidson';
import { dot, multiply } from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { UNATTENDED } from '../../../engine/termination';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';

const OPTIONS: DavidsonOptions = {
  roots: 1,
  residualTolerance: 1e-8,
  maximumIterations: 200,
  maximumVectors: 30,
  control: UNATTENDED,
  stage: 'test',
};

function solve(matrix: Float64Array, n: number, guessCount: number, options: Partial<DavidsonOptions>) {
  const diagonal = Float64Array.from({ length: n }, (_, i) => matrix[i * (n + 1)]);
  const order = Array.from(diagonal.keys()).sort((i, j) => diagonal[i] - diagonal[j]);
  const guesses = order.slice(0, guessCount).map((place) => {
    const guess = new Float64Array(n);
    guess[place] = 1;
    return guess;
  });
  let products = 0;
  const result = lowestEigenpairs(
    {
      dimension: n,
      guesses,
      apply: (vector, product) => {
        products++;
        product.set(multiply(matrix, vector, n, n, 1));
      },
      precondition: preconditionDiagonally(diagonal, 1e-2),
    },
    { ...OPTIONS, ...options },
  );
  return { ...result, products };
}

/** Q·diag(values)·Qᵀ with a random orthogonal Q near 1 (or far from it, `mixing` large). */
function matrixOfSpectrum(values: readonly number[], mixing: number, seed: number): Float64Array {
  const n = values.length;
  const generator = randomSymmetric(n, seededRandom(seed)).map(
    (value, k) => (k % (n + 1) === 0 ? Math.floor(k / n) : 0) + mixing * value,
  );
  const { vectors } = symmetricEigen(generator, n);
  const matrix = new Float64Array(n * n);
  values.forEach((value, k) => {
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) matrix[i * n + j] += value * vectors[i * n + k] * vectors[j * n + k];
    }
  });
  return matrix;
}

describe('lowestEigenpairs', () => {
  it.each([
    [150, 1, 2],
    [150, 4, 6],
    [200, 8, 10],
  ])(
    'independent: random symmetric matrix of %i rows, %i roots from %i guesses: equals dense diagonalisation',
    (n, roots, guesses) => {
      const matrix = randomSymmetric(n, seededRandom(n + roots)).map(
        (value, k) => 0.3 * value + (k % (n + 1) === 0 ? Math.sqrt(k) / 10 : 0),
      );
      const exact = symmetricEigen(matrix, n).values;
      const { values, vectors, residuals, termination } = solve(matrix, n, guesses, {
        roots,
        maximumVectors: 40,
      });
      expect(termination).toEqual({ kind: 'converged' });
      expect(values).toHaveLength(roots);
      values.forEach((value, k) => {
        expect(Math.abs(value - exact[k])).toBeLessThan(1e-11);
        const product = multiply(matrix, vectors[k], n, n, 1);
        const residual = Math.sqrt(product.reduce((sum, p, i) => sum + (p - value * vectors[k][i]) ** 2, 0));
        expect(residual).toBeLessThan(2e-8);
        expect(Math.abs(residual - residuals[k])).toBeLessThan(1e-11);
        vectors.forEach((other, l) => {
          expect(Math.abs(dot(vectors[k], other) - (k === l ? 1 : 0))).toBeLessThan(1e-12);
        });
      });
    },
  );

  it('identity: all members of a degenerate set cut by the number of roots', () => {
    const values = [-3, -2, -2, -2, ...Array.from({ length: 96 }, (_, k) => k / 10)];
    const matrix = matrixOfSpectrum(values, 0.02, 5);
    const result = solve(matrix, 100, 5, { roots: 2 });
    expect(result.termination).toEqual({ kind: 'converged' });
    expect(result.values).toHaveLength(4);
    result.values.forEach((value, k) => {
      expect(Math.abs(value - values[k])).toBeLessThan(1e-12);
    });
  });

  it('identity: a cluster of eigenvalues 1e-4 apart is resolved', () => {
    const values = [-1, -0.9999, -0.9998, -0.9997, ...Array.from({ length: 116 }, (_, k) => k / 20)];
    const result = solve(matrixOfSpectrum(values, 0.02, 6), 120, 6, { roots: 3 });
    expect(result.termination).toEqual({ kind: 'converged' });
    result.values.forEach((value, k) => {
      expect(Math.abs(value - values[k])).toBeLessThan(1e-11);
    });
  });

  it('identity: a diagonal matrix is done at once, also where its preconditioner is singular', () => {
    const values = Array.from({ length: 50 }, (_, k) => k - 7);
    const matrix = new Float64Array(2500);
    values.forEach((value, k) => {
      matrix[k * 51] = value;
    });
    const result = solve(matrix, 50, 3, { roots: 2 });
    expect(Array.from(result.values)).toEqual([-7, -6]);
    expect(result.iterations).toBe(1);
  });

  it('identity: a guard finds the lower root of a block that the first guesses do not reach', () => {
    // two blocks; the second has the higher lowest diagonal but, strongly coupled, the lower eigenvalue
    const n = 60;
    const matrix = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        if (i === j) matrix[i * n + j] = i < 30 ? i : i - 29.9;
        else if (i < 30 === j < 30) matrix[i * n + j] = i < 30 ? 0.01 : -0.3;
      }
    }
    const exact = symmetricEigen(matrix, n).values[0];
    const guarded = solve(matrix, n, 2, { roots: 1 });
    expect(Math.abs(guarded.values[0] - exact)).toBeLessThan(1e-11);
    const unguarded = solve(matrix, n, 1, { roots: 1 });
    expect(unguarded.values[0]).toBeGreaterThan(exact + 0.1);
  });

  it('identity: estimates of second order spare products, and let a guard find a lower root all the same', () => {
    const build = (coupling: number) =>
      Float64Array.from({ length: 60 * 60 }, (_, place) => {
        const [i, j] = [Math.trunc(place / 60), place % 60];
        if (i === j) return i < 30 ? i : i - 29.7;
        return i < 30 === j < 30 ? coupling * (i < 30 ? 0.05 : -0.3) : 0;
      });
    const trustsEstimates = () => true;
    const weak = solve(build(1 / 3), 60, 2, {});
    const spared = solve(build(1 / 3), 60, 2, { trustsEstimates });
    expect(Math.abs(spared.values[0] - weak.values[0])).toBeLessThan(1e-12);
    expect(spared.products).toBeLessThan(weak.products);
    const strong = build(1);
    const exact = symmetricEigen(strong, 60).values[0];
    expect(Math.abs(solve(strong, 60, 2, { trustsEstimates }).values[0] - exact)).toBeLessThan(1e-11);
    expect(solve(strong, 60, 1, { trustsEstimates }).values[0]).toBeGreaterThan(exact + 0.1);
  });

  it('identity: without guards the same root of one block from fewer products, and none of roots above the ceiling', () => {
    const values = Array.from({ length: 80 }, (_, k) => Math.sqrt(k) / 5);
    const matrix = matrixOfSpectrum(values, 0.2, 5);
    const guarded = solve(matrix, 80, 3, { residualTolerance: 1e-6 });
    const unguarded = solve(matrix, 80, 3, { residualTolerance: 1e-6, guards: false });
    expect(unguarded.termination.kind).toBe('converged');
    expect(Math.abs(unguarded.values[0] - guarded.values[0])).toBeLessThan(1e-11);
    expect(unguarded.products).toBeLessThan(guarded.products);
    const above = solve(matrix, 80, 3, { residualTolerance: 1e-6, guards: false, ceiling: -0.5 });
    expect(above.termination.kind).toBe('converged');
    expect(above.values[0]).toBeGreaterThan(-0.5);
    expect(above.products).toBeLessThan(unguarded.products);
  });

  it('identity: converges through many collapses of a small basis', () => {
    const matrix = randomSymmetric(300, seededRandom(1)).map(
      (value, k) => 0.2 * value + (k % 301 === 0 ? Math.floor(k / 300) / 20 : 0),
    );
    const exact = symmetricEigen(matrix, 300).values[0];
    const result = solve(matrix, 300, 1, { roots: 1, maximumVectors: 5 });
    expect(result.termination).toEqual({ kind: 'converged' });
    expect(result.iterations).toBeGreaterThan(5);
    expect(Math.abs(result.values[0] - exact)).toBeLessThan(1e-11);
  });

  it('identity: says why it ended', () => {
    const n = 200;
    const matrix = randomSymmetric(n, seededRandom(2));
    expect(solve(matrix, n, 1, { maximumIterations: 3 }).termination).toEqual({
      kind: 'iterationLimit',
      limit: 3,
    });
    const seen: number[] = [];
    const control = {
      isCancelled: () => seen.length >= 4,
      report: ({ iteration }: { iteration: number }) => seen.push(iteration),
    };
    expect(solve(matrix, n, 1, { control }).termination).toEqual({ kind: 'cancelled' });
    expect(seen).toEqual([1, 2, 3, 4]);
    expect(
      solve(
        matrix.map(() => Number.NaN),
        n,
        1,
        {},
      ).termination.kind,
    ).toBe('notFinite');
    expect(solve(matrix, n, 1, { residualTolerance: 0 }).termination.kind).toBe('stagnated');
    expect(() => solve(matrix, n, 1, { roots: 2 })).toThrow(RangeError);
  });

  it('identity: holds no more vectors than it says', () => {
    const n = 300;
    const matrix = matrixOfSpectrum(
      Array.from({ length: n }, (_, k) => k / 10),
      0.3,
      9,
    );
    const seen = new Set<Float64Array>();
    const guess = randomArray(n, seededRandom(4));
    const { iterations } = lowestEigenpairs(
      {
        dimension: n,
        guesses: [guess],
        apply: (vector, product) => {
          seen.add(vector).add(product);
          product.set(multiply(matrix, vector, n, n, 1));
        },
        precondition: (vector, _, result) => result.set(vector),
      },
      { ...OPTIONS, maximumVectors: 8 },
    );
    expect(iterations).toBeGreaterThan(20);
    // beside basis and products, with which residual and correction are: the eigenvector
    expect(seen.size + 1).toBeLessThanOrEqual(davidsonVectorCount(8));
    expect(seen.size + 1).toBeGreaterThan(davidsonVectorCount(6));
  });
});

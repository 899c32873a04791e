import fc from 'fast-check';
import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chooseKernels } from '../../../engine/kernels/form';
import {
  congruence,
  maximumAbsolute,
  multiplyLeftTransposed,
  multiplyRightTransposed,
} from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { inForm } from '../../support/kernel-forms';
import { randomSymmetric, seededRandom } from '../../support/random';

/** Largest |VᵀAV − values|, against the largest |A|, and largest |VᵀV − 1|. */
function defects(
  matrix: Float64Array,
  n: number,
): { residual: number; orthogonality: number; values: Float64Array } {
  const { values, vectors } = symmetricEigen(matrix, n);
  const diagonal = congruence(matrix, vectors, n, n);
  const metric = multiplyLeftTransposed(vectors, vectors, n, n, n);
  let residual = 0;
  let orthogonality = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      residual = Math.max(residual, Math.abs(diagonal[i * n + j] - (i === j ? values[i] : 0)));
      orthogonality = Math.max(orthogonality, Math.abs(metric[i * n + j] - (i === j ? 1 : 0)));
    }
  }
  return { residual: residual / Math.max(maximumAbsolute(matrix), Number.MIN_VALUE), orthogonality, values };
}

/** A matrix with the spectrum given, turned by the eigenvectors of a random one. */
function withSpectrum(spectrum: readonly number[], seed: number): Float64Array {
  const n = spectrum.length;
  const { vectors } = symmetricEigen(randomSymmetric(n, seededRandom(seed)), n);
  const scaled = Float64Array.from(vectors, (element, k) => element * spectrum[k % n]);
  return multiplyRightTransposed(scaled, vectors, n, n, n);
}

describe.each(['fast', 'plain'] as const)('symmetricEigen, %s form', (form) => {
  beforeAll(() => chooseKernels(form));
  afterAll(() => chooseKernels('fast'));

  it.each([1, 2, 7, 30, 101])('identity: VᵀAV is diagonal with rising values and VᵀV = 1, n = %i', (n) => {
    const { residual, orthogonality, values } = defects(randomSymmetric(n, seededRandom(n)), n);
    expect(residual).toBeLessThan(1e-13);
    expect(orthogonality).toBeLessThan(1e-13);
    expect(Array.from(values)).toEqual(Array.from(values.slice().sort()));
  });

  it('identity: the second-difference matrix has the eigenvalues 2 − 2cos(kπ/(n+1))', () => {
    const n = 12;
    const matrix = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      matrix[i * n + i] = 2;
      if (i > 0) {
        matrix[i * n + i - 1] = -1;
        matrix[(i - 1) * n + i] = -1;
      }
    }
    symmetricEigen(matrix, n).values.forEach((value, k) => {
      expect(Math.abs(value - (2 - 2 * Math.cos(((k + 1) * Math.PI) / (n + 1))))).toBeLessThan(1e-13);
    });
  });

  it('identity: a matrix with NaN is refused at once instead of iterating for ever', () => {
    expect(() => symmetricEigen(Float64Array.of(1, Number.NaN, Number.NaN, 1), 2)).toThrow(RangeError);
  });

  it.each([3, 17, 64, 150])('independent: the eigenvalues that ml-matrix finds, n = %i', (n) => {
    const matrix = randomSymmetric(n, seededRandom(100 + n));
    const library = new EigenvalueDecomposition(Matrix.from1DArray(n, n, Array.from(matrix)), {
      assumeSymmetric: true,
    }).realEigenvalues;
    symmetricEigen(matrix, n).values.forEach((value, k) => {
      expect(Math.abs(value - library[k])).toBeLessThan(1e-12);
    });
  });

  it.each([
    ['clustered to 1e-10', Array.from({ length: 40 }, (_, k) => (k % 4) + 1e-10 * k)],
    ['sevenfold degenerate', Array.from({ length: 42 }, (_, k) => Math.floor(k / 7) - 3)],
    ['all equal', Array.from({ length: 25 }, () => 1.25)],
    ['of rank one', Array.from({ length: 31 }, (_, k) => (k === 7 ? 4 : 0))],
    ['graded over 14 decades', Array.from({ length: 29 }, (_, k) => 10 ** (-k / 2))],
    ['in pairs of opposite sign', Array.from({ length: 36 }, (_, k) => (k % 2 ? 1 : -1) * (1 + (k >> 1)))],
  ])('identity: a spectrum %s comes back', (_, spectrum) => {
    const n = spectrum.length;
    const { residual, orthogonality, values } = defects(withSpectrum(spectrum, n), n);
    expect(residual).toBeLessThan(1e-13);
    expect(orthogonality).toBeLessThan(1e-13);
    const scale = Math.max(...spectrum.map(Math.abs));
    spectrum
      .slice()
      .sort((a, b) => a - b)
      .forEach((value, k) => {
        expect(Math.abs(values[k] - value)).toBeLessThan(1e-13 * scale * Math.sqrt(n));
      });
  });

  it('identity: the matrix of ones has the eigenvalue n once and 0 otherwise', () => {
    const n = 33;
    const { values } = symmetricEigen(new Float64Array(n * n).fill(1), n);
    expect(Math.abs(values[n - 1] - n)).toBeLessThan(1e-12);
    for (let k = 0; k < n - 1; k++) expect(Math.abs(values[k])).toBeLessThan(1e-13);
  });

  it('identity: the middle of Wilkinson’s matrix W21+ is found although its pairs agree to 1e-14', () => {
    const n = 21;
    const matrix = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      matrix[i * n + i] = Math.abs(i - 10);
      if (i > 0) matrix[i * n + i - 1] = matrix[(i - 1) * n + i] = 1;
    }
    const { residual, orthogonality, values } = defects(matrix, n);
    expect(residual).toBeLessThan(1e-14);
    expect(orthogonality).toBeLessThan(1e-13);
    expect(values[20] - values[19]).toBeLessThan(1e-13);
    // the trace, 2·(1 + … + 10)
    const total = values.reduce((sum, value) => sum + value, 0);
    expect(Math.abs(total - 110)).toBeLessThan(1e-12);
  });

  it.each([1e-300, 1e-150, 1e150, 1e300])(
    'identity: scaling the matrix by %d scales its eigenvalues',
    (factor) => {
      const n = 12;
      const matrix = randomSymmetric(n, seededRandom(5));
      const { values } = symmetricEigen(matrix, n);
      const scaled = symmetricEigen(
        matrix.map((element) => element * factor),
        n,
      );
      scaled.values.forEach((value, k) => {
        expect(Math.abs(value / factor - values[k])).toBeLessThan(1e-13);
      });
    },
  );

  it.each([1, 3])('identity: a matrix of rank %i among 60 rows: as many values that are not zero', (rank) => {
    const n = 60;
    const columns = randomSymmetric(n, seededRandom(8)).subarray(0, rank * n);
    const matrix = multiplyLeftTransposed(columns, columns, n, rank, n);
    const { residual, orthogonality, values } = defects(matrix, n);
    expect(residual).toBeLessThan(1e-13);
    expect(orthogonality).toBeLessThan(1e-13);
    expect(values.filter((value) => Math.abs(value) > 1e-12)).toHaveLength(rank);
  });

  it.each([1e-40, 1e-80, 1e-130, 1e-170])(
    'identity: rows with elements %d times as large as the others',
    (small) => {
      const n = 60;
      const matrix = randomSymmetric(n, seededRandom(8)).map((value, place) => {
        const large = Number(place >= n * 30) + Number(place % n >= 30);
        return [small, Math.sqrt(small), 1][large]! * value;
      });
      const { residual, orthogonality } = defects(matrix, n);
      expect(residual).toBeLessThan(1e-13);
      expect(orthogonality).toBeLessThan(1e-13);
    },
  );

  it('identity: the zero matrix, a diagonal one and one of size 0', () => {
    expect(symmetricEigen(new Float64Array(0), 0).values).toHaveLength(0);
    expect(defects(new Float64Array(9), 3)).toMatchObject({ residual: 0, orthogonality: 0 });
    const { values } = symmetricEigen(Float64Array.of(3, 0, 0, 0, -1, 0, 0, 0, 2), 3);
    expect(Array.from(values)).toEqual([-1, 2, 3]);
  });
});

/** Spectra with clusters, repeated values, gaps and sizes from 1 to 1e-12. */
const spectrum = fc.array(
  fc.tuple(
    fc.integer({ min: 1, max: 12 }),
    fc.constantFrom(0, 1e-15, 1e-12, 1e-7, 0.01, 1),
    fc.integer({ min: 0, max: 12 }),
    fc.constantFrom(1, -1),
  ),
  { minLength: 3, maxLength: 9 },
);

describe('the fast form of symmetricEigen', () => {
  it('independent: values, residuals and orthogonality as good as those of the plain form and of ml-matrix', () => {
    fc.assert(
      fc.property(spectrum, fc.integer(), (clusters, seed) => {
        const values = clusters.flatMap(([count, spread, decade, sign]) =>
          Array.from({ length: count }, (_, k) => sign * 10 ** -decade * (1 + spread * k)),
        );
        const n = values.length;
        const matrix = withSpectrum(values, seed);
        const scale = Math.max(maximumAbsolute(matrix), Number.MIN_VALUE);
        const fast = inForm('fast', () => defects(matrix, n));
        expect(fast.residual).toBeLessThan(1e-13);
        expect(fast.orthogonality).toBeLessThan(1e-13);
        const plain = inForm('plain', () => symmetricEigen(matrix, n)).values;
        const library = new EigenvalueDecomposition(Matrix.from1DArray(n, n, Array.from(matrix)), {
          assumeSymmetric: true,
        }).realEigenvalues;
        for (let k = 0; k < n; k++) {
          expect(Math.abs(fast.values[k] - plain[k])).toBeLessThan(2e-14 * scale * Math.sqrt(n));
          expect(Math.abs(fast.values[k] - library[k])).toBeLessThan(5e-14 * scale * Math.sqrt(n));
        }
      }),
      { seed: 4, numRuns: 60 },
    );
  });

  it.each([
    ['of independent blocks', (i: number, j: number) => (i >> 3 === j >> 3 ? 1 / (1 + i + j) : 0)],
    ['with graded rows', (i: number, j: number) => 10 ** (-(i + j) / 8) * Math.cos(i * j)],
    [
      'tridiagonal, with a negative coupling where it is divided',
      (i: number, j: number) => (i === j ? 1 : Math.abs(i - j) === 1 ? -0.5 : 0),
    ],
    ['of equal diagonal elements and hardly any coupling', (i: number, j: number) => (i === j ? 3 : 1e-17)],
  ])('identity: a matrix %s', (_, element) => {
    const n = 70;
    const matrix = Float64Array.from({ length: n * n }, (_, place) =>
      element(Math.floor(place / n), place % n),
    );
    const { residual, orthogonality } = inForm('fast', () => defects(matrix, n));
    expect(residual).toBeLessThan(1e-13);
    expect(orthogonality).toBeLessThan(1e-13);
  });
});

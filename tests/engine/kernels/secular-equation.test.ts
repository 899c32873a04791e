import { describe, expect, it } from 'vitest';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { secularEquationKernels } from '../../../engine/kernels/secular-equation';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { inForm } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';

/** Values and vectors (a row each) of diag(d) + ρ·z·zᵀ. */
function solve(d: Float64Array, z: Float64Array, rho: number) {
  const k = d.length;
  const memory = new KernelMemory();
  const kernels = secularEquationKernels(memory);
  const [work, poles, weights, values] = [2 * k + 2, k, k, k].map((length) => memory.float64(length));
  const differences = memory.float64(k * k);
  const position = memory.int32(k);
  poles.view.set(d);
  weights.view.set(z);
  // turned round, to see that the order is the one asked for
  position.view.forEach((_, i) => {
    position.view[i] = k - 1 - i;
  });
  const missed = kernels.solveSecular(
    work.address,
    poles.address,
    weights.address,
    rho,
    k,
    values.address,
    differences.address,
  );
  const fromPoles = differences.view.slice();
  kernels.secularVectors(
    work.address,
    poles.address,
    weights.address,
    k,
    position.address,
    differences.address,
  );
  return { missed, values: values.view.slice(), fromPoles, vectors: differences.view.slice() };
}

describe('solveSecular and secularVectors', () => {
  const random = seededRandom(12);
  it.each([
    ['a single pole', Float64Array.of(2), Float64Array.of(-0.6), 0.5],
    ['random poles', randomArray(17, random).sort(), randomArray(17, random), 1.3],
    [
      'poles that nearly meet',
      Float64Array.of(0, 1e-13, 2e-13, 1, 1 + 1e-14, 1 + 1e-12),
      Float64Array.of(1, -1, 1, 0.5, 0.5, 1),
      2,
    ],
    ['tiny weights', Float64Array.of(-1, 0, 1, 2, 3), Float64Array.of(1e-8, 1, 1e-12, 1e-3, 1e-7), 1],
  ])('identity: %s', (_, d, z, rho) => {
    const k = d.length;
    const { missed, values, fromPoles, vectors } = solve(d, z, rho);
    expect(missed).toBe(-1);
    const matrix = Float64Array.from({ length: k * k }, (_, place) => {
      const [i, j] = [Math.floor(place / k), place % k];
      return rho * z[i] * z[j] + (i === j ? d[i] : 0);
    });
    const library = inForm('plain', () => symmetricEigen(matrix, k)).values;
    for (let j = 0; j < k; j++) {
      expect(Math.abs(values[j] - library[j])).toBeLessThan(2e-14);
      // between its poles, and so by differences that rounding of the value itself would have blurred
      expect(fromPoles[j * k + j]).toBeLessThan(0);
      if (j < k - 1) expect(fromPoles[j * k + j + 1]).toBeGreaterThan(0);
      for (let l = 0; l <= j; l++) {
        let overlap = 0;
        let element = 0;
        for (let i = 0; i < k; i++) {
          const left = vectors[j * k + k - 1 - i];
          overlap += left * vectors[l * k + k - 1 - i];
          for (let m = 0; m < k; m++) element += left * matrix[i * k + m] * vectors[l * k + k - 1 - m];
        }
        expect(Math.abs(overlap - (j === l ? 1 : 0))).toBeLessThan(1e-14);
        expect(Math.abs(element - (j === l ? values[j] : 0))).toBeLessThan(2e-14);
      }
    }
  });
});

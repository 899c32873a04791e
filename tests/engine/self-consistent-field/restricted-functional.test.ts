import { describe, expect, it } from 'vitest';
import { congruence } from '../../../engine/linear-algebra/dense';
import { orthogonalise } from '../../../engine/self-consistent-field/orthogonalisation';
import { RestrictedFunctional } from '../../../engine/self-consistent-field/restricted-functional';
import { randomArray, seededRandom } from '../../support/random';
import { randomMeanFieldProblem } from '../../support/random-mean-field';

const N = 6;
const OCCUPIED = 2;
const problem = randomMeanFieldProblem(N, 11);
const functional = new RestrictedFunctional(problem, OCCUPIED, orthogonalise(problem.overlap, N));
const point = functional.evaluate(orthogonalise(problem.overlap, N).transformation);
const direction = randomArray((N - OCCUPIED) * OCCUPIED, seededRandom(5));
const along = (t: number) =>
  functional.evaluate(
    functional.rotate(
      point,
      direction.map((value) => t * value),
    ),
  );

describe('RestrictedFunctional', () => {
  it('identity: rotated orbitals stay orthonormal', () => {
    const metric = congruence(problem.overlap, along(0.7).coefficients, N, N);
    metric.forEach((value, k) => {
      expect(Math.abs(value - (k % (N + 1) === 0 ? 1 : 0))).toBeLessThan(1e-13);
    });
  });

  it('independent: the gradient is the numerical slope of the energy', () => {
    // central differences of two step lengths, extrapolated to fourth order
    const slope = (h: number) => (along(h).energy - along(-h).energy) / (2 * h);
    const numerical = (4 * slope(1e-3) - slope(2e-3)) / 3;
    const analytic = direction.reduce((sum, value, k) => sum + value * point.gradient[k], 0);
    expect(Math.abs(numerical - analytic)).toBeLessThan(1e-8 * Math.max(1, Math.abs(analytic)));
  });

  it('independent: the Hessian product is the numerical curvature of the energy', () => {
    const curvature = (h: number) => (along(h).energy - 2 * point.energy + along(-h).energy) / h ** 2;
    const numerical = (4 * curvature(1e-2) - curvature(2e-2)) / 3;
    const product = functional.hessianProduct(point, direction);
    const analytic = direction.reduce((sum, value, k) => sum + value * product[k], 0);
    expect(Math.abs(numerical - analytic)).toBeLessThan(1e-5 * Math.max(1, Math.abs(analytic)));
  });

  it('identity: the Hessians are symmetric', () => {
    const other = randomArray(direction.length, seededRandom(6));
    for (const spin of ['singlet', 'triplet'] as const) {
      const left = functional
        .responseProduct(point, direction, spin)
        .reduce((sum, v, k) => sum + v * other[k], 0);
      const right = functional
        .responseProduct(point, other, spin)
        .reduce((sum, v, k) => sum + v * direction[k], 0);
      expect(Math.abs(left - right)).toBeLessThan(1e-12);
    }
  });
});

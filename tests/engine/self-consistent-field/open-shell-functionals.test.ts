import { describe, expect, it } from 'vitest';
import type { MeanFieldFunctional, MeanFieldPoint } from '../../../engine/self-consistent-field/mean-field';
import { orthogonalise } from '../../../engine/self-consistent-field/orthogonalisation';
import { RestrictedFunctional } from '../../../engine/self-consistent-field/restricted-functional';
import { RestrictedOpenFunctional } from '../../../engine/self-consistent-field/restricted-open-functional';
import { UnrestrictedFunctional } from '../../../engine/self-consistent-field/unrestricted-functional';
import { randomArray, seededRandom } from '../../support/random';
import { randomMeanFieldProblem } from '../../support/random-mean-field';

const N = 6;
const problem = randomMeanFieldProblem(N, 21);
const functions = orthogonalise(problem.overlap, N);
const { transformation } = functions;
const twice = Float64Array.from([...transformation, ...transformation]);

function derivativesAgree<P extends MeanFieldPoint>(
  functional: MeanFieldFunctional<P>,
  orbitals: Float64Array,
): void {
  // away from any stationary point and with unequal spins
  const start = functional.evaluate(orbitals);
  const skew = randomArray(start.gradient.length, seededRandom(3)).map((value) => 0.3 * value);
  const point = functional.evaluate(functional.rotate(start, skew));
  const direction = randomArray(point.gradient.length, seededRandom(4));
  const energyAt = (t: number) =>
    functional.evaluate(
      functional.rotate(
        point,
        direction.map((value) => t * value),
      ),
    ).energy;
  const along = (vector: Float64Array) => direction.reduce((sum, value, k) => sum + value * vector[k], 0);

  // central differences of two step lengths, extrapolated to fourth order
  const slope = (h: number) => (energyAt(h) - energyAt(-h)) / (2 * h);
  const curvature = (h: number) => (energyAt(h) - 2 * point.energy + energyAt(-h)) / h ** 2;
  const gradient = along(point.gradient);
  const hessian = along(functional.hessianProduct(point, direction));
  expect(Math.abs((4 * slope(1e-3) - slope(2e-3)) / 3 - gradient)).toBeLessThan(
    1e-8 * Math.max(1, Math.abs(gradient)),
  );
  expect(Math.abs((4 * curvature(1e-2) - curvature(2e-2)) / 3 - hessian)).toBeLessThan(
    1e-5 * Math.max(1, Math.abs(hessian)),
  );

  const other = randomArray(direction.length, seededRandom(5));
  const left = functional
    .hessianProduct(point, direction)
    .reduce((sum, value, k) => sum + value * other[k], 0);
  const right = functional
    .hessianProduct(point, other)
    .reduce((sum, value, k) => sum + value * direction[k], 0);
  expect(Math.abs(left - right)).toBeLessThan(1e-11);
}

describe('open-shell functionals', () => {
  it.each([
    [2, 2],
    [3, 1],
    [4, 2],
    [2, 0],
  ] as const)(
    'independent: UHF gradient and Hessian are numerical slope and curvature, %i alpha and %i beta',
    (a, b) => {
      derivativesAgree(new UnrestrictedFunctional(problem, [a, b], functions), twice);
    },
  );

  it.each([
    [2, 2],
    [3, 1],
    [4, 2],
    [2, 0],
  ] as const)(
    'independent: ROHF gradient and Hessian are numerical slope and curvature, %i alpha and %i beta',
    (a, b) => {
      derivativesAgree(new RestrictedOpenFunctional(problem, [a, b], functions), transformation);
    },
  );

  it('identity: for paired spins all three give the same energy, and commutators of the same size', () => {
    const closed = new RestrictedFunctional(problem, 2, functions);
    const unrestricted = new UnrestrictedFunctional(problem, [2, 2], functions);
    const open = new RestrictedOpenFunctional(problem, [2, 2], functions);
    const points = [
      closed.evaluate(transformation),
      unrestricted.evaluate(twice),
      open.evaluate(transformation),
    ];
    for (const point of points) expect(Math.abs(point.energy - points[0].energy)).toBeLessThan(1e-12);
    const largest = (matrix: Float64Array) => matrix.reduce((sum, value) => sum + value * value, 0);
    const reference = largest(closed.commutator(closed.evaluate(transformation)));
    expect(largest(unrestricted.commutator(unrestricted.evaluate(twice)))).toBeCloseTo(2 * reference, 10);
  });
});

import { describe, expect, it } from 'vitest';
import { primitiveOverlap } from '../../../engine/basis/normalisation';
import { bestOverlap, type SlaterFunction } from '../../../engine/basis/slater-overlap';
import { integrateOverRadius } from '../../support/radial-quadrature';

const TARGETS: readonly SlaterFunction[] = [
  { principal: 1, angularMomentum: 0 },
  { principal: 2, angularMomentum: 0 },
  { principal: 2, angularMomentum: 1 },
  { principal: 3, angularMomentum: 0 },
  { principal: 3, angularMomentum: 1 },
];
const EXPONENTS = [1.7, 0.31, 0.06];

/** Radial function that quadrature normalises, so that no norm formula is used. */
function normalised(radial: (r: number) => number): (r: number) => number {
  const norm = 1 / Math.sqrt(integrateOverRadius((r) => (r * radial(r)) ** 2));
  return (r) => norm * radial(r);
}

describe.each(TARGETS)('bestOverlap with n = $principal, l = $angularMomentum', (target) => {
  const { principal, angularMomentum } = target;
  const best = bestOverlap(target, EXPONENTS)!;

  it('independent: the overlap of the fitted sum agrees with quadrature, and the sum is normalised', () => {
    const slater = normalised((r) => r ** (principal - 1) * Math.exp(-r));
    const gaussians = EXPONENTS.map((a) => normalised((r) => r ** angularMomentum * Math.exp(-a * r * r)));
    const fitted = (r: number) => gaussians.reduce((sum, g, i) => sum + best.coefficients[i] * g(r), 0);
    expect(integrateOverRadius((r) => (r * fitted(r)) ** 2)).toBeCloseTo(1, 13);
    expect(best.value).toBeCloseTo(
      integrateOverRadius((r) => r * r * fitted(r) * slater(r)),
      13,
    );
  });

  it('identity: no other normalised coefficients overlap more', () => {
    const norm = (c: readonly number[]) =>
      Math.sqrt(
        c.reduce(
          (sum, x, i) =>
            sum +
            c.reduce(
              (s, y, j) => s + x * y * primitiveOverlap(EXPONENTS[i], EXPONENTS[j], angularMomentum),
              0,
            ),
          0,
        ),
      );
    const withSlater = EXPONENTS.map((exponent) => bestOverlap(target, [exponent])!.value);
    const overlap = (c: readonly number[]) => c.reduce((s, x, i) => s + x * withSlater[i], 0) / norm(c);
    expect(overlap(best.coefficients)).toBeCloseTo(best.value, 14);
    for (const i of EXPONENTS.keys()) {
      for (const change of [-0.01, 0.01]) {
        expect(overlap(best.coefficients.map((x, j) => (i === j ? x + change : x)))).toBeLessThan(best.value);
      }
    }
  });

  it('identity: gradient and Hessian are the derivatives by ln α', () => {
    const h = 1e-4;
    const shifted = (j: number, by: number) =>
      bestOverlap(
        target,
        EXPONENTS.map((a, i) => (i === j ? a * Math.exp(by) : a)),
      )!;
    for (const j of EXPONENTS.keys()) {
      const up = shifted(j, h);
      const down = shifted(j, -h);
      expect(best.gradient.get(j, 0)).toBeCloseTo((up.value - down.value) / (2 * h), 8);
      for (const k of EXPONENTS.keys()) {
        const difference = (up.gradient.get(k, 0) - down.gradient.get(k, 0)) / (2 * h);
        expect(best.hessian.get(j, k)).toBeCloseTo(difference, 8);
      }
    }
  });

  it('identity: coinciding exponents have no unique fit', () => {
    expect(bestOverlap(target, [0.4, 0.4])).toBeUndefined();
  });
});

import { describe, expect, it } from 'vitest';
import { primitiveProducts } from '../../../engine/integrals/primitive-products';
import { blockOfShells, pairMembers } from '../../../engine/integrals/shell-block';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { placedBasis } from '../../support/gaussian-integrals';

const HERE: Vector3 = [0.1, 0.2, -0.1];
const THERE: Vector3 = [0.6, -0.3, 0.4];
const EXPONENTS = [5, 0.9, 0.3];

/** a block of two s rows and a p shell over {@link EXPONENTS} */
function blockAt(centre: Vector3) {
  return blockOfShells(
    placedBasis([
      { centre, l: 0, exponents: EXPONENTS, coefficients: [0.7, -0.4, 0.2] },
      { centre, l: 0, exponents: EXPONENTS, coefficients: [-0.1, 0.6, 0.9] },
      { centre, l: 1, exponents: EXPONENTS, coefficients: [0.3, 0.2, 0.8] },
    ]).shells,
  );
}

describe('primitiveProducts', () => {
  it.each([
    ['two centres', HERE, THERE, 9],
    ['one centre, where products of one p are added', HERE, HERE, 6],
  ] as const)(
    'identity: they add up to the product of the contracted radial parts: %s',
    (_title, a, b, count) => {
      const first = blockAt(a);
      const second = blockAt(b);
      const members = pairMembers(first, second);
      const products = primitiveProducts(first, second, members);
      expect(products).toHaveLength(count);
      const point: Vector3 = [0.2, 0.5, -0.3];
      const squared = (centre: Vector3) => point.reduce((sum, x, axis) => sum + (x - centre[axis]) ** 2, 0);
      const radial = ({ coefficients, centre }: (typeof members)[0]['first']) =>
        EXPONENTS.reduce((sum, e, i) => sum + coefficients[i] * Math.exp(-e * squared(centre)), 0);
      members.forEach((member, m) => {
        let sum = 0;
        for (const { firstExponent, secondExponent, prefactor, coefficients } of products) {
          const p = firstExponent + secondExponent;
          const centre = a.map(
            (x, axis) => (firstExponent * x + secondExponent * b[axis]) / p,
          ) as unknown as Vector3;
          const height = (prefactor * p) / (Math.SQRT2 * Math.PI ** 1.25);
          sum += height * coefficients[m] * Math.exp(-p * squared(centre));
        }
        expect(Math.abs(sum - radial(member.first) * radial(member.second))).toBeLessThan(1e-15);
      });
    },
  );

  it('identity: largest first, bounded by no less than √(ss|ss) of each s product with itself', () => {
    const first = blockAt(HERE);
    const second = blockAt(THERE);
    const members = pairMembers(first, second);
    const products = primitiveProducts(first, second, members);
    const bounds = products.map(({ bound }) => bound);
    expect(bounds).toEqual([...bounds].sort((a, b) => b - a));
    for (const { firstExponent, secondExponent, coefficients, bound } of products) {
      const p = firstExponent + secondExponent;
      const distance2 = HERE.reduce((sum, x, axis) => sum + (x - THERE[axis]) ** 2, 0);
      const overlap = Math.exp((-firstExponent * secondExponent * distance2) / p);
      const coulomb = (2 * Math.PI ** 2.5) / (p * p * Math.sqrt(2 * p));
      members.forEach((member, m) => {
        if (member.first.angularMomentum + member.second.angularMomentum > 0) return;
        expect(bound).toBeGreaterThanOrEqual(
          Math.abs(coefficients[m]) * overlap * Math.sqrt(coulomb) * (1 - 1e-14),
        );
      });
    }
  });

  it('identity: shells too far apart have none', () => {
    const first = blockAt(HERE);
    const second = blockAt([0, 0, 60]);
    expect(primitiveProducts(first, second, pairMembers(first, second))).toEqual([]);
  });
});

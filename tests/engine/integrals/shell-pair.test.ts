import { describe, expect, it } from 'vitest';
import type { PlacedShell } from '../../../engine/basis/contracted-gaussian';
import { shellTransformation } from '../../../engine/integrals/basis-transformation';
import { cartesianComponents } from '../../../engine/integrals/cartesian-components';
import { blockOfShells } from '../../../engine/integrals/shell-block';
import { buildShellPair, type ShellPair, shellPairs } from '../../../engine/integrals/shell-pair';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { placedBasis } from '../../support/gaussian-integrals';

const POINTS: readonly Vector3[] = [
  [0.2, 0.5, -0.3],
  [-0.9, 0.1, 0.8],
];

/** Values of a shell's functions at a point. */
function shellValues(shell: PlacedShell, harmonics: 'spherical' | 'cartesian', point: Vector3): number[] {
  const [x, y, z] = point.map((value, axis) => value - shell.centre[axis]);
  let radial = 0;
  shell.exponents.forEach((exponent, i) => {
    radial += shell.coefficients[i] * Math.exp(-exponent * (x * x + y * y + z * z));
  });
  const products = cartesianComponents(shell.angularMomentum).map(
    ([i, j, k]) => x ** i * y ** j * z ** k * radial,
  );
  const { matrix, functionCount, cartesianCount } = shellTransformation(shell.angularMomentum, harmonics);
  return Array.from({ length: functionCount }, (_, row) =>
    products.reduce((sum, value, column) => sum + matrix[row * cartesianCount + column] * value, 0),
  );
}

/** n-th derivative with respect to P of exp(−p(x − P)²), from the recursion of Hermite polynomials. */
function hermiteGaussian(n: number, p: number, distance: number): number {
  let previous = 0;
  let value = Math.exp(-p * distance * distance);
  for (let k = 0; k < n; k++) [previous, value] = [value, 2 * p * (distance * value - k * previous)];
  return value;
}

/** Function products at a point from the pair's Hermite expansion, the Coulomb constant √2 π^(5/4)/p taken out. */
function expandedProducts(pair: ShellPair, [x, y, z]: Vector3): number[] {
  const { layout, primitiveCount } = pair;
  const factorCount = layout.factorDegrees.length;
  const columns = new Float64Array(layout.columnCount);
  for (let i = 0; i < primitiveCount; i++) {
    const p = pair.exponents[i];
    layout.columnPowers.forEach(([t, u, v], column) => {
      const factor = pair.factors[i * factorCount + layout.columnFactor[column]];
      columns[column] +=
        ((factor * p) / (Math.SQRT2 * Math.PI ** 1.25)) *
        hermiteGaussian(t, p, x - pair.centreX[i]) *
        hermiteGaussian(u, p, y - pair.centreY[i]) *
        hermiteGaussian(v, p, z - pair.centreZ[i]);
    });
  }
  return Array.from({ length: pair.productCount }, (_, product) => {
    let sum = 0;
    for (let entry = pair.rowStart[product]; entry < pair.rowStart[product + 1]; entry++) {
      sum += pair.values[entry] * columns[pair.columns[entry]];
    }
    return sum;
  });
}

describe('buildShellPair', () => {
  const separate: Vector3 = [0.6, -0.3, 0.4];
  const here: Vector3 = [0.1, 0.2, -0.1];
  it.each([
    ['s with p, contracted', 0, 1, [0.9, 0.3], separate, 'spherical'],
    ['p with p, contracted', 1, 1, [0.9, 0.3], separate, 'spherical'],
    ['p with p, contracted, one centre', 1, 1, [0.9, 0.3], here, 'spherical'],
    ['p with d, contracted', 1, 2, [0.9, 0.3], separate, 'spherical'],
    ['d with d, one primitive', 2, 2, [0.5], separate, 'spherical'],
    ['d with f, one primitive, one centre', 2, 3, [0.5], here, 'cartesian'],
    ['f with d, contracted', 3, 2, [0.9, 0.3], separate, 'cartesian'],
    ['g with g, one primitive', 4, 4, [0.5], separate, 'spherical'],
    ['g with g, contracted, one centre', 4, 4, [0.9, 0.3], here, 'cartesian'],
  ] as const)(
    'identity: the Hermite expansion is the product of the functions at any point: %s',
    (_title, l, m, exponents, centre, harmonics) => {
      const basis = placedBasis(
        [
          { centre: here, l, exponents },
          { centre, l: m, exponents: exponents.map((e) => 1.4 * e) },
        ],
        harmonics,
      );
      const [first, second] = basis.shells;
      const pair = buildShellPair(blockOfShells([first]), blockOfShells([second]), harmonics);
      for (const point of POINTS) {
        const left = shellValues(first, harmonics, point);
        const right = shellValues(second, harmonics, point);
        expandedProducts(pair, point).forEach((value, product) => {
          const expected = left[Math.floor(product / right.length)] * right[product % right.length];
          expect(Math.abs(value - expected)).toBeLessThan(1e-13);
        });
      }
    },
  );

  it('identity: factors of the second partner carry the sign (−1)^degree', () => {
    const { shells } = placedBasis([
      { centre: [0, 0, 0], l: 1, exponents: [1, 0.2] },
      { centre: [0, 0, 1], l: 1, exponents: [1, 0.2] },
    ]);
    const [first, second] = shells.map((shell) => blockOfShells([shell]));
    const { factors, signedFactors, layout } = buildShellPair(first, second, 'cartesian');
    factors.forEach((value, i) => {
      const degree = layout.factorDegrees[i % layout.factorDegrees.length];
      expect(signedFactors[i]).toBe(degree % 2 === 0 ? value : -value);
    });
  });
});

describe('shellPairs', () => {
  it('identity: shells too far apart for any product are left out, the rest come once', () => {
    const basis = placedBasis([
      { centre: [0, 0, 0], l: 0, exponents: [0.5] },
      { centre: [0, 0, 2], l: 1, exponents: [0.5] },
      { centre: [0, 0, 100], l: 0, exponents: [0.5] },
    ]);
    expect(shellPairs(basis)).toBe(shellPairs(basis));
    const found = shellPairs(basis).map(({ members }) =>
      members.flatMap(({ first, second }) => [first.atom, second.atom]),
    );
    expect(found).toEqual([
      [0, 0],
      [1, 0],
      [1, 1],
      [2, 2],
    ]);
  });
});

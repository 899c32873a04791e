import { describe, expect, it } from 'vitest';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { isFullSpace, orbitalMap } from '../../../engine/configuration-interaction/orbital-map';
import { determinantSymmetry } from '../../../engine/configuration-interaction/vector-symmetry';
import { multiply, multiplyLeftTransposed } from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, rotateOrbitals } from '../../support/random-orbital-integrals';

const FULL = Number.POSITIVE_INFINITY;

function randomOrthogonal(n: number, seed: number): Float64Array {
  const random = seededRandom(seed);
  const { vectors } = symmetricEigen(randomSymmetric(n, random), n);
  return vectors.map((value, index) => (index % n === 0 ? -value : value));
}

function expectClose(actual: Float64Array, expected: Float64Array): void {
  expect(Math.max(...actual.map((value, i) => Math.abs(value - expected[i])))).toBeLessThan(1e-12);
}

describe('orbitalMap', () => {
  it.each([
    [5, 2, 2],
    [5, 3, 1],
    [4, 4, 0],
    [4, 0, 1],
  ])(
    'independent: %i orbitals, %i + %i electrons: H over mapped orbitals acts as map⁻¹·H·map',
    (n, alpha, beta) => {
      const space = buildDeterminantSpace(n, alpha, beta, FULL);
      const map = randomOrthogonal(n, n + alpha);
      const integrals = randomOrbitalIntegrals(n, 5);
      const apply = orbitalMap(space, map);
      const vector = randomArray(space.dimension, seededRandom(6));
      const image = new Float64Array(space.dimension);
      const expected = new Float64Array(space.dimension);
      apply(vector, image);
      prepareHamiltonianProduct(space, integrals).apply(image, expected);
      const product = new Float64Array(space.dimension);
      const found = new Float64Array(space.dimension);
      prepareHamiltonianProduct(space, rotateOrbitals(integrals, map)).apply(vector, product);
      apply(product, found);
      expectClose(found, expected);
    },
  );

  it('identity: of one electron it is the map itself, and maps multiply', () => {
    const n = 5;
    const [first, second] = [randomOrthogonal(n, 1), randomOrthogonal(n, 2)];
    const one = buildDeterminantSpace(n, 1, 0, FULL);
    const vector = randomArray(n, seededRandom(3));
    const image = new Float64Array(n);
    orbitalMap(one, first)(vector, image);
    // strings stand in order of rank: of one electron, in order of orbitals
    expectClose(image, multiply(first, vector, n, n, 1));

    const space = buildDeterminantSpace(n, 2, 2, FULL);
    const many = randomArray(space.dimension, seededRandom(4));
    const [once, twice, both] = [0, 1, 2].map(() => new Float64Array(space.dimension));
    orbitalMap(space, second)(many, once);
    orbitalMap(space, first)(once, twice);
    orbitalMap(space, multiply(first, second, n, n, n))(many, both);
    expectClose(twice, both);
  });
});

describe('determinantSymmetry over orbitals that mix representations', () => {
  it('identity: gives the weights and the squared rotation that pure orbitals give', () => {
    const n = 5;
    const irreps = [0, 2, 3, 6, 1];
    const space = buildDeterminantSpace(n, 2, 2, FULL);
    const mixing = randomOrthogonal(n, 9);
    const random = seededRandom(10);
    const axialRotation = new Float64Array(n * n);
    for (let p = 0; p < n; p++) {
      for (let q = 0; q < p; q++) {
        axialRotation[p * n + q] = 2 * random() - 1;
        axialRotation[q * n + p] = -axialRotation[p * n + q];
      }
    }
    const pure = randomArray(space.dimension, random);
    const norm = Math.hypot(...pure);
    const vector = pure.map((value) => value / norm);
    const mixed = new Float64Array(space.dimension);
    // the same state over the orbitals Σ |p⟩ mixing(p, q)
    orbitalMap(
      space,
      mixing.map((_, index) => mixing[(index % n) * n + Math.trunc(index / n)]),
    )(vector, mixed);
    const overMixed = (matrix: Float64Array) =>
      multiplyLeftTransposed(mixing, multiply(matrix, mixing, n, n, n), n, n, n);
    const operations = [0, 1, 2].map((bit) => {
      const signs = new Float64Array(n * n);
      irreps.forEach((irrep, p) => {
        signs[p * n + p] = (irrep >> bit) & 1 ? -1 : 1;
      });
      return overMixed(signs);
    });
    const expected = determinantSymmetry(space, { irreps, axialRotation })!.describe(vector);
    const found = determinantSymmetry(space, {
      operations,
      axialRotation: overMixed(axialRotation),
    })!.describe(mixed);
    expectClose(found.irrepWeights, expected.irrepWeights);
    expect(found.axialSquare).toBeCloseTo(expected.axialSquare!, 11);
  });

  it('identity: a truncated space is not closed under the operations, so that nothing is said', () => {
    const operations = [randomOrthogonal(5, 1)];
    expect(isFullSpace(buildDeterminantSpace(5, 2, 2, 4))).toBe(true);
    const truncated = buildDeterminantSpace(5, 2, 2, 2);
    expect(isFullSpace(truncated)).toBe(false);
    expect(determinantSymmetry(truncated, { operations })).toBeUndefined();
  });
});

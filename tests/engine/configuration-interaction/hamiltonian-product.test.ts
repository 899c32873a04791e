import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
  transposeInto,
} from '../../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { GATHER_BLOCK } from '../../../engine/configuration-interaction/plain-product';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { scratchMemory } from '../../../engine/kernels/kernel-memory';
import { inForm } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

/** Rows of the plain product that are worked out; they are spread evenly over a larger space. */
const ROWS = 150;

/** Largest deviation of the product, in both forms, from the sum over matrix elements, relative to the largest element. */
function deviation(
  n: number,
  alpha: number,
  beta: number,
  rank: number,
  seed: number,
  species: number[] = [],
  parity = 0,
  integrals: OrbitalIntegrals = randomOrbitalIntegrals(n, seed, { species }),
): number {
  const space = buildDeterminantSpace(n, alpha, beta, rank);
  const vector = randomArray(space.dimension, seededRandom(seed + 1));
  if (parity !== 0) {
    const image = new Float64Array(space.dimension);
    transposeInto(space, vector, image);
    for (let i = 0; i < vector.length; i++) vector[i] += parity * image[i];
  }
  const irreps = species.length > 0 ? species : undefined;
  const products = (['plain', 'fast'] as const).map((form) => {
    const product = new Float64Array(space.dimension).fill(Number.NaN);
    inForm(form, () =>
      scratchMemory().scope(() => prepareHamiltonianProduct(space, integrals, irreps).apply(vector, product)),
    );
    return product;
  });
  const determinants = Array.from({ length: space.dimension }, (_, place) => determinantAt(space, place));
  let largest = 0;
  let scale = 0;
  const step = Math.max(1, Math.floor(space.dimension / ROWS));
  determinants.forEach((left, i) => {
    if (i % step !== 0) return;
    const expected = determinants.reduce(
      (sum, right, j) => sum + hamiltonianElement(left, right, integrals) * vector[j],
      0,
    );
    for (const product of products) largest = Math.max(largest, Math.abs(product[i] - expected));
    scale = Math.max(scale, Math.abs(expected));
  });
  return largest / scale;
}

describe('prepareHamiltonianProduct', () => {
  it('identity: equals the plain Slater–Condon sum for any electron counts and excitation rank', () => {
    const cases = fc
      .integer({ min: 1, max: 6 })
      .chain((n) =>
        fc.tuple(
          fc.constant(n),
          fc.integer({ min: 0, max: n }),
          fc.integer({ min: 0, max: n }),
          fc.constantFrom(1, 2, 3, 4, Number.POSITIVE_INFINITY),
          fc.nat(10_000),
        ),
      );
    fc.assert(
      fc.property(cases, ([n, alpha, beta, rank, seed]) => {
        expect(deviation(n, alpha, beta, rank, seed)).toBeLessThan(1e-11);
      }),
      { seed: 4, numRuns: 120 },
    );
  });

  it.each([
    [8, 4, 3, 3],
    [9, 3, 3, 2],
    [8, 5, 2, 4],
    [12, 2, 2, Number.POSITIVE_INFINITY],
  ])('identity: equals the plain sum, %i orbitals, %i + %i electrons, rank %d', (n, alpha, beta, rank) => {
    expect(deviation(n, alpha, beta, rank, 99)).toBeLessThan(1e-11);
  });

  it('identity: equals the plain sum where more replacements than one block are gathered', () => {
    // a†p ap with p among 6 electrons in 12 orbitals leaves C(11, 5) = 462 strings as they are
    expect(462).toBeGreaterThan(GATHER_BLOCK);
    expect(deviation(12, 6, 1, Number.POSITIVE_INFINITY, 3)).toBeLessThan(1e-11);
    expect(deviation(12, 1, 6, 4, 3)).toBeLessThan(1e-11);
  });

  it.each([1, -1])('identity: equals the plain sum for vectors of spin-flip parity %i', (parity) => {
    for (const [n, electrons, rank] of [
      [5, 2, Number.POSITIVE_INFINITY],
      [6, 3, 2],
      [6, 3, 3],
    ]) {
      expect(deviation(n, electrons, electrons, rank, 61, [], parity)).toBeLessThan(1e-11);
    }
  });

  it('identity: restores a parity that rounding has blurred, and touches no other vector', () => {
    const space = buildDeterminantSpace(5, 2, 2, 3);
    const [product] = prepareHamiltonianProduct(space, randomOrbitalIntegrals(5, 62)).sectors;
    const vector = randomArray(space.dimension, seededRandom(63));
    const untouched = vector.slice();
    product.restoreSpinFlip(vector);
    expect(vector).toEqual(untouched);
    const image = new Float64Array(space.dimension);
    transposeInto(space, vector, image);
    const odd = vector.map((value, i) => value - image[i] + 1e-9 * untouched[i]);
    product.restoreSpinFlip(odd);
    transposeInto(space, odd, image);
    expect(odd.every((value, i) => value + image[i] === 0)).toBe(true);
  });

  it('identity: equals the plain sum over beta orbitals of their own, as a spin-flip parity of the vector says nothing there', () => {
    const cases = fc
      .integer({ min: 2, max: 6 })
      .chain((n) =>
        fc.tuple(
          fc.constant(n),
          fc.integer({ min: 0, max: n }),
          fc.integer({ min: 0, max: n }),
          fc.constantFrom(2, 3, Number.POSITIVE_INFINITY),
          fc.constantFrom(0, 1, -1),
          fc.nat(10_000),
        ),
      );
    fc.assert(
      fc.property(cases, ([n, alpha, beta, rank, parity, seed]) => {
        const integrals = randomUnrestrictedIntegrals(n, seed);
        const kept = alpha === beta ? parity : 0;
        // odd vectors vanish where there is a single string
        fc.pre(kept !== -1 || (alpha > 0 && alpha < n));
        expect(deviation(n, alpha, beta, rank, seed, [], kept, integrals)).toBeLessThan(1e-11);
      }),
      { seed: 5, numRuns: 80 },
    );
  });

  it('identity: beta orbitals of their own leave no exchange of spins to restore', () => {
    const space = buildDeterminantSpace(4, 2, 2, Number.POSITIVE_INFINITY);
    const [product] = prepareHamiltonianProduct(space, randomUnrestrictedIntegrals(4, 9)).sectors;
    const vector = randomArray(space.dimension, seededRandom(10));
    const image = new Float64Array(space.dimension);
    transposeInto(space, vector, image);
    const nearlyEven = vector.map((value, i) => value + image[i] + 1e-9 * vector[i]);
    const before = nearlyEven.slice();
    product.restoreSpinFlip(nearlyEven);
    expect(nearlyEven).toEqual(before);
    expect(product.spinFlipParts(vector)).toEqual([vector]);
  });

  it('identity: equals the plain sum where symmetry makes most integrals vanish', () => {
    expect(deviation(7, 3, 3, Number.POSITIVE_INFINITY, 8, [0, 1, 2, 3, 0, 1, 2])).toBeLessThan(1e-11);
    expect(deviation(7, 3, 3, 3, 8, [0, 1, 2, 3, 0, 1, 2], 1)).toBeLessThan(1e-11);
  });

  it('identity: an integral that the representations forbid puts all determinants into one sector', () => {
    const space = buildDeterminantSpace(5, 2, 2, Number.POSITIVE_INFINITY);
    const irreps = [0, 1, 2, 3, 0];
    const integrals = randomOrbitalIntegrals(5, 8, { species: irreps });
    expect(prepareHamiltonianProduct(space, integrals, irreps).sectors).toHaveLength(4);
    integrals.oneElectron[1] = integrals.oneElectron[5] = 1e-5;
    expect(prepareHamiltonianProduct(space, integrals, irreps).sectors).toHaveLength(1);
  });
});

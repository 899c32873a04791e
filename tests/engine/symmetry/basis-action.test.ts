import { describe, expect, it } from 'vitest';
import type { StudyAtom } from '#engine';
import type { Harmonics, PlacedBasis } from '../../../engine/basis/contracted-gaussian';
import { kineticMatrix } from '../../../engine/integrals/kinetic';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import { congruence, multiplyLeftTransposed } from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { buildMolecule } from '../../../engine/molecule/build-molecule';
import type { Molecule } from '../../../engine/molecule/molecule';
import { applyAction, axialRotationAction, operationAction } from '../../../engine/symmetry/basis-action';
import { findSymmetry } from '../../../engine/symmetry/point-group';
import { type AxisSigns, POINT_GROUPS } from '../../../engine/symmetry/point-groups';
import { placedBasis } from '../../support/gaussian-integrals';
import { anywhere } from '../../support/orientation';
import { seededRandom } from '../../support/random';
import * as molecules from '../../support/symmetric-molecules';

/** s to g on every atom, exponents by element. */
function fullBasis(molecule: Molecule, harmonics: Harmonics): PlacedBasis {
  const sketches = molecule.atoms.flatMap(({ position, atomicNumber }) =>
    [0, 1, 2, 3, 4].map((l) => ({ centre: position, l, exponents: [0.3 + 0.1 * atomicNumber, 1.1] })),
  );
  const basis = placedBasis(sketches, harmonics);
  // five sketches an atom
  return { ...basis, shells: basis.shells.map((shell, k) => ({ ...shell, atom: Math.trunc(k / 5) })) };
}

function moleculeOf(atoms: readonly StudyAtom[]): Molecule {
  const built = buildMolecule({ unit: 'bohr', atoms });
  if (!built.ok) throw built.errors[0];
  return built.molecule;
}

function unit(n: number): Float64Array {
  return Float64Array.from({ length: n * n }, (_, k) => Number(k % (n + 1) === 0));
}

function expectClose(actual: Float64Array, expected: Float64Array, digits: number): void {
  const difference = actual.reduce(
    (largest, value, k) => Math.max(largest, Math.abs(value - expected[k])),
    0,
  );
  expect(difference).toBeLessThan(10 ** -digits);
}

const random = seededRandom(11);
const cases = (['spherical', 'cartesian'] as const).flatMap((harmonics) =>
  (
    [
      ['water', molecules.water],
      ['ethylene', molecules.ethylene],
      ['methane', molecules.methane],
      ['trans-diazene', molecules.transDiazene],
      ['ammonia', molecules.ammonia],
    ] as const
  ).map(([name, atoms]) => [name, harmonics, atoms] as const),
);

describe('operationAction', () => {
  it.each(cases)(
    'identity: operations of %s leave overlap and kinetic energy as they are and multiply like the group, %s s to g',
    (_, harmonics, atoms) => {
      const molecule = moleculeOf(anywhere(atoms, random));
      const symmetry = findSymmetry(molecule);
      const basis = fullBasis(molecule, harmonics);
      const n = basis.functionCount;
      const { generators } = POINT_GROUPS[symmetry.pointGroup];
      const image = (signs: AxisSigns, of: Float64Array) =>
        applyAction(operationAction(molecule, basis, symmetry, signs), of, n);

      for (const matrix of [overlapMatrix(basis), kineticMatrix(basis)]) {
        for (const signs of generators) {
          expectClose(congruence(matrix, image(signs, unit(n)), n, n), matrix, 9);
        }
      }
      for (const first of generators) {
        expectClose(image(first, image(first, unit(n))), unit(n), 9);
        for (const second of generators) {
          const product = first.map((sign, axis) => sign * second[axis]) as unknown as AxisSigns;
          expectClose(image(first, image(second, unit(n))), image(product, unit(n)), 9);
        }
      }
    },
  );

  it('identity: an operation that is no symmetry is refused', () => {
    const molecule = moleculeOf(anywhere(molecules.water, random));
    const basis = fullBasis(molecule, 'spherical');
    expect(() => operationAction(molecule, basis, findSymmetry(molecule), [-1, -1, -1])).toThrow(RangeError);
  });
});

describe('axialRotationAction', () => {
  it.each<[Harmonics, readonly number[]]>([
    // of one shell each of s, p, d, f, g: how many functions have the squared angular momentum 0, 1, 4, 9, 16
    ['spherical', [5, 8, 6, 4, 2]],
    // degree l holds the harmonics l, l − 2, …
    ['cartesian', [9, 12, 8, 4, 2]],
  ])('identity: %s shells have the angular momenta that their harmonics have', (harmonics, [...counts]) => {
    const molecule = moleculeOf(anywhere(molecules.carbonMonoxide, random));
    const basis = fullBasis(molecule, harmonics);
    const n = basis.functionCount;
    const overlap = overlapMatrix(basis);
    const images = applyAction(axialRotationAction(basis, findSymmetry(molecule)), unit(n), n);
    const rotation = multiplyLeftTransposed(overlap, images, n, n, n);
    const square = congruence(overlap, images, n, n);
    // antisymmetric in the metric of the overlap
    for (let i = 0; i < n; i++) {
      for (let j = 0; j <= i; j++) expect(rotation[i * n + j] + rotation[j * n + i]).toBeCloseTo(0, 9);
    }
    const { values, vectors } = symmetricEigen(overlap, n);
    const x = vectors.map((value, k) => value / Math.sqrt(values[k % n]));
    const momenta = symmetricEigen(congruence(square, x, n, n), n).values;
    const expected = counts.flatMap((count, m) => Array<number>(2 * count).fill(m ** 2));
    momenta.forEach((value, k) => {
      expect(value).toBeCloseTo(expected[k], 6);
    });
  });
});

import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { replacementsBetween } from '../../../engine/configuration-interaction/determinants';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { rankParts } from '../../../engine/configuration-interaction/rank-parts';
import { dot } from '../../../engine/linear-algebra/dense';
import { minimalHydrogens, TEXTBOOK_HYDROGEN } from '../../support/model-hamiltonians';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

describe('rankParts', () => {
  it.each([
    [5, 2, 2, Number.POSITIVE_INFINITY],
    [6, 3, 3, Number.POSITIVE_INFINITY],
    [5, 3, 2, 2],
    [6, 2, 2, 3],
    [5, 3, 1, Number.POSITIVE_INFINITY],
    [4, 1, 0, 1],
    [3, 3, 3, 2],
  ])(
    'identity: %i orbitals, %i + %i electrons, rank %d: ⟨H⟩ of every cut-off vector, element by element',
    (n, alpha, beta, rank) => {
      const integrals = randomOrbitalIntegrals(n, 7);
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      const raw = randomArray(space.dimension, seededRandom(n));
      const vector = raw.map((value) => value / Math.sqrt(dot(raw, raw)));
      const determinants = Array.from(vector, (_, place) => determinantAt(space, place));
      const [reference] = determinants;
      const ranks = determinants.map(
        (one) =>
          replacementsBetween(one.alpha, reference!.alpha) + replacementsBetween(one.beta, reference!.beta),
      );
      const referenceEnergy = hamiltonianElement(reference!, reference!, integrals);
      const upTo = (highest: number) => {
        let energy = 0;
        determinants.forEach((left, i) => {
          determinants.forEach((right, j) => {
            if (ranks[i]! > highest || ranks[j]! > highest) return;
            const element = hamiltonianElement(left, right, integrals) - (i === j ? referenceEnergy : 0);
            energy += vector[i]! * vector[j]! * element;
          });
        });
        return energy;
      };
      const parts = rankParts(
        space,
        prepareHamiltonianProduct(space, integrals).apply,
        vector,
        referenceEnergy,
      );
      expect(parts).toHaveLength(Math.max(...ranks) + 1);
      let sum = 0;
      parts.forEach(({ weight, energy }, k) => {
        sum += energy;
        expect(Math.abs(sum - upTo(k))).toBeLessThan(1e-11);
        const expected = vector.reduce((total, value, i) => (ranks[i] === k ? total + value ** 2 : total), 0);
        expect(Math.abs(weight - expected)).toBeLessThan(1e-14);
      });
    },
  );

  it('identity: two H2 infinitely far apart, in full CI: the closed form of doubles and quadruples', () => {
    const { h11, h22, J11, J22, K12 } = TEXTBOOK_HYDROGEN;
    const gap = 2 * h22 + J22 - 2 * h11 - J11;
    const angle = Math.atan2(-2 * K12, gap) / 2;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const integrals = minimalHydrogens(2);
    const space = buildDeterminantSpace(4, 2, 2, Number.POSITIVE_INFINITY);
    const vector = Float64Array.from({ length: space.dimension }, (_, place) => {
      const { alpha, beta } = determinantAt(space, place);
      if (alpha[0] !== beta[0]) return 0;
      // bonding orbitals 0 and 1, antibonding 2 and 3
      return { 3: c * c, 6: c * s, 9: c * s, 12: s * s }[alpha[0]!] ?? 0;
    });
    const { apply } = prepareHamiltonianProduct(space, integrals);
    const parts = rankParts(space, apply, vector, 2 * (2 * h11 + J11));
    const expected = [
      0,
      0,
      2 * c * c * (s * s * gap + 2 * c * s * K12),
      0,
      2 * s * s * (s * s * gap + 2 * c * s * K12),
    ];
    expect(parts).toHaveLength(5);
    parts.forEach(({ energy }, k) => {
      expect(Math.abs(energy - expected[k]!)).toBeLessThan(1e-13);
    });
  });
});

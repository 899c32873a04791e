import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  type DeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import {
  determinantSymmetry,
  singlesSymmetry,
} from '../../../engine/configuration-interaction/vector-symmetry';
import { randomArray, seededRandom } from '../../support/random';

const IRREPS = [0, 2, 3, 2, 3, 1];

/** A random antisymmetric matrix. */
function randomRotation(n: number, seed: number): Float64Array {
  const random = seededRandom(seed);
  const rotation = new Float64Array(n * n);
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < p; q++) {
      rotation[p * n + q] = 2 * random() - 1;
      rotation[q * n + p] = -rotation[p * n + q];
    }
  }
  return rotation;
}

interface Occupation {
  readonly alpha: readonly number[];
  readonly beta: readonly number[];
}

function determinantsOf(space: DeterminantSpace): Occupation[] {
  return Array.from({ length: space.dimension }, (_, place) => {
    const { alpha, beta } = determinantAt(space, place);
    return { alpha: occupiedOrbitals(alpha), beta: occupiedOrbitals(beta) };
  });
}

/** ⟨left| Σ K(pq) a†p aq |right⟩ for one spin, by writing a†p aq out as a replacement in a sorted list. */
function bruteElement(
  left: readonly number[],
  right: readonly number[],
  rotation: Float64Array,
  n: number,
): number {
  let element = 0;
  right.forEach((q, at) => {
    for (let p = 0; p < n; p++) {
      const replaced = right.map((orbital, k) => (k === at ? p : orbital));
      if (new Set(replaced).size < replaced.length) continue;
      let sign = 1;
      const sorted = replaced.slice();
      for (let i = 0; i < sorted.length; i++) {
        for (let k = 0; k + 1 < sorted.length - i; k++) {
          if (sorted[k] <= sorted[k + 1]) continue;
          [sorted[k], sorted[k + 1]] = [sorted[k + 1], sorted[k]];
          sign = -sign;
        }
      }
      if (sorted.join() === left.join()) element += sign * rotation[p * n + q];
    }
  });
  return element;
}

const normalised = (vector: Float64Array) => {
  const norm = Math.hypot(...vector);
  return vector.map((value) => value / norm);
};

describe('determinantSymmetry', () => {
  it.each([
    [2, 2, Number.POSITIVE_INFINITY],
    [3, 2, Number.POSITIVE_INFINITY],
    [3, 2, 2],
    [2, 0, 1],
  ])(
    'identity: %i + %i electrons, rank %d: weights and squared rotation equal sums over determinants',
    (a, b, rank) => {
      const n = IRREPS.length;
      const space = buildDeterminantSpace(n, a, b, rank);
      const axialRotation = randomRotation(n, 3);
      const vector = normalised(randomArray(space.dimension, seededRandom(4)));
      const determinants = determinantsOf(space);
      const weights = new Float64Array(8);
      determinants.forEach(({ alpha, beta }, place) => {
        weights[[...alpha, ...beta].reduce((product, p) => product ^ IRREPS[p], 0)] += vector[place] ** 2;
      });
      const turned = determinants.map((left) =>
        determinants.reduce((sum, right, place) => {
          const ofAlpha =
            left.beta.join() === right.beta.join()
              ? bruteElement(left.alpha, right.alpha, axialRotation, n)
              : 0;
          const ofBeta =
            left.alpha.join() === right.alpha.join()
              ? bruteElement(left.beta, right.beta, axialRotation, n)
              : 0;
          return sum + (ofAlpha + ofBeta) * vector[place];
        }, 0),
      );
      const found = determinantSymmetry(space, { irreps: IRREPS, axialRotation })!.describe(vector);
      found.irrepWeights.forEach((weight, irrep) => {
        expect(weight).toBeCloseTo(weights[irrep], 13);
      });
      expect(found.axialSquare).toBeCloseTo(
        turned.reduce((sum, value) => sum + value ** 2, 0),
        12,
      );
      const [byIrrep, byRotation] = determinantSymmetry(space, {
        irreps: IRREPS,
        axialRotation,
      })!.distinguishingOperators();
      const product = new Float64Array(vector.length);
      const expectation = () => product.reduce((sum, value, place) => sum + value * vector[place], 0);
      byRotation.apply(vector, product);
      expect(expectation()).toBeCloseTo(found.axialSquare!, 12);
      byIrrep.apply(vector, product);
      expect(expectation()).toBeCloseTo(
        weights.reduce((sum, weight, irrep) => sum + irrep * weight, 0),
        12,
      );
    },
  );

  it('identity: without a rotation only representations are told', () => {
    const space = buildDeterminantSpace(6, 1, 1, Number.POSITIVE_INFINITY);
    const symmetry = determinantSymmetry(space, { irreps: IRREPS })!;
    expect(symmetry.distinguishingOperators()).toHaveLength(1);
    expect(symmetry.describe(normalised(randomArray(36, seededRandom(1)))).axialSquare).toBeUndefined();
  });
});

describe('singlesSymmetry', () => {
  it('identity: singlet excitations are labelled like the determinants that they stand for', () => {
    const [n, occupied] = [6, 2];
    // joins occupied with occupied, virtual with virtual orbitals: a closed shell is left as it is
    const axialRotation = randomRotation(n, 8).map((value, index) => {
      return Math.trunc(index / n) < occupied === index % n < occupied ? value : 0;
    });
    const virtuals = n - occupied;
    const amplitudes = normalised(randomArray(occupied * virtuals, seededRandom(9)));
    const space = buildDeterminantSpace(n, occupied, occupied, 1);
    const vector = new Float64Array(space.dimension);
    determinantsOf(space).forEach(({ alpha, beta }, place) => {
      for (const string of [alpha, beta]) {
        const hole = [0, 1].find((i) => !string.includes(i));
        const particle = string.find((p) => p >= occupied);
        if (hole === undefined || particle === undefined) continue;
        // an electron from orbital 0 passes the one in orbital 1
        const sign = hole === 0 ? -1 : 1;
        vector[place] = (sign * amplitudes[hole * virtuals + particle - occupied]) / Math.SQRT2;
      }
    });
    const expected = determinantSymmetry(space, { irreps: IRREPS, axialRotation })!.describe(vector);
    const found = singlesSymmetry(occupied, virtuals, { irreps: IRREPS, axialRotation })!.describe(
      amplitudes,
    );
    expect(found.axialSquare).toBeCloseTo(expected.axialSquare!, 12);
    found.irrepWeights.forEach((weight, irrep) => {
      expect(weight).toBeCloseTo(expected.irrepWeights[irrep], 13);
    });
  });
});

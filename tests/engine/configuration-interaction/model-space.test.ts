import { describe, expect, it } from 'vitest';
import {
  buildModelSpace,
  chooseGuesses,
  modelPreconditioner,
} from '../../../engine/configuration-interaction/model-space';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';

/** Two blocks of 20; the second starts higher on the diagonal but is more strongly coupled. */
function twoBlocks(): Float64Array {
  const n = 40;
  const random = randomSymmetric(n, seededRandom(8));
  return random.map((value, k) => {
    const i = Math.floor(k / n);
    const j = k % n;
    if (i === j) return i % 2 === 0 ? i / 10 : 0.05 + i / 10;
    if (i % 2 !== j % 2) return 0;
    return (i % 2 === 0 ? 0.01 : 0.1) * value;
  });
}

const modelOf = (matrix: Float64Array, n: number, size: number) =>
  buildModelSpace(
    Float64Array.from({ length: n }, (_, i) => matrix[i * (n + 1)]),
    size,
    (places) => ({ hamiltonian: (i, j) => matrix[places[i] * n + places[j]] }),
  );

describe('buildModelSpace', () => {
  it('identity: a model space of everything is the dense solution, each vector in one block', () => {
    const matrix = twoBlocks();
    const model = modelOf(matrix, 40, 40);
    const exact = symmetricEigen(matrix, 40).values;
    model.energies.forEach((energy, k) => {
      expect(energy).toBeCloseTo(exact[k], 12);
      const parities = new Set(
        Array.from(model.vectors[k].keys())
          .filter((i) => model.vectors[k][i] !== 0)
          .map((i) => i % 2),
      );
      expect(parities.size).toBe(1);
    });
    expect(new Set(model.sectors).size).toBe(2);
  });

  describe('with a spin operator', () => {
    const size = 40;
    /** ½(1 ∓ 1): pairs of determinants that exchange spins make a singlet and a triplet. */
    const spinSquared = (i: number, j: number) => {
      if (Math.floor(i / 2) !== Math.floor(j / 2)) return 0;
      return i === j ? 1 : -1;
    };
    const exchange = (i: number) => i + 1 - 2 * (i % 2);
    const random = randomSymmetric(size, seededRandom(12));
    const symmetric = random.map((value, k) => {
      const [i, j] = [Math.floor(k / size), k % size];
      return value + random[exchange(i) * size + exchange(j)];
    });
    const modelWithSpin = (matrix: Float64Array) =>
      buildModelSpace(
        Float64Array.from({ length: size }, (_, i) => matrix[i * (size + 1)]),
        size,
        (places) => ({
          hamiltonian: (i, j) => matrix[places[i] * size + places[j]],
          spinSquared: (i, j) => spinSquared(places[i], places[j]),
        }),
      );

    it('identity: the states of every spin are those of the whole, and eigenvectors of both', () => {
      const model = modelWithSpin(symmetric);
      const exact = symmetricEigen(symmetric, size).values;
      expect(new Set(model.spins)).toEqual(new Set([0, 2]));
      model.energies.forEach((energy, k) => {
        expect(energy).toBeCloseTo(exact[k], 11);
        const vector = model.vectors[k];
        vector.forEach((value, i) => {
          const turned = value - vector[exchange(i)];
          expect(turned).toBeCloseTo(model.spins[k] * value, 10);
          let product = 0;
          for (let j = 0; j < size; j++) product += symmetric[i * size + j] * vector[j];
          expect(product).toBeCloseTo(energy * value, 10);
        });
      });
    });

    it('identity: where H joins different spins, as in a space that does not close, states are still those of H', () => {
      const model = modelWithSpin(random);
      const exact = symmetricEigen(random, size).values;
      model.energies.forEach((energy, k) => {
        expect(energy).toBeCloseTo(exact[k], 11);
      });
    });
  });

  it('identity: takes the lowest places and does not tear equal ones apart', () => {
    const diagonal = [5, 1, 3, 2, 3, 4, 3];
    const choose = (size: number) =>
      Array.from(
        buildModelSpace(Float64Array.from(diagonal), size, (places) => ({
          hamiltonian: (i, j) => (i === j ? diagonal[places[i]] : 0),
        })).places,
      );
    expect(choose(2)).toEqual([1, 3]);
    expect(choose(3)).toEqual([1, 3]);
    expect(choose(5)).toEqual([1, 2, 3, 4, 6]);
    expect(choose(10)).toEqual([0, 1, 2, 3, 4, 5, 6]);
  });
});

describe('chooseGuesses', () => {
  it('identity: the lowest states, one more, and the next of every sector', () => {
    const model = modelOf(twoBlocks(), 40, 12);
    const { lowest, guards } = chooseGuesses(model, 1);
    expect(lowest).toEqual([0, 1]);
    expect(new Set([...lowest, ...guards].map((k) => model.sectors[k])).size).toBe(2);
    for (const k of guards) {
      const earlier = model.sectors.slice(2, k);
      expect(earlier).not.toContain(model.sectors[k]);
    }
  });
});

describe('modelPreconditioner', () => {
  it('identity: inverts exactly what is inside the model space, and the diagonal outside', () => {
    const n = 40;
    const matrix = twoBlocks();
    const diagonal = Float64Array.from({ length: n }, (_, i) => matrix[i * (n + 1)]);
    const model = modelOf(matrix, n, 12);
    const vector = randomArray(n, seededRandom(3));
    const result = new Float64Array(n);
    const shift = -0.7;
    modelPreconditioner(model, diagonal)(vector, shift, result);
    const inside = new Set(model.places);
    for (let i = 0; i < n; i++) {
      let back = -shift * result[i];
      if (inside.has(i)) for (const j of model.places) back += matrix[i * n + j] * result[j];
      else back += diagonal[i] * result[i];
      expect(back).toBeCloseTo(vector[i], 12);
    }
  });
});

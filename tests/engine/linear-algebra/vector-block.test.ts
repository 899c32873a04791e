import { describe, expect, it } from 'vitest';
import { dot } from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { plainVectors } from '../../../engine/linear-algebra/vector-algebra';
import { VectorBlock } from '../../../engine/linear-algebra/vector-block';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';

function randomBlock(dimension: number, size: number, seed: number): VectorBlock {
  const block = new VectorBlock(dimension);
  const random = seededRandom(seed);
  for (let k = 0; k < size; k++) {
    block.spare().set(randomArray(dimension, random));
    block.orthonormalise(block.spare(), 1e-9);
    block.append();
  }
  return block;
}

describe('VectorBlock', () => {
  it('identity: vectors made orthonormal are so to rounding, nearly dependent ones too', () => {
    const block = randomBlock(1300, 6, 1);
    const nearly = block.at(2).slice();
    nearly[17] += 1e-7;
    expect(block.orthonormalise(nearly, 1e-9)).toBe(true);
    expect(Math.abs(dot(nearly, nearly) - 1)).toBeLessThan(1e-14);
    for (let k = 0; k < 6; k++) expect(Math.abs(dot(nearly, block.at(k)))).toBeLessThan(1e-14);
  });

  it('identity: a combination of the block, and a zero vector, bring nothing new', () => {
    const block = randomBlock(200, 4, 2);
    const combination = new Float64Array(200);
    plainVectors.combine(combination, 0, block.members, [1, -2, 3, 0.5]);
    expect(block.orthonormalise(combination, 1e-9)).toBe(false);
    expect(block.orthonormalise(new Float64Array(200), 1e-9)).toBe(false);
  });

  it('identity: rotation by an orthogonal matrix gives the combinations, longer than one chunk', () => {
    const block = randomBlock(1300, 5, 3);
    const { vectors } = symmetricEigen(randomSymmetric(5, seededRandom(9)), 5);
    const expected = Array.from({ length: 3 }, (_, k) => {
      const target = new Float64Array(1300);
      const column = Array.from({ length: 5 }, (_, i) => vectors[i * 5 + k]);
      plainVectors.combine(target, 0, block.members, column);
      return target;
    });
    const kept = Float64Array.from({ length: 15 }, (_, k) => vectors[Math.floor(k / 3) * 5 + (k % 3)]);
    block.rotate(kept, 3);
    expect(block.size).toBe(3);
    expected.forEach((vector, k) => {
      vector.forEach((value, i) => {
        expect(Math.abs(block.at(k)[i] - value)).toBeLessThan(1e-15);
      });
    });
  });
});

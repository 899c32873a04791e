import { describe, expect, it } from 'vitest';
import { shellTransformation } from '../../../engine/integrals/basis-transformation';
import { cartesianComponents } from '../../../engine/integrals/cartesian-components';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { rotate, scale } from '../../../engine/molecule/vector';
import { type Matrix3, shellMapAction, shellRotationAction } from '../../../engine/symmetry/shell-action';
import { randomRotation, turn } from '../../support/orientation';
import { seededRandom } from '../../support/random';

const shells = (['spherical', 'cartesian'] as const).flatMap((harmonics) =>
  [0, 1, 2, 3, 4].map((l) => [harmonics, l] as const),
);

/** Values of a shell's functions without their common radial part. */
function valuesAt(l: number, harmonics: 'spherical' | 'cartesian', [x, y, z]: Vector3): number[] {
  const { functionCount, matrix } = shellTransformation(l, harmonics);
  const products = cartesianComponents(l).map(([i, j, k]) => x ** i * y ** j * z ** k);
  return Array.from({ length: functionCount }, (_, row) =>
    products.reduce((sum, product, column) => sum + matrix[row * products.length + column] * product, 0),
  );
}

function act(action: Float64Array, values: readonly number[]): number[] {
  const n = values.length;
  return values.map((_, k) => values.reduce((sum, value, j) => sum + action[k * n + j] * value, 0));
}

describe('shellMapAction', () => {
  it.each(shells)(
    'independent: %s l = %i, rotated and reflected, has the values that it had before',
    (harmonics, l) => {
      const random = seededRandom(l + 1);
      for (const sign of [1, -1]) {
        const map = randomRotation(random).map((row) => scale(row, sign)) as unknown as Matrix3;
        const action = shellMapAction(l, harmonics, map);
        const r: Vector3 = [random() - 0.5, random() - 0.5, random() - 0.5];
        const expected = valuesAt(l, harmonics, turn(map, r));
        act(action, valuesAt(l, harmonics, r)).forEach((value, k) => {
          expect(value).toBeCloseTo(expected[k], 12);
        });
      }
    },
  );
});

describe('shellRotationAction', () => {
  it.each(shells)('independent: %s l = %i, is the slope of small finite rotations', (harmonics, l) => {
    const random = seededRandom(l + 10);
    const [axis] = randomRotation(random);
    const r: Vector3 = [random() - 0.5, random() - 0.5, random() - 0.5];
    const step = 1e-3;
    // the rotated function at r is the function at r turned back; two steps cancel the error of third order
    const difference = (size: number) => {
      const [after, before] = [-size, size].map((angle) => valuesAt(l, harmonics, rotate(r, axis, angle)));
      return after.map((value, k) => (value - before[k]) / (2 * size));
    };
    const [fine, coarse] = [difference(step), difference(2 * step)];
    act(shellRotationAction(l, harmonics, axis), valuesAt(l, harmonics, r)).forEach((value, k) => {
      expect(value).toBeCloseTo((4 * fine[k] - coarse[k]) / 3, 8);
    });
  });
});

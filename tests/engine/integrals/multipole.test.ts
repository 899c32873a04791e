import { describe, expect, it } from 'vitest';
import { dipoleMatrices, secondMomentMatrices } from '../../../engine/integrals/multipole';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import type { Vector3 } from '../../../engine/molecule/molecule';
import {
  cartesianFunctions,
  contracted,
  momentByQuadrature,
  placedBasis,
} from '../../support/gaussian-integrals';

const basis = placedBasis([
  { centre: [0.1, -0.2, 0.3], l: 0, exponents: [0.9, 0.2], coefficients: [0.4, 0.7] },
  { centre: [0.5, 0.4, -0.6], l: 1, exponents: [0.8, 2.1], coefficients: [0.6, 0.5] },
  { centre: [-0.4, 0.7, 0.2], l: 2, exponents: [0.6] },
  { centre: [0.3, 0.1, 0.9], l: 4, exponents: [0.7] },
]);
const origin: Vector3 = [0.3, -1.2, 2.0];

function expectMoments(matrices: readonly Float64Array[], moments: readonly Vector3[]): void {
  const functions = cartesianFunctions(basis);
  matrices.forEach((matrix, index) => {
    for (let i = 0; i < functions.length; i++) {
      for (let j = 0; j < functions.length; j++) {
        const expected = contracted([functions[i], functions[j]], ([a, b]) =>
          momentByQuadrature(a, b, moments[index], origin),
        );
        expect(Math.abs(matrix[i * functions.length + j] - expected)).toBeLessThan(1e-12);
      }
    }
  });
}

describe('dipoleMatrices', () => {
  it('independent: x, y, z by Gauss–Hermite quadrature', () => {
    expectMoments(dipoleMatrices(basis, origin), [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]);
  });

  it('identity: moving the origin by d takes d · S away', () => {
    const overlap = overlapMatrix(basis);
    const shift: Vector3 = [100, -3, 0.7];
    const here = dipoleMatrices(basis, origin);
    const there = dipoleMatrices(basis, [origin[0] + shift[0], origin[1] + shift[1], origin[2] + shift[2]]);
    here.forEach((matrix, axis) => {
      matrix.forEach((value, i) => {
        expect(Math.abs(value - shift[axis] * overlap[i] - there[axis][i])).toBeLessThan(1e-12);
      });
    });
  });
});

describe('secondMomentMatrices', () => {
  it('independent: xx, xy, xz, yy, yz, zz by Gauss–Hermite quadrature', () => {
    expectMoments(secondMomentMatrices(basis, origin), [
      [2, 0, 0],
      [1, 1, 0],
      [1, 0, 1],
      [0, 2, 0],
      [0, 1, 1],
      [0, 0, 2],
    ]);
  });

  it('identity: ⟨r²⟩ of a solid harmonic of degree l with exponent a is (2l + 3)/(4a)', () => {
    for (let l = 0; l <= 4; l++) {
      const a = 0.3 + l;
      const single = placedBasis([{ centre: origin, l, exponents: [a] }], 'spherical');
      const [xx, , , yy, , zz] = secondMomentMatrices(single, origin);
      for (let i = 0; i < single.functionCount; i++) {
        const place = i * (single.functionCount + 1);
        expect(xx[place] + yy[place] + zz[place]).toBeCloseTo((2 * l + 3) / (4 * a), 13);
      }
    }
  });
});

import { describe, expect, it } from 'vitest';
import {
  shellTransformation,
  solidHarmonics,
  transformBlock,
} from '../../../engine/integrals/basis-transformation';
import { cartesianComponents, cartesianIndex } from '../../../engine/integrals/cartesian-components';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import { placedBasis } from '../../support/gaussian-integrals';

const DEGREES = [0, 1, 2, 3, 4];

describe('solidHarmonics', () => {
  it.each(DEGREES)('identity: every harmonic of degree %i satisfies the Laplace equation', (l) => {
    const components = cartesianComponents(l);
    const matrix = solidHarmonics(l);
    for (let row = 0; row < 2 * l + 1; row++) {
      const laplacian = new Float64Array(cartesianComponents(Math.max(l - 2, 0)).length);
      components.forEach((powers, column) => {
        for (const axis of [0, 1, 2]) {
          if (powers[axis] < 2) continue;
          const lowered = powers.map((power, a) => (a === axis ? power - 2 : power));
          laplacian[cartesianIndex(lowered[1], lowered[2])] +=
            powers[axis] * (powers[axis] - 1) * matrix[row * components.length + column];
        }
      });
      for (const value of laplacian) expect(Math.abs(value)).toBeLessThan(1e-13);
    }
  });

  it('identity: degree 2 is √3 xy, √3 yz, z² − (x² + y²)/2, √3 xz, √3/2 (x² − y²)', () => {
    const r = Math.sqrt(3);
    // xx, xy, xz, yy, yz, zz
    const expected = [
      [0, r, 0, 0, 0, 0],
      [0, 0, 0, 0, r, 0],
      [-0.5, 0, 0, -0.5, 0, 1],
      [0, 0, r, 0, 0, 0],
      [r / 2, 0, 0, -r / 2, 0, 0],
    ].flat();
    solidHarmonics(2).forEach((value, i) => {
      expect(value).toBeCloseTo(expected[i], 14);
    });
  });

  it('identity: row m turns into row −m under a turn by 90°/m about z', () => {
    for (const l of [2, 3, 4]) {
      for (let m = 1; m <= l; m++) {
        const angle = Math.PI / (2 * m);
        for (const [x, y, z] of [
          [0.3, -0.7, 0.5],
          [1.1, 0.2, -0.4],
        ]) {
          const turnedX = x * Math.cos(angle) - y * Math.sin(angle);
          const turnedY = x * Math.sin(angle) + y * Math.cos(angle);
          expect(evaluate(l, l - m, turnedX, turnedY, z)).toBeCloseTo(evaluate(l, l + m, x, y, z), 13);
        }
      }
    }
  });
});

describe('shellTransformation', () => {
  it.each(DEGREES)('identity: spherical functions of degree %i are orthonormal', (l) => {
    const basis = placedBasis([{ centre: [1, 2, 3], l, exponents: [0.4, 3] }], 'spherical');
    const n = basis.functionCount;
    expect(n).toBe(2 * l + 1);
    overlapMatrix(basis).forEach((value, i) => {
      expect(Math.abs(value - (i % (n + 1) === 0 ? 1 : 0))).toBeLessThan(1e-14);
    });
  });

  it.each(DEGREES)('identity: Cartesian functions of degree %i are normalised', (l) => {
    const basis = placedBasis([{ centre: [1, 2, 3], l, exponents: [0.4, 3] }], 'cartesian');
    const overlap = overlapMatrix(basis);
    for (let i = 0; i < basis.functionCount; i++) {
      expect(overlap[i * (basis.functionCount + 1)]).toBeCloseTo(1, 14);
    }
  });

  it('identity: p functions are x, y, z in both kinds', () => {
    for (const harmonics of ['spherical', 'cartesian'] as const) {
      expect([...shellTransformation(1, harmonics).matrix]).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 1]);
    }
  });
});

describe('transformBlock', () => {
  it('identity: an outer product is transformed factor by factor', () => {
    const a = shellTransformation(3, 'spherical');
    const b = shellTransformation(2, 'cartesian');
    const left = Float64Array.from({ length: a.cartesianCount }, (_, i) => Math.sin(i + 1));
    const right = Float64Array.from({ length: b.cartesianCount }, (_, i) => Math.cos(2 * i));
    const block = Float64Array.from(
      { length: left.length * right.length },
      (_, i) => left[Math.floor(i / right.length)] * right[i % right.length],
    );
    const product = (t: typeof a, vector: Float64Array, row: number) =>
      vector.reduce((sum, value, i) => sum + t.matrix[row * t.cartesianCount + i] * value, 0);
    transformBlock(a, b, block).forEach((value, i) => {
      const row = Math.floor(i / b.functionCount);
      expect(value).toBeCloseTo(product(a, left, row) * product(b, right, i % b.functionCount), 13);
    });
  });
});

function evaluate(l: number, row: number, x: number, y: number, z: number): number {
  const components = cartesianComponents(l);
  const matrix = solidHarmonics(l);
  return components.reduce(
    (sum, [i, j, k], column) => sum + matrix[row * components.length + column] * x ** i * y ** j * z ** k,
    0,
  );
}

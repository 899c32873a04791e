import { describe, expect, it } from 'vitest';
import { predictFromOthers, rationalInterpolant } from '../../../engine/curves/rational-interpolant';
import { seededRandom } from '../../support/random';

const random = seededRandom(7);
const abscissas = Array.from({ length: 12 }, (_, i) => i + 0.6 * random());

describe('rationalInterpolant', () => {
  it.each([0, 1, 3, 6, 11])('identity: degree %i reproduces polynomials of that degree', (degree) => {
    const polynomial = (x: number) => 3 + (0.2 * x - 1) ** degree;
    const f = rationalInterpolant(abscissas, abscissas.map(polynomial), degree);
    for (let x = 0.7; x < 11; x += 0.37) expect(Math.abs(f(x) - polynomial(x))).toBeLessThan(1e-9);
    abscissas.forEach((x) => {
      expect(f(x)).toBe(polynomial(x));
    });
  });

  it('identity: the error falls with the power degree + 1 of the spacing', () => {
    const error = (n: number) => {
      const points = Array.from({ length: n + 1 }, (_, i) => (4 * i) / n);
      const f = rationalInterpolant(points, points.map(Math.sin), 5);
      return Math.max(
        ...Array.from({ length: 397 }, (_, i) =>
          Math.abs(f((4 * (i + 0.5)) / 397) - Math.sin((4 * (i + 0.5)) / 397)),
        ),
      );
    };
    expect(Math.log2(error(20) / error(40))).toBeGreaterThan(5.7);
    expect(Math.log2(error(20) / error(40))).toBeLessThan(7);
  });

  it('identity: Runge’s function has no oscillation that grows with the number of points', () => {
    const runge = (x: number) => 1 / (1 + x * x);
    const points = Array.from({ length: 41 }, (_, i) => -5 + i / 4);
    const f = rationalInterpolant(points, points.map(runge), 3);
    for (let x = -5; x <= 5; x += 0.01) expect(Math.abs(f(x) - runge(x))).toBeLessThan(1e-3);
  });
});

describe('predictFromOthers', () => {
  it.each([3, 6, 9])('identity: is the interpolant through all other points, degree %i', (degree) => {
    const abscissas = Array.from({ length: 18 }, (_, k) => 0.3 * k + 0.02 * k * k);
    const values = abscissas.map((x) => Math.sin(x) + 1 / (1 + x * x));
    const predicted = predictFromOthers(abscissas, values, degree);
    abscissas.forEach((x, left) => {
      const others = (list: readonly number[]) => list.filter((_, k) => k !== left);
      const isEnd = left === 0 || left === abscissas.length - 1;
      const expected = isEnd
        ? values[left]
        : rationalInterpolant(others(abscissas), others(values), degree)(x);
      expect(predicted[left]).toBeCloseTo(expected, 13);
    });
  });
});

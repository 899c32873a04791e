import { describe, expect, it } from 'vitest';
import {
  fixedPoint,
  ONE,
  PI,
  product,
  quotient,
  solvePositiveDefinite,
  squareRoot,
  toNumber,
} from '../../../engine/basis/fixed-point';

/** distance in units of the last place, 2⁻²⁰⁰ */
const distance = (first: bigint, second: bigint) => Number(first > second ? first - second : second - first);

describe('fixed-point numbers', () => {
  it('identity: a double survives the way there and back', () => {
    for (const value of [1, -0.1, 1 / 3, 6994.673813, 1.2e-9, 0])
      expect(toNumber(fixedPoint(value))).toBe(value);
  });

  it('identity: quotient and square root undo product and square', () => {
    for (const value of [2, 0.037, 1000.5].map(fixedPoint)) {
      expect(distance(product(quotient(ONE, value), value), ONE)).toBeLessThan(2000);
      const root = squareRoot(value);
      expect(distance(product(root, root), value)).toBeLessThan(2000);
    }
  });

  it('independent: π agrees with the formula of Machin, 16 arctan(1/5) − 4 arctan(1/239)', () => {
    const arcTangentOfInverse = (n: bigint) => {
      let sum = 0n;
      let power = ONE / n;
      for (let k = 1n; power !== 0n; k += 2n) {
        sum += k % 4n === 1n ? power / k : -power / k;
        power /= n * n;
      }
      return sum;
    };
    const machin = 16n * arcTangentOfInverse(5n) - 4n * arcTangentOfInverse(239n);
    expect(distance(machin, PI)).toBeLessThan(2 ** 200 * 1e-57);
  });

  it('identity: the solution of an ill-conditioned system gives back the right-hand side', () => {
    // Hilbert matrix: condition number 1.5e7 for n = 6
    const matrix = Array.from({ length: 6 }, (_, i) =>
      Array.from({ length: 6 }, (_, j) => ONE / BigInt(i + j + 1)),
    );
    const right = [3n, 1n, 4n, 1n, 5n, 9n].map((digit) => digit * ONE);
    const solution = solvePositiveDefinite(matrix, right);
    for (const [i, row] of matrix.entries()) {
      const sum = row.reduce((total, entry, j) => total + product(entry, solution[j]), 0n);
      expect(toNumber(sum - right[i])).toBeCloseTo(0, 45);
    }
  });
});

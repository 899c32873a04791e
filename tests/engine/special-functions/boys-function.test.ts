import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BOYS_MAX_ORDER, boysFunctionInto } from '../../../engine/special-functions/boys-function';

const SCALE = 10n ** 60n;

/**
 * F_0 … F_maxOrder of T = numerator/2^10 in integers that count units of 1e-60: the series
 * Σ_i (−T)^i / (i! (2m + 2i + 1)). Its terms cancel, but rounding stays below 600 e^T units, so that for T ≤ 45 and
 * F_m ≥ 1e-20 more than 17 digits are right.
 */
function boysByIntegers(maxOrder: number, numerator: bigint): number[] {
  return Array.from({ length: maxOrder + 1 }, (_, order) => {
    let power = SCALE;
    let sum = 0n;
    for (let i = 0n; power !== 0n || i < 2n; i++) {
      sum += power / BigInt(2 * order + 1 + 2 * Number(i));
      power = (-power * numerator) / (1024n * (i + 1n));
      if (i > 600n) throw new Error('series did not end');
    }
    return Number(`${sum}e-60`);
  });
}

function boys(maxOrder: number, argument: number): number[] {
  const target = new Float64Array(maxOrder + 1);
  boysFunctionInto(maxOrder, argument, target);
  return [...target];
}

function largestRelativeError(actual: readonly number[], expected: readonly number[]): number {
  return Math.max(...actual.map((value, i) => Math.abs(value / expected[i] - 1)));
}

describe('boysFunctionInto', () => {
  it('independent: the series summed in integers, between, on and beyond the points of the table', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 45 * 1024 }),
        fc.integer({ min: 0, max: 12 }),
        (numerator, order) => {
          const error = largestRelativeError(
            boys(order, numerator / 1024),
            boysByIntegers(order, BigInt(numerator)),
          );
          expect(error).toBeLessThan(2e-15);
        },
      ),
      { seed: 7, numRuns: 300 },
    );
  });

  it('independent: every order at once, where the downward recursion is longest', () => {
    for (const argument of [0, 1 / 64, 0.5, 3, 17.25, 35.984375, 36, 40]) {
      const expected = boysByIntegers(BOYS_MAX_ORDER, BigInt(argument * 1024));
      expect(largestRelativeError(boys(BOYS_MAX_ORDER, argument), expected)).toBeLessThan(2e-15);
    }
  });

  it('identity: F_m(0) = 1/(2m + 1)', () => {
    boys(BOYS_MAX_ORDER, 0).forEach((value, m) => {
      expect(value).toBeCloseTo(1 / (2 * m + 1), 16);
    });
  });

  it('identity: for huge T, F_m = (2m − 1)!! / (2T)^m · ½√(π/T)', () => {
    for (const argument of [1e3, 1e8, 1e15]) {
      let expected = 0.5 * Math.sqrt(Math.PI / argument);
      boys(4, argument).forEach((value, m) => {
        expect(Math.abs(value / expected - 1)).toBeLessThan(1e-14);
        expected *= (2 * m + 1) / (2 * argument);
      });
    }
    expect(boys(2, Number.MAX_VALUE).every((value) => value >= 0 && value < 1e-150)).toBe(true);
  });

  it('identity: 2T F_(m+1) = (2m + 1) F_m − e^−T, whatever the highest order asked for', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 60, noNaN: true }), (argument) => {
        const all = boys(16, argument);
        for (let m = 0; m < 16; m++) {
          const [value, next] = boys(m + 1, argument).slice(m);
          expect(Math.abs(value - all[m])).toBeLessThan(3e-15 * all[m]);
          expect(Math.abs(2 * argument * next - (2 * m + 1) * value + Math.exp(-argument))).toBeLessThan(
            1e-14,
          );
        }
      }),
      { seed: 11, numRuns: 200 },
    );
  });
});

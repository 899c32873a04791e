import { describe, expect, it } from 'vitest';
import { findZeroCrossing } from '../../../engine/curves/zero-crossing';

function crossing(f: (x: number) => number, a: number, b: number, tolerance: number) {
  let evaluations = 0;
  const found = findZeroCrossing(
    (x) => {
      evaluations++;
      return f(x);
    },
    { x: a, value: f(a) },
    { x: b, value: f(b) },
    tolerance,
  );
  if (found.kind !== 'found') throw new Error('not found');
  return { ...found, evaluations };
}

describe('findZeroCrossing', () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ['√2', (x) => x * x - 2, 0, 2, Math.SQRT2],
    ['√2 from the other side', (x) => x * x - 2, 2, 0, Math.SQRT2],
    ['the Dottie number', (x) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    ['a triple root', (x) => (x - 1) ** 3, 0, 5, 1],
    ['a jump', (x) => (x < 0.3 ? -1 : 1), 0, 1, 0.3],
    ['a steep flank', (x) => Math.exp(40 * x) - 1e9, -1, 2, Math.log(1e9) / 40],
  ])('identity: finds %s within the uncertainty that it states', (_, f, a, b, root) => {
    for (const tolerance of [1e-3, 1e-9]) {
      const { x, uncertainty, evaluations } = crossing(f, a, b, tolerance);
      expect(uncertainty).toBeLessThanOrEqual(tolerance);
      expect(Math.abs(x - root)).toBeLessThanOrEqual(uncertainty + 1e-15);
      expect(evaluations).toBeLessThan(60);
    }
  });

  it('identity: needs far fewer places than bisection where the function is smooth', () => {
    expect(crossing((x) => Math.cos(x) - x, 0, 1, 1e-9).evaluations).toBeLessThan(10);
  });

  it('identity: says where the function could not be had, and refuses ends of one sign', () => {
    const side = (x: number, value: number) => ({ x, value });
    expect(findZeroCrossing(() => undefined, side(0, -1), side(1, 1), 1e-3)).toEqual({
      kind: 'undefined',
      x: 0.5,
    });
    expect(() => findZeroCrossing(() => 0, side(0, 1), side(1, 1), 1e-3)).toThrow(RangeError);
  });
});

import { describe, expect, it } from 'vitest';
import { innerTail, outerTail } from '../../../engine/curves/curve-tails';

const sample = (f: (r: number) => number, ...distances: number[]) =>
  distances.map((distance) => ({ distance, energy: f(distance) }));

describe('outerTail', () => {
  it.each([4, 6])('identity: C/r^%i is recognised and continued', (n) => {
    const f = (r: number) => -100 - 7 / r ** n;
    const tail = outerTail(sample(f, 6, 7, 8, 9.5), -100);
    expect(tail).toMatchObject({ form: 'inversePower', limit: -100, limitMissedBy: 0 });
    expect(tail.rate).toBeCloseTo(n, 6);
    expect(tail.energyAt(20)).toBeCloseTo(f(20), 12);
  });

  it('identity: an exponential is recognised and continued, from above as well', () => {
    for (const sign of [-1, 1]) {
      const f = (r: number) => -1 + sign * 0.3 * Math.exp(-1.3 * r);
      const tail = outerTail(sample(f, 4, 5, 5.5), -1);
      expect(tail.form).toBe('exponential');
      expect(tail.rate).toBeCloseTo(1.3, 9);
      expect(tail.energyAt(12)).toBeCloseTo(f(12), 12);
    }
  });

  it('identity: a limit that the curve does not approach is not used, and the gap is given', () => {
    const f = (r: number) => -1 - Math.exp(-r);
    const tail = outerTail(sample(f, 10, 20, 40), -1.01);
    expect(tail.form).toBe('constant');
    expect(tail.limit).toBe(f(40));
    expect(tail.limitMissedBy).toBeCloseTo(-0.01, 12);
    expect(tail.energyAt(100)).toBe(f(40));
  });

  it('identity: without a limit the last energy is kept', () => {
    expect(outerTail(sample((r) => 1 / r, 2, 3, 4))).toMatchObject({
      form: 'constant',
      limit: 0.25,
      limitMissedBy: 0,
    });
  });
});

describe('innerTail', () => {
  it('identity: nuclear repulsion goes on', () => {
    const f = (r: number) => -3 + 4 / r;
    const tail = innerTail(sample(f, 0.5, 0.7, 1));
    expect(tail.form).toBe('repulsion');
    expect(tail.energyAt(0.1)).toBeCloseTo(f(0.1), 10);
  });

  it('identity: a curve that does not rise inwards is held at its first energy', () => {
    const tail = innerTail(sample((r) => r, 1, 2, 3));
    expect([tail.form, tail.energyAt(0.2)]).toEqual(['constant', 1]);
  });
});

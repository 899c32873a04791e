import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type ScanRange, scanValues } from '../../../engine/molecule/scan-values';

function refusal(range: ScanRange): string {
  try {
    scanValues(range);
  } catch (error) {
    const { code, place } = error as { code: string; place: string };
    return `${code} at ${place}`;
  }
  return 'accepted';
}

describe('scanValues', () => {
  it('identity: both ends are exact, the steps even, rising or falling', () => {
    const end = fc.double({ min: 0.01, max: 100, noNaN: true });
    fc.assert(
      fc.property(end, end, fc.integer({ min: 2, max: 500 }), (from, to, count) => {
        fc.pre(from !== to);
        const values = scanValues({ from, to, count });
        expect(values).toHaveLength(count);
        expect([values[0], values.at(-1)]).toEqual([from, to]);
        const step = (to - from) / (count - 1);
        values.forEach((value, i) => {
          expect(Math.abs(value - (from + i * step))).toBeLessThan(1e-12);
        });
      }),
      { seed: 20261201 },
    );
  });

  it('identity: round numbers stay round', () => {
    expect(scanValues({ from: 0.5, to: 2.5, count: 21 })[1]).toBe(0.6);
    expect(scanValues({ from: 0.4, to: 5, count: 24 })[2]).toBe(0.8);
    expect(scanValues({ from: 0.8, to: 3.2, count: 33 })[3]).toBe(1.025);
  });

  it('identity: a list is taken in the order given', () => {
    expect(scanValues({ values: [2, 0.5, 1] })).toEqual([2, 0.5, 1]);
  });

  it.each([1, 0, -3, 2.5, 10_001, 1e6, Number.NaN, Number.POSITIVE_INFINITY])(
    'identity: %d points are refused',
    (count) => {
      expect(refusal({ from: 1, to: 2, count })).toBe('scan.count at scan.count');
    },
  );

  it('identity: lists that are empty, too long, not finite or repeat themselves are refused at their place', () => {
    expect(refusal({ values: [] })).toBe('scan.count at scan.values');
    expect(refusal({ values: Array.from({ length: 10_001 }, (_, i) => i) })).toBe(
      'scan.count at scan.values',
    );
    expect(refusal({ values: [1, Number.NaN] })).toBe('scan.value at scan.values[1]');
    expect(refusal({ values: [1, 2, 1] })).toBe('scan.value at scan.values[2]');
  });

  it('identity: ranges without finite ends or without width are refused at their place', () => {
    expect(refusal({ from: Number.NaN, to: 2, count: 3 })).toBe('scan.value at scan.from');
    expect(refusal({ from: 1, to: Number.POSITIVE_INFINITY, count: 3 })).toBe('scan.value at scan.to');
    expect(refusal({ from: 2, to: 2, count: 3 })).toBe('scan.value at scan.to');
  });
});

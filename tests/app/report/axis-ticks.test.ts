import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisTicks, tickLabel } from '../../../app/report/axis-ticks';

describe('axisTicks', () => {
  it('gives round numbers inside the range, ends included', () => {
    expect(axisTicks(-1.2, -0.8, 4).labels).toEqual(['−1.2', '−1.1', '−1.0', '−0.9', '−0.8']);
    expect(axisTicks(0.4, 6, 6).labels).toEqual(['1', '2', '3', '4', '5', '6']);
    expect(axisTicks(-112.3456, -112.3441, 3).labels).toEqual(['−112.3455', '−112.3450', '−112.3445']);
  });

  it('for any range stays inside it, evenly spaced, with about as many ticks as wanted and distinct labels', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1000, max: 1000, noNaN: true }),
        fc.double({ min: 1e-4, max: 100, noNaN: true }),
        fc.integer({ min: 3, max: 8 }),
        (low, width, wanted) => {
          const { values, labels } = axisTicks(low, low + width, wanted);
          expect(values.length).toBeGreaterThanOrEqual(Math.floor(wanted / 2.5));
          expect(values.length).toBeLessThanOrEqual(wanted + 1);
          expect(new Set(labels).size).toBe(values.length);
          for (const value of values) {
            expect(value).toBeGreaterThan(low - 1e-6 * width);
            expect(value).toBeLessThan(low + width + 1e-6 * width);
          }
        },
      ),
      { seed: 20240611 },
    );
  });

  it('writes a true minus sign, and none on zero', () => {
    expect(tickLabel(-0.00001, 2)).toBe('0.00');
    expect(tickLabel(-1.5, 1)).toBe('−1.5');
  });
});

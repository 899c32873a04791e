import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { contractRuns, packRuns } from '../../../engine/integrals/contraction-runs';

const number = fc.double({ min: -1, max: 1, noNaN: true });

describe('contractRuns', () => {
  it('independent: the sum as written, whether runs are joined or not and for every remainder of the unrolling', () => {
    const width = 9;
    const run = fc.record({ source: fc.integer({ min: 0, max: 4 }), length: fc.integer({ min: 1, max: 5 }) });
    const problem = fc.record({
      // few different sources, so that neighbours often share one
      shapes: fc.array(run, { minLength: 1, maxLength: 2 }),
      choice: fc.array(fc.nat(1), { minLength: 1, maxLength: 5 }),
      count: fc.integer({ min: 0, max: 8 }),
      skipped: fc.integer({ min: 0, max: 2 }),
      numbers: fc.array(number, { minLength: 150, maxLength: 150 }),
    });
    fc.assert(
      fc.property(problem, ({ shapes, choice, count, skipped, numbers }) => {
        let end = 0;
        const runs = choice.map((which, factor) => {
          const { source, length } = shapes[which % shapes.length];
          const target = end;
          end += length;
          return { factor, source, length, target };
        });
        const factors = Float64Array.from(numbers.slice(0, runs.length * (count + skipped)));
        const source = Float64Array.from(numbers.slice(60, 60 + count * width));
        const target = new Float64Array(end + 2).fill(0.25);
        contractRuns(packRuns(runs), factors, runs.length, skipped, source, width, count, target, 2);

        const expected = new Float64Array(end + 2).fill(0.25);
        for (const { factor, source: from, length, target: to } of runs)
          for (let n = 0; n < length; n++)
            for (let k = 0; k < count; k++)
              expected[2 + to + n] +=
                factors[(skipped + k) * runs.length + factor] * source[k * width + from + n];
        target.forEach((value, i) => {
          expect(Math.abs(value - expected[i])).toBeLessThan(1e-14);
        });
      }),
      { seed: 9, numRuns: 300 },
    );
  });
});

describe('packRuns', () => {
  it('identity: neighbours with one source and length share a run, others do not', () => {
    const packed = packRuns([
      { factor: 0, source: 1, length: 3, target: 0 },
      { factor: 1, source: 1, length: 3, target: 3 },
      { factor: 2, source: 1, length: 3, target: 6 },
      { factor: 3, source: 4, length: 6, target: 9 },
    ]);
    expect([...packed]).toEqual([0, 1, 3, 0, 3, 2, 1, 3, 6, -1, 3, 4, 6, 9, -1]);
  });
});

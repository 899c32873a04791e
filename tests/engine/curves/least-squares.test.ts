import { describe, expect, it } from 'vitest';
import { fitLeastSquares } from '../../../engine/curves/least-squares';

describe('fitLeastSquares', () => {
  it('published: the banana-shaped valley of Rosenbrock leads to (1, 1)', () => {
    const fit = fitLeastSquares(
      ([x, y]) => ({
        residuals: [10 * (y - x * x), 1 - x],
        derivatives: [
          [-20 * x, 10],
          [-1, 0],
        ],
      }),
      [-1.2, 1],
    );
    expect(fit.termination.kind).toBe('converged');
    for (const value of fit.parameters)
      expect(value).toMatchPublished({
        printed: '1',
        source: 'H. H. Rosenbrock, Comput. J. 3, 175 (1960), value from memory',
        tolerance: 1e-9,
        because: 'an exact zero of the residuals',
      });
  });

  it('identity: a straight line is fitted as its normal equations say', () => {
    const [xs, ys] = [
      [0, 1, 2, 3],
      [1, 2.5, 2.4, 4.1],
    ];
    const fit = fitLeastSquares(
      ([a, b]) => ({ residuals: xs.map((x, i) => a + b * x - ys[i]), derivatives: xs.map((x) => [1, x]) }),
      [0, 0],
    );
    expect(fit.termination.kind).toBe('converged');
    // slope Σ(x − x̄)y/Σ(x − x̄)² = 4.6/5, intercept ȳ − slope·x̄ = 2.5 − 1.38
    expect(fit.parameters[1]).toBeCloseTo(0.92, 10);
    expect(fit.parameters[0]).toBeCloseTo(1.12, 10);
  });

  it('identity: residuals that are no numbers are said, and a model that cannot be met ends', () => {
    const broken = fitLeastSquares(() => ({ residuals: [Number.NaN], derivatives: [[1]] }), [1]);
    expect(broken.termination).toEqual({ kind: 'notFinite', quantity: 'residuals at the start' });
    // derivatives of the wrong sign: no step ever helps
    const misled = fitLeastSquares(([x]) => ({ residuals: [x - 3], derivatives: [[-1]] }), [1]);
    expect(misled.termination.kind).toBe('stagnated');
    expect(misled.parameters).toEqual([1]);
  });

  it('identity: a slope without end is followed to the limit of iterations', () => {
    const fit = fitLeastSquares(([x]) => ({ residuals: [1 / x], derivatives: [[-1 / (x * x)]] }), [1]);
    expect(fit.termination).toEqual({ kind: 'iterationLimit', limit: 500 });
    expect(fit.parameters[0]).toBeGreaterThan(1e100);
  });
});

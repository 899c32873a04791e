import { describe, expect, it } from 'vitest';
import { minimiseQuasiNewton, type SmoothFunction } from '../../../engine/calculation/quasi-newton';
import { UNATTENDED } from '../../../engine/termination';

const options = {
  gradientTolerance: 1e-9,
  maximumIterations: 200,
  longestStep: 1,
  noise: 1e-15,
  lowest: [-10, -10],
  highest: [10, 10],
  control: UNATTENDED,
  stage: 'test',
};

/** H. H. Rosenbrock, Comput. J. 3, 175 (1960): a curved valley, lowest at (1, 1). */
const valley: SmoothFunction = {
  value: ([x, y]) => 100 * (y! - x! * x!) ** 2 + (1 - x!) ** 2,
  derivatives: ([x, y]) => ({
    gradient: [-400 * x! * (y! - x! * x!) - 2 * (1 - x!), 200 * (y! - x! * x!)],
    curvature: [1200 * x! * x! - 400 * y! + 2, 200],
  }),
};

describe('minimiseQuasiNewton', () => {
  it('published: finds the end of Rosenbrock’s valley from his starting point', () => {
    const { x, value, residual, termination } = minimiseQuasiNewton(valley, [-1.2, 1], options);
    expect(termination).toEqual({ kind: 'converged' });
    expect(Math.max(...x.map((xi) => Math.abs(xi - 1)))).toBeLessThan(1e-8);
    expect(value).toBeLessThan(1e-15);
    expect(residual).toBeLessThanOrEqual(1e-9);
  });

  it('identity: a minimum outside the bounds is sought along them', () => {
    // on the edge y = ½ the lowest point solves 200x³ − 99x − 1 = 0 there
    const { x, termination } = minimiseQuasiNewton(valley, [0.5, 0.2], { ...options, highest: [10, 0.5] });
    expect(termination.kind).toBe('converged');
    expect(x[1]).toBe(0.5);
    expect(Math.abs(200 * x[0]! ** 3 - 99 * x[0]! - 1)).toBeLessThan(1e-8);
  });

  it('identity: from a maximum’s flank it goes down, whatever the curvature says', () => {
    const double: SmoothFunction = {
      value: ([x]) => x! ** 4 - x! ** 2,
      derivatives: ([x]) => ({ gradient: [4 * x! ** 3 - 2 * x!], curvature: [12 * x! * x! - 2] }),
    };
    const { x } = minimiseQuasiNewton(double, [0.05], { ...options, lowest: [-10], highest: [10] });
    expect(Math.abs(x[0]! - Math.SQRT1_2)).toBeLessThan(1e-8);
  });

  it('identity: says why it stopped short', () => {
    const end = (target: SmoothFunction, changes: Partial<typeof options> = {}) =>
      minimiseQuasiNewton(target, [-1.2, 1], { ...options, ...changes }).termination;
    expect(end(valley, { maximumIterations: 3 })).toEqual({ kind: 'iterationLimit', limit: 3 });
    expect(end(valley, { control: { ...UNATTENDED, isCancelled: () => true } })).toEqual({
      kind: 'cancelled',
    });
    expect(end({ ...valley, value: () => Number.POSITIVE_INFINITY })).toEqual({
      kind: 'notFinite',
      quantity: 'energy',
    });
    // derivatives that point uphill
    const wrong: SmoothFunction = {
      value: valley.value,
      derivatives: (x) => ({ gradient: valley.derivatives(x).gradient.map((g) => -g), curvature: [1, 1] }),
    };
    expect(end(wrong).kind).toBe('stagnated');
  });
});

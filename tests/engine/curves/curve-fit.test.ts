import { describe, expect, it } from 'vitest';
import { fitExtendedRydberg, fitMorse } from '../../../engine/curves/curve-fit';
import { HYDROGEN_CURVE } from '../../reference-data/hydrogen-curve';
import { seededRandom } from '../../support/random';

type Curve = (r: number) => number;
const morse =
  (depth: number, a: number, re: number, limit = 0): Curve =>
  (r) =>
    limit + depth * ((1 - Math.exp(-a * (r - re))) ** 2 - 1);
const rydberg =
  (depth: number, re: number, [a1, a2, a3]: readonly number[], limit = 0): Curve =>
  (r) => {
    const rho = r - re;
    return limit - depth * (1 + a1 * rho + a2 * rho ** 2 + a3 * rho ** 3) * Math.exp(-a1 * rho);
  };
const sample = (f: Curve, from: number, to: number, count: number) =>
  Array.from({ length: count }, (_, i) => from + ((to - from) * i) / (count - 1)).map((distance) => ({
    distance,
    energy: f(distance),
  }));
function present<T>(value: T | undefined): T {
  if (value === undefined) throw new Error('no fit');
  return value;
}
const HYDROGEN = HYDROGEN_CURVE.map(([distance, energy]) => ({ distance, energy: Number(energy) }));

describe('fitMorse', () => {
  it.each([
    [0.1744, 1.02764, 1.40201, -1, 0.5, 8],
    [0.36, 1.42, 2.07, -108.9, 1.5, 7],
    [0.0001, 0.7, 5.6, -5.7, 4, 14],
  ])(
    'identity: points of a Morse curve of depth %f give its parameters back',
    (depth, a, re, limit, from, to) => {
      for (const fixed of [{}, { limit }]) {
        const fit = present(fitMorse(sample(morse(depth, a, re, limit), from, to, 30), fixed));
        expect(fit.termination.kind).toBe('converged');
        expect(fit.parameters.depth / depth).toBeCloseTo(1, 7);
        expect(fit.parameters.steepness).toBeCloseTo(a, 7);
        expect(fit.parameters.equilibrium).toBeCloseTo(re, 7);
        expect(fit.parameters.limit).toBeCloseTo(limit, 9);
        expect(fit.largestPerCm).toBeLessThan(1e-6);
      }
    },
  );

  it('identity: the fit is a minimum: no parameter moved either way makes the residuals smaller', () => {
    const fit = present(fitMorse(HYDROGEN, { limit: -1 }));
    expect(fit.termination.kind).toBe('converged');
    const { depth, equilibrium, steepness } = fit.parameters;
    const sum = (d: number, a: number, re: number) =>
      fit.residuals.reduce((total, { distance }) => {
        const point = present(HYDROGEN.find((candidate) => candidate.distance === distance));
        return total + (morse(d, a, re, -1)(distance) - point.energy) ** 2;
      }, 0);
    const best = sum(depth, steepness, equilibrium);
    for (const factor of [0.999, 1.001]) {
      expect(sum(depth * factor, steepness, equilibrium)).toBeGreaterThan(best);
      expect(sum(depth, steepness * factor, equilibrium)).toBeGreaterThan(best);
      expect(sum(depth, steepness, equilibrium * factor)).toBeGreaterThan(best);
    }
  });

  it('identity: points above the limit are left out unless asked for', () => {
    expect(present(fitMorse(HYDROGEN, { limit: -1 })).residuals[0].distance).toBe(0.8);
    expect(present(fitMorse(HYDROGEN, { limit: -1, highest: 0 })).residuals[0].distance).toBe(0.4);
  });

  it('identity: residuals, their mean square and their largest agree', () => {
    const fit = present(fitMorse(HYDROGEN, { limit: -1 }));
    const sizes = fit.residuals.map(({ residualPerCm }) => Math.abs(residualPerCm));
    expect(fit.largestPerCm).toBe(Math.max(...sizes));
    expect(fit.rootMeanSquarePerCm ** 2).toBeCloseTo(sizes.reduce((s, x) => s + x * x, 0) / sizes.length, 6);
    // H2 is not a Morse oscillator: hundreds of cm⁻¹, and that is said
    expect(fit.largestPerCm).toBeGreaterThan(100);
  });

  it('identity: fewer points than parameters give no fit', () => {
    expect(fitMorse(sample(morse(0.1, 1, 1.4), 1.3, 1.5, 3), { highest: 0 })).toBeUndefined();
  });
});

describe('fitExtendedRydberg', () => {
  it('identity: points of such a curve give its parameters back', () => {
    const coefficients = [2.1, 1.05, 0.4] as const;
    for (const limit of [0, -76]) {
      const points = sample(rydberg(0.17, 1.83, coefficients, limit), 1.1, 7, 40);
      for (const options of [{}, { limit }]) {
        const fit = present(fitExtendedRydberg(points, options));
        expect(fit.termination.kind).toBe('converged');
        expect(fit.parameters.depth).toBeCloseTo(0.17, 7);
        expect(fit.parameters.equilibrium).toBeCloseTo(1.83, 7);
        fit.parameters.coefficients.forEach((value, k) => {
          expect(value).toBeCloseTo(coefficients[k], 6);
        });
      }
    }
  });

  it('identity: it describes H2 ten times better than a Morse curve does', () => {
    const options = { limit: -1 };
    const extended = present(fitExtendedRydberg(HYDROGEN, options));
    expect(extended.termination.kind).toBe('converged');
    expect(extended.rootMeanSquarePerCm).toBeLessThan(
      present(fitMorse(HYDROGEN, options)).rootMeanSquarePerCm / 10,
    );
    expect(extended.energyAt(extended.parameters.equilibrium)).toBeCloseTo(
      -1 - extended.parameters.depth,
      12,
    );
  });

  it('identity: noise moves the parameters by about its size only', () => {
    const random = seededRandom(5);
    const f = rydberg(0.17, 1.83, [2.1, 1.05, 0.4]);
    const points = sample((r) => f(r) + 1e-7 * (random() - 0.5), 1.1, 7, 40);
    const fit = present(fitExtendedRydberg(points, { limit: 0 }));
    expect(fit.termination.kind).toBe('converged');
    expect(Math.abs(fit.parameters.depth - 0.17)).toBeLessThan(1e-6);
    expect(fit.rootMeanSquarePerCm).toBeLessThan(0.01);
  });

  it('identity: fewer points than parameters give no fit', () => {
    expect(fitExtendedRydberg(sample(morse(0.1, 1, 1.4), 1.3, 1.5, 5), { highest: 0 })).toBeUndefined();
  });
});

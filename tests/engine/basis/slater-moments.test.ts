import { describe, expect, it } from 'vitest';
import { slaterGaussianMoments } from '../../../engine/basis/slater-moments';
import { integrateOverRadius } from '../../support/radial-quadrature';

const EXPONENTS = [1e-3, 0.03, 0.11, 0.5, 1, 4, 23, 150, 1000];

describe('slaterGaussianMoments', () => {
  it.each(EXPONENTS)('independent: moments of exponent %s agree with quadrature', (exponent) => {
    const moments = slaterGaussianMoments(exponent, 9);
    for (const [k, moment] of moments.entries()) {
      const reference = integrateOverRadius((r) => r ** k * Math.exp(-r - exponent * r * r));
      expect(moment / reference - 1).toBeCloseTo(0, 13);
    }
  });

  it.each(EXPONENTS)('identity: integration by parts links three moments, exponent %s', (exponent) => {
    const moments = slaterGaussianMoments(exponent, 9);
    for (let k = 1; k < 9; k++) {
      const right = 2 * exponent * moments[k + 1] + moments[k];
      expect((k * moments[k - 1]) / right - 1).toBeCloseTo(0, 14);
    }
  });
});

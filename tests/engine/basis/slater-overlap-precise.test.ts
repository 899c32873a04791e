import { describe, expect, it } from 'vitest';
import { bestOverlap, type SlaterFunction } from '../../../engine/basis/slater-overlap';
import { preciseOverlap } from '../../../engine/basis/slater-overlap-precise';

const TARGETS: readonly SlaterFunction[] = [
  { principal: 1, angularMomentum: 0 },
  { principal: 2, angularMomentum: 0 },
  { principal: 2, angularMomentum: 1 },
  { principal: 3, angularMomentum: 0 },
  { principal: 3, angularMomentum: 1 },
];

describe.each(TARGETS)('preciseOverlap with n = $principal, l = $angularMomentum', (target) => {
  it('independent: overlap, slope and coefficients agree with the form in doubles', () => {
    for (const exponents of [[1.7, 0.31, 0.06], [0.25], [900, 40, 0.5, 0.03]]) {
      const precise = preciseOverlap(target, exponents);
      const best = bestOverlap(target, exponents)!;
      expect(1 - precise.deficit).toBeCloseTo(best.value, 14);
      for (const j of exponents.keys()) {
        expect(precise.gradient[j]).toBeCloseTo(best.gradient.get(j, 0), 13);
        expect(precise.coefficients[j]).toBeCloseTo(best.coefficients[j], 13);
      }
    }
  });

  it('identity: a difference of overlaps keeps digits that doubles lose', () => {
    // the change over 1e-9 in ln α is the slope times 1e-9 and the curvature times 1e-18
    const exponents = [0.9, 0.2];
    const shift = 2 ** -30;
    const [low, high] = [1 - shift, 1 + shift].map((factor) =>
      preciseOverlap(target, [exponents[0] * factor, exponents[1]]),
    );
    const slope = (low.deficit - high.deficit) / Math.log((1 + shift) / (1 - shift));
    expect(slope / ((low.gradient[0] + high.gradient[0]) / 2)).toBeCloseTo(1, 6);
  });
});

import { describe, expect, it } from 'vitest';
import { unpairedElectrons } from '../../../engine/configuration-interaction/unpaired-electrons';

describe('unpairedElectrons', () => {
  it('identity: one determinant has as many as it has singly occupied orbitals, in every form', () => {
    for (const [occupations, unpaired] of [
      [[2, 2, 0, 0], 0],
      [[2, 1, 1, 1, 0], 3],
      [[], 0],
    ] as const) {
      expect(unpairedElectrons(occupations)).toEqual({
        linear: unpaired,
        quadratic: unpaired,
        quartic: unpaired,
      });
    }
  });

  it('identity: a bond whose antibonding orbital holds x electrons: 2x, 2x(2 − x), 2x²(2 − x)²', () => {
    for (const x of [0, 0.03, 0.4, 1]) {
      const { linear, quadratic, quartic } = unpairedElectrons([2 - x, x]);
      expect(linear).toBeCloseTo(2 * x, 14);
      expect(quadratic).toBeCloseTo(2 * x * (2 - x), 14);
      expect(quartic).toBeCloseTo(2 * x ** 2 * (2 - x) ** 2, 14);
    }
  });

  it('identity: occupations that rounding has led out of 0 … 2 count nothing', () => {
    expect(unpairedElectrons([2 + 1e-12, -1e-12])).toEqual({ linear: 0, quadratic: 0, quartic: 0 });
  });
});

import { describe, expect, it } from 'vitest';
import {
  normalisationNotes,
  primitiveNorm,
  primitiveOverlap,
  selfOverlap,
  withoutZeros,
} from '../../../engine/basis/normalisation';
import { integrateOverRadius } from '../../support/radial-quadrature';

/** ∫ x^(2l) over the unit sphere: 4π/(2l + 1) */
const angular = (l: number) => (4 * Math.PI) / (2 * l + 1);

describe('primitiveNorm and primitiveOverlap', () => {
  for (const l of [0, 1, 2, 3, 4]) {
    it(`independent: norm and overlap of x^${l} exp(−αr²) agree with quadrature`, () => {
      const between = (a: number, b: number) =>
        angular(l) * integrateOverRadius((r) => r ** (2 * l + 2) * Math.exp(-(a + b) * r * r));
      for (const [a, b] of [
        [0.3, 0.3],
        [2.5, 0.04],
        [40, 7],
      ]) {
        expect(primitiveNorm(a, l) ** 2 * between(a, a)).toBeCloseTo(1, 13);
        const overlap = primitiveNorm(a, l) * primitiveNorm(b, l) * between(a, b);
        expect(primitiveOverlap(a, b, l)).toBeCloseTo(overlap, 13);
      }
    });
  }
});

describe('selfOverlap', () => {
  it('published: the 3-Gaussian 1s function of the textbook is normalised to its six digits', () => {
    const shell = {
      angularMomentum: 0,
      exponents: [0.109818, 0.405771, 2.22766],
      coefficients: [0.444635, 0.535328, 0.154329],
    };
    expect(selfOverlap(shell)).toMatchPublished({
      printed: '1.00000',
      source: 'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, eq. (3.221): a normalised function',
    });
  });

  it('identity: two equal primitives of opposite sign vanish', () => {
    expect(selfOverlap({ angularMomentum: 1, exponents: [0.7, 0.7], coefficients: [2, -2] })).toBe(0);
  });
});

describe('withoutZeros', () => {
  it('identity: the primitives that do not contribute go, the self-overlap stays', () => {
    const shell = { angularMomentum: 2, exponents: [5, 1, 0.2], coefficients: [0, 0.4, 0.7] };
    expect(withoutZeros(shell)).toEqual({
      angularMomentum: 2,
      exponents: [1, 0.2],
      coefficients: [0.4, 0.7],
    });
    expect(selfOverlap(withoutZeros(shell))).toBe(selfOverlap(shell));
  });
});

describe('normalisationNotes', () => {
  const note = (coefficient: number) =>
    normalisationNotes(
      new Map([['Li', [{ angularMomentum: 0, exponents: [0.5], coefficients: [coefficient] }]]]),
    );

  it('identity: only a self-overlap off by more than 1e-3 is remarked on', () => {
    expect(note(1)).toEqual([]);
    expect(note(Math.sqrt(1.0009))).toEqual([]);
    expect(note(Math.sqrt(0.77))).toEqual([expect.stringMatching(/^Li, contraction 1: .*0\.770000/)]);
  });
});

import { describe, expect, it } from 'vitest';
import { franckCondonFactors } from '../../../engine/curves/franck-condon';
import type { RadialCurve } from '../../../engine/curves/radial-range';

const MASS = 5000;
const oscillator = (omega: number, centre: number): RadialCurve => ({
  energyAt: (r) => 0.5 * MASS * omega ** 2 * (r - centre) ** 2,
  limit: 0.5,
  computed: { from: centre - 3, to: centre + 3 },
});
const morse = (depth: number, a: number, re: number): RadialCurve => ({
  energyAt: (r) => depth * ((1 - Math.exp(-a * (r - re))) ** 2 - 1),
  limit: 0,
  computed: { from: 0.3 * re, to: 20 * re },
});
const factorial = (n: number): number => (n < 2 ? 1 : n * factorial(n - 1));

/** L_m^(k)(x) from its sum. */
function laguerre(m: number, k: number, x: number): number {
  let sum = 0;
  for (let i = 0; i <= m; i++)
    sum += ((-x) ** i * factorial(m + k)) / (factorial(m - i) * factorial(k + i) * factorial(i));
  return sum;
}

describe('franckCondonFactors', () => {
  it('identity: displaced oscillators of equal frequency have their closed form', () => {
    // |⟨m|n⟩|² = e^−S S^(n−m) (m!/n!) [L_m^(n−m)(S)]², S = μωd²/2, n ≥ m
    const [omega, shift] = [0.01, 0.3];
    const strength = (MASS * omega * shift ** 2) / 2;
    const { factors, termination } = franckCondonFactors(
      oscillator(omega, 8),
      oscillator(omega, 8 + shift),
      MASS,
      { mostLevels: 12, outermost: 14, tolerance: 1e-9 },
    );
    expect(termination.kind).toBe('converged');
    for (let row = 0; row < 12; row++)
      for (let column = 0; column < 12; column++) {
        const [m, n] = [Math.min(row, column), Math.max(row, column)];
        const exact =
          Math.exp(-strength) *
          strength ** (n - m) *
          (factorial(m) / factorial(n)) *
          laguerre(m, n - m, strength) ** 2;
        expect(Math.abs(factors[row][column] - exact)).toBeLessThan(1e-9);
      }
  });

  it('identity: oscillators of different frequency have their closed form from the ground level', () => {
    // |⟨0|0⟩|² = 2√(ωω′)/(ω + ω′)·exp(−μωω′d²/(ω + ω′))
    for (const [first, second, shift] of [
      [0.01, 0.007, 0.2],
      [0.006, 0.014, -0.1],
      [0.01, 0.02, 0],
    ]) {
      const { factors } = franckCondonFactors(oscillator(first, 8), oscillator(second, 8 + shift), MASS, {
        mostLevels: 3,
        outermost: 14,
        tolerance: 1e-9,
      });
      const exact =
        ((2 * Math.sqrt(first * second)) / (first + second)) *
        Math.exp((-MASS * first * second * shift ** 2) / (first + second));
      expect(Math.abs(factors[0][0] - exact)).toBeLessThan(1e-9);
      // without displacement even and odd levels do not mix
      if (shift === 0) expect(factors[0][1]).toBeLessThan(1e-12);
    }
  });

  it('identity: factors of a level add to one over a complete set', () => {
    const { sums } = franckCondonFactors(oscillator(0.01, 8), oscillator(0.008, 8.2), MASS, {
      mostLevels: 40,
      outermost: 14,
      tolerance: 1e-8,
    });
    for (const sum of sums.slice(0, 10)) expect(Math.abs(sum - 1)).toBeLessThan(1e-8);
  });

  it('identity: a curve with itself gives the unit matrix', () => {
    const curve = morse(0.1744, 1.02764, 1.40201);
    const { factors } = franckCondonFactors(curve, curve, 918.0764);
    expect(factors).toHaveLength(17);
    factors.forEach((row, i) => {
      row.forEach((factor, j) => {
        expect(Math.abs(factor - (i === j ? 1 : 0))).toBeLessThan(1e-8);
      });
    });
  });

  it('identity: what a bound final curve does not take goes to its continuum', () => {
    const { sums } = franckCondonFactors(morse(0.1744, 1.02764, 1.4), morse(0.02, 0.6, 3.4), 918.0764);
    for (const sum of sums) {
      expect(sum).toBeGreaterThan(0);
      expect(sum).toBeLessThan(1 + 1e-9);
    }
    expect(sums[0]).toBeLessThan(0.5);
  });

  it('identity: with a transition moment of r, neighbouring oscillator levels have strength n/(2μω)', () => {
    const omega = 0.01;
    const { strengths } = franckCondonFactors(oscillator(omega, 8), oscillator(omega, 8), MASS, {
      mostLevels: 6,
      outermost: 14,
      tolerance: 1e-10,
      transitionMoment: (r) => r,
    });
    if (!strengths) throw new Error('no strengths');
    for (let n = 1; n < 6; n++) {
      expect(strengths[n - 1][n] / (n / (2 * MASS * omega))).toBeCloseTo(1, 7);
      expect(strengths[n][n]).toBeCloseTo(64, 6);
    }
    expect(
      franckCondonFactors(oscillator(omega, 8), oscillator(omega, 8), MASS, { mostLevels: 1, outermost: 14 })
        .strengths,
    ).toBeUndefined();
  });

  it('identity: a repulsive final curve has no levels and takes no factor', () => {
    const repulsive: RadialCurve = { energyAt: (r) => 1 / r, limit: 0, computed: { from: 0.5, to: 10 } };
    const found = franckCondonFactors(morse(0.1744, 1.02764, 1.4), repulsive, 918.0764, { mostLevels: 2 });
    expect(found.factors).toEqual([[], []]);
    expect(found.sums).toEqual([0, 0]);
  });
});

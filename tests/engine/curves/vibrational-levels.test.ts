import { describe, expect, it } from 'vitest';
import { HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import type { RadialCurve } from '../../../engine/curves/radial-range';
import { vibrationalLevels } from '../../../engine/curves/vibrational-levels';

interface Morse {
  readonly depth: number;
  readonly steepness: number;
  readonly equilibrium: number;
}

/** Hydrogen-like: the parameters of C. C. Marston, G. G. Balint-Kurti, J. Chem. Phys. 91, 3571 (1989), from memory. */
const HYDROGEN: Morse = { depth: 0.1744, steepness: 1.02764, equilibrium: 1.40201 };
const NITROGEN: Morse = { depth: 0.36, steepness: 1.42, equilibrium: 2.07 };
const SHALLOW: Morse = { depth: 0.01, steepness: 0.5, equilibrium: 5 };

const morseCurve = ({ depth, steepness, equilibrium }: Morse, zero = 0): RadialCurve => ({
  energyAt: (r) => zero + depth * ((1 - Math.exp(-steepness * (r - equilibrium))) ** 2 - 1),
  limit: zero,
  computed: { from: 0.2 * equilibrium, to: 40 * equilibrium },
});
/** P. M. Morse, Phys. Rev. 34, 57 (1929): energies from the bottom of the well, hartree. */
function morseLevels({ depth, steepness }: Morse, mass: number): number[] {
  const count = Math.floor(Math.sqrt(2 * mass * depth) / steepness + 0.5);
  return Array.from({ length: count }, (_, v) => {
    const n = v + 0.5;
    return steepness * Math.sqrt((2 * depth) / mass) * n - (steepness ** 2 / (2 * mass)) * n * n;
  });
}
const perCm = (hartree: number) => hartree * HARTREE_IN_WAVENUMBERS;
const TIGHT = { tolerancePerCm: 1e-7 };

describe('vibrationalLevels', () => {
  it.each([
    ['a hydrogen-like well', HYDROGEN, 918.0764, 17],
    ['its heavier isotopologue', HYDROGEN, 1835.2415, 25],
    ['a nitrogen-like well', NITROGEN, 12850, 68],
    ['a shallow, wide well', SHALLOW, 6000, 22],
  ])('identity: all levels of %s have the closed form of Morse to 1e-6 cm⁻¹', (_, morse, mass, count) => {
    const exact = morseLevels(morse, mass);
    const found = vibrationalLevels(morseCurve(morse), mass, TIGHT);
    expect(exact).toHaveLength(count);
    expect(found.boundLevels).toBe(count);
    expect(found.converged).toBe(true);
    const worst = Math.max(...found.levels.map(({ energy }, v) => Math.abs(energy + morse.depth - exact[v])));
    expect(perCm(worst)).toBeLessThan(1e-6);
    expect(found.zeroPointPerCm).toBeCloseTo(perCm(exact[0]), 3);
    expect(found.dissociationPerCm).toBeCloseTo(perCm(morse.depth - exact[0]), 6);
  });

  it('identity: the default tolerance keeps its promise and the uncertainty covers the error', () => {
    const exact = morseLevels(HYDROGEN, 918.0764);
    const found = vibrationalLevels(morseCurve(HYDROGEN), 918.0764);
    found.levels.forEach(({ energy, uncertaintyPerCm }, v) => {
      const error = perCm(Math.abs(energy + HYDROGEN.depth - exact[v]));
      expect(error).toBeLessThan(1e-3);
      // a few roundings of the total come on top
      expect(error).toBeLessThanOrEqual(uncertaintyPerCm + 1e-9);
    });
  });

  it('identity: a total energy of −100 hartree added to the curve moves no level', () => {
    const found = vibrationalLevels(morseCurve(HYDROGEN, -100), 918.0764, TIGHT);
    const plain = vibrationalLevels(morseCurve(HYDROGEN), 918.0764, TIGHT);
    expect(found.levels).toHaveLength(plain.levels.length);
    found.levels.forEach(({ bindingPerCm }, v) => {
      expect(Math.abs(bindingPerCm - plain.levels[v].bindingPerCm)).toBeLessThan(1e-6);
    });
  });

  it.each([0, 1, 7, 20])(
    'identity: levels and B_v of r² + r⁻² have their closed form at J = %i',
    (rotation) => {
      // E = ω(2n + 1 + √((J + ½)² + 2μA)), and B = dE/d(J(J+1)) by the Hellmann–Feynman theorem
      const [mass, omega, strength] = [1500, 0.005, 0.4];
      const root = Math.sqrt((rotation + 0.5) ** 2 + 2 * mass * strength);
      const found = vibrationalLevels(
        {
          energyAt: (r) => 0.5 * mass * omega ** 2 * r * r + strength / (r * r),
          limit: 1,
          computed: { from: 0.2, to: 12 },
        },
        mass,
        { rotation, mostLevels: 20, outermost: 20, ...TIGHT },
      );
      expect(found.levels).toHaveLength(20);
      found.levels.forEach(({ energy, rotationalConstantPerCm }, n) => {
        expect(Math.abs(perCm(energy - omega * (2 * n + 1 + root)))).toBeLessThan(1e-6);
        expect(Math.abs(rotationalConstantPerCm - perCm(omega / (2 * root)))).toBeLessThan(1e-6);
      });
    },
  );

  it.each([0, 3, 12])(
    'identity: levels of 1/r² − 2/r (Kratzer) have their closed form at J = %i',
    (rotation) => {
      // A. Kratzer, Z. Phys. 3, 289 (1920): a Coulomb problem with angular momentum of any real value
      const [mass, depth, equilibrium] = [2000, 0.05, 2];
      const found = vibrationalLevels(
        {
          energyAt: (r) => depth * ((equilibrium / r) ** 2 - (2 * equilibrium) / r),
          limit: 0,
          computed: { from: 0.4, to: 40 },
        },
        mass,
        { rotation, mostLevels: 15, outermost: 40, ...TIGHT },
      );
      const shift = 0.5 + Math.sqrt((rotation + 0.5) ** 2 + 2 * mass * depth * equilibrium ** 2);
      found.levels.forEach(({ energy, quantumNumber }) => {
        const exact = (-0.5 * mass * (2 * depth * equilibrium) ** 2) / (quantumNumber + shift) ** 2;
        expect(Math.abs(perCm(energy - exact))).toBeLessThan(1e-6);
      });
      // the limit of a Coulomb tail holds infinitely many levels: only those that were asked for are computed
      expect(found.levels).toHaveLength(15);
    },
  );

  it('identity: a harmonic oscillator has evenly spaced levels', () => {
    const [mass, omega, centre] = [5000, 0.01, 10];
    const found = vibrationalLevels(
      {
        energyAt: (r) => 0.5 * mass * omega ** 2 * (r - centre) ** 2,
        limit: 0.6,
        computed: { from: 7, to: 13 },
      },
      mass,
      { mostLevels: 40, outermost: 20, ...TIGHT },
    );
    expect(found.levels).toHaveLength(40);
    found.levels.forEach(({ energy }, v) => {
      expect(Math.abs(perCm(energy - omega * (v + 0.5)))).toBeLessThan(1e-6);
    });
    expect(found.converged).toBe(true);
  });

  it('identity: two equal wells far apart have pairs of equal levels, and none is missed', () => {
    const [mass, omega] = [5000, 0.01];
    const well = (r: number) => 0.5 * mass * omega ** 2 * Math.min((r - 6) ** 2, (r - 9) ** 2);
    const { levels } = vibrationalLevels(
      { energyAt: well, limit: 0.4, computed: { from: 4, to: 12 } },
      mass,
      { mostLevels: 6, outermost: 14 },
    );
    expect(levels).toHaveLength(6);
    levels.forEach(({ energy }, v) => {
      expect(Math.abs(perCm(energy - omega * (Math.floor(v / 2) + 0.5)))).toBeLessThan(0.01);
    });
  });

  it('identity: a repulsive curve has no level, and that is a converged answer', () => {
    const found = vibrationalLevels(
      { energyAt: (r) => 1 / r, limit: 0, computed: { from: 0.5, to: 10 } },
      1000,
    );
    expect(found).toMatchObject({ levels: [], boundLevels: 0, converged: true });
    expect(found.zeroPointPerCm).toBeUndefined();
    expect(found.dissociationPerCm).toBeUndefined();
  });
});

describe('flags of vibrationalLevels', () => {
  it('identity: a wall that cuts the wave is noticed, and its effect estimated', () => {
    const exact = morseLevels(HYDROGEN, 918.0764);
    const found = vibrationalLevels(morseCurve(HYDROGEN), 918.0764, { outermost: 5 });
    expect(found.converged).toBe(false);
    expect(found.levels.some(({ converged }) => converged)).toBe(true);
    const cut = found.levels.filter(({ converged }) => !converged);
    expect(cut.length).toBeGreaterThan(0);
    found.levels.forEach(({ energy, uncertaintyPerCm, converged, quantumNumber }) => {
      const error = perCm(Math.abs(energy + HYDROGEN.depth - exact[quantumNumber]));
      if (converged) expect(error).toBeLessThan(1e-3);
      else expect(uncertaintyPerCm).toBeGreaterThan(1e-3);
      // first-order in the wall: a fair estimate while the effect is small
      if (error > 1e-3 && error < 1) {
        expect(uncertaintyPerCm / error).toBeGreaterThan(0.5);
        expect(uncertaintyPerCm / error).toBeLessThan(2);
      }
    });
  });

  it('identity: levels that reach beyond the computed points are named', () => {
    const curve = { ...morseCurve(HYDROGEN), computed: { from: 0.5, to: 6 } };
    const found = vibrationalLevels(curve, 918.0764);
    expect(found.converged).toBe(true);
    expect(found.beyondComputedRange.length).toBeGreaterThan(0);
    expect(found.beyondComputedRange).not.toContain(0);
    expect(found.beyondComputedRange).toContain(16);
    // what they name is first-order perturbation theory: move the tail by a hundredth, and the level follows
    const moved = vibrationalLevels(
      {
        ...curve,
        energyAt: (r) => curve.energyAt(r) * (r > 6 ? 0.99 : 1),
      },
      918.0764,
    );
    const shift = Math.abs(moved.levels[16].bindingPerCm - found.levels[16].bindingPerCm);
    expect(shift / (0.01 * found.levels[16].extrapolatedPerCm)).toBeCloseTo(1, 1);
  });

  it('identity: a tolerance that rounding does not allow ends unconverged', () => {
    const found = vibrationalLevels(morseCurve(SHALLOW, -100), 6000, { tolerancePerCm: 1e-13 });
    expect(found.termination.kind).not.toBe('converged');
    expect(found.converged).toBe(false);
    expect(found.levels.length).toBe(22);
  });
});

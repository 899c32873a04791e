import { describe, expect, it } from 'vitest';
import { HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import { centrifugalDistortions } from '../../../engine/curves/centrifugal-distortion';

const MASS = 1500;

describe('centrifugalDistortions', () => {
  it('identity: of r² + r⁻² every level has the closed form ω(¼ + 2μA)^(−3/2)/8', () => {
    // E = ω(2n + 1 + √(¼ + J(J + 1) + 2μA)): D is −½ of its second derivative by J(J + 1)
    const [omega, strength] = [0.005, 0.4];
    const curve = {
      energyAt: (r: number) => 0.5 * MASS * omega ** 2 * r * r + strength / (r * r),
      limit: 1,
      computed: { from: 0.2, to: 12 },
    };
    const exact = (omega / 8) * (0.25 + 2 * MASS * strength) ** -1.5 * HARTREE_IN_WAVENUMBERS;
    const found = centrifugalDistortions(curve, MASS, 12);
    expect(found).toHaveLength(12);
    for (const value of found) expect(value! / exact).toBeCloseTo(1, 4);
  });

  it('identity: of a Coulomb tail (Kratzer) levels have their closed form', () => {
    // E = −2μ(Dre)²/(v + s)², s = ½ + √(¼ + J(J + 1) + 2μDre²)
    const [depth, equilibrium] = [0.05, 2];
    const curve = {
      energyAt: (r: number) => depth * ((equilibrium / r) ** 2 - (2 * equilibrium) / r),
      limit: 0,
      computed: { from: 0.4, to: 40 },
    };
    const root = Math.sqrt(0.25 + 2 * MASS * depth * equilibrium ** 2);
    const found = centrifugalDistortions(curve, MASS, 8);
    found.forEach((value, v) => {
      const n = v + 0.5 + root;
      const strength = 2 * MASS * (depth * equilibrium) ** 2;
      // −½ d²/dx² of −strength·n⁻² with dn/dx = 1/(2·root)
      const exact = strength * ((3 * n ** -4) / (4 * root ** 2) + n ** -3 / (4 * root ** 3));
      expect(value! / (exact * HARTREE_IN_WAVENUMBERS)).toBeCloseTo(1, 4);
    });
    expect(found).toHaveLength(8);
  });

  it('identity: no constant is given of a level that rotation lifts out of its well', () => {
    const [depth, steepness, equilibrium] = [0.1744, 1.02764, 1.40201];
    const curve = {
      energyAt: (r: number) => depth * ((1 - Math.exp(-steepness * (r - equilibrium))) ** 2 - 1),
      limit: 0,
      computed: { from: 0.3, to: 40 },
    };
    // a mass at which the level v = 17 lies 0.05 cm⁻¹ below the limit
    const turns = 17.5 + 0.02;
    const mass = (steepness * turns) ** 2 / (2 * depth);
    const found = centrifugalDistortions(curve, mass, 100);
    expect(found).toHaveLength(18);
    expect(found[16]).toBeGreaterThan(0);
    expect(found[17]).toBeUndefined();
  });
});

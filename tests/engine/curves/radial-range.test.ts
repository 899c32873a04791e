import { describe, expect, it } from 'vitest';
import { type RadialCurve, radialRange } from '../../../engine/curves/radial-range';

const morse: RadialCurve = {
  energyAt: (r) => 0.2 * ((1 - Math.exp(-1.2 * (r - 2.1))) ** 2 - 1),
  limit: 0,
  computed: { from: 0.9, to: 9 },
};

describe('radialRange', () => {
  it('identity: finds the minimum to the last digit of its energy', () => {
    const { centre, lowest } = radialRange(morse, 5000);
    expect(centre).toBeCloseTo(2.1, 7);
    expect(lowest).toBeCloseTo(-0.2, 14);
  });

  it('identity: goes inwards until no wave is left, and closer for a lighter molecule', () => {
    const [heavy, light] = [50000, 500].map((mass) => radialRange(morse, mass).from);
    expect(light).toBeLessThan(heavy);
    expect(heavy).toBeLessThan(2.1 - Math.log(2) / 1.2);
    expect(light).toBeGreaterThan(0);
  });

  it('identity: the largest phase is that of the fastest wave', () => {
    const { phase, from } = radialRange(morse, 5000);
    let fastest = 0;
    for (let r = from; r < 400; r += 0.001) {
      const gap = Math.max(0, -morse.energyAt(r));
      fastest = Math.max(fastest, (Math.sqrt(2 * 5000 * gap) * (r + 2.1) ** 2) / 4.2);
    }
    expect(phase / fastest).toBeCloseTo(1, 4);
  });

  it('identity: a tail of two ions is cut where waves would never slow down, and a given end is kept', () => {
    const ions: RadialCurve = {
      energyAt: (r) => 40 * Math.exp(-2 * r) - 1 / r,
      limit: 0,
      computed: { from: 1, to: 20 },
    };
    const range = radialRange(ions, 9000);
    expect(range.to).toBeGreaterThan(20);
    expect(range.to).toBeLessThan(100 * range.centre);
    expect(radialRange(morse, 9000, 30).to).toBe(30);
  });
});

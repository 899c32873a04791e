import { describe, expect, it } from 'vitest';
import type { PointResult } from '#engine';
import { stepCautions } from '../../../engine/calculation/step-cautions';
import { atom, prepare, study } from '../../support/studies';

const XS = Array.from({ length: 15 }, (_, k) => 0.8 + 0.2 * k);
const morse = (x: number) => 0.17 * (1 - Math.exp(-1.02 * (x - 1.4))) ** 2 - 1.17;

/** Full CI of H2 whose energies are made up. */
function codesOf(energyAt: (x: number) => number, crossings: Parameters<typeof stepCautions>[2] = []) {
  const prepared = prepare(
    study([atom('H'), atom('H', 0, 0, 1.4)], {
      levels: ['FCI'],
      scan: { coordinate: { bonds: [[0, 1]] }, values: XS },
    }),
  );
  const points = XS.map((coordinate) => ({
    coordinate,
    levels: { FCI: { kind: 'correlated', converged: true, energy: energyAt(coordinate) } },
  }));
  return stepCautions(prepared, points as unknown as PointResult[], crossings);
}

describe('stepCautions', () => {
  it('identity: a smooth curve has no steps, steep wall and flat end included', () => {
    expect(codesOf(morse)).toEqual([]);
    expect(codesOf((x) => 3 * Math.exp(-2 * x) - 0.1 * Math.exp(-((x - 1.6) ** 2)))).toEqual([]);
  });

  it('identity: one point in another state is found, with how far off it is', () => {
    const [caution, ...others] = codesOf((x) => morse(x) + (Math.abs(x - 2.4) < 1e-9 ? 0.05 : 0));
    expect(others).toEqual([]);
    expect(caution).toMatchObject({ code: 'curve.step', level: 'FCI' });
    expect(caution?.numbers?.[0]?.value).toBeCloseTo(0.05, 3);
    expect(caution?.range?.[0]).toBeLessThan(2.4);
    expect(caution?.range?.[1]).toBeGreaterThan(2.4);
  });

  it('identity: a curve that goes over to a higher one has a step there, unless that is known already', () => {
    const broken = (x: number) => morse(x) + (x > 2.3 ? 0.03 : 0);
    expect(codesOf(broken).map(({ range }) => range?.map((x) => Number(x.toFixed(1))))).toEqual([[2, 2.6]]);
    const crossing = { kind: 'restricted', range: [2.2, 2.4], gap: 0.03 } as const;
    expect(codesOf(broken, [crossing])).toEqual([]);
  });
});

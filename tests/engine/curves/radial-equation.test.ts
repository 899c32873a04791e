import { describe, expect, it } from 'vitest';
import {
  boundStates,
  integrateProduct,
  integrationWeights,
  radialEquation,
} from '../../../engine/curves/radial-equation';
import { radialGrid } from '../../../engine/curves/radial-grid';

const MASS = 2000;
const [DEPTH, STEEPNESS, CENTRE] = [0.15, 1.1, 2];
const morse = (r: number) => DEPTH * ((1 - Math.exp(-STEEPNESS * (r - CENTRE))) ** 2 - 1);
const exact = (v: number) =>
  -DEPTH +
  STEEPNESS * Math.sqrt((2 * DEPTH) / MASS) * (v + 0.5) -
  ((STEEPNESS ** 2 / MASS) * (v + 0.5) ** 2) / 2;
const solved = (intervals: number, most = 100) => {
  const grid = radialGrid(CENTRE, 0.5, 100, intervals);
  return { grid, ...boundStates(radialEquation(grid, morse, MASS, 0), 0, most) };
};

describe('boundStates', () => {
  it('identity: the error falls as the fourth power of the spacing', () => {
    const [coarse, fine] = [1000, 2000].map((n) =>
      solved(n, 12).states.map(({ energy }, v) => energy - exact(v)),
    );
    for (let v = 2; v < 12; v++) expect(coarse[v] / fine[v]).toBeCloseTo(16, 0);
  });

  it('identity: states are orthonormal and state v has v nodes', () => {
    const { grid, states, count, isComplete } = solved(3000);
    const unity = integrationWeights(grid, () => 1);
    expect(isComplete).toBe(true);
    expect(states).toHaveLength(count);
    states.forEach((first, v) => {
      states.forEach((second, w) => {
        const overlap = integrateProduct(first, second, unity);
        expect(Math.abs(overlap - (v === w ? 1 : 0))).toBeLessThan(1e-6);
      });
      // below a millionth of the wave its sign is rounding
      const values = [...first.amplitude].filter((value) => Math.abs(value) > 1e-6);
      const nodes = values.filter((value, i) => i > 0 && value * values[i - 1] < 0).length;
      expect(nodes).toBe(v);
      expect(values[0]).toBeGreaterThan(0);
    });
  });

  it('identity: ⟨V⟩ obeys the virial theorem of a curve, 2⟨T⟩ = ⟨r·dV/dr⟩', () => {
    const { grid, states } = solved(3000);
    const slope = (r: number) => {
      const decay = Math.exp(-STEEPNESS * (r - CENTRE));
      return 2 * DEPTH * STEEPNESS * decay * (1 - decay);
    };
    const [potential, ofSlope] = [morse, (r: number) => r * slope(r)].map((f) => integrationWeights(grid, f));
    for (const state of states) {
      const kinetic = state.energy - integrateProduct(state, state, potential);
      const virial = integrateProduct(state, state, ofSlope);
      expect(Math.abs(2 * kinetic - virial)).toBeLessThan(1e-7);
    }
  });

  it('identity: only as many states as asked for, and all are counted', () => {
    const { states, count } = solved(1000, 3);
    expect(states).toHaveLength(3);
    expect(count).toBe(Math.floor(Math.sqrt(2 * MASS * DEPTH) / STEEPNESS + 0.5));
  });
});

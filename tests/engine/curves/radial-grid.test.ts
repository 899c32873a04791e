import { describe, expect, it } from 'vitest';
import { intervalsFor, radialGrid, stretchAt } from '../../../engine/curves/radial-grid';

describe('radialGrid', () => {
  const { step, distances, stretch } = radialGrid(2.5, 0.4, 300, 5000);

  it('identity: runs from the first to the last distance', () => {
    expect(distances).toHaveLength(5001);
    expect(distances[0]).toBeCloseTo(0.4, 12);
    expect(distances[5000]).toBeCloseTo(300, 8);
  });

  it('identity: the stretch is the derivative of distance by the even variable', () => {
    for (let i = 1; i < 4000; i += 97) {
      const derivative = (distances[i + 1] - distances[i - 1]) / (2 * step);
      expect(derivative / stretch[i]).toBeCloseTo(1, 4);
      expect(stretch[i]).toBe(stretchAt(distances[i], 2.5));
    }
  });

  it('identity: a wave turns by no more than asked for from point to point', () => {
    // phase per unit of y = stretch·k for a wave number k of 3 inside 5 bohr
    const phase = 3 * stretchAt(5, 2.5);
    const fine = radialGrid(2.5, 0.4, 300, intervalsFor(2.5, 0.4, 300, phase, 0.2));
    for (let i = 1; fine.distances[i] < 5; i++)
      expect(3 * (fine.distances[i] - fine.distances[i - 1])).toBeLessThan(0.2);
  });
});

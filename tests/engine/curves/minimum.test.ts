import { describe, expect, it } from 'vitest';
import { findCurveMinimum } from '../../../engine/curves/minimum';

const morse = (depth: number, a: number, re: number) => (x: number) =>
  depth * (1 - Math.exp(-a * (x - re))) ** 2 - 100;
const sample = (f: (x: number) => number, from: number, to: number, count: number) =>
  Array.from({ length: count }, (_, i) => from + ((to - from) * i) / (count - 1)).map((x) => ({
    x,
    energy: f(x),
  }));

describe('findCurveMinimum', () => {
  it.each([
    [0.1744, 1.02764, 1.40201, 0.5, 8],
    [0.38, 1.4, 2.0743, 1.2, 9],
    [0.01, 0.5, 5.05, 3, 20],
  ])('identity: a Morse curve D = %f, a = %f has its minimum at re = %f', (depth, a, re, from, to) => {
    const f = morse(depth, a, re);
    const minimum = findCurveMinimum(sample(f, from, to, 25), f, 0.04);
    if (minimum.kind !== 'found') throw new Error(minimum.kind);
    // energies about −100 carry rounding of 1e-14; over h·f″ that is far below 1e-7
    expect(Math.abs(minimum.x - re)).toBeLessThan(1e-7);
    expect(Math.abs(minimum.energy + 100)).toBeLessThan(1e-11);
    expect(minimum.uncertainty).toBeLessThan(1e-5);
  });

  it('identity: the estimate does not depend on where a coarse scan happens to have its points', () => {
    const f = morse(0.1744, 1.02764, 1.40201);
    for (const offset of [0, 0.13, 0.31, 0.47]) {
      const minimum = findCurveMinimum(sample(f, 0.5 + offset, 6 + offset, 8), f, 0.04);
      expect(minimum.kind === 'found' && Math.abs(minimum.x - 1.40201) < 1e-7).toBe(true);
    }
  });

  it('identity: a falling or rising curve has its lowest point at the edge, and that is said', () => {
    expect(
      findCurveMinimum(
        sample((x) => 1 / x, 1, 5, 9),
        (x) => 1 / x,
        0.04,
      ),
    ).toEqual({ kind: 'atEdge', x: 5 });
    expect(
      findCurveMinimum(
        sample((x) => x, 1, 5, 9),
        (x) => x,
        0.04,
      ),
    ).toEqual({ kind: 'atEdge', x: 1 });
  });

  it('identity: of the minima of a tilted double well the lowest is taken, and the other listed', () => {
    // zeros of 4x(x² − 1) + t: Newton from both wells
    const tilt = 0.1;
    const f = (x: number) => (x * x - 1) ** 2 + tilt * x;
    const rootNear = (start: number) =>
      Array.from({ length: 30 }).reduce<number>(
        (x) => x - (4 * x * (x * x - 1) + tilt) / (12 * x * x - 4),
        start,
      );
    const minimum = findCurveMinimum(sample(f, -2, 2, 17), f, 0.01);
    if (minimum.kind !== 'found') throw new Error(minimum.kind);
    expect(minimum.x).toBeCloseTo(rootNear(-1), 8);
    expect(minimum.others).toHaveLength(1);
    expect(minimum.others[0]!.x).toBeCloseTo(rootNear(1), 8);
    expect(minimum.others[0]!.energy).toBeCloseTo(f(rootNear(1)), 10);
  });

  it('identity: a dip that does not settle is left out where it lies higher, and ends the search where it is lowest', () => {
    const well = morse(0.1744, 1.02764, 1.40201);
    const twoWells = (shift: number) => (x: number) => Math.min(well(x), well(x - 4) + shift);
    const found = (shift: number) =>
      findCurveMinimum(
        sample(twoWells(shift), 0.5, 9, 35),
        (x) => (x > 4 ? undefined : twoWells(shift)(x)),
        0.04,
      );
    expect(found(0.05)).toMatchObject({ kind: 'found', others: [] });
    expect(found(-0.05).kind).toBe('none');
  });

  it('identity: convergence noise in a flat tail is not taken for a minimum', () => {
    const f = (x: number) => morse(0.1744, 1.02764, 1.40201)(x) + 1e-9 * Math.sin(1e4 * x);
    expect(findCurveMinimum(sample(f, 0.5, 40, 120), f, 0.04).kind).toBe('found');
  });

  it('identity: points that did not converge are left out, and too few are said', () => {
    const f = morse(0.1744, 1.02764, 1.40201);
    const scan = sample(f, 0.5, 6, 12).map((point, k) =>
      k % 5 === 0 ? { x: point.x, energy: undefined } : point,
    );
    expect(findCurveMinimum(scan, f, 0.04).kind).toBe('found');
    expect(findCurveMinimum(scan.slice(0, 2), f, 0.04).kind).toBe('none');
    expect(findCurveMinimum(scan, () => undefined, 0.04).kind).toBe('none');
  });
});

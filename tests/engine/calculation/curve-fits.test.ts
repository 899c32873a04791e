import { describe, expect, it } from 'vitest';
import { curveFits } from '../../../engine/calculation/curve-fits';
import type { LevelCurve } from '../../../engine/calculation/level-curve';
import type { Dissociation, WellDepth } from '../../../engine/calculation/result';
import { expandWell, stencilDistances } from '../../../engine/curves/spectroscopic-constants';

const [DEPTH, STEEPNESS, EQUILIBRIUM, LIMIT] = [0.17, 1.03, 1.4, -1];
const morse = (r: number) => LIMIT + DEPTH * ((1 - Math.exp(-STEEPNESS * (r - EQUILIBRIUM))) ** 2 - 1);
const ANGSTROM = 1.8897261246;

function curveOf(energyAt: (r: number) => number, distances: readonly number[]): LevelCurve {
  const scan = distances.map((r) => ({ x: r / ANGSTROM, energy: energyAt(r) }));
  return {
    level: 'FCI',
    bohrPerUnit: ANGSTROM,
    scan,
    points: () => scan,
    energyAt: (x) => energyAt(x * ANGSTROM),
  };
}
const DISTANCES = [0.8, 1, 1.2, 1.4, 1.7, 2, 2.5, 3, 4, 6, 9];
const fragments = (energy: number, farEndAbove: number): Dissociation => ({
  kind: 'found',
  energy,
  fragments: [] as never,
  farEndAbove,
});
const DEPTH_FOUND: WellDepth = { value: DEPTH, against: 'farEnd', farEnd: 9 };

describe('curveFits', () => {
  it('identity: points of a Morse curve give its parameters back, with the limit kept or fitted', () => {
    for (const limit of [undefined, fragments(LIMIT, 1e-4)]) {
      const { morse: fit } = curveFits(curveOf(morse, DISTANCES), limit, DEPTH_FOUND, undefined);
      expect(fit!.limitIsFixed).toBe(limit !== undefined);
      expect(fit!.depth).toBeCloseTo(DEPTH, 8);
      expect(fit!.steepnessPerBohr).toBeCloseTo(STEEPNESS, 7);
      expect(fit!.equilibriumDistanceBohr).toBeCloseTo(EQUILIBRIUM, 8);
      expect(fit!.limit).toBeCloseTo(LIMIT, 8);
      expect(fit!.largestPerCm).toBeLessThan(1e-3);
    }
  });

  it('identity: a curve that does not tend to its fragments is fitted with a limit of its own', () => {
    const { morse: fit } = curveFits(
      curveOf(morse, DISTANCES),
      fragments(LIMIT - 0.1, 0.1),
      DEPTH_FOUND,
      undefined,
    );
    expect(fit!.limitIsFixed).toBe(false);
    expect(fit!.limit).toBeCloseTo(LIMIT, 8);
  });

  it('identity: points above the limit are left out, and the range says so in the unit of the study', () => {
    const distances = [0.3, 0.4, ...DISTANCES];
    const { morse: fit } = curveFits(curveOf(morse, distances), fragments(LIMIT, 0), DEPTH_FOUND, undefined);
    const below = distances.filter((r) => morse(r) <= LIMIT);
    expect(below.length).toBeLessThan(distances.length);
    expect(fit!.points).toBe(below.length);
    expect(fit!.range[0] * ANGSTROM).toBeCloseTo(below[0]!, 10);
    expect(fit!.range[1] * ANGSTROM).toBeCloseTo(9, 10);
  });

  it('identity: residuals of both forms are those of their printed formulas', () => {
    const curve = curveOf((r) => morse(r) + 0.002 * Math.sin(3 * r), DISTANCES);
    const { morse: simple, extendedRydberg } = curveFits(curve, fragments(LIMIT, 0), DEPTH_FOUND, undefined);
    const [a1, a2, a3] = extendedRydberg!.coefficientsInBohr;
    const formulas = [
      {
        fit: simple!,
        at: (r: number) =>
          simple!.limit +
          simple!.depth *
            ((1 - Math.exp(-simple!.steepnessPerBohr * (r - simple!.equilibriumDistanceBohr))) ** 2 - 1),
      },
      {
        fit: extendedRydberg!,
        at: (r: number) => {
          const rho = r - extendedRydberg!.equilibriumDistanceBohr;
          return (
            extendedRydberg!.limit -
            extendedRydberg!.depth * (1 + a1 * rho + a2 * rho ** 2 + a3 * rho ** 3) * Math.exp(-a1 * rho)
          );
        },
      },
    ];
    for (const { fit, at } of formulas) {
      const residuals = curve.scan
        .filter(({ energy }) => energy! <= LIMIT)
        .map(({ x, energy }) => (at(x * ANGSTROM) - energy!) * 219474.6313632);
      expect(fit.largestPerCm).toBeCloseTo(Math.max(...residuals.map(Math.abs)), 5);
      expect(fit.rootMeanSquarePerCm).toBeCloseTo(Math.hypot(...residuals) / Math.sqrt(residuals.length), 5);
    }
    expect(extendedRydberg!.rootMeanSquarePerCm).toBeLessThan(simple!.rootMeanSquarePerCm);
  });

  it('identity: Dunham’s coefficients of a Morse curve have their closed form', () => {
    const spacing = 0.1;
    const stencil = stencilDistances(EQUILIBRIUM, spacing).map((distance) => ({
      distance,
      energy: morse(distance),
    }));
    const expansion = expandWell(
      EQUILIBRIUM,
      spacing,
      stencil.map(({ energy }) => energy),
    )!;
    const { dunham } = curveFits(curveOf(morse, DISTANCES), undefined, DEPTH_FOUND, { expansion, stencil });
    // of D(1 − e^(−x))² = Dx²(1 − x + 7x²/12 − x³/4 + 31x⁴/360 − …), x = a·re·ξ
    const scale = STEEPNESS * EQUILIBRIUM;
    const exact = [-scale, (7 / 12) * scale ** 2, -(scale ** 3) / 4, (31 / 360) * scale ** 4];
    expect(dunham!.leading).toBeCloseTo(DEPTH * scale ** 2, 8);
    for (const k of [0, 1, 2, 3]) expect(dunham!.coefficients[k]! / exact[k]!).toBeCloseTo(1, 4);
    // the series breaks off: it must be exact at the minimum and bad at the ends, and its residuals say so
    expect(dunham!.points).toBe(13);
    expect(dunham!.largestPerCm).toBeGreaterThan(1);
  });

  it('identity: with as few points as parameters nothing is fitted that they would not test', () => {
    const few = curveOf(morse, [1, 1.4, 2]);
    expect(curveFits(few, undefined, DEPTH_FOUND, undefined)).toEqual({});
  });
});

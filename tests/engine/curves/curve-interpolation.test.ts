import { describe, expect, it } from 'vitest';
import { HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import {
  FEWEST_POINTS,
  type InterpolatedCurve,
  interpolateCurve,
  pointsToAdd,
} from '../../../engine/curves/curve-interpolation';
import { reducedMass } from '../../../engine/curves/reduced-mass';
import { vibrationalLevels } from '../../../engine/curves/vibrational-levels';
import { HYDROGEN_CURVE } from '../../reference-data/hydrogen-curve';
import { seededRandom } from '../../support/random';

type Curve = (r: number) => number;
const morse =
  (depth: number, a: number, re: number): Curve =>
  (r) =>
    depth * ((1 - Math.exp(-a * (r - re))) ** 2 - 1);
const dispersion: Curve = (r) => 0.01 * ((5 / r) ** 12 - 2 * (5 / r) ** 6);
/** Repulsion, a well by overlap, and dispersion that is damped inside. */
const mixed: Curve = (r) =>
  (Math.exp(-1.2 * r) / r) * (1 + 0.3 * r) - 0.9 * r * Math.exp(-1.15 * r) - 6.5 / (r * r + 3) ** 3;

const sample = (f: Curve, from: number, to: number, count: number) =>
  Array.from({ length: count }, (_, i) => from + ((to - from) * i) / (count - 1)).map((distance) => ({
    distance,
    energy: f(distance),
  }));
function interpolated(
  points: readonly { distance: number; energy: number }[],
  limit?: number,
): InterpolatedCurve {
  const curve = interpolateCurve(points, limit);
  if (!curve) throw new Error('too few points');
  return curve;
}
/** Adds points until none is asked for. */
function refined(
  f: Curve,
  from: number,
  to: number,
  count: number,
): { curve: InterpolatedCurve; rounds: number } {
  let points = sample(f, from, to, count);
  for (let rounds = 0; rounds < 10; rounds++) {
    const curve = interpolated(points, 0);
    const added = pointsToAdd(curve);
    if (added.length === 0) return { curve, rounds };
    points = [...points, ...added.map((distance) => ({ distance, energy: f(distance) }))];
  }
  throw new Error('points are asked for without end');
}
/** Largest error where the curve is below one well depth above its limit of 0, cm⁻¹. */
function worstError(curve: InterpolatedCurve, f: Curve): number {
  const lowest = Math.min(...curve.points.map(({ energy }) => energy));
  let worst = 0;
  for (let r = curve.computed.from; r < curve.computed.to; r += 0.003)
    if (f(r) < -lowest) worst = Math.max(worst, Math.abs(curve.energyAt(r) - f(r)));
  return worst * HARTREE_IN_WAVENUMBERS;
}

const CURVES: readonly (readonly [string, Curve, number, number])[] = [
  ['a hydrogen-like Morse curve', morse(0.1744, 1.02764, 1.40201), 0.5, 8],
  ['a nitrogen-like Morse curve', morse(0.36, 1.42, 2.07), 1.2, 8],
  ['a van der Waals curve', dispersion, 4, 20],
  ['a well by overlap with a tail by dispersion', mixed, 0.4, 12],
];

describe('interpolateCurve', () => {
  it.each(CURVES)(
    'identity: %s, evenly scanned, comes within 0.01 cm⁻¹ with the points it asks for',
    (_, f, from, to) => {
      for (const count of [10, 20, 40]) {
        const { curve } = refined(f, from, to, count);
        expect(worstError(curve, f)).toBeLessThan(0.01);
        expect(curve.points.length).toBeLessThanOrEqual(55);
      }
    },
  );

  it.each(CURVES)(
    'identity: the estimate for %s is not below the error once points are dense',
    (_, f, from, to) => {
      const curve = interpolated(sample(f, from, to, 60), 0);
      expect(worstError(curve, f)).toBeLessThan(Math.max(...curve.errorsPerCm));
    },
  );

  it('identity: levels on an interpolated Morse curve are those of the curve to 0.01 cm⁻¹', () => {
    const [depth, a, mass] = [0.1744, 1.02764, 918.0764];
    const { curve } = refined(morse(depth, a, 1.40201), 0.5, 12, 20);
    const found = vibrationalLevels(curve, mass);
    expect(found.boundLevels).toBe(17);
    expect(found.converged).toBe(true);
    found.levels.forEach(({ energy, quantumNumber }) => {
      const n = quantumNumber + 0.5;
      const exact = a * Math.sqrt((2 * depth) / mass) * n - ((a * a) / (2 * mass)) * n * n - depth;
      expect(Math.abs(energy - exact) * HARTREE_IN_WAVENUMBERS).toBeLessThan(0.01);
    });
  });

  it('identity: noise of 1e-11 hartree stays noise in the well, and below 0.01 cm⁻¹ at the ends', () => {
    const random = seededRandom(3);
    const f = morse(0.36, 1.42, 2.07);
    const points = sample(f, 1.2, 8, 60).map(({ distance, energy }) => ({
      distance,
      energy: energy - 109 + 2e-11 * (random() - 0.5),
    }));
    const curve = interpolated(points, -109);
    // within d points of an end the rule of degree d amplifies by up to 2^d; higher up the wall no wave has weight
    const nearEnds = 10 * (6.8 / 59);
    for (let r = 1.2; r < 8; r += 0.01) {
      if (f(r) > 0.36) continue;
      const error = Math.abs(curve.energyAt(r) + 109 - f(r)) * HARTREE_IN_WAVENUMBERS;
      expect(error).toBeLessThan(r < 1.2 + nearEnds || r > 8 - nearEnds ? 0.01 : 1e-4);
    }
    expect(pointsToAdd(curve, 0.1)).toEqual([]);
  });

  it('identity: the curve goes through its points, without a step into its tails', () => {
    const curve = interpolated(sample(mixed, 0.6, 9, 30), 0);
    for (const { distance, energy } of curve.points) expect(curve.energyAt(distance)).toBeCloseTo(energy, 14);
    for (const end of [0.6, 9]) {
      const [below, above] = [curve.energyAt(end - 1e-9), curve.energyAt(end + 1e-9)];
      expect(Math.abs(below - above)).toBeLessThan(1e-7);
    }
    expect(curve.computed).toEqual({ from: 0.6, to: 9 });
  });

  it('identity: a scan that stops too early asks for a point further out', () => {
    const curve = interpolated(sample(mixed, 0.4, 6, 60), 0);
    expect(curve.outerErrorPerCm).toBeGreaterThan(0.01);
    expect(Math.max(...pointsToAdd(curve))).toBeGreaterThan(6);
  });

  it('identity: a point computed twice, with noise, counts once', () => {
    const points = sample(mixed, 0.6, 9, 40);
    const twice = [
      ...points,
      ...points.map(({ distance, energy }) => ({ distance: distance + 1e-13, energy: energy + 1e-10 })),
    ];
    const [single, double] = [interpolated(points, 0), interpolated(twice, 0)];
    expect(double.points).toEqual(single.points);
    expect(double.energyAt(1.234)).toBe(single.energyAt(1.234));
  });

  it('identity: a dense cluster of points at the minimum does no harm elsewhere', () => {
    const f = morse(0.36, 1.42, 2.07);
    const curve = interpolated([...sample(f, 1.2, 8, 40), ...sample(f, 1.531, 2.611, 13)], 0);
    expect(worstError(curve, f)).toBeLessThan(0.001);
  });

  it('identity: too few points give no curve', () => {
    expect(interpolateCurve(sample(mixed, 1, 5, FEWEST_POINTS - 1))).toBeUndefined();
    expect(interpolateCurve(sample(mixed, 1, 5, FEWEST_POINTS))).toBeDefined();
  });
});

describe('levels of H2 from near-exact points', () => {
  const curve = interpolated(
    HYDROGEN_CURVE.map(([distance, energy]) => ({ distance, energy: Number(energy) })),
    -1,
  );
  const hydrogen = { element: 'H' };
  const INTERPOLATED = {
    tolerance: 0.001,
    because: 'the curve is known at points 0.2 bohr apart and farther; interpolation aims at 0.01 cm⁻¹ only',
  };

  it('published: D0 of H2 in the Born–Oppenheimer approximation', () => {
    const found = vibrationalLevels(curve, reducedMass(hydrogen, hydrogen, 'nuclear'));
    // the points end at 6 bohr: the two highest levels rest on the tail, and that is said
    expect(found.beyondComputedRange).toEqual([13, 14]);
    expect(found.boundLevels).toBe(15);
    expect(found.dissociationPerCm).toMatchPublished({
      printed: '36112.5927',
      unit: 'cm^-1',
      source:
        'K. Piszczatowski, G. Lach, M. Przybytek, J. Komasa, K. Pachucki, B. Jeziorski, J. Chem. Theory Comput. 5, 3039 (2009); value from memory',
      ...INTERPOLATED,
    });
  });

  it('published: D0 of D2 in the Born–Oppenheimer approximation', () => {
    const deuterium = { element: 'H', isotope: 2 };
    const found = vibrationalLevels(curve, reducedMass(deuterium, deuterium, 'nuclear'));
    expect(found.dissociationPerCm).toMatchPublished({
      printed: '36746.1623',
      unit: 'cm^-1',
      source:
        'K. Piszczatowski, G. Lach, M. Przybytek, J. Komasa, K. Pachucki, B. Jeziorski, J. Chem. Theory Comput. 5, 3039 (2009); value from memory',
      ...INTERPOLATED,
    });
  });
});

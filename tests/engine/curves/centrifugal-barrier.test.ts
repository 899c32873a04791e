import { describe, expect, it } from 'vitest';
import { HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import { vibrationalLevels } from '../../../engine/curves/vibrational-levels';

const MASS = 918.0764;
const [DEPTH, STEEPNESS, EQUILIBRIUM] = [0.1744, 1.02764, 1.40201];
const morse = (r: number) => DEPTH * ((1 - Math.exp(-STEEPNESS * (r - EQUILIBRIUM))) ** 2 - 1);
const curve = { energyAt: morse, limit: 0, computed: { from: 0.3, to: 50 } };
const potential = (rotation: number) => (r: number) =>
  morse(r) + (rotation * (rotation + 1)) / (2 * MASS * r * r);

/**
 * How strong the wave of a free particle of this energy is inside the barrier: ∫u² over the well, with u = sin outside.
 * Integrated outwards step by step, without any wall: at a resonance it has a peak of Lorentz's shape.
 */
function strengthInside(rotation: number, energy: number, barrier: number): number {
  const w = potential(rotation);
  const step = 2e-3;
  const far = 60;
  const k = (r: number) => 2 * MASS * (energy - w(r));
  let before = 0;
  let u = 1e-30;
  let inside = 0;
  let r = 0.4;
  const weight = (at: number) => 1 + (step * step * k(at)) / 12;
  while (r < far) {
    const next = ((2 - (5 * step * step * k(r)) / 6) * u - weight(r - step) * before) / weight(r + step);
    [before, u] = [u, next];
    r += step;
    if (r < barrier) inside += u * u * step;
  }
  const wave = Math.sqrt(k(r));
  const slope = (u - before) / step;
  return inside / (u * u + (slope / wave) ** 2);
}

/** Distance of the top of the barrier. */
function barrierAt(rotation: number): number {
  const w = potential(rotation);
  const places = Array.from({ length: 2000 }, (_, i) => 2 + i * 0.005);
  return places.reduce((best, r) => (w(r) > w(best) ? r : best), 3);
}

/** Position and full width at half maximum of the peak near an energy. */
function resonanceNear(rotation: number, guess: number, width: number) {
  const barrier = barrierAt(rotation);
  const at = (energy: number) => strengthInside(rotation, energy, barrier);
  const energies = Array.from({ length: 121 }, (_, i) => guess + ((i - 60) / 20) * width);
  const values = energies.map(at);
  const highest = values.reduce((best, value, i) => (value > values[best] ? i : best), 0);
  const isHalf = (i: number) => values[i] < values[highest] / 2;
  const left = energies.findLastIndex((_, i) => i < highest && isHalf(i));
  const right = energies.findIndex((_, i) => i > highest && isHalf(i));
  return { energy: energies[highest], width: energies[right] - energies[left] };
}

describe('levels behind the centrifugal barrier', () => {
  it.each([
    { rotation: 20, v: 9 },
    { rotation: 30, v: 3 },
  ])('independent: v = $v at J = $rotation is a resonance of the free wave', ({ rotation, v }) => {
    const { quasiBound, converged, levels } = vibrationalLevels(curve, MASS, { rotation });
    expect(converged).toBe(true);
    expect(levels.every(({ energy }) => energy < 0)).toBe(true);
    const level = quasiBound.find(({ quantumNumber }) => quantumNumber === v)!;
    const width = level.widthPerCm / HARTREE_IN_WAVENUMBERS;
    const resonance = resonanceNear(rotation, level.energy, width);
    // a level with walls in place of the barrier's outside lies within its own width
    expect(Math.abs(resonance.energy - level.energy)).toBeLessThan(width);
    // semiclassical, and the grid of energies is a twentieth of it
    expect(resonance.width / width).toBeGreaterThan(0.6);
    expect(resonance.width / width).toBeLessThan(1.6);
  });

  it('identity: the top is the highest point of curve and centrifugal term outside the well', () => {
    for (const rotation of [5, 20, 30]) {
      const { barrier } = vibrationalLevels(curve, MASS, { rotation });
      expect(barrier! * HARTREE_IN_WAVENUMBERS).toBeCloseTo(
        potential(rotation)(barrierAt(rotation)) * HARTREE_IN_WAVENUMBERS,
        1,
      );
    }
  });

  it('identity: every level that rotation lifts over the limit is quasi-bound until it passes the barrier', () => {
    for (const rotation of [5, 15, 20, 30]) {
      const { levels, quasiBound, barrier } = vibrationalLevels(curve, MASS, { rotation });
      const numbers = [...levels, ...quasiBound].map(({ quantumNumber }) => quantumNumber);
      expect(numbers).toEqual(numbers.map((_, v) => v));
      for (const { energy } of quasiBound) {
        expect(energy).toBeGreaterThan(0);
        expect(energy).toBeLessThan(barrier!);
      }
    }
  });

  it('identity: without rotation, and where rotation leaves no well, there is neither barrier nor level', () => {
    expect(vibrationalLevels(curve, MASS)).toMatchObject({ quasiBound: [], barrier: undefined });
    const spun = vibrationalLevels(curve, MASS, { rotation: 60 });
    expect(spun).toMatchObject({ levels: [], quasiBound: [], barrier: undefined, converged: true });
  });
});

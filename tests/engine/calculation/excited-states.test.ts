import { beforeAll, describe, expect, it } from 'vitest';
import {
  type CorrelatedState,
  computePoint,
  type ExcitedState,
  findLevelMinimum,
  followStates,
  HARTREE_IN_WAVENUMBERS,
  type LevelFindings,
  type PointResult,
} from '#engine';
import { excitedStates } from '../../../engine/calculation/excited-states';
import { levelPoints, lowestCurve } from '../../../engine/calculation/level-curve';
import { readWell } from '../../../engine/calculation/read-well';
import { atom, compute, correlated, prepare, study } from '../../support/studies';

const DISTANCES = [0.9, 1.1, 1.3, 1.5, 1.8, 2.1, 2.5, 3, 3.6, 4.5, 6, 8];
const HYDROGEN = { basis: '6-31G', levels: ['FCI'], states: 4 };
const prepared = prepare(
  study([atom('H'), atom('H', 0, 0, 1.4)], {
    ...HYDROGEN,
    scan: { coordinate: { bonds: [[0, 1]] }, values: DISTANCES },
  }),
);

let points: readonly PointResult[];
let findings: LevelFindings;
beforeAll(() => {
  points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
  findings = findLevelMinimum(prepared, 'FCI', points);
});

/** The lowest state of ¹Σu⁺, of ³Σu⁺ and of ¹Σg⁺ above the lowest. */
const SINGLET_U = { spin: 'singlet', inversion: 'u', number: 1 } as const;
const TRIPLET_U = { spin: 'triplet', inversion: 'u', number: 1 } as const;
const SINGLET_G = { spin: 'singlet', inversion: 'g', number: 2 } as const;
type Kind = typeof SINGLET_U | typeof TRIPLET_U | typeof SINGLET_G;

function found({ spin, inversion, number }: Kind, among: readonly ExcitedState[] = findings.excitedStates!) {
  const index = followStates(points, 'FCI').findIndex(
    (state) =>
      state.spin === spin && state.symmetry?.term?.inversion === inversion && state.number === number,
  );
  return among.find(({ curve }) => curve === index)!;
}

/** The same state of a study of one point. */
function stateAt(distance: number, { spin, inversion, number }: Kind): CorrelatedState {
  const { states } = correlated(compute(study([atom('H'), atom('H', 0, 0, distance)], HYDROGEN)));
  return states.filter((state) => state.spin === spin && state.symmetry?.term?.inversion === inversion)[
    number - 1
  ]!;
}

const lowest = () => {
  if (findings.minimum.kind !== 'found') throw new Error(findings.minimum.kind);
  return findings.minimum;
};

describe('excited states of H2 by full CI', () => {
  it('identity: the lowest state itself is not among them', () => {
    const ground = followStates(points, 'FCI').findIndex(({ states }) => states[3] === 0);
    expect(findings.excitedStates!.map(({ curve }) => curve)).not.toContain(ground);
    expect(findings.excitedStates!.length).toBeGreaterThanOrEqual(3);
  });

  it.each([SINGLET_U, TRIPLET_U])(
    'identity: vertical excitation is that of a single point ($spin)',
    (kind) => {
      const at = lowest().equilibriumDistance;
      const { vertical } = found(kind);
      expect(vertical!.coordinate).toBeCloseTo(at, 12);
      expect(vertical!.energy.value).toBeCloseTo(stateAt(at, kind).excitation, 8);
    },
  );

  it('identity: the minimum of ¹Σu⁺ is one, and Tₑ stands from minimum to minimum', () => {
    const { minimum, minimumFrom, adiabatic } = found(SINGLET_U);
    if (minimum.kind !== 'found') throw new Error(minimum.kind);
    expect(minimumFrom).toBe('computed');
    const bottom = stateAt(minimum.equilibriumDistance, SINGLET_U).energy;
    expect(minimum.energy).toBeCloseTo(bottom, 9);
    for (const step of [-2e-3, 2e-3]) {
      expect(stateAt(minimum.equilibriumDistance + step, SINGLET_U).energy).toBeGreaterThan(bottom);
    }
    expect(adiabatic!.value).toBeCloseTo(minimum.energy - lowest().energy, 12);
  });

  it('identity: a repulsive state has no minimum, and its lowest point is at the end', () => {
    const { minimum, adiabatic, vibration } = found(TRIPLET_U);
    expect(minimum).toEqual({ kind: 'atEdge', coordinate: 8 });
    expect([adiabatic, vibration]).toEqual([undefined, undefined]);
  });

  it('identity: T₀ is Tₑ with both zero-point energies', () => {
    const { adiabatic, zeroPointToZeroPoint, vibration } = found(SINGLET_U);
    const below = findings.vibration!;
    if (vibration?.kind !== 'found' || below.kind !== 'found') throw new Error('no levels');
    const change = (vibration.zeroPointPerCm - below.zeroPointPerCm) / HARTREE_IN_WAVENUMBERS;
    expect(zeroPointToZeroPoint!.value).toBeCloseTo(adiabatic!.value + change, 9);
  });

  it('identity: the well of ¹Σu⁺ is counted to the ions that it goes to, D0 from its lowest level', () => {
    const { minimum, dissociation, wellDepth, vibration } = found(SINGLET_U);
    if (minimum.kind !== 'found' || dissociation?.kind !== 'found') throw new Error('no well');
    if (vibration?.kind !== 'found') throw new Error('no levels');
    expect(dissociation.fragments.map(({ charge }) => Math.abs(charge))).toEqual([1, 1]);
    const ion = correlated(compute(study([atom('H')], { ...HYDROGEN, states: 1, charge: -1 })));
    expect(wellDepth).toMatchObject({ against: 'fragments', farEnd: 8 });
    expect(wellDepth!.value).toBeCloseTo(ion.energy - minimum.energy, 9);
    expect(vibration.d0! * HARTREE_IN_WAVENUMBERS).toBeCloseTo(
      wellDepth!.value * HARTREE_IN_WAVENUMBERS - vibration.zeroPointPerCm,
      6,
    );
    for (const { energyPerCm } of vibration.levels) {
      expect(energyPerCm).toBeLessThan(wellDepth!.value * HARTREE_IN_WAVENUMBERS);
    }
    // levels without end towards ions are not continued beyond the curve
    expect(vibration.boundLevels).toBeLessThan(60);
  });

  it('identity: Franck–Condon factors are probabilities, and their sums stay below one by the continuum', () => {
    const { franckCondon, vibration } = found(SINGLET_U);
    if (vibration?.kind !== 'found') throw new Error('no levels');
    const { factors, sums, boundLevels, converged } = franckCondon!;
    expect(converged).toBe(true);
    expect(boundLevels).toBe(vibration.boundLevels);
    factors.forEach((row, v) => {
      expect(row).toHaveLength(boundLevels);
      for (const factor of row) expect(factor).toBeGreaterThanOrEqual(0);
      expect(row.reduce((sum, factor) => sum + factor, 0)).toBeCloseTo(sums[v]!, 10);
      expect(sums[v]).toBeLessThan(1 + 1e-6);
    });
    // the upper well is displaced: the largest factor of v″ = 0 is not the first
    expect(Math.max(...factors[0]!)).toBeGreaterThan(factors[0]![0]!);
  });

  it('identity: transition moments are those of the points, none to another spin and zero from g to g', () => {
    const { transitionMoments } = found(SINGLET_U);
    expect(transitionMoments.map(({ coordinate }) => coordinate)).toEqual(DISTANCES);
    const { transitionDipole } = stateAt(DISTANCES[4]!, SINGLET_U);
    expect(transitionMoments[4]!.dipole).toBeCloseTo(Math.hypot(...transitionDipole!), 6);
    expect(found(TRIPLET_U).transitionMoments).toEqual([]);
    for (const { dipole } of found(SINGLET_G).transitionMoments) expect(dipole).toBeLessThan(1e-8);
  });

  it('independent: what is interpolated where points are dear agrees with what is computed, within its uncertainty', () => {
    const known = levelPoints(prepared, 'FCI', points, []);
    const curve = lowestCurve(known);
    const { well } = readWell(prepared, curve, undefined, 0);
    const before = known.all().length;
    const dear = excitedStates(prepared, known, { curve, well }, Number.POSITIVE_INFINITY);
    // one more for vertical excitations, at the minimum of the lowest state
    expect(known.all().length).toBeLessThanOrEqual(before + 1);
    const [rough, good] = [found(SINGLET_U, dear), found(SINGLET_U)];
    expect(rough.minimumFrom).toBe('interpolated');
    expect(rough.constants).toBeUndefined();
    if (rough.minimum.kind !== 'found' || good.minimum.kind !== 'found') throw new Error('no minimum');
    const shift = Math.abs(rough.minimum.equilibriumDistance - good.minimum.equilibriumDistance);
    expect(rough.minimum.uncertainty).toBeGreaterThan(0);
    expect(shift).toBeLessThan(rough.minimum.uncertainty);
    const change = Math.abs(rough.adiabatic!.value - good.adiabatic!.value);
    expect(change).toBeLessThan(rough.adiabatic!.uncertainty);
  });
});

describe('excited states of CIS', () => {
  const asked = study([atom('Li'), atom('H', 0, 0, 3)], {
    levels: ['CIS'],
    states: 3,
    scan: { coordinate: { bonds: [[0, 1]] }, values: [2, 2.4, 2.8, 3.2, 3.6, 4.2, 5] },
  });

  it('identity: excitations are counted from RHF, and of degenerate partners the first stands for both', () => {
    const request = prepare(asked);
    const computed = request.coordinates.map((coordinate) => computePoint(request, coordinate).result);
    const { minimum, excitedStates: states = [] } = findLevelMinimum(request, 'CIS', computed);
    expect(minimum.kind).toBe('none');
    const curves = followStates(computed, 'CIS');
    const isPi = (index: number) => curves[index]?.symmetry?.term?.lambda === 1;
    const pairs = curves.filter((_, index) => isPi(index)).length;
    expect(pairs).toBeGreaterThan(0);
    expect(states.filter(({ curve }) => isPi(curve))).toHaveLength(pairs / 2);
    const vertical = states[0]!.vertical!;
    const { levels } = compute(
      study([atom('Li'), atom('H', 0, 0, vertical.coordinate)], { levels: ['CIS'], states: 3 }),
    );
    if (levels.CIS?.kind !== 'singles') throw new Error('no CIS');
    const excitations = levels.CIS.states.map(({ excitation }) => excitation);
    expect(Math.min(...excitations.map((value) => Math.abs(value - vertical.energy.value)))).toBeLessThan(
      1e-8,
    );
  });
});

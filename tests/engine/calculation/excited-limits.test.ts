import { describe, expect, it } from 'vitest';
import { computePoint, type Dissociation, type Study, type StudyAtom } from '#engine';
import { excitedLimits } from '../../../engine/calculation/excited-limits';
import { dissociationLimit } from '../../../engine/calculation/fragments';
import { levelPoints } from '../../../engine/calculation/level-curve';
import { type CurveOfState, curvesOfStates } from '../../../engine/calculation/state-curves';
import { atom, compute, correlated, prepare, singles, study } from '../../support/studies';

type Found = Extract<Dissociation, { readonly kind: 'found' }>;

interface StateWithLimit {
  readonly state: CurveOfState;
  readonly limit: Dissociation | undefined;
  readonly farEnd: number | undefined;
}

function limitsAt(
  atoms: readonly StudyAtom[],
  values: readonly number[],
  changes: Partial<Study> & { charge?: number },
): readonly StateWithLimit[] {
  const prepared = prepare(
    study(atoms, { levels: ['FCI'], scan: { coordinate: { bonds: [[0, 1]] }, values }, ...changes }),
  );
  const computed = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
  const points = levelPoints(prepared, prepared.study.levels[0]!, computed, []);
  const limitOf = excitedLimits(prepared, points);
  return curvesOfStates(points).map((state) => ({
    state,
    limit: limitOf(state),
    farEnd: state.stateAt(values.length - 1)?.energy,
  }));
}

const onlyFound = (states: readonly StateWithLimit[]) =>
  states.flatMap(({ state, limit, farEnd }) =>
    limit?.kind === 'found' && farEnd !== undefined ? [{ state, limit, farEnd }] : [],
  );

const charges = ({ fragments }: Found) => fragments.map(({ charge }) => Math.abs(charge));

const HYDROGEN = [atom('H'), atom('H', 0, 0, 1.4)];
const HELIUM_HYDRIDE = [atom('He'), atom('H', 0, 0, 1.4)];

describe('excitedLimits', () => {
  it('identity: far apart every state of HeH⁺ has the energy of its fragments', () => {
    const states = onlyFound(limitsAt(HELIUM_HYDRIDE, [11, 12], { basis: '6-31G', charge: 1, states: 5 }));
    expect(states).toHaveLength(5);
    for (const { limit, farEnd } of states) {
      expect(farEnd).toBeCloseTo(limit.energy, 6);
      expect(limit.farEndAbove).toBeCloseTo(farEnd - limit.energy, 12);
      expect(limit.fragments[0].energy + limit.fragments[1].energy).toBeCloseTo(limit.energy, 12);
    }
    const ofSpin = (spin: string) => states.filter(({ state }) => state.followed.spin === spin);
    // He + H⁺, He⁺ + H and He⁺ + H(2s); a closed shell beside a proton has no triplet
    expect(ofSpin('singlet').map(({ limit }) => charges(limit))).toEqual([
      [0, 1],
      [1, 0],
      [1, 0],
    ]);
    expect(ofSpin('triplet').map(({ limit }) => charges(limit))).toEqual([
      [1, 0],
      [1, 0],
    ]);
    const [ground, excited] = ofSpin('triplet').map(({ limit }) => limit);
    expect(ground!.fragments.map(({ excitation }) => excitation)).toEqual([0, 0]);
    expect(excited!.fragments[1].excitation).toBeCloseTo(excited!.energy - ground!.energy, 10);
  });

  it('identity: the lowest state has the limit that it has as the lowest', () => {
    const scan = { coordinate: { bonds: [[0, 1]] }, values: [14] } as const;
    const [lowest] = limitsAt(HYDROGEN, [14], { basis: '6-31G', states: 4 });
    const prepared = prepare(study(HYDROGEN, { basis: '6-31G', levels: ['FCI'], scan }));
    const dissociation = dissociationLimit(prepared, 'FCI', undefined);
    if (dissociation?.kind !== 'found' || lowest?.limit?.kind !== 'found') throw new Error('no limit');
    expect(lowest.limit.energy).toBeCloseTo(dissociation.energy, 10);
  });

  it('identity: ions of H2 still attract one another at the far end, and H⁻ + H⁺ is a limit as H⁺ + H⁻ is', () => {
    const distance = 14;
    const states = onlyFound(limitsAt(HYDROGEN, [13.5, distance], { basis: '6-31G', states: 4 }));
    const ionic = states.filter(({ limit }) => charges(limit)[0] === 1);
    expect(ionic).toHaveLength(2);
    const ion = correlated(compute(study([atom('H')], { basis: '6-31G', levels: ['FCI'], charge: -1 })));
    for (const { state, limit, farEnd } of ionic) {
      expect(state.followed.spin).toBe('singlet');
      expect(limit.energy).toBeCloseTo(ion.energy, 9);
      expect(farEnd + 1 / distance).toBeCloseTo(limit.energy, 5);
    }
  });

  it('identity: two nitrogen atoms in ⁴S couple to one state each of S = 0, 1, 2 and 3', () => {
    const states = onlyFound(
      limitsAt([atom('N'), atom('N', 0, 0, 9)], [20], { frozenCore: true, states: 4 }),
    );
    expect(states.map(({ state }) => state.followed.spin).sort()).toEqual([
      'quintet',
      'septet',
      'singlet',
      'triplet',
    ]);
    for (const { limit, farEnd } of states) {
      expect(limit.fragments.map(({ multiplicity }) => multiplicity)).toEqual([4, 4]);
      expect(farEnd).toBeCloseTo(limit.energy, 6);
    }
  });

  it('identity: a curve that ends far from every limit gets none, and the reason says so', () => {
    const reasons = limitsAt(HYDROGEN, [1.4, 1.8], { basis: '6-31G', states: 2 }).map(({ limit }) =>
      limit?.kind === 'none' ? limit.reason : undefined,
    );
    for (const reason of reasons) expect(reason).toContain('far end');
    expect(reasons.length).toBeGreaterThan(0);
  });

  it('identity: CISD is no full CI for lithium with its core, so that its states get no limit', () => {
    const request = { levels: ['CISD'], states: 2 };
    for (const { limit } of limitsAt([atom('Li'), atom('H', 0, 0, 3)], [12], request)) {
      if (limit?.kind !== 'none') throw new Error('a limit');
      expect(limit.reason).toContain('CISD leaves out');
    }
    const withoutCore = limitsAt([atom('Li'), atom('H', 0, 0, 3)], [14], { ...request, frozenCore: true });
    expect(onlyFound(withoutCore).length).toBe(withoutCore.length);
  });

  it('identity: CIS of closed shells tends to excitations within one and from one to the other', () => {
    const request = { basis: '6-31G', levels: ['CIS'], states: 2 };
    const ionic = onlyFound(limitsAt(HELIUM_HYDRIDE, [14], { ...request, charge: 1 }));
    expect(ionic).toHaveLength(4);
    for (const { limit, farEnd } of ionic) {
      expect(farEnd).toBeCloseTo(limit.energy, 6);
      // an electron of helium goes to the proton
      expect(charges(limit)).toEqual([1, 0]);
    }
    const neutral = onlyFound(limitsAt([atom('He'), atom('He', 0, 0, 9)], [12], request));
    expect(neutral).toHaveLength(4);
    const helium = singles(compute(study([atom('He')], request))).states;
    for (const { state, limit, farEnd } of neutral) {
      expect(farEnd).toBeCloseTo(limit.energy, 3);
      const excited = helium.find(({ spin }) => spin === state.followed.spin)!;
      const excitations = limit.fragments.map(({ excitation }) => excitation!).toSorted((a, b) => a - b);
      expect(excitations[0]).toBeCloseTo(0, 10);
      expect(excitations[1]).toBeCloseTo(excited.excitation, 9);
    }
  });

  it('identity: RHF of H2 does not part into closed shells, so that states of CIS get no limit', () => {
    for (const { limit } of limitsAt(HYDROGEN, [14], { levels: ['CIS'], states: 1 })) {
      expect(limit).toMatchObject({ kind: 'none', reason: expect.stringContaining('closed shells') });
    }
  });

  it('identity: scans that part no molecule have no limits', () => {
    const water = [atom('O'), atom('H', 0, 0, 1.8), atom('H', 1.8)];
    const scan = { coordinate: { bonds: [[0, 1] as const, [0, 2] as const] }, values: [1.8] };
    const prepared = prepare(study(water, { levels: ['CISD'], states: 2, scan }));
    const points = levelPoints(prepared, 'CISD', [computePoint(prepared, 1.8).result], []);
    const limitOf = excitedLimits(prepared, points);
    for (const state of curvesOfStates(points)) expect(limitOf(state)).toBeUndefined();
  });
});

import { describe, expect, it } from 'vitest';
import { type CorrelatedResult, type HartreeFockResult, prepareStudy, type Study } from '#engine';
import { atom, compute, correlated, study, waterAtoms } from '../../support/studies';

const nitrogen = (distance: number) => [atom('N'), atom('N', 0, 0, distance)];
const hydrogen = (distance: number) => [atom('H'), atom('H', 0, 0, distance)];
const onBoth = (request: Study) =>
  [compute(request), compute({ ...request, orbitals: 'unrestricted' })] as const;
const energy = (point: ReturnType<typeof compute>, level: string) =>
  (point.levels[level] as HartreeFockResult).energy;
const open = (atoms: Study['molecule']['atoms'], multiplicity: number, changes: Partial<Study>): Study => ({
  ...study(atoms, changes),
  molecule: { unit: 'bohr', atoms, multiplicity, ...changes.molecule },
});

/** Everything that does not depend on the orbitals, of all states. */
function expectEqualStates(one: CorrelatedResult, other: CorrelatedResult): void {
  expect(other.states.length).toBe(one.states.length);
  one.states.forEach((state, k) => {
    const same = other.states[k];
    expect(Math.abs(same.energy - state.energy)).toBeLessThan(1e-10);
    expect(Math.abs(same.sSquared - state.sSquared)).toBeLessThan(1e-8);
    expect(same.spin).toBe(state.spin);
  });
}

const MOLECULES: readonly (readonly [string, Study])[] = [
  ['stretched H2O', study(waterAtoms(3.6, 104), { levels: ['UHF', 'FCI'], states: 3 })],
  ['OH', open([atom('O'), atom('H', 0, 0, 2.6)], 2, { levels: ['UHF', 'FCI'], states: 3 })],
  ['Li2+', { ...study([atom('Li'), atom('Li', 0, 0, 6)], { levels: ['UHF', 'FCI'], states: 2, charge: 1 }) }],
  ['O in 6-31G', open([atom('O')], 3, { levels: ['UHF', 'FCI'], basis: '6-31G', states: 3 })],
];

describe('configuration interaction on UHF orbitals', () => {
  it.each(MOLECULES)('identity: full CI of %s does not depend on the orbitals', (_, request) => {
    const [restricted, unrestricted] = onBoth(request).map((point) => correlated(point));
    expectEqualStates(restricted, unrestricted);
    expect(unrestricted.reference).toBe('UHF');
    expect(restricted.reference).toBeUndefined();
    expect(unrestricted.correlation).toBeCloseTo(restricted.correlation, 9);
    unrestricted.naturalOccupations.forEach((occupation, i) => {
      expect(Math.abs(occupation - restricted.naturalOccupations[i])).toBeLessThan(1e-5);
    });
    const total = restricted.dipole.map((component, axis) => Math.abs(component - unrestricted.dipole[axis]));
    expect(Math.max(...total)).toBeLessThan(1e-5);
    expect(unrestricted.energyParts!.kinetic).toBeCloseTo(restricted.energyParts!.kinetic, 4);
  });

  it('identity: full CI of stretched N2 in the iteration of large spaces, and on UHF orbitals that are those of RHF', () => {
    for (const [distance, states, frozenCore] of [
      [3.6, 1, false],
      // the cores are the same only where UHF is RHF
      [1.8, 2, true],
    ] as const) {
      const [restricted, unrestricted] = onBoth(
        study(nitrogen(distance), { levels: ['UHF', 'FCI'], states, frozenCore }),
      );
      expect(correlated(unrestricted).iterations).toBeGreaterThan(0);
      expectEqualStates(correlated(restricted), correlated(unrestricted));
    }
  });

  it('identity: where UHF is RHF, truncated CI is the same on either, with states of any spin', () => {
    for (const level of ['CISD', 'CISDT']) {
      const [restricted, unrestricted] = onBoth(
        study(waterAtoms(1.85, 104), { levels: ['RHF', 'UHF', level], states: 4, frozenCore: true }),
      );
      expect(Math.abs(energy(restricted, 'UHF') - energy(restricted, 'RHF'))).toBeLessThan(1e-10);
      const [one, other] = [correlated(restricted, level), correlated(unrestricted, level)];
      one.states.forEach((state, k) => {
        expect(Math.abs(other.states[k].energy - state.energy)).toBeLessThan(1e-9);
        expect(Math.abs(other.states[k].sSquared - state.sSquared)).toBeLessThan(1e-4);
      });
      expect(other.davidsonCorrected).toBeCloseTo(one.davidsonCorrected!, 8);
      expect(other.referenceWeight).toBeCloseTo(one.referenceWeight, 6);
    }
  });

  it('identity: full CI has the same transition moments on either', () => {
    const [restricted, unrestricted] = onBoth(
      study([atom('Li'), atom('H', 0, 0, 6)], { levels: ['FCI'], states: 6 }),
    ).map((point) => correlated(point));
    expectEqualStates(restricted, unrestricted);
    let bright = 0;
    restricted.states.forEach((state, k) => {
      if (k === 0) return;
      const strength = unrestricted.states[k].oscillatorStrength!;
      expect(Math.abs(strength - state.oscillatorStrength!)).toBeLessThan(1e-6);
      if (strength > 1e-2) bright++;
    });
    expect(bright).toBeGreaterThan(0);
    expect(unrestricted.referenceWeight).not.toBeCloseTo(restricted.referenceWeight, 2);
  });

  it('identity: CISD lies below the UHF determinant and above full CI, at every distance', () => {
    for (const distance of [1.8, 2.6, 3.6, 5]) {
      const point = compute(
        study(nitrogen(distance), {
          levels: ['UHF', 'CISD', 'FCI'],
          frozenCore: true,
          orbitals: 'unrestricted',
        }),
      );
      expect(energy(point, 'CISD')).toBeLessThanOrEqual(energy(point, 'UHF') + 1e-10);
      expect(energy(point, 'CISD')).toBeGreaterThanOrEqual(energy(point, 'FCI') - 1e-10);
    }
  });

  it('identity: CISD of dissociating H2 is full CI, in a singlet however far UHF is from one', () => {
    for (const distance of [1.4, 3, 6, 12]) {
      const point = compute(
        study(hydrogen(distance), {
          levels: ['UHF', 'CISD', 'FCI'],
          basis: '6-31G',
          states: 3,
          orbitals: 'unrestricted',
        }),
      );
      expect(Math.abs(energy(point, 'CISD') - energy(point, 'FCI'))).toBeLessThan(1e-11);
      for (const { sSquared } of correlated(point).states) {
        expect(Math.min(Math.abs(sSquared), Math.abs(sSquared - 2))).toBeLessThan(1e-7);
      }
      if (distance > 3) expect((point.levels.UHF as HartreeFockResult).sSquared).toBeGreaterThan(0.7);
    }
  });

  it('identity: a window that the electrons fill is the UHF determinant: its energy, ⟨S²⟩, dipole and energy parts', () => {
    const molecule = waterAtoms(3.6, 104);
    const point = compute(
      study(molecule, {
        levels: ['UHF', 'FCI'],
        active: { electrons: 4, orbitals: 2 },
        orbitals: 'unrestricted',
      }),
    );
    const uhf = point.levels.UHF as HartreeFockResult;
    const ci = correlated(point);
    expect(ci.determinants).toBe(1);
    expect(Math.abs(ci.energy - uhf.energy)).toBeLessThan(1e-9);
    expect(uhf.sSquared).toBeGreaterThan(0.5);
    expect(ci.sSquared).toBeCloseTo(uhf.sSquared!, 9);
    ci.dipole.forEach((component, axis) => {
      expect(component).toBeCloseTo(uhf.dipole[axis], 9);
    });
    expect(ci.energyParts!.kinetic).toBeCloseTo(uhf.energyParts!.kinetic, 8);
    expect(ci.energyParts!.coulomb).toBeCloseTo(uhf.energyParts!.coulomb, 8);
    ci.states[0].charges!.mulliken.forEach((charge, i) => {
      expect(charge).toBeCloseTo(uhf.charges!.mulliken[i], 8);
    });
    expect(ci.naturalOccupations.reduce((sum, value) => sum + value, 0)).toBeCloseTo(10, 9);
  });

  it('identity: full CI of one electron, without any beta ones, and of a quartet', () => {
    for (const request of [
      open([atom('H')], 2, { levels: ['UHF', 'FCI'], basis: '6-31G', states: 2 }),
      open([atom('N')], 4, { levels: ['FCI'], basis: '6-31G' }),
    ]) {
      const [restricted, unrestricted] = onBoth(request).map((point) => correlated(point));
      expectEqualStates(restricted, unrestricted);
    }
  });

  it('refuses CIS, which stands on RHF, and keeps the choice in the study', () => {
    const preparation = prepareStudy(study(hydrogen(1.4), { levels: ['CIS'], orbitals: 'unrestricted' }));
    if (preparation.ok) throw new Error('CIS on UHF orbitals was not refused');
    expect(preparation.errors.map(({ code, place }) => [code, place])).toEqual([
      ['study.orbitals', 'orbitals'],
    ]);
    const kept = prepareStudy(study(hydrogen(1.4), { levels: ['CISD'], orbitals: 'unrestricted' }));
    expect(kept.ok && kept.prepared.study.orbitals).toBe('unrestricted');
    const left = prepareStudy(study(hydrogen(1.4)));
    expect(left.ok && left.prepared.study.orbitals).toBe('restricted');
  });
});

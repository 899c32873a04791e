import { describe, expect, it } from 'vitest';
import type { StudyAtom } from '#engine';
import {
  atom,
  compute,
  correlated,
  hartreeFock,
  type Place,
  singles,
  study,
  waterAtoms,
} from '../../support/studies';

const ALL = ['RHF', 'CIS', 'CISD', 'FCI'];
const NONE: Place = [0, 0, 0];

/** Turned about a skew axis by an angle with nothing special about it, then moved. */
function moved(atoms: readonly StudyAtom[], by: Place): StudyAtom[] {
  const axis = [1, 2, -0.7].map((value, _, all) => value / Math.hypot(...all));
  const [c, s] = [Math.cos(1.1), Math.sin(1.1)];
  return atoms.map(({ element, at }) => {
    const along = at.reduce((sum, value, k) => sum + value * axis[k], 0);
    const cross = [0, 1, 2].map(
      (k) => axis[(k + 1) % 3] * at[(k + 2) % 3] - axis[(k + 2) % 3] * at[(k + 1) % 3],
    );
    const turned = [0, 1, 2].map((k) => at[k] * c + cross[k] * s + axis[k] * along * (1 - c) + by[k]);
    return atom(element, turned[0], turned[1], turned[2]);
  });
}

function energies(atoms: readonly StudyAtom[], charge = 0) {
  const point = compute(study(atoms, { levels: ALL, charge, states: 2 }));
  return {
    point,
    all: [
      hartreeFock(point).energy,
      ...correlated(point, 'CISD').states.map((state) => state.energy),
      ...correlated(point).states.map((state) => state.energy),
      ...singles(point).states.map((state) => state.energy),
    ],
    oscillatorStrengths: singles(point).states.map((state) => state.oscillatorStrength),
  };
}

function expectEqual(one: readonly number[], other: readonly number[], tolerance: number): void {
  expect(other).toHaveLength(one.length);
  one.forEach((value, k) => {
    expect(Math.abs(value - other[k])).toBeLessThan(tolerance);
  });
}

describe('invariance', () => {
  // p functions off axis, no symmetry: hypofluorous acid's atoms at a bent, stretched geometry
  const atoms = [atom('F', 0, 0, 0), atom('O', 0, 0, 2.8), atom('H', 1.9, 0, 3.3)];
  const reference = energies(atoms);

  it('identity: energies and oscillator strengths stay under translation and rotation', () => {
    const other = energies(moved(atoms, [3, -40, 7.5]));
    expectEqual(reference.all, other.all, 1e-10);
    expectEqual(reference.oscillatorStrengths, other.oscillatorStrengths, 1e-7);
  });

  it('identity: the dipole turns with the molecule, so its length stays', () => {
    const length = (at: readonly StudyAtom[]) => Math.hypot(...hartreeFock(energies(at).point).dipole);
    expect(Math.abs(length(moved(atoms, [5, 5, 5])) - length(atoms))).toBeLessThan(1e-7);
  });

  it('identity: energies do not depend on the order of the atoms', () => {
    const [f, o, h] = atoms;
    for (const order of [
      [h, f, o],
      [o, h, f],
    ]) {
      expectEqual(reference.all, energies(order).all, 1e-10);
    }
  });

  it('identity: a length in ångström and the same in bohr give the same energy', () => {
    const bohr = 0.529177210544;
    const scaled = atoms.map(({ element, at }) => atom(element, at[0] * bohr, at[1] * bohr, at[2] * bohr));
    const point = compute(study(scaled, { unit: 'angstrom' }));
    expect(Math.abs(hartreeFock(point).energy - reference.all[0])).toBeLessThan(1e-11);
  });
});

describe('dipole moments', () => {
  it('identity: the dipole of an ion changes by charge × shift when it is moved', () => {
    const atoms = [atom('He'), atom('H', 0, 0, 1.4632)];
    const levels = ['RHF', 'CISD', 'FCI'];
    const at = (by: Place) =>
      compute(
        study(
          atoms.map(({ element, at: [x, y, z] }) => atom(element, x + by[0], y + by[1], z + by[2])),
          { charge: 1, levels },
        ),
      );
    const home = at(NONE);
    const away = at([1.5, -2, 0.25]);
    for (const level of levels) {
      const dipole = (point: typeof home) =>
        (level === 'RHF' ? hartreeFock(point) : correlated(point, level)).dipole;
      expectEqual(
        dipole(home).map((value, k) => value + [1.5, -2, 0.25][k]),
        dipole(away),
        1e-7,
      );
    }
  });

  it('identity: a homonuclear molecule has none, wherever the origin is', () => {
    const point = compute(study([atom('H'), atom('H', 0, 0, 1.4)], { levels: ['RHF', 'FCI'] }));
    expect(Math.hypot(...hartreeFock(point).dipole)).toBeLessThan(1e-10);
    expect(Math.hypot(...correlated(point).dipole)).toBeLessThan(1e-10);
  });
});

describe('order of methods', () => {
  it.each([
    ['LiH', [atom('Li'), atom('H', 0, 0, 3.0)], 0],
    ['BeH2', [atom('Be'), atom('H', 0, 0, 2.5), atom('H', 0, 0, -2.9)], 0],
    ['H2O', waterAtoms(2.2, 104.5), 0],
    ['BH2+', [atom('B'), atom('H', 0, 0.3, 2.3), atom('H', 0, 0.1, -2.3)], 1],
  ])('identity: RHF ≥ CISD ≥ CISDT ≥ CISDTQ ≥ FCI for %s', (_, atoms, charge) => {
    const levels = ['RHF', 'CISD', 'CISDT', 'CISDTQ', 'FCI'];
    const point = compute(study(atoms, { levels, charge }));
    const sequence = levels.map(
      (level) => (level === 'RHF' ? hartreeFock(point) : correlated(point, level)).energy,
    );
    for (let k = 1; k < sequence.length; k++)
      expect(sequence[k]).toBeLessThanOrEqual(sequence[k - 1] + 1e-11);
    expect(sequence[1]).toBeLessThan(sequence[0] - 1e-3);
  });

  it.each([
    ['H2', [atom('H'), atom('H', 0, 0, 2.3)], 0],
    ['HeH+', [atom('He'), atom('H', 0, 0, 1.8)], 1],
    ['H3+', [atom('H'), atom('H', 0, 0, 1.65), atom('H', 0, 1.43, 0.825)], 1],
  ])('identity: for the two electrons of %s CISD is full CI', (_, atoms, charge) => {
    const basis = '6-31G';
    const point = compute(study(atoms, { levels: ['RHF', 'CISD', 'FCI'], charge, basis }));
    expect(Math.abs(correlated(point, 'CISD').energy - correlated(point).energy)).toBeLessThan(1e-11);
    expect(correlated(point).davidsonCorrected).toBeUndefined();
  });
});

describe('size consistency', () => {
  it('identity: full CI of two molecules 200 bohr apart is the sum of both; CISD is above it', () => {
    const hydrogen = [atom('H'), atom('H', 0, 0, 1.6)];
    const hydride = [atom('He', 200, 0, 0), atom('H', 200, 0, 1.5)];
    const levels = ['RHF', 'CISD', 'FCI'];
    const one = compute(study(hydrogen, { levels }));
    const other = compute(study(hydride, { levels, charge: 1 }));
    const both = compute(study([...hydrogen, ...hydride], { levels, charge: 1 }));
    const sum = (level: 'RHF' | 'FCI') =>
      level === 'RHF'
        ? hartreeFock(one).energy + hartreeFock(other).energy
        : correlated(one).energy + correlated(other).energy;
    // What is left is the ion's charge with the quadrupole of H2, of order 1/200³.
    expect(Math.abs(hartreeFock(both).energy - sum('RHF'))).toBeLessThan(1e-6);
    expect(Math.abs(correlated(both).energy - sum('FCI'))).toBeLessThan(1e-6);
    expect(correlated(both, 'CISD').energy).toBeGreaterThan(correlated(both).energy + 1e-6);
  });
});

describe('symmetry of excited states', () => {
  it('identity: both components of a Π state are found, and are degenerate', () => {
    const point = compute(study([atom('B'), atom('H', 0, 0, 2.33)], { levels: ['CIS', 'FCI'], states: 4 }));
    const excited = correlated(point).states.slice(1, 3);
    expect(Math.abs(excited[0].energy - excited[1].energy)).toBeLessThan(1e-8);
    expect(excited.map((state) => state.spin)).toEqual(['triplet', 'triplet']);
  });
});

describe('excitation rank', () => {
  it('identity: rank 6 is full CI for six electrons, and rank 5 lies between it and rank 4', () => {
    const levels = ['RHF', 'CISDTQ', 'CISDTQ5', 'CISDTQ56', 'FCI'];
    const point = compute(study([atom('Be'), atom('H', 0, 0, 3.5), atom('H', 0, 0, -3.5)], { levels }));
    const energy = (level: string) => correlated(point, level).energy;
    expect(Math.abs(energy('CISDTQ56') - energy('FCI'))).toBeLessThan(1e-10);
    expect(energy('CISDTQ5')).toBeLessThanOrEqual(energy('CISDTQ') + 1e-11);
    expect(energy('FCI')).toBeLessThanOrEqual(energy('CISDTQ5') + 1e-11);
  });
});

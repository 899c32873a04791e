import { describe, expect, it } from 'vitest';
import type { HartreeFockResult, Study, StudyAtom } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { type EnergyParts, energyParts } from '../../../engine/calculation/energy-parts';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { transformToOrbitals } from '../../../engine/integrals/orbital-transformation';
import {
  atom,
  compute,
  correlated,
  hartreeFock,
  prepare,
  singles,
  study,
  waterAtoms,
} from '../../support/studies';

function total(parts: EnergyParts): number {
  return parts.kinetic + parts.nuclearAttraction + parts.electronRepulsion + parts.nuclearRepulsion;
}

const tempered = (smallest: number) => ({
  name: 'even-tempered',
  evenTempered: { H: [{ angularMomentum: 0, smallest, ratio: 2.2, count: 13 }] },
});

describe('energyParts', () => {
  it('identity: hydrogen with one Gaussian of the best exponent 8/(9π): T = −E = 4/(3π), −V/T = 2', () => {
    const basis = {
      name: 'one Gaussian',
      evenTempered: { H: [{ angularMomentum: 0, smallest: 8 / (9 * Math.PI), ratio: 2, count: 1 }] },
    };
    const point = compute(study([atom('H')], { levels: ['ROHF', 'UHF', 'FCI'], basis }));
    for (const level of ['ROHF', 'UHF', 'FCI']) {
      const parts = (point.levels[level] as HartreeFockResult).energyParts!;
      expect(Math.abs(parts.kinetic - 4 / (3 * Math.PI))).toBeLessThan(1e-11);
      expect(Math.abs(parts.virialRatio - 2)).toBeLessThan(1e-10);
      // one electron does not repel itself
      expect(Math.abs(parts.electronRepulsion)).toBeLessThan(1e-11);
      expect(Math.abs(parts.coulomb + parts.exchangeCorrelation)).toBeLessThan(1e-11);
    }
  });

  it('identity: the Slater limit of hydrogen: T = 1/2, V = −1, −V/T = 2', () => {
    const parts = correlated(compute(study([atom('H')], { levels: ['FCI'], basis: tempered(0.02) })))
      .energyParts!;
    expect(parts.kinetic).toBeCloseTo(0.5, 4);
    expect(parts.nuclearAttraction).toBeCloseTo(-1, 4);
    expect(parts.virialRatio).toBeCloseTo(2, 3);
  });

  it('identity: scaling all lengths by s: E(s) = s²T + sV is the energy in the scaled basis', () => {
    // the same coefficients in a basis scaled with the molecule: T·s², V·s; best s gives −V²/4T
    const scale = 1.02;
    const at = (s: number) =>
      energyParts(
        0,
        [Float64Array.of(0.5), Float64Array.of(0.5)],
        (() => {
          const prepared = prepare(
            study([atom('H')], {
              levels: ['FCI'],
              basis: {
                name: 'one Gaussian',
                evenTempered: { H: [{ angularMomentum: 0, smallest: 0.3 * s * s, ratio: 2, count: 1 }] },
              },
            }),
          );
          const molecule = prepared.moleculeAt(null);
          return molecularIntegrals(molecule, placeBasis(prepared.basisSet, molecule));
        })(),
      );
    expect(Math.abs(at(scale).kinetic - scale ** 2 * at(1).kinetic)).toBeLessThan(1e-13);
    expect(Math.abs(at(scale).nuclearAttraction - scale * at(1).nuclearAttraction)).toBeLessThan(1e-13);
    expect(Math.abs(at(scale).coulomb - scale * at(1).coulomb)).toBeLessThan(1e-13);
  });

  it('identity: the parts add up to the energy, and for two paired electrons exchange is −J/2', () => {
    const point = compute(
      study([atom('He'), atom('H', 0, 0, 1.5)], {
        levels: ['RHF', 'CISD', 'FCI'],
        charge: 1,
        basis: '6-31G',
      }),
    );
    const field = hartreeFock(point);
    expect(Math.abs(total(field.energyParts!) - field.energy)).toBeLessThan(1e-11);
    const { coulomb, exchangeCorrelation } = field.energyParts!;
    expect(Math.abs(exchangeCorrelation + coulomb / 2)).toBeLessThan(1e-9);
    for (const level of ['CISD', 'FCI']) {
      const { energy, energyParts: parts } = correlated(point, level);
      expect(Math.abs(total(parts!) - energy)).toBeLessThan(1e-11);
      // correlation keeps the electrons further apart
      expect(parts!.exchangeCorrelation).toBeLessThan(exchangeCorrelation);
    }
  });

  it('identity: CI that cannot improve on its reference has the parts of the reference, frozen core or not', () => {
    const neon = [atom('Ne')];
    for (const frozenCore of [false, true]) {
      const point = compute(study(neon, { levels: ['RHF', 'FCI'], frozenCore }));
      const [field, full] = [hartreeFock(point).energyParts!, correlated(point).energyParts!];
      for (const key of Object.keys(field) as (keyof EnergyParts)[]) {
        expect(Math.abs(field[key]! - full[key]!), key).toBeLessThan(1e-9);
      }
    }
  });
});

describe('Coulomb, exchange and correlation of the repulsion', () => {
  const split = ({ coulomb, exchange, correlation, electronRepulsion, exchangeCorrelation }: EnergyParts) => {
    expect(Math.abs(coulomb + exchange! + correlation! - electronRepulsion)).toBeLessThan(1e-11);
    expect(Math.abs(exchange! + correlation! - exchangeCorrelation)).toBeLessThan(1e-11);
    return { coulomb, exchange: exchange!, correlation: correlation! };
  };
  const open = (atoms: StudyAtom[], multiplicity: number, changes: Partial<Study> = {}): Study => ({
    ...study(atoms, { levels: ['ROHF', 'UHF', 'CISD'], ...changes }),
    molecule: { unit: 'bohr', atoms, multiplicity },
  });

  it('identity: a determinant has no correlation: RHF, ROHF, UHF, however far its spins part', () => {
    const closed = compute(study(waterAtoms(3.4, 104), { levels: ['RHF', 'UHF'] }));
    const radical = compute(open([atom('O'), atom('H', 0, 0, 2)], 2));
    for (const result of [closed.levels.RHF, closed.levels.UHF, radical.levels.ROHF, radical.levels.UHF]) {
      const { exchange, correlation } = split((result as HartreeFockResult).energyParts!);
      expect(Math.abs(correlation)).toBeLessThan(1e-8);
      expect(exchange).toBeLessThan(-1);
    }
  });

  it('identity: correlation lowers the repulsion at every CI level, with either orbitals', () => {
    for (const orbitals of ['restricted', 'unrestricted'] as const) {
      const point = compute(open([atom('O'), atom('H', 0, 0, 2)], 2, { orbitals, frozenCore: true }));
      expect(split(correlated(point, 'CISD').energyParts!).correlation).toBeLessThan(-0.01);
    }
  });

  it('identity: two electrons of equal spin in two orbitals: one determinant, no correlation', () => {
    const point = compute(open([atom('H'), atom('H', 0, 0, 2)], 3, { levels: ['FCI'] }));
    expect(Math.abs(split(correlated(point).energyParts!).correlation)).toBeLessThan(1e-10);
  });

  it('independent: H2 in a minimal basis: from the three integrals over its orbitals and c²', () => {
    const point = compute(study([atom('H'), atom('H', 0, 0, 2)], { levels: ['RHF', 'FCI'] }));
    const prepared = prepare(study([atom('H'), atom('H', 0, 0, 2)], { levels: ['FCI'] }));
    const molecule = prepared.moleculeAt(null);
    const { problem } = molecularIntegrals(molecule, placeBasis(prepared.basisSet, molecule));
    const s = problem.overlap[1]!;
    const [a, b] = [1 / Math.sqrt(2 + 2 * s), 1 / Math.sqrt(2 - 2 * s)];
    const { twoElectron } = transformToOrbitals({
      oneElectron: problem.coreHamiltonian,
      repulsion: problem.repulsion,
      coefficients: Float64Array.of(a, b, a, -b),
      orbitalCount: 2,
      frozen: 0,
      active: 2,
      nuclearRepulsion: 0,
    });
    // (11|11), (22|11), (21|21), (22|22)
    const [J11, J12, K12, J22] = [twoElectron[0]!, twoElectron[3]!, twoElectron[2]!, twoElectron[5]!];
    const { energyParts, naturalOccupations } = correlated(point);
    const [n1, n2] = naturalOccupations;
    const { coulomb, exchange, correlation } = split(energyParts!);
    expect(Math.abs(coulomb - (n1! ** 2 * J11 + n2! ** 2 * J22 + 2 * n1! * n2! * J12) / 2)).toBeLessThan(
      1e-9,
    );
    expect(Math.abs(exchange + (n1! ** 2 * J11 + n2! ** 2 * J22 + 2 * n1! * n2! * K12) / 4)).toBeLessThan(
      1e-9,
    );
    const repulsion = (n1! * J11 + n2! * J22) / 2 - Math.sqrt(n1! * n2!) * K12;
    expect(Math.abs(coulomb + exchange + correlation - repulsion)).toBeLessThan(1e-9);
  });
});

describe('transitions of CI states', () => {
  it('identity: H2+ in a minimal basis: moment R/(2√(1 − S²)) from σg to σu', () => {
    const request = study([atom('H'), atom('H', 0, 0, 2)], { levels: ['FCI'], charge: 1, states: 2 });
    const prepared = prepare(request);
    const molecule = prepared.moleculeAt(null);
    const { problem } = molecularIntegrals(molecule, placeBasis(prepared.basisSet, molecule));
    const [ground, excited] = correlated(compute(request)).states;
    const moment = 1 / Math.sqrt(1 - problem.overlap[1] ** 2);
    expect(Math.abs(Math.abs(excited.transitionDipole![2]) - moment)).toBeLessThan(1e-11);
    expect(Math.hypot(excited.transitionDipole![0], excited.transitionDipole![1])).toBeLessThan(1e-12);
    expect(Math.abs(excited.oscillatorStrength! - (2 / 3) * excited.excitation * moment ** 2)).toBeLessThan(
      1e-11,
    );
    expect(ground).not.toHaveProperty('oscillatorStrength');
  });

  it('identity: oscillator strengths of the one electron of H2+ add up to 1 (Thomas, Reiche, Kuhn)', () => {
    const shells = [
      { angularMomentum: 0, smallest: 0.05, ratio: 2.6, count: 7 },
      { angularMomentum: 1, smallest: 0.08, ratio: 2.6, count: 5 },
    ];
    const request = study([atom('H'), atom('H', 0, 0, 2)], {
      levels: ['FCI'],
      charge: 1,
      states: 44,
      basis: { name: 'even-tempered', evenTempered: { H: shells } },
    });
    const { states } = correlated(compute(request));
    const sum = states.slice(1).reduce((total, state) => total + state.oscillatorStrength!, 0);
    expect(states).toHaveLength(44);
    expect(Math.abs(sum - 1)).toBeLessThan(0.02);
  });

  it('identity: singlet to triplet is dark, and turning the molecule turns the moment', () => {
    const states = (atoms: ReturnType<typeof waterAtoms>) =>
      correlated(compute(study(atoms, { levels: ['FCI'], states: 4, frozenCore: true }))).states;
    const home = states(waterAtoms(1.9, 104));
    for (const state of home.slice(1)) {
      if (state.spin === 'triplet') expect(state.oscillatorStrength).toBeLessThan(1e-15);
    }
    const turned = states(
      waterAtoms(1.9, 104).map(({ element, at: [x, y, z] }) => atom(element, y + 3, z, x)),
    );
    home.slice(1).forEach((state, k) => {
      expect(Math.abs(state.oscillatorStrength! - turned[k + 1].oscillatorStrength!)).toBeLessThan(1e-9);
    });
    expect(Math.max(...home.slice(1).map((state) => state.oscillatorStrength!))).toBeGreaterThan(1e-3);
  });

  it('identity: the triplet of H2 in a minimal basis is one excitation, so that CIS has the parts of full CI', () => {
    const atoms = [atom('H'), atom('H', 0, 0, 1.7)];
    const [state] = singles(compute(study(atoms, { levels: ['CIS'] }))).states;
    const molecule = { unit: 'bohr', atoms, multiplicity: 3 } as const;
    const exact = correlated(compute({ ...study(atoms, { levels: ['FCI'] }), molecule }));
    expect(state!.spin).toBe('triplet');
    expect(state!.naturalOccupations).toEqual(exact.naturalOccupations.map((n) => expect.closeTo(n, 9)));
    expect(state!.unpairedElectrons!.linear).toBeCloseTo(2, 9);
    for (const part of [
      'kinetic',
      'nuclearAttraction',
      'coulomb',
      'electronRepulsion',
      'virialRatio',
    ] as const) {
      expect(state!.energyParts![part], part).toBeCloseTo(exact.energyParts![part], 8);
    }
    expect(total(state!.energyParts!)).toBeCloseTo(state!.energy, 9);
  });

  it('identity: states of CIS keep their frozen cores, and their dipoles do not depend on the origin', () => {
    const along = (shift: number) => [atom('Li', 0, 0, shift), atom('H', 0, 0, 3 + shift)];
    const at = (shift: number) =>
      singles(compute(study(along(shift), { levels: ['CIS'], frozenCore: true, states: 2 }))).states;
    for (const [k, state] of at(0).entries()) {
      expect(state.naturalOccupations![0]).toBe(2);
      expect(state.naturalOccupations!.reduce((sum, n) => sum + n, 0)).toBeCloseTo(4, 9);
      expect(at(5)[k]!.dipole![2]).toBeCloseTo(state.dipole![2], 6);
    }
  });
});

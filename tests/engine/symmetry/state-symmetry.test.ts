import { describe, expect, it } from 'vitest';
import type { HartreeFockResult, StateSymmetry, StudyAtom } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import { transformToOrbitals } from '../../../engine/integrals/orbital-transformation';
import { diagonaliseFock } from '../../../engine/self-consistent-field/orbitals';
import { orthogonalise } from '../../../engine/self-consistent-field/orthogonalisation';
import { symmetriseOrbitals } from '../../../engine/symmetry/orbital-symmetry';
import { findSymmetry } from '../../../engine/symmetry/point-group';
import { stateSymmetry } from '../../../engine/symmetry/state-symmetry';
import { anywhere } from '../../support/orientation';
import { seededRandom } from '../../support/random';
import { atom, compute, correlated, prepare, singles, study } from '../../support/studies';
import * as molecules from '../../support/symmetric-molecules';

const random = seededRandom(5);

/** As `3Σg-`: multiplicity, Λ, parity, reflection. */
function term({ spin, symmetry }: { readonly spin: string; readonly symmetry?: StateSymmetry }): string {
  const multiplicity =
    ['singlet', 'doublet', 'triplet', 'quartet', 'quintet', 'sextet', 'septet'].indexOf(spin) + 1;
  const { lambda, inversion = '', reflection = '' } = symmetry?.term ?? { lambda: Number.NaN };
  return `${multiplicity}${'ΣΠΔΦΓ'[lambda] ?? '?'}${inversion}${reflection}`;
}

/** Neighbours of one term and one energy are one level; as often as there are states. */
function levels(
  states: readonly { readonly energy: number; readonly spin: string; readonly symmetry?: StateSymmetry }[],
): string[] {
  const found: { name: string; energy: number; count: number }[] = [];
  for (const state of states) {
    const name = term(state);
    const last = found.find((level) => level.name === name && Math.abs(level.energy - state.energy) < 1e-6);
    if (last) last.count++;
    else found.push({ name, energy: state.energy, count: 1 });
  }
  return found.map(({ name, count }) => (count > 1 ? `${count}×${name}` : name));
}

function fullStates(atoms: readonly StudyAtom[], states: number, changes: Parameters<typeof study>[1] = {}) {
  const request = study(anywhere(atoms, random), { levels: ['FCI'], states, frozenCore: true, ...changes });
  return correlated(compute(request)).states;
}

describe('terms of linear molecules', () => {
  it('published: H2 has X ¹Σg⁺, b ³Σu⁺, B ¹Σu⁺ and a doubly excited ¹Σg⁺ (Herzberg, Diatomic Molecules, 1950, value from memory)', () => {
    expect(levels(fullStates(molecules.hydrogen, 4))).toEqual(['1Σg+', '3Σu+', '1Σu+', '1Σg+']);
  });

  it('published: O2 has X ³Σg⁻, a ¹Δg, b ¹Σg⁺ (Herzberg 1950, value from memory)', () => {
    expect(levels(fullStates(molecules.oxygen, 4))).toEqual(['3Σg-', '2×1Δg', '1Σg+']);
  });

  it('published: the lowest of C2 are X ¹Σg⁺, a ³Πu, A ¹Πu, b ³Σg⁻, B ¹Δg, B′ ¹Σg⁺, c ³Σu⁺, d ³Πg (Herzberg 1950, M. Martin, J. Photochem. Photobiol. A 66, 263 (1992), value from memory)', () => {
    // over orbitals of the bare nuclei, as RHF of C2 breaks the symmetry
    const prepared = prepare(study(anywhere(molecules.carbon, random)));
    const molecule = prepared.moleculeAt(null);
    const basis = placeBasis(prepared.basisSet, molecule);
    const { problem } = molecularIntegrals(molecule, basis);
    const n = basis.functionCount;
    const { transformation } = orthogonalise(problem.overlap, n);
    const symmetry = findSymmetry(molecule);
    const { coefficients, irreps, axialRotation } = symmetriseOrbitals(
      molecule,
      basis,
      problem.overlap,
      symmetry,
      diagonaliseFock(problem.coreHamiltonian, transformation, n, n),
      [],
    );
    const integrals = transformToOrbitals({
      ...problem,
      oneElectron: problem.coreHamiltonian,
      coefficients,
      orbitalCount: n,
      frozen: 2,
      active: n - 2,
    });
    const { states } = solveConfigurationInteraction(integrals, {
      alphaElectrons: 4,
      betaElectrons: 4,
      maximumRank: Number.POSITIVE_INFINITY,
      states: 12,
      species: {
        irreps: irreps.slice(2) as number[],
        axialRotation: axialRotation!.filter((_, k) => k >= 2 * n && k % n >= 2),
      },
    });
    const named = states.map(({ energy, spin, symmetry: found }) => ({
      energy,
      spin,
      symmetry: stateSymmetry(symmetry, found!.irrepWeights, found!.axialSquare)!,
    }));
    expect(levels(named).sort()).toEqual(
      ['1Σg+', '2×3Πu', '2×1Πu', '3Σg-', '2×1Δg', '1Σg+', '3Σu+', '2×3Πg'].sort(),
    );
  });

  it('published: OH is X ²Π, A ²Σ⁺, BeH the other way round (Herzberg 1950, value from memory)', () => {
    expect(levels(fullStates([atom('O'), atom('H', 0, 0, 1.83)], 3))).toEqual(['2×2Π', '2Σ+']);
    expect(levels(fullStates([atom('Be'), atom('H', 0, 0, 2.538)], 3))).toEqual(['2Σ+', '2×2Π']);
  });

  it('identity: π³π*¹ of N2 gives Σ⁺, Σ⁻ and Δ of u, for both spins, as π × π = Σ⁺ + Σ⁻ + Δ', () => {
    const point = compute(study(anywhere(molecules.nitrogen, random), { levels: ['CIS'], states: 8 }));
    const found = levels(singles(point).states);
    for (const name of ['3Σu+', '3Σu-', '2×3Δu', '1Σu-', '2×1Δu', '2×1Πg', '2×3Πg']) {
      expect(found).toContain(name);
    }
    expect(found.join()).not.toContain('?');
    // only Σ⁺ and Π of u reach the ground state by one photon
    for (const state of singles(point).states) {
      const isAllowed = state.oscillatorStrength > 1e-8;
      if (isAllowed) expect(['1Σu+', '1Πu']).toContain(term(state));
    }
  });

  it('published: at a long bond the lowest of N2 are ¹Σg⁺, ³Σu⁺, ⁵Σg⁺, ⁷Σu⁺ of two ⁴S atoms, though RHF breaks the symmetry there (Wigner–Witmer rules in Herzberg 1950, value from memory)', () => {
    const stretched = [atom('N'), atom('N', 0, 0, 4.8)];
    const point = compute(
      study(anywhere(stretched, random), { levels: ['RHF', 'FCI'], states: 4, frozenCore: true }),
    );
    expect((point.levels.RHF as HartreeFockResult).orbitalSymmetries).toContain(null);
    expect(levels(correlated(point).states)).toEqual(['1Σg+', '3Σu+', '5Σg+', '7Σu+']);
  });

  it('identity: CO has no parity', () => {
    const found = levels(fullStates(molecules.carbonMonoxide, 3));
    expect(found).toEqual(['1Σ+', '2×3Π']);
  });
});

describe('states of bent molecules', () => {
  it('identity: CIS states of water reach the ground state along the axis that they transform as', () => {
    const point = compute(study(molecules.water, { basis: '6-31G', levels: ['CIS'], states: 6 }));
    const along: Readonly<Record<string, number>> = { B1: 1, B2: 0, A1: 2 };
    // with the plane xz of the study's coordinates: x here is y of the convention
    for (const { symmetry, transitionDipole, oscillatorStrength } of singles(point).states) {
      expect(symmetry?.term).toBeUndefined();
      transitionDipole.forEach((component, axis) => {
        if (along[symmetry!.irrep] !== axis) expect(Math.abs(component)).toBeLessThan(1e-6);
      });
      if (symmetry!.irrep === 'A2') expect(oscillatorStrength).toBeLessThan(1e-10);
    }
    expect(new Set(singles(point).states.map(({ symmetry }) => symmetry?.irrep)).size).toBeGreaterThan(2);
  });

  it('published: the lowest excitation of water is from 1b1 to a1, so that it is B1 (Herzberg, Polyatomic Molecules, 1966, value from memory)', () => {
    const point = compute(study(anywhere(molecules.water, random), { basis: '6-31G', levels: ['CIS'] }));
    expect(singles(point).states.map(({ symmetry }) => symmetry?.irrep)).toEqual(['B1', 'B1']);
  });

  it('identity: full CI labels do not depend on the orientation or on the frozen core', () => {
    const irreps = [false, true, true].map((frozenCore) =>
      fullStates(molecules.water, 6, { frozenCore }).map(({ symmetry }) => symmetry?.irrep),
    );
    expect(irreps[0]).not.toContain(undefined);
    expect(irreps[1]).toEqual(irreps[0]);
    expect(irreps[2]).toEqual(irreps[0]);
  });
});

describe('stateSymmetry', () => {
  const linear = { pointGroup: 'D2h', linear: 'D∞h' } as const;
  const only = (irrep: number) => Array.from({ length: 8 }, (_, k) => Number(k === irrep));

  it.each([
    ['Σg⁺', 0, 0],
    ['Σg⁻', 1, 0],
    ['Σu⁺', 5, 0],
    ['Σu⁻', 4, 0],
  ])(
    'published: %s is representation %i of D2h (correlation table in Herzberg 1966, value from memory)',
    (name, irrep, square) => {
      const found = stateSymmetry(linear, only(irrep), square);
      expect(`Σ${found?.term?.inversion}${found?.term?.reflection === '+' ? '⁺' : '⁻'}`).toBe(name);
    },
  );

  it('identity: what is mixed, or no whole angular momentum, gets no label', () => {
    expect(stateSymmetry(linear, [0.99, 0.01, 0, 0, 0, 0, 0, 0], 0)).toBeUndefined();
    expect(stateSymmetry(linear, only(0), 2)).toEqual({ irrep: 'Ag' });
    // an odd Λ cannot be in a representation that half a turn about the axis leaves alone
    expect(stateSymmetry(linear, only(0), 1)).toEqual({ irrep: 'Ag' });
    expect(stateSymmetry({ pointGroup: 'C2v' }, [0, 0, 1, 0])).toEqual({ irrep: 'B1' });
  });
});

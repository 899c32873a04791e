import { describe, expect, it } from 'vitest';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { congruence, multiply } from '../../../engine/linear-algebra/dense';
import { diagonaliseFock } from '../../../engine/self-consistent-field/orbitals';
import { orthogonalise } from '../../../engine/self-consistent-field/orthogonalisation';
import { symmetriseOrbitals } from '../../../engine/symmetry/orbital-symmetry';
import { findSymmetry } from '../../../engine/symmetry/point-group';
import { anywhere } from '../../support/orientation';
import { seededRandom } from '../../support/random';
import { prepare, study } from '../../support/studies';
import * as molecules from '../../support/symmetric-molecules';

/** Orbitals of the bare nuclei, and all that labelling needs. */
function bareOrbitals(atoms: typeof molecules.nitrogen, seed: number) {
  const prepared = prepare(study(anywhere(atoms, seededRandom(seed)), { basis: '6-31G' }));
  const molecule = prepared.moleculeAt(null);
  const basis = placeBasis(prepared.basisSet, molecule);
  const { overlap, coreHamiltonian } = molecularIntegrals(molecule, basis).problem;
  const n = basis.functionCount;
  const orbitals = diagonaliseFock(coreHamiltonian, orthogonalise(overlap, n).transformation, n, n);
  return { molecule, basis, overlap, coreHamiltonian, n, orbitals, symmetry: findSymmetry(molecule) };
}

/** Turns two orbitals into each other by 45°. */
function mixed(coefficients: Float64Array, m: number, p: number, q: number): Float64Array {
  return coefficients.map((value, index) => {
    const row = index - (index % m);
    if (index % m === p) return (value + coefficients[row + q]) * Math.SQRT1_2;
    if (index % m === q) return (value - coefficients[row + p]) * Math.SQRT1_2;
    return value;
  });
}

describe('symmetriseOrbitals', () => {
  it.each([
    ['nitrogen', molecules.nitrogen],
    ['acetylene', molecules.acetylene],
    ['methane', molecules.methane],
    ['ammonia', molecules.ammonia],
  ])(
    'identity: turned orbitals of %s stay orthonormal, diagonalise the same operator, and all are pure',
    (_, atoms) => {
      const { molecule, basis, overlap, coreHamiltonian, n, orbitals, symmetry } = bareOrbitals(atoms, 21);
      const found = symmetriseOrbitals(molecule, basis, overlap, symmetry, orbitals, []);
      const metric = congruence(overlap, found.coefficients, n, n);
      const energy = congruence(coreHamiltonian, found.coefficients, n, n);
      for (let p = 0; p < n; p++) {
        for (let q = 0; q < n; q++) {
          expect(metric[p * n + q]).toBeCloseTo(Number(p === q), 10);
          expect(energy[p * n + q]).toBeCloseTo(p === q ? found.energies[p] : 0, 8);
          // the operator joins no two representations
          if (found.irreps[p] !== found.irreps[q]) expect(Math.abs(energy[p * n + q])).toBeLessThan(1e-10);
        }
        expect(found.energies[p]).toBeCloseTo(orbitals.energies[p], 5);
      }
      expect(found.irreps).not.toContain(undefined);
    },
  );

  it('identity: the axial rotation of a linear molecule has the angular momenta as eigenvalues', () => {
    const { molecule, basis, overlap, n, orbitals, symmetry } = bareOrbitals(molecules.carbonMonoxide, 22);
    const { axialRotation, lambdas } = symmetriseOrbitals(molecule, basis, overlap, symmetry, orbitals, []);
    const square = multiply(axialRotation!, axialRotation!, n, n, n);
    for (let p = 0; p < n; p++) {
      for (let q = 0; q < n; q++) {
        expect(square[p * n + q]).toBeCloseTo(p === q ? -(lambdas[p]! ** 2) : 0, 7);
      }
    }
  });

  it('identity: orbitals that mix representations get no label, the others keep theirs', () => {
    const { molecule, basis, overlap, n, orbitals, symmetry } = bareOrbitals(molecules.water, 23);
    const label = (coefficients: Float64Array) =>
      symmetriseOrbitals(molecule, basis, overlap, symmetry, { ...orbitals, coefficients }, []).irreps;
    const pure = label(orbitals.coefficients);
    const other = pure.findIndex((irrep) => irrep !== pure[0]);
    const broken = label(mixed(orbitals.coefficients, n, 0, other));
    expect(broken).toEqual(pure.map((irrep, p) => (p === 0 || p === other ? undefined : irrep)));
  });

  it('identity: a boundary inside a degenerate set is not crossed', () => {
    const { molecule, basis, overlap, orbitals, n, symmetry } = bareOrbitals(molecules.methane, 24);
    const pair = Array.from(orbitals.energies).findIndex(
      (energy, p) => Math.abs(orbitals.energies[p + 1] - energy) < 1e-8,
    );
    const bounded = symmetriseOrbitals(molecule, basis, overlap, symmetry, orbitals, [pair + 1]);
    for (let i = 0; i < n; i++) {
      expect(bounded.coefficients[i * n + pair]).toBe(orbitals.coefficients[i * n + pair]);
    }
  });
});

import { describe, expect, it } from 'vitest';
import type { StudyAtom } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { closedShellFock } from '../../../engine/configuration-interaction/singles';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import { transformToOrbitals } from '../../../engine/integrals/orbital-transformation';
import {
  restrictedSecondOrder,
  type SpinOrbitals,
  unrestrictedSecondOrder,
} from '../../../engine/perturbation/second-order';
import { superposeAtomicDensities } from '../../../engine/self-consistent-field/initial-guess';
import { columnRange } from '../../../engine/self-consistent-field/mean-field';
import { solveUnrestricted } from '../../../engine/self-consistent-field/open-shell';
import { solveRestricted } from '../../../engine/self-consistent-field/restricted';
import { UNATTENDED } from '../../../engine/termination';
import { atom, prepare, study, waterAtoms } from '../../support/studies';

function setUp(atoms: readonly StudyAtom[], basis: string) {
  const prepared = prepare(study(atoms, { basis, levels: ['UHF'] }));
  const molecule = prepared.moleculeAt(null);
  const placed = placeBasis(prepared.basisSet, molecule);
  const { problem } = molecularIntegrals(molecule, placed);
  const start = { kind: 'density', density: superposeAtomicDensities(molecule, placed) } as const;
  return { problem, start, electrons: prepared.electrons, n: problem.functionCount };
}

function spinOrbitals(
  coefficients: Float64Array,
  energies: Float64Array,
  n: number,
  occupied: number,
): SpinOrbitals {
  const m = energies.length;
  return {
    occupied: columnRange(coefficients, n, m, 0, occupied),
    virtual: columnRange(coefficients, n, m, occupied, m),
    occupiedEnergies: energies.subarray(0, occupied),
    virtualEnergies: energies.subarray(occupied),
  };
}

function closedShell(atoms: readonly StudyAtom[], basis: string) {
  const { problem, start, electrons, n } = setUp(atoms, basis);
  const solution = solveRestricted(problem, electrons, [start], UNATTENDED);
  const orbitals = spinOrbitals(solution.coefficients, solution.orbitalEnergies, n, electrons / 2);
  return { problem, n, electrons, solution, orbitals };
}

function openShell(atoms: readonly StudyAtom[], basis: string, alpha: number, beta: number): number {
  const { problem, start, n } = setUp(atoms, basis);
  const { coefficients, orbitalEnergies } = solveUnrestricted(problem, [alpha, beta], [start], UNATTENDED);
  const { sameSpin, oppositeSpin } = unrestrictedSecondOrder(
    problem.repulsion,
    n,
    spinOrbitals(coefficients[0], orbitalEnergies[0], n, alpha),
    spinOrbitals(coefficients[1], orbitalEnergies[1], n, beta),
  );
  return sameSpin + oppositeSpin;
}

describe('second-order energy', () => {
  it.each([
    ['H2', [atom('H'), atom('H', 0, 0, 1.4)], '6-31G'],
    ['LiH', [atom('Li'), atom('H', 0, 0, 3)], 'STO-3G'],
    ['H2O', waterAtoms(1.8, 104.5), 'STO-3G'],
  ])(
    'independent: for %s half the curvature of the full-CI energy from Fock operator to Hamiltonian',
    (_, atoms, basis) => {
      const { problem, n, electrons, solution, orbitals } = closedShell(atoms, basis);
      const { sameSpin, oppositeSpin } = restrictedSecondOrder(problem.repulsion, n, orbitals);
      const integrals = transformToOrbitals({
        oneElectron: problem.coreHamiltonian,
        repulsion: problem.repulsion,
        coefficients: solution.coefficients,
        orbitalCount: solution.orbitalCount,
        frozen: 0,
        active: solution.orbitalCount,
        nuclearRepulsion: 0,
      });
      const fock = closedShellFock(integrals, electrons / 2);
      // H(λ) = F + λ(H − F): the second-order energy is half the second derivative at λ = 0
      const energy = (lambda: number) =>
        solveConfigurationInteraction(
          {
            ...integrals,
            oneElectron: fock.map((value, k) => (1 - lambda) * value + lambda * integrals.oneElectron[k]),
            twoElectron: integrals.twoElectron.map((value) => lambda * value),
          },
          {
            alphaElectrons: electrons / 2,
            betaElectrons: electrons / 2,
            maximumRank: Number.POSITIVE_INFINITY,
            states: 1,
            residualTolerance: 1e-9,
          },
        ).states[0].energy;
      const curvature = (h: number) => (energy(h) - 2 * energy(0) + energy(-h)) / (2 * h * h);
      // two step lengths, extrapolated to fourth order
      const numerical = (4 * curvature(5e-3) - curvature(1e-2)) / 3;
      expect(Math.abs(sameSpin + oppositeSpin - numerical)).toBeLessThan(1e-6);
      expect(sameSpin + oppositeSpin).toBeLessThan(-1e-3);
    },
  );

  it('identity: orbitals of their own for the spins change nothing for a closed shell', () => {
    const { problem, n, orbitals } = closedShell(waterAtoms(1.9, 100), '6-31G');
    const restricted = restrictedSecondOrder(problem.repulsion, n, orbitals);
    const unrestricted = unrestrictedSecondOrder(problem.repulsion, n, orbitals, orbitals);
    expect(Math.abs(restricted.sameSpin - unrestricted.sameSpin)).toBeLessThan(1e-12);
    expect(Math.abs(restricted.oppositeSpin - unrestricted.oppositeSpin)).toBeLessThan(1e-12);
  });

  it('identity: it is size-consistent, an open-shell atom far from a molecule adds its own', () => {
    const hydride = [atom('Be', 300), atom('H', 300, 0, 2.5), atom('H', 300, 0, -2.5)];
    const sum = openShell([atom('N')], '6-31G', 5, 2) + openShell(hydride, '6-31G', 3, 3);
    expect(Math.abs(openShell([atom('N'), ...hydride], '6-31G', 8, 5) - sum)).toBeLessThan(1e-8);
  });

  it('identity: a single electron is not correlated', () => {
    expect(openShell([atom('H')], '6-31G', 1, 0)).toBe(0);
  });
});

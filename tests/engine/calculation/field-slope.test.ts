import { describe, expect, it } from 'vitest';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import { transformToOrbitals } from '../../../engine/integrals/orbital-transformation';
import { nuclearDipole } from '../../../engine/molecule/build-molecule';
import { superposeAtomicDensities } from '../../../engine/self-consistent-field/initial-guess';
import { solveRestricted } from '../../../engine/self-consistent-field/restricted';
import { UNATTENDED } from '../../../engine/termination';
import { atom, compute, correlated, hartreeFock, prepare, study } from '../../support/studies';

const atoms = [atom('Li'), atom('H', 0.4, -0.3, 3.1)];

/** RHF and full-CI energy in a homogeneous field along z, hartree; the nuclei feel it too. */
function energiesInField(field: number): { rhf: number; fci: number } {
  const prepared = prepare(study(atoms));
  const molecule = prepared.moleculeAt(null);
  const basis = placeBasis(prepared.basisSet, molecule);
  const { problem, dipole } = molecularIntegrals(molecule, basis);
  const inField = {
    ...problem,
    coreHamiltonian: problem.coreHamiltonian.map((value, i) => value + field * dipole[2][i]),
    nuclearRepulsion: problem.nuclearRepulsion - field * nuclearDipole(molecule)[2],
  };
  const start = { kind: 'density', density: superposeAtomicDensities(molecule, basis) } as const;
  const options = {
    energyTolerance: 1e-13,
    gradientTolerance: 1e-10,
    extrapolatedIterations: 60,
    minimiserIterations: 60,
  };
  const solution = solveRestricted(inField, prepared.electrons, [start], UNATTENDED, options);
  const integrals = transformToOrbitals({
    oneElectron: inField.coreHamiltonian,
    repulsion: inField.repulsion,
    coefficients: solution.coefficients,
    orbitalCount: solution.orbitalCount,
    frozen: 0,
    active: solution.orbitalCount,
    nuclearRepulsion: inField.nuclearRepulsion,
  });
  const [ground] = solveConfigurationInteraction(integrals, {
    alphaElectrons: 2,
    betaElectrons: 2,
    maximumRank: Number.POSITIVE_INFINITY,
    states: 1,
  }).states;
  return { rhf: solution.energy, fci: ground.energy };
}

describe('dipole moments', () => {
  it('independent: RHF and full-CI dipoles are the slopes of the energy in an electric field', () => {
    const point = compute(study(atoms, { levels: ['RHF', 'FCI'] }));
    const slope = (h: number) => {
      const up = energiesInField(h);
      const down = energiesInField(-h);
      return { rhf: -(up.rhf - down.rhf) / (2 * h), fci: -(up.fci - down.fci) / (2 * h) };
    };
    const [near, far] = [slope(2e-4), slope(4e-4)];
    // central differences extrapolated to fourth order
    expect(Math.abs((4 * near.rhf - far.rhf) / 3 - hartreeFock(point).dipole[2])).toBeLessThan(1e-7);
    expect(Math.abs((4 * near.fci - far.fci) / 3 - correlated(point).dipole[2])).toBeLessThan(1e-7);
    expect(Math.abs(hartreeFock(point).dipole[2])).toBeGreaterThan(0.5);
  });
});

import { describe, expect, it } from 'vitest';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { determinantEnergy } from '../../../engine/self-consistent-field/determinant-energy';
import { superposeAtomicDensities } from '../../../engine/self-consistent-field/initial-guess';
import { firstColumns } from '../../../engine/self-consistent-field/mean-field';
import { solveRestrictedOpen, solveUnrestricted } from '../../../engine/self-consistent-field/open-shell';
import { solveRestricted } from '../../../engine/self-consistent-field/restricted';
import { UNATTENDED } from '../../../engine/termination';
import { atom, prepare, study } from '../../support/studies';

function setUp(second: string, distance: number, multiplicity: number, charge = 0) {
  const plain = study([atom('H'), atom(second, 0, 0, distance)], { charge, levels: ['ROHF'] });
  const prepared = prepare({ ...plain, molecule: { ...plain.molecule, multiplicity } });
  const molecule = prepared.moleculeAt(null);
  const basis = placeBasis(prepared.basisSet, molecule);
  const { problem } = molecularIntegrals(molecule, basis);
  const start = { kind: 'density' as const, density: superposeAtomicDensities(molecule, basis) };
  return { problem, start, electrons: prepared.spinElectrons, n: prepared.functionCount };
}

describe('determinantEnergy', () => {
  it('identity: the energy that RHF reports, from orbitals scaled and mixed at will', () => {
    const { problem, start, electrons, n } = setUp('F', 1.8, 1);
    const { coefficients, orbitalCount, energy } = solveRestricted(problem, 10, [start], UNATTENDED);
    const occupied = firstColumns(coefficients, n, orbitalCount, electrons[0]);
    const mixed = occupied.map((value, k) => {
      const column = k % 5;
      return column === 0 ? 1.5 * value : value + 0.2 * occupied[k - column]!;
    });
    const found = determinantEnergy(problem, { kind: 'occupiedOrbitals', alpha: mixed, beta: mixed });
    expect(Math.abs(found! - energy)).toBeLessThan(1e-11);
  });

  it('identity: the energies that UHF and ROHF report, also without a beta electron', () => {
    for (const [second, multiplicity, charge] of [
      ['O', 2, 0],
      ['H', 3, 0],
      ['H', 2, 1],
    ] as const) {
      const { problem, start, electrons, n } = setUp(second, 1.9, multiplicity, charge);
      const occupied = (coefficients: Float64Array, m: number, spin: 0 | 1) =>
        firstColumns(coefficients, n, m, electrons[spin]);
      const unrestricted = solveUnrestricted(problem, electrons, [start], UNATTENDED);
      const open = solveRestrictedOpen(problem, electrons, [start], UNATTENDED);
      for (const { energy, coefficients, orbitalCount: m } of [
        unrestricted,
        { ...open, coefficients: [open.coefficients, open.coefficients] as const },
      ]) {
        const [alpha, beta] = [occupied(coefficients[0], m, 0), occupied(coefficients[1], m, 1)];
        const found = determinantEnergy(problem, { kind: 'occupiedOrbitals', alpha, beta });
        expect(Math.abs(found! - energy)).toBeLessThan(1e-11);
      }
    }
  });

  it('identity: linearly dependent orbitals have none', () => {
    const { problem, n } = setUp('H', 1.4, 1);
    const twice = new Float64Array(2 * n).fill(1);
    expect(
      determinantEnergy(problem, { kind: 'occupiedOrbitals', alpha: twice, beta: twice }),
    ).toBeUndefined();
  });
});

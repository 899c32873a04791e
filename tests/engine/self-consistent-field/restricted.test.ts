import { describe, expect, it } from 'vitest';
import type { PreparedStudy, StudyAtom } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { multiply } from '../../../engine/linear-algebra/dense';
import { superposeAtomicDensities } from '../../../engine/self-consistent-field/initial-guess';
import type { StartingPoint } from '../../../engine/self-consistent-field/mean-field';
import { DEFAULT_SELF_CONSISTENCY } from '../../../engine/self-consistent-field/mean-field-problem';
import { type RestrictedSolution, solveRestricted } from '../../../engine/self-consistent-field/restricted';
import { UNATTENDED } from '../../../engine/termination';
import { atom, prepare, study } from '../../support/studies';

function setUp(atoms: readonly StudyAtom[], basis: string) {
  const prepared: PreparedStudy = prepare(study(atoms, { basis }));
  const molecule = prepared.moleculeAt(null);
  const placed = placeBasis(prepared.basisSet, molecule);
  return {
    problem: molecularIntegrals(molecule, placed).problem,
    electrons: prepared.electrons,
    atomic: { kind: 'density', density: superposeAtomicDensities(molecule, placed) } as StartingPoint,
  };
}

function solve(
  atoms: readonly StudyAtom[],
  basis: string,
  options = DEFAULT_SELF_CONSISTENCY,
): RestrictedSolution {
  const { problem, electrons, atomic } = setUp(atoms, basis);
  return solveRestricted(problem, electrons, [atomic], UNATTENDED, options);
}

const pair = (one: string, other: string, distance: number) => [atom(one), atom(other, 0, 0, distance)];

describe('solveRestricted', () => {
  it('published: N2 in STO-3G at 2.074 bohr is the lowest solution even from bare nuclei', () => {
    const { problem, electrons } = setUp(pair('N', 'N', 2.074), 'STO-3G');
    // a start without electrons: the first Fock matrix is the core Hamiltonian, which can stop at −106.766
    const bare: StartingPoint = { kind: 'density', density: new Float64Array(problem.functionCount ** 2) };
    const solution = solveRestricted(problem, electrons, [bare], UNATTENDED);
    expect(solution.energy).toMatchPublished({
      printed: '-107.496',
      unit: 'hartree',
      source: 'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (1989), Tables 3.11–3.13; value from memory',
    });
  });

  it.each([
    ['N2', pair('N', 'N', 4)],
    ['N2', pair('N', 'N', 9)],
    ['F2', pair('F', 'F', 7)],
    ['C2', pair('C', 'C', 2.35)],
    ['C2', pair('C', 'C', 6)],
    ['LiF', pair('Li', 'F', 11)],
    ['Li2', pair('Li', 'Li', 16)],
    ['BeO', pair('Be', 'O', 2.5)],
    ['BeO', pair('Be', 'O', 7)],
    ['NaCl', pair('Na', 'Cl', 14)],
  ])('identity: the hard case %s converges to a minimum, no real singlet rotation lowers it', (_, atoms) => {
    const solution = solve(atoms, '6-31G');
    expect(solution.termination).toEqual({ kind: 'converged' });
    expect(solution.residual).toBeLessThanOrEqual(1e-8);
    expect(solution.stability!.singlet).toBeGreaterThan(-1e-5);
  });

  it.each([
    ['N2', pair('N', 'N', 3.4)],
    ['C2', pair('C', 'C', 3)],
    ['LiF', pair('Li', 'F', 6)],
  ])('independent: for %s the minimiser without any extrapolation finds the same energy', (_, atoms) => {
    const usual = solve(atoms, '6-31G');
    const byMinimiser = solve(atoms, '6-31G', { ...DEFAULT_SELF_CONSISTENCY, extrapolatedIterations: 1 });
    expect(byMinimiser.termination).toEqual({ kind: 'converged' });
    expect(Math.abs(byMinimiser.energy - usual.energy)).toBeLessThan(1e-9);
  });

  it('identity: the density is idempotent and holds all electrons', () => {
    const { problem, electrons, atomic } = setUp(pair('C', 'O', 2.132), '6-31G');
    const { density } = solveRestricted(problem, electrons, [atomic], UNATTENDED);
    const n = problem.functionCount;
    const ds = multiply(density, problem.overlap, n, n, n);
    const dsd = multiply(ds, density, n, n, n);
    let trace = 0;
    for (let i = 0; i < n; i++) trace += ds[i * n + i];
    expect(Math.abs(trace - electrons)).toBeLessThan(1e-10);
    dsd.forEach((value, k) => {
      expect(Math.abs(value - 2 * density[k])).toBeLessThan(1e-9);
    });
  });

  it('identity: RHF of H2 becomes unstable to unequal spins as the bond is pulled, never before', () => {
    const triplet = [1, 1.4, 2, 2.6, 3, 4, 8].map(
      (r) => solve(pair('H', 'H', r), '6-31G').stability!.triplet,
    );
    for (let k = 1; k < triplet.length; k++) expect(triplet[k]).toBeLessThan(triplet[k - 1]);
    expect(triplet[1]).toBeGreaterThan(0);
    expect(triplet.at(-1)).toBeLessThan(0);
  });

  it('identity: an iteration that is stopped says so and is not converged', () => {
    const { problem, electrons, atomic } = setUp(pair('C', 'O', 2.132), 'STO-3G');
    const impatient = { isCancelled: () => true, report: () => undefined };
    expect(solveRestricted(problem, electrons, [atomic], impatient).termination).toEqual({
      kind: 'cancelled',
    });
    const short = { ...DEFAULT_SELF_CONSISTENCY, extrapolatedIterations: 2, minimiserIterations: 1 };
    expect(solveRestricted(problem, electrons, [atomic], UNATTENDED, short).termination).toEqual({
      kind: 'iterationLimit',
      limit: 1,
    });
  });

  it('identity: a determinant that is known to be stable is not analysed again, and is the same', () => {
    const { problem, electrons, atomic } = setUp(pair('Li', 'H', 3), 'STO-3G');
    const analysed = (starts: readonly StartingPoint[], stableEnergy?: number) => {
      let analyses = 0;
      const onStage = (stage: unknown, what: string) => {
        if (stage === 'stability' && what === 'begins') analyses++;
      };
      const options = { ...DEFAULT_SELF_CONSISTENCY, ...(stableEnergy !== undefined && { stableEnergy }) };
      const solution = solveRestricted(problem, electrons, starts, { ...UNATTENDED, onStage }, options);
      return { ...solution, analyses };
    };
    const once = analysed([atomic]);
    expect(once.analyses).toBe(2);
    const nearby: StartingPoint = {
      kind: 'density',
      density: once.density.map((value, i) => value + 1e-3 * problem.overlap[i]),
    };
    const twice = analysed([atomic, nearby]);
    expect(twice.analyses).toBe(2);
    expect(twice.iterations).toBeGreaterThan(once.iterations);
    expect(twice.stability).toEqual(once.stability);
    const again = analysed([nearby], once.energy);
    expect(again.analyses).toBe(0);
    expect(again.energy).toBeCloseTo(once.energy, 9);
    expect(analysed([nearby], once.energy - 1e-3).analyses).toBe(2);
  });
});

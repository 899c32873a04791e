import type { PlacedBasis } from '../basis/contracted-gaussian';
import type { ScaleFactors } from '../basis/scalable-basis';
import type { Molecule } from '../molecule/molecule';
import { superposeAtomicDensities } from '../self-consistent-field/initial-guess';
import { firstColumns, type StartingPoint } from '../self-consistent-field/mean-field';
import { DEFAULT_SELF_CONSISTENCY, type MeanFieldProblem } from '../self-consistent-field/mean-field-problem';
import {
  type RestrictedOpenSolution,
  solveRestrictedOpen,
  solveUnrestricted,
  type UnrestrictedSolution,
} from '../self-consistent-field/open-shell';
import { type RestrictedSolution, solveRestricted } from '../self-consistent-field/restricted';
import type { RunControl } from '../termination';
import type { Level } from './levels';
import type { PreparedStudy } from './prepare-study';

/** Occupied orbitals of both spins, functions × occupied each. */
export interface OccupiedOrbitals {
  readonly alpha: Float64Array;
  readonly beta: Float64Array;
  /** of the determinant of these orbitals, hartree */
  readonly energy: number;
}

/** What one point leaves for its neighbour; survives structured cloning. Only converged orbitals are left. */
export interface PointCarry {
  readonly restricted?: OccupiedOrbitals;
  readonly unrestricted?: OccupiedOrbitals;
  /** where the study has them optimised */
  readonly scaleFactors?: ScaleFactors;
}

/** The Hartree–Fock solutions that the chosen levels need. */
export interface MeanFields {
  /**
   * RHF for closed shells, ROHF for open ones: what configuration interaction is built on unless the study asks for
   * UHF orbitals, and in any case what correlation energies count from
   */
  readonly reference: RestrictedSolution | RestrictedOpenSolution;
  readonly restricted?: RestrictedSolution;
  readonly restrictedOpen?: RestrictedOpenSolution;
  readonly unrestricted?: UnrestrictedSolution;
}

/**
 * @param describes - false: no more than the chosen levels need; default: also whether RHF is stable where none of them
 * is Hartree–Fock
 */
export function solveMeanFields(
  prepared: PreparedStudy,
  molecule: Molecule,
  basis: PlacedBasis,
  problem: MeanFieldProblem,
  chosen: readonly Level[],
  guess: PointCarry | undefined,
  control: RunControl,
  describes = true,
): MeanFields {
  const options = {
    ...DEFAULT_SELF_CONSISTENCY,
    energyTolerance: prepared.study.convergence.energy,
    turnsSpinsApart:
      describes ||
      prepared.study.orbitals === 'unrestricted' ||
      chosen.some(({ kind }) => kind === 'hartreeFock'),
  };
  const atomic: StartingPoint = { kind: 'density', density: superposeAtomicDensities(molecule, basis) };
  const starts = (orbitals: OccupiedOrbitals | undefined): StartingPoint[] =>
    orbitals ? [atomic, { kind: 'occupiedOrbitals', ...orbitals }] : [atomic];
  const isClosed = molecule.multiplicity === 1;
  const wants = (name: string) => chosen.some((level) => level.name === name);

  const restricted = isClosed
    ? solveRestricted(problem, prepared.electrons, starts(guess?.restricted), control, options)
    : undefined;
  const restrictedOpen =
    !isClosed || wants('ROHF')
      ? solveRestrictedOpen(problem, prepared.spinElectrons, starts(guess?.restricted), control, options)
      : undefined;
  const reference = (isClosed ? restricted : restrictedOpen)!;
  const correlatesUnrestricted =
    prepared.study.orbitals === 'unrestricted' && chosen.some((level) => level.kind === 'correlated');
  const unrestricted =
    wants('UHF') || (wants('MP2') && !isClosed) || correlatesUnrestricted
      ? solveUnrestricted(
          problem,
          prepared.spinElectrons,
          [
            ...starts(guess?.unrestricted),
            { kind: 'occupiedOrbitals', ...occupiedOf(prepared, reference) },
            // where RHF is unstable, the way down is not left to luck
            ...(restricted?.brokenSpinStart
              ? [{ kind: 'occupiedOrbitals', ...restricted.brokenSpinStart } as const]
              : []),
          ],
          control,
          options,
        )
      : undefined;
  return {
    reference,
    ...(restricted && { restricted }),
    ...(restrictedOpen && { restrictedOpen }),
    ...(unrestricted && { unrestricted }),
  };
}

/** Occupied orbitals of the converged solutions. */
export function carryOf(
  prepared: PreparedStudy,
  { reference, unrestricted }: MeanFields,
): PointCarry | undefined {
  const carry: PointCarry = {
    ...(reference.termination.kind === 'converged' && { restricted: occupiedOf(prepared, reference) }),
    ...(unrestricted?.termination.kind === 'converged' && {
      unrestricted: occupiedOf(prepared, unrestricted),
    }),
  };
  return carry.restricted || carry.unrestricted ? carry : undefined;
}

function occupiedOf(
  { functionCount: n, spinElectrons }: PreparedStudy,
  {
    coefficients,
    orbitalCount: m,
    energy,
  }: {
    readonly coefficients: Float64Array | readonly [Float64Array, Float64Array];
    readonly orbitalCount: number;
    readonly energy: number;
  },
): OccupiedOrbitals {
  const [alpha, beta] = coefficients instanceof Float64Array ? [coefficients, coefficients] : coefficients;
  return {
    alpha: firstColumns(alpha, n, m, spinElectrons[0]),
    beta: firstColumns(beta, n, m, spinElectrons[1]),
    energy,
  };
}

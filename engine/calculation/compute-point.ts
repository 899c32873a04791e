import { placeBasis } from '../basis/place-basis';
import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { transformOneElectron, transformToOrbitals } from '../integrals/orbital-transformation';
import { nuclearDipole } from '../molecule/build-molecule';
import type { Molecule } from '../molecule/molecule';
import { superposeAtomicDensities } from '../self-consistent-field/initial-guess';
import type { StartingPoint } from '../self-consistent-field/mean-field';
import { DEFAULT_SELF_CONSISTENCY } from '../self-consistent-field/mean-field-problem';
import { type RestrictedSolution, solveRestricted } from '../self-consistent-field/restricted';
import { type RunControl, UNATTENDED } from '../termination';
import { pointCautions } from './cautions';
import { type CorrelationInput, computeCorrelated, computeSingles, hartreeFockResult } from './level-results';
import type { Level } from './levels';
import { type MolecularIntegrals, molecularIntegrals } from './molecular-integrals';
import type { PreparedStudy } from './prepare-study';
import type { LevelResult, PointResult } from './result';

/** What one point leaves for its neighbour; survives structured cloning. */
export interface PointCarry {
  /** functions × occupied, row-major */
  readonly occupiedOrbitals: Float64Array;
}

export interface ComputedPoint {
  readonly result: PointResult;
  /** absent where the orbitals did not converge */
  readonly carry?: PointCarry;
}

export interface ComputePointOptions {
  /** orbitals of a nearby geometry, tried beside the atomic start */
  readonly guess?: PointCarry | undefined;
  /** only these levels of the study; default all */
  readonly levels?: readonly string[] | undefined;
  readonly control?: RunControl | undefined;
}

/**
 * All levels of a study at one value of its coordinate.
 *
 * @param coordinate - in the study's unit or degrees; null without a scan; need not be one of the study's values
 * @throws EngineError where the geometry or the basis is impossible
 */
export function computePoint(
  prepared: PreparedStudy,
  coordinate: number | null,
  options: ComputePointOptions = {},
): ComputedPoint {
  const control = options.control ?? UNATTENDED;
  const molecule = prepared.moleculeAt(coordinate);
  const basis = placeBasis(prepared.basisSet, molecule);
  const integrals = molecularIntegrals(molecule, basis);

  const starts: StartingPoint[] = [{ kind: 'density', density: superposeAtomicDensities(molecule, basis) }];
  if (options.guess) {
    const { occupiedOrbitals } = options.guess;
    starts.push({ kind: 'occupiedOrbitals', alpha: occupiedOrbitals, beta: occupiedOrbitals });
  }
  const meanField = solveRestricted(integrals.problem, prepared.electrons, starts, control, {
    ...DEFAULT_SELF_CONSISTENCY,
    energyTolerance: prepared.study.convergence.energy,
  });

  const chosen = prepared.levels.filter((level) => options.levels?.includes(level.name) ?? true);
  const correlation = needsOrbitalIntegrals(chosen)
    ? correlationInput(prepared, molecule, integrals, meanField, control)
    : undefined;
  const levels: Record<string, LevelResult> = {};
  for (const level of chosen) {
    if (level.kind === 'hartreeFock') levels[level.name] = hartreeFockResult(meanField, molecule, integrals);
    else if (level.kind === 'singles') levels[level.name] = computeSingles(correlation!);
    else levels[level.name] = computeCorrelated(level, correlation!);
  }
  return {
    result: {
      coordinate,
      atoms: prepared.geometryAt(coordinate),
      nuclearRepulsion: integrals.problem.nuclearRepulsion,
      levels,
      cautions: pointCautions(meanField, levels),
    },
    ...(meanField.termination.kind === 'converged' && {
      carry: { occupiedOrbitals: occupiedOf(meanField, prepared) },
    }),
  };
}

function needsOrbitalIntegrals(levels: readonly Level[]): boolean {
  return levels.some((level) => level.kind !== 'hartreeFock');
}

function occupiedOf(
  meanField: RestrictedSolution,
  { electrons, functionCount }: PreparedStudy,
): Float64Array {
  const occupied = electrons / 2;
  const m = meanField.orbitalCount;
  const part = new Float64Array(functionCount * occupied);
  for (let i = 0; i < functionCount; i++) {
    part.set(meanField.coefficients.subarray(i * m, i * m + occupied), i * occupied);
  }
  return part;
}

function correlationInput(
  prepared: PreparedStudy,
  molecule: Molecule,
  integrals: MolecularIntegrals,
  meanField: RestrictedSolution,
  control: RunControl,
): CorrelationInput {
  const { problem, dipole } = integrals;
  const n = problem.functionCount;
  const frozen = prepared.frozenOrbitals;
  const orbitalIntegrals: OrbitalIntegrals = transformToOrbitals({
    oneElectron: problem.coreHamiltonian,
    repulsion: problem.repulsion,
    coefficients: meanField.coefficients,
    orbitalCount: meanField.orbitalCount,
    frozen,
    active: meanField.orbitalCount - frozen,
    nuclearRepulsion: problem.nuclearRepulsion,
  });
  return {
    integrals: orbitalIntegrals,
    dipole: dipole.map((matrix) =>
      transformOneElectron(matrix, meanField.coefficients, n, meanField.orbitalCount),
    ),
    nuclearDipole: nuclearDipole(molecule),
    orbitalCount: meanField.orbitalCount,
    frozen,
    electrons: prepared.electrons,
    states: prepared.study.states,
    energyTolerance: prepared.study.convergence.energy,
    meanFieldEnergy: meanField.energy,
    memoryLimit: prepared.memoryLimit,
    orbitalsConverged: meanField.termination.kind === 'converged',
    control,
  };
}

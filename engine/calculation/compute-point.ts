import { placeBasis } from '../basis/place-basis';
import { transformOneElectron, transformToOrbitals } from '../integrals/orbital-transformation';
import { transformToSpinOrbitals } from '../integrals/unrestricted-transformation';
import { congruence, transpose } from '../linear-algebra/dense';
import { nuclearDipole } from '../molecule/build-molecule';
import type { Molecule } from '../molecule/molecule';
import { inStage } from '../stages';
import { type RunControl, UNATTENDED } from '../termination';
import { atomicCharges, type ChargesOf } from './atomic-charges';
import { energyParts } from './energy-parts';
import { type FieldSymmetry, symmetriseFields } from './field-symmetry';
import {
  type CorrelationInput,
  computeCorrelated,
  computeSingles,
  hartreeFockResult,
  secondOrderResult,
} from './level-results';
import type { Level } from './levels';
import { carryOf, type MeanFields, type PointCarry, solveMeanFields } from './mean-fields';
import { type MolecularIntegrals, molecularIntegrals } from './molecular-integrals';
import { naturalOrbitals, wantsNaturalOrbitals } from './natural-orbitals';
import { optimiseScale } from './optimise-scale';
import { pointCautions } from './point-cautions';
import type { PreparedStudy } from './prepare-study';
import type { LevelResult, PointResult } from './result';

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
  /**
   * false: leaves out what costs extra and only describes a state – the parts of a correlation energy, natural orbitals,
   * the stability of the RHF under another level. Default true
   */
  readonly describesStates?: boolean | undefined;
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
  const optimised =
    prepared.scalable &&
    inStage(control, 'scale factors', () =>
      optimiseScale(prepared, prepared.scalable!, molecule, options.guess, control),
    );
  const basis = placeBasis(optimised?.basisSet ?? prepared.basisSet, molecule);
  const integrals = inStage(control, 'integrals', () => molecularIntegrals(molecule, basis));

  const chosen = prepared.levels.filter((level) => options.levels?.includes(level.name) ?? true);
  const guess = optimised?.carry ?? options.guess;
  const solved = inStage(control, 'self-consistency', () =>
    solveMeanFields(
      prepared,
      molecule,
      basis,
      integrals.problem,
      chosen,
      guess,
      control,
      options.describesStates,
    ),
  );
  const { fields, symmetry } = inStage(control, 'symmetry', () =>
    symmetriseFields(prepared, molecule, basis, integrals.problem.overlap, solved),
  );
  const { pointGroup, linear } = symmetry.molecule;
  const chargesOf = atomicCharges(molecule, basis, integrals.problem.overlap);
  const correlation = needsOrbitalIntegrals(chosen)
    ? correlationInput(prepared, molecule, integrals, fields, symmetry, chargesOf, {
        describesStates: options.describesStates ?? true,
        control,
      })
    : undefined;
  const levels: Record<string, LevelResult> = {};
  const correlated = correlatedOnce();
  const compute = (level: Level): LevelResult => {
    switch (level.kind) {
      case 'hartreeFock':
        return hartreeFockResult(level.name, fields, symmetry, molecule, integrals, chargesOf);
      case 'perturbation':
        return secondOrderResult(prepared, fields, integrals);
      case 'singles':
        return computeSingles(correlation!);
      case 'correlated':
        return correlated(level, correlation!);
    }
  };
  for (const level of chosen) {
    levels[level.name] = inStage(control, { level: level.name }, () => compute(level));
  }
  const carry = carryOf(prepared, fields);
  return {
    result: {
      coordinate,
      atoms: prepared.geometryAt(coordinate),
      nuclearRepulsion: integrals.problem.nuclearRepulsion,
      ...(optimised && { scaleFactors: optimised.factors, scaleOptimisation: optimised.outcome }),
      symmetry: { pointGroup, ...(linear && { linear }) },
      levels,
      cautions: pointCautions(prepared, fields, levels, optimised?.outcome),
    },
    ...(carry && { carry: { ...carry, ...(optimised && { scaleFactors: optimised.factors }) } }),
  };
}

/** Levels that reach all electrons are the same full CI under different names. */
function correlatedOnce(): typeof computeCorrelated {
  let full: ReturnType<typeof computeCorrelated> | undefined;
  return (level, input) => {
    const [alphaElectrons, betaElectrons] = input.activeElectrons;
    if (level.maximumRank < alphaElectrons + betaElectrons) return computeCorrelated(level, input);
    full ??= computeCorrelated(level, input);
    return full;
  };
}

function needsOrbitalIntegrals(levels: readonly Level[]): boolean {
  return levels.some((level) => level.kind === 'singles' || level.kind === 'correlated');
}

function correlationInput(
  prepared: PreparedStudy,
  molecule: Molecule,
  integrals: MolecularIntegrals,
  { reference, unrestricted }: MeanFields,
  symmetry: FieldSymmetry,
  chargesOf: ChargesOf,
  { describesStates, control }: { readonly describesStates: boolean; readonly control: RunControl },
): CorrelationInput {
  const { problem, dipole } = integrals;
  const spinsDiffer = prepared.study.orbitals === 'unrestricted';
  const base = spinsDiffer ? unrestricted! : reference;
  const n = problem.functionCount;
  const m = base.orbitalCount;
  const frozen = prepared.frozenOrbitals;
  const transformation = {
    oneElectron: problem.coreHamiltonian,
    repulsion: problem.repulsion,
    orbitalCount: m,
    frozen,
    // nearly dependent functions may leave fewer orbitals than there were when the study was checked
    active: Math.min(prepared.activeOrbitals ?? m, m - frozen),
    nuclearRepulsion: problem.nuclearRepulsion,
  };
  const coefficients = spinsDiffer ? unrestricted!.coefficients[0] : reference.coefficients;
  const overFunctions = (density: Float64Array) => congruence(density, transpose(coefficients, n, m), m, n);
  return {
    integrals: inStage(control, 'transformation', () =>
      spinsDiffer
        ? transformToSpinOrbitals({
            ...transformation,
            overlap: problem.overlap,
            coefficients: unrestricted!.coefficients,
          })
        : transformToOrbitals({ ...transformation, coefficients }),
    ),
    dipole: dipole.map((matrix) => transformOneElectron(matrix, coefficients, n, m)),
    nuclearDipole: nuclearDipole(molecule),
    chargesOf: (density) => chargesOf([overFunctions(density)]),
    partsOf: (energy, [alpha, beta]) => {
      const ofAlpha = overFunctions(alpha);
      return energyParts(energy, [ofAlpha, alpha === beta ? ofAlpha : overFunctions(beta)], integrals);
    },
    ...(describesStates &&
      wantsNaturalOrbitals(prepared) && {
        naturalOrbitalsOf: (density) =>
          naturalOrbitals({
            density,
            coefficients,
            functionCount: n,
            ...(spinsDiffer ? { frozen: 0, active: m } : { frozen, active: transformation.active }),
            symmetry: symmetry.molecule,
            ...(!spinsDiffer && { species: symmetry.species }),
          }),
      }),
    wantsParts: describesStates,
    orbitalCount: m,
    frozen,
    activeElectrons: [prepared.spinElectrons[0] - frozen, prepared.spinElectrons[1] - frozen],
    states: prepared.study.states,
    energyTolerance: prepared.study.convergence.energy,
    meanFieldEnergy: reference.energy,
    determinantEnergy: base.energy,
    memoryLimit: prepared.memoryLimit,
    symmetry,
    orbitalsConverged: base.termination.kind === 'converged',
    control,
  };
}

import type { ConfigurationInteractionState } from '../configuration-interaction/describe-state';
import { solveSingles } from '../configuration-interaction/singles';
import { solveConfigurationInteraction } from '../configuration-interaction/solve';
import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { dot } from '../linear-algebra/dense';
import { nuclearDipole } from '../molecule/build-molecule';
import type { Molecule, Vector3 } from '../molecule/molecule';
import type { RestrictedSolution } from '../self-consistent-field/restricted';
import type { RunControl, Termination } from '../termination';
import type { Level } from './levels';
import type { MolecularIntegrals } from './molecular-integrals';
import type {
  CorrelatedResult,
  CorrelatedState,
  HartreeFockResult,
  LeadingDeterminant,
  LevelTermination,
  SinglesResult,
} from './result';

/** What configuration interaction is built on. */
export interface CorrelationInput {
  /** active orbitals only */
  readonly integrals: OrbitalIntegrals;
  /** ⟨p|r|q⟩ over all orbitals, x, y, z */
  readonly dipole: readonly Float64Array[];
  readonly nuclearDipole: Vector3;
  /** all orbitals, frozen ones included */
  readonly orbitalCount: number;
  readonly frozen: number;
  readonly electrons: number;
  readonly states: number;
  readonly energyTolerance: number;
  readonly meanFieldEnergy: number;
  readonly orbitalsConverged: boolean;
  readonly memoryLimit: number;
  readonly control: RunControl;
}

export function hartreeFockResult(
  solution: RestrictedSolution,
  molecule: Molecule,
  { dipole }: MolecularIntegrals,
): HartreeFockResult {
  const nuclear = nuclearDipole(molecule);
  return {
    kind: 'hartreeFock',
    energy: solution.energy,
    converged: solution.termination.kind === 'converged',
    termination: solution.termination,
    iterations: solution.iterations,
    orbitalEnergies: Array.from(solution.orbitalEnergies),
    dipole: vector((axis) => nuclear[axis] - dot(solution.density, dipole[axis])),
    ...(solution.stability && { stability: solution.stability }),
  };
}

export function computeSingles(input: CorrelationInput): SinglesResult {
  const { integrals, frozen, orbitalCount } = input;
  const result = solveSingles(integrals, {
    occupied: input.electrons / 2 - frozen,
    states: input.states,
    dipole: input.dipole.map((matrix) => activeBlock(matrix, orbitalCount, frozen)),
    control: input.control,
  });
  const termination = onOrbitals(input, result.termination);
  return {
    kind: 'singles',
    converged: termination.kind === 'converged',
    termination,
    states: result.states.map((state) => ({
      energy: state.energy,
      excitation: state.excitation,
      spin: state.spin,
      oscillatorStrength: state.oscillatorStrength,
      transitionDipole: state.transitionDipole,
      leading: state.leading.map(({ from, to, weight }) => ({
        from: from + frozen,
        to: to + frozen,
        weight,
      })),
    })),
  };
}

/** CI of any rank. Full CI of all electrons does not depend on the orbitals, so it is final without theirs being. */
export function computeCorrelated(
  level: Extract<Level, { kind: 'correlated' }>,
  input: CorrelationInput,
): CorrelatedResult {
  const active = input.electrons / 2 - input.frozen;
  const result = solveConfigurationInteraction(input.integrals, {
    alphaElectrons: active,
    betaElectrons: active,
    maximumRank: level.maximumRank,
    states: input.states,
    memoryLimit: input.memoryLimit,
    control: input.control,
  });
  const independent = level.maximumRank >= 2 * active && input.frozen === 0;
  const termination = independent ? result.termination : onOrbitals(input, result.termination);
  const states = result.states.map((state) => stateResult(state, result.states[0].energy, input));
  const [lowest] = states;
  const correlation = lowest.energy - input.meanFieldEnergy;
  const isTruncated = level.maximumRank < 2 * active;
  return {
    kind: 'correlated',
    energy: lowest.energy,
    correlation,
    converged: termination.kind === 'converged',
    termination,
    iterations: result.iterations,
    determinants: result.determinants,
    referenceWeight: lowest.referenceWeight,
    sSquared: lowest.sSquared,
    spin: lowest.spin,
    naturalOccupations: lowest.naturalOccupations,
    dipole: lowest.dipole,
    ...(isTruncated && { davidsonCorrected: lowest.energy + (1 - lowest.referenceWeight) * correlation }),
    states,
  };
}

function stateResult(
  state: ConfigurationInteractionState,
  lowestEnergy: number,
  input: CorrelationInput,
): CorrelatedState {
  const { frozen, orbitalCount, integrals, dipole, nuclearDipole: nuclear } = input;
  const core = Array.from({ length: frozen }, (_, i) => i);
  const withCore = (orbitals: readonly number[]) => [...core, ...orbitals.map((p) => p + frozen)];
  return {
    energy: state.energy,
    excitation: state.energy - lowestEnergy,
    spin: state.spin,
    sSquared: state.sSquared,
    referenceWeight: state.referenceWeight,
    residual: state.residual,
    dipole: vector((axis) => {
      const matrix = dipole[axis];
      const ofCore = core.reduce((sum, i) => sum + 2 * matrix[i * orbitalCount + i], 0);
      return nuclear[axis] - ofCore - dot(state.density, activeBlock(matrix, orbitalCount, frozen));
    }),
    naturalOccupations: [...core.map(() => 2), ...state.naturalOccupations.slice(0, integrals.orbitalCount)],
    leading: state.leading.map(
      ({ coefficient, weight, alpha, beta }): LeadingDeterminant => ({
        coefficient,
        weight,
        alpha: withCore(alpha),
        beta: withCore(beta),
      }),
    ),
  };
}

function onOrbitals(input: CorrelationInput, termination: Termination): LevelTermination {
  return input.orbitalsConverged || termination.kind !== 'converged'
    ? termination
    : { kind: 'orbitalsNotConverged' };
}

/** Rows and columns of the active orbitals, which follow the frozen ones. */
function activeBlock(matrix: Float64Array, orbitalCount: number, frozen: number): Float64Array {
  const active = orbitalCount - frozen;
  const block = new Float64Array(active * active);
  for (let p = 0; p < active; p++) {
    const start = (p + frozen) * orbitalCount + frozen;
    block.set(matrix.subarray(start, start + active), p * active);
  }
  return block;
}

function vector(component: (axis: number) => number): Vector3 {
  return [component(0), component(1), component(2)];
}

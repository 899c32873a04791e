import type { CorrelationParts } from '../configuration-interaction/correlation-parts';
import type { ConfigurationInteractionState } from '../configuration-interaction/describe-state';
import {
  naturalOrbitals,
  padDensity,
  type SpinDensities,
} from '../configuration-interaction/one-particle-density';
import { type SinglesSolution, solveSingles } from '../configuration-interaction/singles';
import { singlesDensity } from '../configuration-interaction/singles-density';
import { sizeCorrections } from '../configuration-interaction/size-corrections';
import { solveConfigurationInteraction } from '../configuration-interaction/solve';
import { unpairedElectrons } from '../configuration-interaction/unpaired-electrons';
import type { OrbitalSpecies, VectorSymmetry } from '../configuration-interaction/vector-symmetry';
import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { dot } from '../linear-algebra/dense';
import { nuclearDipole } from '../molecule/build-molecule';
import type { Molecule, Vector3 } from '../molecule/molecule';
import {
  restrictedSecondOrder,
  type SpinOrbitals,
  unrestrictedSecondOrder,
} from '../perturbation/second-order';
import { columnRange } from '../self-consistent-field/mean-field';
import { type StateSymmetry, stateSymmetry } from '../symmetry/state-symmetry';
import type { RunControl, Termination } from '../termination';
import type { ChargesOf } from './atomic-charges';
import { type EnergyParts, energyParts } from './energy-parts';
import type { FieldSymmetry, HartreeFockName } from './field-symmetry';
import type { Level } from './levels';
import type { MeanFields } from './mean-fields';
import type { MolecularIntegrals } from './molecular-integrals';
import type { PreparedStudy } from './prepare-study';
import type {
  AtomicCharges,
  CorrelatedResult,
  CorrelatedState,
  FailedLevel,
  HartreeFockResult,
  LeadingConfiguration,
  LeadingDeterminant,
  LevelTermination,
  NaturalOrbitals,
  PerturbationResult,
  SinglesResult,
  SinglesState,
} from './result';

/** What configuration interaction is built on. */
export interface CorrelationInput {
  /** active orbitals only */
  readonly integrals: OrbitalIntegrals;
  /** ⟨p|r|q⟩ over all orbitals (of alpha spin, where the spins have their own; so all densities), x, y, z */
  readonly dipole: readonly Float64Array[];
  readonly nuclearDipole: Vector3;
  /** of a density over all orbitals */
  readonly chargesOf: (density: Float64Array) => AtomicCharges;
  /** of an energy and its densities over all orbitals */
  readonly partsOf: (energy: number, densities: SpinDensities) => EnergyParts;
  /** of a density over all orbitals; absent where none are wanted */
  readonly naturalOrbitalsOf?: (density: Float64Array) => NaturalOrbitals;
  /** whether the correlation energy is to be divided up, which takes some more products with H */
  readonly wantsParts: boolean;
  /** all orbitals, frozen ones included */
  readonly orbitalCount: number;
  readonly frozen: number;
  /** alpha and beta electrons outside the frozen orbitals */
  readonly activeElectrons: readonly [number, number];
  readonly states: number;
  readonly energyTolerance: number;
  /** RHF or ROHF, which correlation counts from */
  readonly meanFieldEnergy: number;
  /** of the reference determinant: the same, or UHF */
  readonly determinantEnergy: number;
  readonly symmetry: FieldSymmetry;
  readonly orbitalsConverged: boolean;
  readonly memoryLimit: number;
  readonly control: RunControl;
}

export function hartreeFockResult(
  name: HartreeFockName,
  fields: MeanFields,
  symmetry: FieldSymmetry,
  molecule: Molecule,
  integrals: MolecularIntegrals,
  chargesOf: ChargesOf,
): HartreeFockResult {
  const solution = { RHF: fields.restricted, UHF: fields.unrestricted, ROHF: fields.restrictedOpen }[name];
  if (!solution) throw new RangeError(`${name} was not computed`);
  const densities: readonly Float64Array[] = 'density' in solution ? [solution.density] : solution.densities;
  const ofSpins = 'density' in solution ? halves(solution.density) : solution.densities;
  const { dipole } = integrals;
  const nuclear = nuclearDipole(molecule);
  const { stability } = solution;
  return {
    kind: 'hartreeFock',
    energy: solution.energy,
    converged: solution.termination.kind === 'converged',
    termination: solution.termination,
    iterations: solution.iterations,
    orbitalEnergies:
      solution.orbitalEnergies instanceof Float64Array
        ? Array.from(solution.orbitalEnergies)
        : { alpha: Array.from(solution.orbitalEnergies[0]), beta: Array.from(solution.orbitalEnergies[1]) },
    ...symmetry.labels[name],
    dipole: vector((axis) =>
      densities.reduce<number>((sum, density) => sum - dot(density, dipole[axis]), nuclear[axis]),
    ),
    energyParts: energyParts(solution.energy, ofSpins, integrals),
    charges: chargesOf(densities),
    ...('sSquared' in solution && { sSquared: solution.sSquared }),
    ...(stability !== undefined && {
      stability: typeof stability === 'number' ? { own: stability } : stability,
    }),
  };
}

/** Of a closed shell. */
function halves(density: Float64Array): SpinDensities {
  const half = density.map((value) => value / 2);
  return [half, half];
}

/** MP2 on RHF for closed shells, on UHF for open ones. */
export function secondOrderResult(
  prepared: PreparedStudy,
  { reference, restricted, unrestricted }: MeanFields,
  { problem }: MolecularIntegrals,
): PerturbationResult {
  const { functionCount: n, repulsion } = problem;
  const [alpha, beta] = prepared.spinElectrons;
  const orbitals = (coefficients: Float64Array, energies: Float64Array, occupied: number): SpinOrbitals => {
    const m = energies.length;
    const frozen = prepared.frozenOrbitals;
    return {
      occupied: columnRange(coefficients, n, m, frozen, occupied),
      virtual: columnRange(coefficients, n, m, occupied, m),
      occupiedEnergies: energies.subarray(frozen, occupied),
      virtualEnergies: energies.subarray(occupied),
    };
  };
  const base = restricted ?? unrestricted;
  if (!base) throw new RangeError('MP2 without its Hartree–Fock');
  const { sameSpin, oppositeSpin } =
    base === restricted
      ? restrictedSecondOrder(
          repulsion,
          n,
          orbitals(restricted.coefficients, restricted.orbitalEnergies, alpha),
        )
      : unrestrictedSecondOrder(
          repulsion,
          n,
          orbitals(unrestricted!.coefficients[0], unrestricted!.orbitalEnergies[0], alpha),
          orbitals(unrestricted!.coefficients[1], unrestricted!.orbitalEnergies[1], beta),
        );
  const energy = base.energy + sameSpin + oppositeSpin;
  const converged = base.termination.kind === 'converged';
  return {
    kind: 'perturbation',
    energy,
    correlation: energy - reference.energy,
    reference: base === restricted ? 'RHF' : 'UHF',
    sameSpin,
    oppositeSpin,
    energyParts: {
      kind: 'none',
      reason: 'A second-order energy is not an expectation value and has no kinetic or potential part.',
    },
    converged,
    termination: converged ? { kind: 'converged' } : { kind: 'orbitalsNotConverged' },
  };
}

export function computeSingles(input: CorrelationInput): SinglesResult {
  const { integrals, frozen } = input;
  const result = solveSingles(integrals, {
    occupied: input.activeElectrons[0],
    states: input.states,
    dipole: input.dipole.map((matrix) => activeBlock(matrix, input)),
    species: activeSpecies(input),
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
      ...symmetryOf(state, input),
      oscillatorStrength: state.oscillatorStrength,
      transitionDipole: state.transitionDipole,
      leading: state.leading.map(({ from, to, weight }) => ({
        from: from + frozen,
        to: to + frozen,
        weight,
      })),
      ...(input.wantsParts && singlesDescription(state, input)),
    })),
  };
}

/** What the density of a state says of it; the orbitals are those of RHF and not relaxed. */
function singlesDescription(
  { energy, amplitudes }: SinglesSolution,
  input: CorrelationInput,
): Pick<SinglesState, 'naturalOccupations' | 'unpairedElectrons' | 'dipole' | 'energyParts'> {
  const { integrals, frozen, dipole, nuclearDipole: nuclear } = input;
  const active = singlesDensity(amplitudes, input.activeElectrons[0], integrals.orbitalCount);
  const occupations = Array.from(naturalOrbitals(active, integrals.orbitalCount).values);
  const density = overAllOrbitals(active, input);
  const half = density.map((value) => value / 2);
  return {
    naturalOccupations: [...Array.from({ length: frozen }, () => 2), ...occupations],
    unpairedElectrons: unpairedElectrons(occupations),
    dipole: vector((axis) => nuclear[axis] - dot(density, dipole[axis])),
    energyParts: input.partsOf(energy, [half, half]),
  };
}

/** CI of any rank. Full CI of all electrons does not depend on the orbitals, so it is final without theirs being. */
export function computeCorrelated(
  level: Extract<Level, { kind: 'correlated' }>,
  input: CorrelationInput,
): CorrelatedResult | FailedLevel {
  const [alphaElectrons, betaElectrons] = input.activeElectrons;
  const active = alphaElectrons + betaElectrons;
  const result = solveConfigurationInteraction(input.integrals, {
    alphaElectrons,
    betaElectrons,
    maximumRank: level.maximumRank,
    states: input.states,
    memoryLimit: input.memoryLimit,
    // the two sets of orbitals share no labels
    ...(!input.integrals.beta && { species: activeSpecies(input) }),
    correlationParts: input.wantsParts,
    control: input.control,
  });
  // integrals that are not finite leave nothing to report
  if (result.states.length === 0)
    return { kind: 'failed', converged: false, termination: result.termination };
  const independent = level.maximumRank >= active && input.integrals.orbitalCount === input.orbitalCount;
  const termination = independent ? result.termination : onOrbitals(input, result.termination);
  const states = result.states.map((state) => stateResult(state, result.states[0].energy, input));
  const [lowest] = states;
  const correlation = lowest.energy - input.meanFieldEnergy;
  const belowDeterminant = lowest.energy - input.determinantEnergy;
  const isTruncated = level.maximumRank < active;
  return {
    kind: 'correlated',
    energy: lowest.energy,
    correlation,
    converged: termination.kind === 'converged',
    termination,
    iterations: result.iterations,
    determinants: result.determinants,
    referenceWeight: lowest.referenceWeight,
    ...(input.integrals.beta && { reference: 'UHF' as const }),
    sSquared: lowest.sSquared,
    spin: lowest.spin,
    ...(lowest.symmetry && { symmetry: lowest.symmetry }),
    naturalOccupations: lowest.naturalOccupations,
    ...(input.naturalOrbitalsOf && {
      naturalOrbitals: input.naturalOrbitalsOf(overAllOrbitals(result.states[0].density, input)),
    }),
    unpairedElectrons: lowest.unpairedElectrons,
    ...(result.correlationParts && {
      correlationParts: countFromFrozen(result.correlationParts, input.frozen),
    }),
    dipole: lowest.dipole,
    energyParts: input.partsOf(lowest.energy, bothOverAllOrbitals(result.states[0].spinDensities, input)),
    ...(isTruncated && {
      davidsonCorrected: lowest.energy + (1 - lowest.referenceWeight) * belowDeterminant,
    }),
    ...(isTruncated &&
      level.maximumRank === 2 && {
        sizeCorrections: sizeCorrections({
          energy: lowest.energy,
          correlation: belowDeterminant,
          referenceWeight: lowest.referenceWeight,
          electrons: active,
        }),
      }),
    states,
  };
}

/** Orbitals counted over all, frozen ones included. */
function countFromFrozen(parts: CorrelationParts, frozen: number): CorrelationParts {
  const { projected } = parts;
  if (projected.kind === 'none') return parts;
  return {
    ...parts,
    projected: {
      kind: 'found',
      singles: projected.singles.map((part) => ({ ...part, orbital: part.orbital + frozen })),
      pairs: projected.pairs.map((part) => ({
        ...part,
        orbitals: [part.orbitals[0] + frozen, part.orbitals[1] + frozen],
      })),
    },
  };
}

function stateResult(
  state: ConfigurationInteractionState,
  lowestEnergy: number,
  input: CorrelationInput,
): CorrelatedState & Required<Pick<CorrelatedState, 'unpairedElectrons'>> {
  const { frozen, integrals, dipole, nuclearDipole: nuclear } = input;
  const density = overAllOrbitals(state.density, input);
  const core = Array.from({ length: frozen }, (_, i) => i);
  const withCore = (orbitals: readonly number[]) => [...core, ...orbitals.map((p) => p + frozen)];
  return {
    energy: state.energy,
    excitation: state.energy - lowestEnergy,
    spin: state.spin,
    ...symmetryOf(state, input),
    sSquared: state.sSquared,
    referenceWeight: state.referenceWeight,
    residual: state.residual,
    ...transitionOf(state, lowestEnergy, input),
    dipole: vector((axis) => nuclear[axis] - dot(density, dipole[axis])),
    charges: input.chargesOf(density),
    naturalOccupations: integrals.beta
      ? state.naturalOccupations
      : [...core.map(() => 2), ...state.naturalOccupations],
    unpairedElectrons: unpairedElectrons(state.naturalOccupations),
    leading: state.leading.map(
      ({ coefficient, weight, alpha, beta }): LeadingDeterminant => ({
        coefficient,
        weight,
        alpha: withCore(alpha),
        beta: withCore(beta),
      }),
    ),
    ...(state.configurations && {
      configurations: state.configurations.map(
        ({ weight, doublyOccupied, singlyOccupied }): LeadingConfiguration => ({
          weight,
          doublyOccupied: withCore(doublyOccupied),
          singlyOccupied: singlyOccupied.map((p) => p + frozen),
        }),
      ),
    }),
  };
}

/** Two states of one CI are orthogonal: neither nuclei nor frozen orbitals have a part in the moment between them. */
function transitionOf(
  { energy, transitionDensity }: ConfigurationInteractionState,
  lowestEnergy: number,
  input: CorrelationInput,
): Pick<CorrelatedState, 'oscillatorStrength' | 'transitionDipole'> {
  if (!transitionDensity) return {};
  const density = overAllOrbitals(transitionDensity, input, 0);
  const transitionDipole = vector((axis) => -dot(density, input.dipole[axis]));
  const strength = transitionDipole.reduce((sum, component) => sum + component ** 2, 0);
  return { oscillatorStrength: (2 / 3) * (energy - lowestEnergy) * strength, transitionDipole };
}

/** Frozen orbitals are filled, so that they add nothing to the symmetry of a state. */
function activeSpecies(input: CorrelationInput): OrbitalSpecies {
  const { frozen } = input;
  const { irreps, operations, axialRotation } = input.symmetry.species;
  const active = (matrix: Float64Array) => activeBlock(matrix, input);
  return {
    ...(irreps && { irreps: irreps.slice(frozen, frozen + input.integrals.orbitalCount) }),
    ...(operations && { operations: operations.map(active) }),
    ...(axialRotation && { axialRotation: active(axialRotation) }),
  };
}

function symmetryOf(
  { symmetry: found }: { readonly symmetry?: VectorSymmetry },
  input: CorrelationInput,
): { symmetry?: StateSymmetry } {
  const symmetry = found && stateSymmetry(input.symmetry.molecule, found.irrepWeights, found.axialSquare);
  return symmetry ? { symmetry } : {};
}

function onOrbitals(input: CorrelationInput, termination: Termination): LevelTermination {
  return input.orbitalsConverged || termination.kind !== 'converged'
    ? termination
    : { kind: 'orbitalsNotConverged' };
}

type OrbitalRange = Pick<CorrelationInput, 'integrals' | 'orbitalCount' | 'frozen'>;

/** A density that CI gives, over all orbitals: the frozen ones occupied as said, those above the active ones empty. */
function overAllOrbitals(
  density: Float64Array,
  { integrals, orbitalCount, frozen }: OrbitalRange,
  occupation = 2,
): Float64Array {
  // where beta orbitals differ it is over all of them already
  return integrals.beta ? density : padDensity(density, orbitalCount, frozen, occupation);
}

function bothOverAllOrbitals([alpha, beta]: SpinDensities, range: OrbitalRange): SpinDensities {
  return [overAllOrbitals(alpha, range, 1), overAllOrbitals(beta, range, 1)];
}

/** Rows and columns of the active orbitals, which follow the frozen ones. */
function activeBlock(
  matrix: Float64Array,
  { integrals: { orbitalCount: size }, orbitalCount, frozen }: OrbitalRange,
): Float64Array {
  if (size === orbitalCount) return matrix;
  const block = new Float64Array(size * size);
  for (let p = 0; p < size; p++) {
    const start = (p + frozen) * orbitalCount + frozen;
    block.set(matrix.subarray(start, start + size), p * size);
  }
  return block;
}

function vector(component: (axis: number) => number): Vector3 {
  return [component(0), component(1), component(2)];
}

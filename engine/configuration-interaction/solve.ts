import { EngineError } from '../errors';
import type { BetaIntegrals, OrbitalIntegrals } from '../integrals/orbital-integrals';
import { kernelForm } from '../kernels/form';
import { scratchMemory } from '../kernels/kernel-memory';
import { addScaledInto, dot } from '../linear-algebra/dense';
import { KernelVectors } from '../linear-algebra/kernel-vectors';
import { plainVectors } from '../linear-algebra/vector-algebra';
import { type RunControl, type Termination, UNATTENDED } from '../termination';
import { type CorrelationParts, correlationParts } from './correlation-parts';
import type { DistinguishingOperator } from './degenerate-states';
import {
  applySpin,
  type ConfigurationInteractionState,
  densitiesBetween,
  describeState,
  leadingSign,
} from './describe-state';
import { buildDeterminantSpace, type DeterminantSpace, determinantAt } from './determinant-space';
import { type Determinant, occupiedOrbitals } from './determinants';
import { spinAveragedDiagonal, unrestrictedDiagonal } from './diagonal';
import {
  type HamiltonianProduct,
  prepareHamiltonianProduct,
  type SectorProduct,
} from './hamiltonian-product';
import { findLowestStates } from './lowest-states';
import { hamiltonianElement, spinSquaredElement } from './matrix-elements';
import type { ModelElements } from './model-space';
import { spinSummed } from './one-particle-density';
import { isWholeSpace, placesInSpace, putSector, takeSector } from './sector';
import {
  basisVectorsWithin,
  configurationInteractionBytes,
  countDeterminants,
  listBytes,
  vectorsHeld,
  WORKING_VECTORS,
} from './size';
import type { SpinOperator } from './spin-search';
import { stringAt } from './string-space';
import { unrestrictedSpin, unrestrictedSpinSquaredElement } from './unrestricted-spin';
import { determinantSymmetry, type OrbitalSpecies, type SpaceSymmetry } from './vector-symmetry';

export interface ConfigurationInteractionOptions {
  readonly alphaElectrons: number;
  readonly betaElectrons: number;
  /** highest excitation rank against the reference, in spin orbitals: 2 for CISD; Infinity for full CI */
  readonly maximumRank: number;
  /** how many lowest states with M = (N(α) − N(β))/2 */
  readonly states: number;
  /** largest ‖Hc − Ec‖ of a converged state, hartree; default 1e-6, which leaves about 1e-12 in the energy */
  readonly residualTolerance?: number;
  readonly maximumIterations?: number;
  /** bytes that may be taken; where they are few, the eigensolver holds fewer vectors and takes longer; default: no limit */
  readonly memoryLimit?: number;
  /** labels the states, and makes degenerate ones of different symmetry definite */
  readonly species?: OrbitalSpecies;
  /** whether to divide up the correlation energy of the lowest state, at the cost of three products; default no */
  readonly correlationParts?: boolean;
  readonly control?: RunControl;
}

export interface ConfigurationInteractionResult {
  readonly determinants: number;
  /** rising energy; fewer than asked for where there are fewer determinants */
  readonly states: readonly ConfigurationInteractionState[];
  /** of the lowest state, where asked for */
  readonly correlationParts?: CorrelationParts;
  readonly termination: Termination;
  /** 0: diagonalised directly */
  readonly iterations: number;
}

const DEFAULTS = Object.freeze({
  residualTolerance: 1e-6,
  // close states of a stretched multiple bond take two hundred: three of C2 at 3 Å in a minimal basis
  maximumIterations: 300,
  memoryLimit: Number.POSITIVE_INFINITY,
  control: UNATTENDED,
});

/** From here on kernels handle vectors faster than they are called. */
const LONG_VECTORS = 5000;
/** ⟨S²⟩ this close counts as the same spin when degenerate states are told apart. */
const SAME_SPIN = 1e-3;

/**
 * Lowest states of configuration interaction up to any excitation rank, full CI included, for any numbers of
 * alpha and beta electrons. The reference determinant has the first orbitals occupied.
 *
 * Small spaces are diagonalised directly; others by Davidson's method, started from the eigenvectors of a model
 * space, with guards against missed states (`chooseGuesses`, `lowestEigenpairs`). States degenerate within
 * `DEGENERACY_TOLERANCE` are told apart by S² and then by a fixed one-particle operator, so that they come out
 * the same however the iteration mixed them; a degenerate set cut by `states` is converged as a whole first.
 *
 * In a truncated open-shell space the determinants do not close under spin: ⟨S²⟩ is the exact expectation value
 * of the vector, and need not be S(S + 1). The same holds for any truncated space over beta orbitals that differ from
 * the alpha ones.
 *
 * @throws EngineError `study.tooLarge` before anything is allocated, if more than `memoryLimit` would be taken
 * @throws RangeError if the electrons do not fit the orbitals, or `states` or `maximumRank` is not positive
 */
export function solveConfigurationInteraction(
  integrals: OrbitalIntegrals,
  options: ConfigurationInteractionOptions,
): ConfigurationInteractionResult {
  const settings = { ...DEFAULTS, ...options };
  checkOptions(integrals, settings);
  return scratchMemory().scope(() => solve(integrals, settings));
}

function solve(
  integrals: OrbitalIntegrals,
  settings: ConfigurationInteractionOptions &
    Required<Pick<ConfigurationInteractionOptions, keyof typeof DEFAULTS>>,
): ConfigurationInteractionResult {
  const { alphaElectrons, betaElectrons, maximumRank } = settings;
  const { beta } = integrals;
  const space = buildDeterminantSpace(integrals.orbitalCount, alphaElectrons, betaElectrons, maximumRank);
  const { species } = settings;
  const product = prepareHamiltonianProduct(space, integrals, species?.irreps);
  const symmetry = species && determinantSymmetry(space, species);
  const diagonals = sectorDiagonals(product, integrals);
  const elementsAmong = (places: Int32Array, { sector, matrix }: SectorProduct): ModelElements => {
    const spin = beta && unrestrictedSpin(beta, integrals.orbitalCount, [alphaElectrons, betaElectrons]);
    let made: readonly Determinant[] | undefined;
    const determinant = (i: number): Determinant => {
      made ??= Array.from(placesInSpace(sector, places), (place) => determinantAt(space, place));
      return made[i];
    };
    return {
      hamiltonian: matrix
        ? (i, j) => matrix[places[i] * sector.dimension + places[j]] + (i === j ? integrals.coreEnergy : 0)
        : (i, j) => hamiltonianElement(determinant(i), determinant(j), integrals),
      spinSquared: (i, j) =>
        spin
          ? unrestrictedSpinSquaredElement(determinant(i), determinant(j), spin)
          : spinSquaredElement(determinant(i), determinant(j)),
    };
  };
  const longest = Math.max(...product.sectors.map(({ sector }) => sector.dimension));
  const basisVectors = basisVectorsWithin(
    vectorsWithin(integrals, settings, longest),
    settings.states,
    longest,
  );
  const algebra =
    kernelForm() === 'fast' && longest >= LONG_VECTORS
      ? new KernelVectors(scratchMemory(), longest, vectorsHeld(settings.states, longest, basisVectors))
      : plainVectors;
  const found = findLowestStates(
    {
      sectors: product.sectors.map((ofSector, k) => ({
        dimension: ofSector.sector.dimension,
        diagonal: diagonals[k],
        apply: ofSector.apply,
        restoreSymmetry: ofSector.restoreSpinFlip,
        partsOf: ofSector.spinFlipParts,
        // where the orbitals show the symmetry of the states, guesses of every representation are enough
        ...(isWholeSpace(ofSector.sector) &&
          closesUnderSpin(settings, beta) && { spin: spinOperator(space) }),
        elementsAmong: (places) => elementsAmong(places, ofSector),
        ...(!isWholeSpace(ofSector.sector) && {
          widen: (vector) => {
            const whole = new Float64Array(space.dimension);
            putSector(ofSector.sector, vector, whole);
            return whole;
          },
        }),
      })),
      reference: 0,
      distinguishing: distinguishingOperators(space, symmetry, beta),
    },
    {
      ...settings,
      stage: 'configuration interaction',
      algebra,
      basisVectors,
    },
  );

  const scratch = longest === space.dimension ? algebra.take(longest) : new Float64Array(space.dimension);
  const states = found.vectors.map((vector, k) => {
    const energy = found.values[k];
    const residual = residualNorm(product, vector, energy, scratch);
    return {
      ...describeState(space, vector, energy, residual, beta, scratch),
      ...(k > 0 && { transitionDensity: transitionFromLowest(space, found.vectors[0], vector, beta) }),
      ...(symmetry && { symmetry: symmetry.describe(vector) }),
    };
  });
  return {
    determinants: space.dimension,
    states,
    ...(settings.correlationParts &&
      states.length > 0 && {
        correlationParts: correlationParts(product, found.vectors[0], states[0].energy, integrals),
      }),
    termination: found.termination,
    iterations: found.iterations,
  };
}

/** The diagonal of H, or what stands for it, by sectors. */
function sectorDiagonals(
  { space, sectors }: HamiltonianProduct,
  integrals: OrbitalIntegrals,
): Float64Array[] {
  const diagonal = integrals.beta
    ? unrestrictedDiagonal(space, integrals)
    : spinAveragedDiagonal(space, integrals);
  return sectors.map(({ sector }) => (isWholeSpace(sector) ? diagonal : takeSector(sector, diagonal)));
}

/** How many vectors of the eigensolver the memory allows. */
function vectorsWithin(
  { orbitalCount, beta }: OrbitalIntegrals,
  options: ConfigurationInteractionOptions & { readonly memoryLimit: number },
  longest: number,
): number {
  const { alphaElectrons, betaElectrons, maximumRank, memoryLimit } = options;
  const space = [orbitalCount, alphaElectrons, betaElectrons, maximumRank] as const;
  const bytes = memoryLimit - listBytes(...space, beta !== undefined);
  return (bytes / 8 - WORKING_VECTORS * countDeterminants(...space)) / longest;
}

/**
 * H keeps the spin of a vector where every determinant's partners with other spins of the open-shell electrons are in the
 * space too: ranks are counted over spin orbitals, so that of truncated spaces only closed-shell ones have them all.
 */
function closesUnderSpin(
  { alphaElectrons, betaElectrons, maximumRank }: ConfigurationInteractionOptions,
  beta: BetaIntegrals | undefined,
): boolean {
  return !beta && (alphaElectrons === betaElectrons || maximumRank >= alphaElectrons + betaElectrons);
}

/** S², and the values that it can have with so many electrons and orbitals. */
function spinOperator(space: DeterminantSpace): SpinOperator {
  const { alpha, beta, orbitalCount } = space;
  const electrons = alpha.electrons + beta.electrons;
  const lowest = Math.abs(alpha.electrons - beta.electrons) / 2;
  const highest = Math.min(electrons, 2 * orbitalCount - electrons) / 2;
  return {
    values: Array.from({ length: highest - lowest + 1 }, (_, k) => (lowest + k) * (lowest + k + 1)),
    apply: (vector, product) => applySpin(space, vector, product),
  };
}

/** With the signs of both states as their leading determinants are given. */
function transitionFromLowest(
  space: DeterminantSpace,
  lowest: Float64Array,
  vector: Float64Array,
  beta: BetaIntegrals | undefined,
): Float64Array {
  const sign = leadingSign(lowest) * leadingSign(vector);
  return spinSummed(densitiesBetween(space, lowest, vector, beta)).map((element) => sign * element);
}

function checkOptions(
  { orbitalCount, beta }: OrbitalIntegrals,
  options: ConfigurationInteractionOptions & { readonly memoryLimit: number },
): void {
  const { alphaElectrons, betaElectrons, maximumRank, states } = options;
  for (const electrons of [alphaElectrons, betaElectrons]) {
    if (!Number.isInteger(electrons) || electrons < 0 || electrons > orbitalCount) {
      throw new RangeError(`${electrons} electrons of one spin do not fit ${orbitalCount} orbitals`);
    }
  }
  if (!(maximumRank >= 1)) throw new RangeError(`excitation rank ${maximumRank}`);
  if (!Number.isInteger(states) || states < 1) throw new RangeError(`${states} states`);
  const bytes = configurationInteractionBytes(
    orbitalCount,
    alphaElectrons,
    betaElectrons,
    maximumRank,
    states,
    beta !== undefined,
    options.memoryLimit,
  );
  // places in vectors and lists are 32-bit numbers
  const count = countDeterminants(orbitalCount, alphaElectrons, betaElectrons, maximumRank);
  if (bytes > options.memoryLimit || count > 2 ** 31 - 1) {
    throw new EngineError(
      'study.tooLarge',
      `${count.toLocaleString('en-GB')} determinants need about ${(bytes / 2 ** 30).toFixed(1)} GiB of memory, more than the ${(options.memoryLimit / 2 ** 30).toFixed(1)} GiB allowed.`,
      'Choose a lower excitation rank, a smaller basis set, a frozen core or fewer states.',
      { bytes, limit: options.memoryLimit },
    );
  }
}

/**
 * Spin first, then symmetry where it is known; then the square of Σ √(p + 1)·n(p): the sum tells π(x) from π(y), its square
 * also x² − y² from xy. What the operator is does not matter, as long as it follows the orbitals.
 */
function distinguishingOperators(
  space: DeterminantSpace,
  symmetry: SpaceSymmetry | undefined,
  beta: BetaIntegrals | undefined,
): DistinguishingOperator[] {
  let labels: Float64Array | undefined;
  return [
    {
      tolerance: SAME_SPIN,
      apply: (vector, product) => applySpin(space, vector, product, beta),
    },
    ...(symmetry?.distinguishingOperators() ?? []),
    {
      tolerance: 0,
      apply: (vector, product) => {
        labels ??= occupationLabels(space);
        for (let i = 0; i < product.length; i++) product[i] = labels[i] ** 2 * vector[i];
      },
    },
  ];
}

/** Σ over the electrons of a determinant of √(p + 1). */
function occupationLabels(space: DeterminantSpace): Float64Array {
  const sumOver = (orbitals: number[]) => orbitals.reduce((sum, p) => sum + Math.sqrt(p + 1), 0);
  const alpha = Float64Array.from({ length: space.alpha.count }, (_, a) =>
    sumOver(occupiedOrbitals(stringAt(space.alpha, a))),
  );
  const labels = new Float64Array(space.dimension);
  for (let b = 0; b < space.beta.count; b++) {
    const ofBeta = sumOver(occupiedOrbitals(stringAt(space.beta, b)));
    const start = space.rows.start[b];
    for (let place = start; place < space.rows.start[b + 1]; place++)
      labels[place] = ofBeta + alpha[place - start];
  }
  return labels;
}

function residualNorm(
  product: HamiltonianProduct,
  vector: Float64Array,
  energy: number,
  scratch: Float64Array,
): number {
  product.apply(vector, scratch);
  addScaledInto(scratch, -energy, vector);
  return Math.sqrt(dot(scratch, scratch));
}

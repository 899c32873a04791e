import { EngineError } from '../errors';
import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { type DavidsonResult, DEGENERACY_TOLERANCE, lowestEigenpairs } from '../linear-algebra/davidson';
import { addScaledInto, dot } from '../linear-algebra/dense';
import { type RunControl, type Termination, UNATTENDED } from '../termination';
import { diagonaliseWithin, splitRuns } from './degenerate-states';
import { type ConfigurationInteractionState, describeState } from './describe-state';
import { buildDeterminantSpace, type DeterminantSpace } from './determinant-space';
import { occupiedOrbitals } from './determinants';
import { spinAveragedDiagonal } from './diagonal';
import { type HamiltonianProduct, prepareHamiltonianProduct } from './hamiltonian-product';
import { buildModelSpace, chooseGuesses, modelPreconditioner, spreadModelVector } from './model-space';
import { basisVectorLimit, configurationInteractionBytes, countDeterminants } from './size';
import { applySpinSquared } from './spin';
import { stringAt } from './string-space';

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
  /** bytes that may be taken; default: no limit */
  readonly memoryLimit?: number;
  readonly control?: RunControl;
}

export interface ConfigurationInteractionResult {
  readonly determinants: number;
  /** rising energy; fewer than asked for where there are fewer determinants */
  readonly states: readonly ConfigurationInteractionState[];
  readonly termination: Termination;
  /** 0: diagonalised directly */
  readonly iterations: number;
}

const DEFAULTS = Object.freeze({
  residualTolerance: 1e-6,
  maximumIterations: 100,
  memoryLimit: Number.POSITIVE_INFINITY,
  control: UNATTENDED,
});

/**
 * Determinants in the model space that starts the iteration, and at the same time the largest space that is
 * diagonalised directly instead.
 */
export const MODEL_SPACE_SIZE = 300;
/** Model vectors per state wanted, at least. */
const MODEL_VECTORS_PER_STATE = 10;
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
 * of the vector, and need not be S(S + 1).
 *
 * @throws EngineError `study.tooLarge` before anything is allocated, if more than `memoryLimit` would be taken
 * @throws RangeError if the electrons do not fit the orbitals, or `states` or `maximumRank` is not positive
 */
export function solveConfigurationInteraction(
  integrals: OrbitalIntegrals,
  options: ConfigurationInteractionOptions,
): ConfigurationInteractionResult {
  const settings = { ...DEFAULTS, ...options };
  checkOptions(integrals.orbitalCount, settings);
  const { alphaElectrons, betaElectrons, maximumRank } = settings;
  const space = buildDeterminantSpace(integrals.orbitalCount, alphaElectrons, betaElectrons, maximumRank);
  const product = prepareHamiltonianProduct(space, integrals);
  const { iterations, termination, ...found } = findStates(space, product, integrals, settings);

  const energies = found.values;
  const vectors = found.vectors;
  makeDegenerateStatesDefinite(space, energies, vectors);
  const scratch = new Float64Array(space.dimension);
  const states = vectors
    .slice(0, settings.states)
    .map((vector, k) =>
      describeState(space, vector, energies[k], residualNorm(product, vector, energies[k], scratch)),
    )
    .sort((a, b) => a.energy - b.energy);
  return { determinants: space.dimension, states, termination, iterations };
}

function checkOptions(
  orbitalCount: number,
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

function findStates(
  space: DeterminantSpace,
  product: HamiltonianProduct,
  integrals: OrbitalIntegrals,
  settings: Required<ConfigurationInteractionOptions>,
): Pick<DavidsonResult, 'values' | 'vectors' | 'iterations' | 'termination'> {
  const diagonal = spinAveragedDiagonal(space, integrals);
  if (!diagonal.every(Number.isFinite)) {
    return {
      values: new Float64Array(0),
      vectors: [],
      iterations: 0,
      termination: { kind: 'notFinite', quantity: 'Hamiltonian' },
    };
  }
  const size = Math.max(MODEL_SPACE_SIZE, MODEL_VECTORS_PER_STATE * settings.states);
  const model = buildModelSpace(space, diagonal, integrals, size);
  if (model.places.length === space.dimension) {
    const wanted = Math.min(settings.states, space.dimension);
    const limit = model.energies[wanted - 1] + DEGENERACY_TOLERANCE;
    const values = model.energies.filter((energy) => energy <= limit);
    // the model space has its own order of determinants only where it is a part of the space
    const vectors = model.vectors.slice(0, values.length);
    return { values, vectors, iterations: 0, termination: { kind: 'converged' } };
  }

  const guesses = chooseGuesses(model, settings.states);
  return lowestEigenpairs(
    {
      dimension: space.dimension,
      apply: product.apply,
      precondition: modelPreconditioner(model, diagonal),
      guesses: guesses.map((k) => {
        const guess = new Float64Array(space.dimension);
        spreadModelVector(model, k, guess);
        return guess;
      }),
    },
    {
      roots: settings.states,
      residualTolerance: settings.residualTolerance,
      maximumIterations: settings.maximumIterations,
      maximumVectors: basisVectorLimit(guesses.length),
      control: settings.control,
      stage: 'configuration interaction',
    },
  );
}

/** In place: degenerate vectors become eigenvectors of S², and of Σ √(p + 1)·n(p) within equal spin. */
function makeDegenerateStatesDefinite(
  space: DeterminantSpace,
  energies: Float64Array,
  vectors: readonly Float64Array[],
): void {
  if (vectors.length < 2) return;
  const byEnergy = splitRuns([{ first: 0, last: vectors.length }], energies, DEGENERACY_TOLERANCE);
  const degenerate = byEnergy.filter((run) => run.last - run.first > 1);
  const spins = diagonaliseWithin(degenerate, energies, vectors, (vector, result) =>
    applySpinSquared(space, vector, result),
  );
  const bySpin = splitRuns(degenerate, spins, SAME_SPIN).filter((run) => run.last - run.first > 1);
  if (bySpin.length === 0) return;
  const label = occupationLabels(space);
  diagonaliseWithin(bySpin, energies, vectors, (vector, result) => {
    for (let i = 0; i < result.length; i++) result[i] = label[i] * vector[i];
  });
}

/** Σ over the electrons of a determinant of √(p + 1): tells π(x) from π(y) however they are numbered. */
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

import type { DavidsonResult } from '../linear-algebra/davidson';
import { dot } from '../linear-algebra/dense';
import type { DavidsonProblem } from '../linear-algebra/subspace';
import type { VectorAlgebra } from '../linear-algebra/vector-algebra';
import type { RunControl } from '../termination';
import type { ModelElements, modelPreconditioner } from './model-space';
import type { SpinOperator } from './spin-search';

/** A Hamiltonian over basis states that it does not join with others. */
export interface SectorProblem {
  readonly dimension: number;
  /** energies of the basis states, or what stands for them in a preconditioner, hartree */
  readonly diagonal: Float64Array;
  apply(vector: Float64Array, product: Float64Array): void;
  /** as of `DavidsonProblem` */
  restoreSymmetry?(direction: Float64Array): void;
  /** parts of a vector that H does not join, as far as the iteration must keep them apart; default: the whole */
  partsOf?(vector: Float64Array): readonly Float64Array[];
  /**
   * absent where H joins vectors of different spin, the states have none to tell, or the sectors are those of all
   * symmetries that they can have
   */
  readonly spin?: SpinOperator;
  elementsAmong(places: Int32Array): ModelElements;
}

export interface StateSettings {
  readonly states: number;
  readonly residualTolerance: number;
  readonly maximumIterations: number;
  readonly control: RunControl;
  readonly stage: string;
  /** what handles the vectors of the iteration; default: plain TypeScript */
  readonly algebra?: VectorAlgebra | undefined;
  /**
   * most basis vectors that may be held, at least one more than the states; default: as many as are of use. Where they
   * are fewer, guards are sought one after the other (`findWithFewVectors`)
   */
  readonly basisVectors?: number | undefined;
}

export type LowestStates = Pick<DavidsonResult, 'values' | 'vectors' | 'iterations' | 'termination'>;

export interface KnownState {
  readonly value: number;
  readonly vector: Float64Array;
  /** by how much the lowest state of its sector lies below what a model space of that sector gave, hartree */
  readonly lowering?: number | undefined;
}

/** @param keepSpin - takes from a direction, in place, what rounding has brought in of other spins */
export function asDavidsonProblem(
  problem: SectorProblem,
  precondition: ReturnType<typeof modelPreconditioner>,
  guesses: DavidsonProblem['guesses'],
  { algebra }: StateSettings,
  keepSpin?: (direction: Float64Array) => void,
): DavidsonProblem {
  return {
    dimension: problem.dimension,
    apply: (vector, product) => problem.apply(vector, product),
    precondition,
    restoreSymmetry: (direction) => {
      problem.restoreSymmetry?.(direction);
      keepSpin?.(direction);
    },
    guesses,
    ...(algebra && { algebra }),
  };
}

/** Of no determinant more than this: the model space says little about such a state, and guards can fail. */
const STRONGLY_MIXED = 0.6;

export function isStronglyMixed({ vector }: KnownState): boolean {
  return vector.every((coefficient) => coefficient ** 2 <= STRONGLY_MIXED);
}

/** A vector of which states hold less than this is another state. */
const KNOWN_WEIGHT = 0.9;

/** Do the states hold the vector, of a degenerate set in whatever mixture? */
export function isKnown(vector: Float64Array, states: readonly Float64Array[]): boolean {
  return states.reduce((weight, state) => weight + dot(state, vector) ** 2, 0) >= KNOWN_WEIGHT;
}

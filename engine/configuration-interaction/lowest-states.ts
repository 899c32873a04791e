import { DEGENERACY_TOLERANCE } from '../linear-algebra/davidson';
import { inStage } from '../stages';
import type { Termination } from '../termination';
import { type DistinguishingOperator, makeDegenerateStatesDefinite, splitRuns } from './degenerate-states';
import { lowestDirectly } from './direct-states';
import { buildModelSpace } from './model-space';
import type { KnownState, LowestStates, SectorProblem, StateSettings } from './sector-problem';
import { findSectorStates } from './sector-states';

/** A Hamiltonian over many basis states, of which the lowest eigenvectors are wanted. */
export interface StateProblem {
  /** parts that the Hamiltonian does not join */
  readonly sectors: readonly (SectorProblem & {
    /** a vector of the sector as one over all basis states; default: it is one */
    widen?(vector: Float64Array): Float64Array;
  })[];
  /** place of the basis state that others are excited from, where there is one */
  readonly reference?: number;
  /** how degenerate states are told apart; acts on vectors over all basis states */
  readonly distinguishing: readonly DistinguishingOperator[];
}

/**
 * Basis states in the model spaces that start the iteration, and at the same time the largest problem that is
 * diagonalised directly instead.
 */
export const MODEL_SPACE_SIZE = 300;
/** The same of one of many sectors, at least. */
const SECTOR_MODEL_SIZE = 100;
/** A sector of no more is diagonalised directly too. */
const DIRECT_SECTOR_SIZE = 200;
/** Model vectors per state wanted, at least. */
const MODEL_VECTORS_PER_STATE = 10;
/** Energies this close, in hartree, are not put in order. */
const SAME_ENERGY = 1e-9;
/** Of two degenerate states only one can have the symmetry of the reference; smaller differences of weight are rounding. */
const MORE_WEIGHT = 1e-6;

/**
 * The lowest states, rising, with definite members of every degenerate set: directly where the problem is small,
 * by Davidson's method where not. A degenerate set that `states` cuts is converged as a whole before it is cut,
 * so that the cut takes the same members every time. Fewer states where there are no more.
 */
export function findLowestStates(problem: StateProblem, settings: StateSettings): LowestStates {
  if (!problem.sectors.every(({ diagonal }) => diagonal.every(Number.isFinite))) {
    const termination = { kind: 'notFinite', quantity: 'Hamiltonian' } as const;
    return {
      values: new Float64Array(0),
      vectors: [],
      iterations: 0,
      termination,
    };
  }
  const found = lowestOfSectors(problem, settings);
  makeDegenerateStatesDefinite(found.values, found.vectors, DEGENERACY_TOLERANCE, problem.distinguishing);

  const order = orderStates(found, problem.reference).slice(0, settings.states);
  return {
    ...found,
    values: Float64Array.from(order, (k) => found.values[k]),
    vectors: order.map((k) => found.vectors[k]),
  };
}

/**
 * One sector after the other, the one with the lowest state first: what is known of it soon shows that others lie
 * higher. None is left out, for a model says too little of what lies beyond it.
 */
function lowestOfSectors({ sectors }: StateProblem, settings: StateSettings): LowestStates {
  const { control, states } = settings;
  const total = sectors.reduce((sum, { dimension }) => sum + dimension, 0);
  const size = Math.max(
    total <= MODEL_SPACE_SIZE ? total : Math.max(MODEL_SPACE_SIZE / sectors.length, SECTOR_MODEL_SIZE),
    MODEL_VECTORS_PER_STATE * states,
  );
  const started = sectors.map((sector) => {
    const stage = <T>(work: () => T): T => inStage(control, 'CI model space', work);
    if (sector.dimension <= Math.max(size, DIRECT_SECTOR_SIZE)) {
      const found = stage(() => lowestDirectly(sector, states));
      return { sector, lowestValue: found.values[0], isModel: false, solve: () => found };
    }
    const model = stage(() =>
      buildModelSpace(sector.diagonal, size, (places) => sector.elementsAmong(places)),
    );
    const apply: SectorProblem['apply'] = (vector, product) =>
      inStage(control, 'CI product', () => sector.apply(vector, product));
    const solve = (ceiling: number, known: KnownState | undefined): LowestStates =>
      findSectorStates({ ...sector, apply }, model, settings, ceiling, known);
    return { sector, lowestValue: model.energies[0], isModel: true, solve };
  });
  started.sort((a, b) => a.lowestValue - b.lowestValue);

  let lowest: (KnownState & { readonly sector: StateProblem['sectors'][number] })[] = [];
  let iterations = 0;
  let termination: Termination = { kind: 'converged' };
  for (const { sector, lowestValue, isModel, solve } of started) {
    const found = solve(lowest[states - 1]?.value ?? Number.POSITIVE_INFINITY, lowest[0]);
    iterations += found.iterations;
    if (termination.kind === 'converged') ({ termination } = found);
    const lowering = isModel ? lowestValue - found.values[0] : undefined;
    found.vectors.forEach((vector, k) => {
      lowest.push({ value: found.values[k], vector, lowering, sector });
    });
    lowest.sort((a, b) => a.value - b.value);
    const highest = (lowest[states - 1]?.value ?? Number.POSITIVE_INFINITY) + DEGENERACY_TOLERANCE;
    for (const { value, vector } of lowest) if (value > highest) settings.algebra?.giveBack(vector);
    lowest = lowest.filter(({ value }) => value <= highest);
  }
  return {
    values: Float64Array.from(lowest, ({ value }) => value),
    vectors: lowest.map(({ vector, sector }) => sector.widen?.(vector) ?? vector),
    iterations,
    termination,
  };
}

/**
 * Rising. Of degenerate neighbours the one that holds the reference stands first, as weights and corrections are told of
 * it; the others stay as they are: rounding must not choose between them.
 */
function orderStates(
  { values: energies, vectors }: Pick<LowestStates, 'values' | 'vectors'>,
  reference: number | undefined,
): number[] {
  const order = Array.from(energies.keys());
  for (let last = 1; last < order.length; last++) {
    for (let k = last; k > 0 && energies[order[k - 1]] > energies[order[k]] + SAME_ENERGY; k--) {
      [order[k - 1], order[k]] = [order[k], order[k - 1]];
    }
  }
  if (reference === undefined) return order;
  const ordered = order.map((k) => energies[k]);
  const weights = order.map((k) => vectors[k][reference] ** 2);
  for (const { first, last } of splitRuns([{ first: 0, last: order.length }], ordered, SAME_ENERGY)) {
    const holder = weights.indexOf(Math.max(...weights.slice(first, last)), first);
    if (weights[holder] > weights[first] + MORE_WEIGHT) order.splice(first, 0, ...order.splice(holder, 1));
  }
  return order;
}

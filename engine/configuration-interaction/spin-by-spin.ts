import { arbitraryNumbers } from '../linear-algebra/arbitrary-numbers';
import { DEGENERACY_TOLERANCE } from '../linear-algebra/davidson';
import { addScaledInto, dot } from '../linear-algebra/dense';
import type { DavidsonProblem } from '../linear-algebra/subspace';
import type { LowestStates, SectorProblem } from './sector-problem';
import { projectOnSpin, type SpinOperator, searchSpin } from './spin-search';

/** Rough vectors that the search of a spin hands on, beside one for every state wanted. */
const FURTHER_VECTORS = 2;

/** How the states of one spin are found from vectors of that spin. */
export interface SpinSolver {
  /** guesses from determinants, normalised */
  seedsOf(value: number): readonly Float64Array[];
  /**
   * the lowest states that the guesses lead to; those above `ceiling` need not be converged
   *
   * @param keepSpin - takes from a direction, in place, what rounding has brought in of other spins
   */
  solve(
    guesses: DavidsonProblem['guesses'],
    roots: number,
    ceiling: number,
    keepSpin: (direction: Float64Array) => void,
  ): LowestStates;
}

/**
 * The lowest states of a sector, rising, each spin by itself: what states of different spin compete for in one
 * iteration, as where a stretched bond leaves them within microhartrees, they cannot lose here. A degenerate set that
 * `states` cuts is whole.
 *
 * @param ceiling - states that lie above this, hartree, are not wanted, and need not be converged
 */
export function statesBySpin(
  problem: Pick<SectorProblem, 'dimension' | 'apply'>,
  spin: SpinOperator,
  { seedsOf, solve }: SpinSolver,
  states: number,
  ceiling: number,
): LowestStates {
  const searches = spin.values.map((value) => {
    const seeds = seedsOf(value);
    const start = startWith(seeds, problem.dimension);
    return { value, seeds, ...searchSpin(problem, spin, start, value, states + FURTHER_VECTORS) };
  });
  // none of these lies below the state in its place, so that the last one wanted lies no higher
  const rough = searches.flatMap(({ values }) => Array.from(values)).sort((a, b) => a - b);
  let found: { value: number; vector: Float64Array }[] = [];
  let iterations = searches.reduce((sum, { products }) => sum + products, 0);
  let termination: LowestStates['termination'] = { kind: 'converged' };
  for (const { value, seeds, ...search } of searches) {
    const highest = Math.min(ceiling, rough[states - 1] ?? ceiling, found[states - 1]?.value ?? ceiling);
    if (search.lowerBound > highest + DEGENERACY_TOLERANCE) continue;
    const roots = Math.min(states, search.vectors.length);
    const ofSpin = solve([...search.vectors, ...seeds], roots, highest, (direction) =>
      projectOnSpin(spin, direction, value),
    );
    iterations += ofSpin.iterations;
    if (termination.kind === 'converged') termination = ofSpin.termination;
    ofSpin.vectors.forEach((vector, k) => {
      found.push({ value: ofSpin.values[k], vector });
    });
    found.sort((a, b) => a.value - b.value);
    const last = found[states - 1]?.value ?? Number.POSITIVE_INFINITY;
    found = found.filter((state) => state.value <= last + DEGENERACY_TOLERANCE);
  }
  return {
    values: Float64Array.from(found, ({ value }) => value),
    vectors: found.map(({ vector }) => vector),
    iterations,
    termination,
  };
}

/** An arbitrary vector of unit length, and every seed beside it. */
function startWith(seeds: readonly Float64Array[], dimension: number): Float64Array {
  const arbitrary = arbitraryNumbers(dimension);
  const length = Math.sqrt(dot(arbitrary, arbitrary));
  const start = arbitrary.map((element) => element / length);
  for (const seed of seeds) addScaledInto(start, 1, seed);
  return start;
}

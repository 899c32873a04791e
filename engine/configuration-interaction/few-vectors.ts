import { type DavidsonOptions, lowestEigenpairs } from '../linear-algebra/davidson';
import type { DavidsonProblem } from '../linear-algebra/subspace';
import { chooseGuesses, type ModelSpace, modelPreconditioner, writeModelVector } from './model-space';
import {
  asDavidsonProblem,
  isKnown,
  isStronglyMixed,
  type KnownState,
  type LowestStates,
  type SectorProblem,
  type StateSettings,
} from './sector-problem';
import { GUARD_BASIS, guessLimit } from './size';

/** Residual, hartree, at which a guard that has come below the states found counts as one of them. */
const CLOSE_RESIDUAL = 1e-4;

/**
 * The lowest states of one sector where memory has no room for guards beside them, for many determinants: first the
 * states, from as many model vectors, the basis collapsing as often as it must; then every guard by itself, until second
 * order, or its residual, shows that it lies above. No more than `basisVectors` and their products are held, and beside
 * the states found two of each. There are no probes: a state of a symmetry that no basis state shows can be missed.
 */
export function findWithFewVectors(
  problem: SectorProblem,
  model: ModelSpace,
  settings: StateSettings & { readonly basisVectors: number },
  ceiling: number,
  lowest: KnownState | undefined,
): LowestStates {
  const { states, algebra } = settings;
  const precondition = modelPreconditioner(model, problem.diagonal);
  const solve = (guesses: DavidsonProblem['guesses'], options: Partial<DavidsonOptions>) =>
    lowestEigenpairs(asDavidsonProblem(problem, precondition, guesses, settings), {
      ...settings,
      roots: states,
      maximumVectors: settings.basisVectors,
      guards: false,
      ceiling,
      ...options,
    });
  const handOver = (vector: Float64Array) => (into: Float64Array) => {
    into.set(vector);
    algebra?.giveBack(vector);
  };
  const choice = chooseGuesses(model, states);
  const first = choice.lowest.slice(0, states);
  let found = solve(
    first.map((k) => writeModelVector(model, k)),
    {},
  );
  let iterations = found.iterations;

  const guards = [...choice.lowest.slice(states), ...choice.guards].slice(0, guessLimit(states) - states);
  for (const k of guards) {
    if (found.termination.kind !== 'converged') break;
    const own = { value: found.values[0], vector: found.vectors[0] };
    const isTrusted = !isStronglyMixed(lowest && lowest.value < own.value ? lowest : own);
    const highest = Math.min(ceiling, found.values[Math.min(states, found.values.length) - 1]);
    const guard = solve([writeModelVector(model, k)], {
      roots: 1,
      maximumVectors: GUARD_BASIS,
      residualTolerance: Math.max(CLOSE_RESIDUAL, settings.residualTolerance),
      ceiling: highest,
      trustsEstimates: () => isTrusted,
    });
    iterations += guard.iterations;
    if (guard.values[0] < highest && !isKnown(guard.vectors[0], found.vectors)) {
      found = solve([...guard.vectors, ...found.vectors].map(handOver), {});
      iterations += found.iterations;
    } else {
      for (const other of guard.vectors) algebra?.giveBack(other);
    }
  }
  return { ...found, iterations };
}

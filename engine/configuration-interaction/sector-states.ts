import { arbitraryNumbers } from '../linear-algebra/arbitrary-numbers';
import { type DavidsonOptions, lowestEigenpairs } from '../linear-algebra/davidson';
import { addScaledInto, dot } from '../linear-algebra/dense';
import type { DavidsonProblem } from '../linear-algebra/subspace';
import { findWithFewVectors } from './few-vectors';
import {
  chooseGuesses,
  type ModelSpace,
  modelPreconditioner,
  spreadModelVector,
  writeModelVector,
} from './model-space';
import {
  asDavidsonProblem,
  isKnown,
  isStronglyMixed,
  type KnownState,
  type LowestStates,
  type SectorProblem,
  type StateSettings,
} from './sector-problem';
import { basisVectorLimit, guessLimit, PROBES } from './size';
import { statesBySpin } from './spin-by-spin';

/** Where vectors are longer, a search by products alone takes too long: guards and `lowerStatesOfOtherSpins` must do. */
const LONGEST_BY_SPIN = 100_000;
/** Below the model's lowest energy, hartree: what lies higher by this much keeps a quarter of its weight. */
const PROBE_SHIFT = 0.5;

/**
 * The lowest states of one sector, rising, by Davidson's method. A degenerate set that `states` cuts is whole.
 *
 * @param model - not of the whole sector
 * @param ceiling - states that lie above this, hartree, are not wanted, and need not be converged
 * @param lowest - the lowest state of the sectors before
 */
export function findSectorStates(
  problem: SectorProblem,
  model: ModelSpace,
  settings: StateSettings,
  ceiling: number,
  lowest?: KnownState,
): LowestStates {
  const maximumVectors = basisVectorLimit(settings.states, problem.dimension);
  if (settings.basisVectors !== undefined && settings.basisVectors < maximumVectors) {
    return findWithFewVectors(
      problem,
      model,
      { ...settings, basisVectors: settings.basisVectors },
      ceiling,
      lowest,
    );
  }
  const precondition = modelPreconditioner(model, problem.diagonal);
  const solve = (
    vectors: DavidsonProblem['guesses'],
    roots = settings.states,
    highest = ceiling,
    keepSpin?: (direction: Float64Array) => void,
  ) =>
    lowestEigenpairs(asDavidsonProblem(problem, precondition, vectors, settings, keepSpin), {
      ...settings,
      roots,
      ceiling: highest,
      trustsEstimates: (vector) => !isStronglyMixed(lowest ?? { value: 0, vector }),
      maximumVectors,
    });
  const { spin } = problem;
  const isMixed = (state: KnownState) =>
    isStronglyMixed(lowest && lowest.value < state.value ? lowest : state);
  const seedsOf = (value: number) =>
    seedsOfSpin(model, value).map((k) => spreadModelVector(model, k, problem.dimension));
  const bySpin =
    spin && problem.dimension <= LONGEST_BY_SPIN
      ? () => statesBySpin(problem, spin, { seedsOf, solve }, settings.states, ceiling)
      : undefined;
  if (bySpin && isMixed({ value: model.energies[0], vector: model.vectors[0] })) return bySpin();

  const probing = probes(problem, model, precondition);
  const { first, later } = divideGuesses(model, settings.states, ceiling, lowest, isMixed);
  const select = (candidates: readonly number[], count: number) =>
    selectGuesses(problem, model, precondition, candidates, count).map((k) => writeModelVector(model, k));
  const places = guessLimit(settings.states);
  const found = solve([...select(first, places), ...probing]);
  if (found.termination.kind !== 'converged') return found;
  const own = { value: found.values[0], vector: found.vectors[0] };
  if (!isMixed(own)) {
    const highest = found.values[Math.min(settings.states, found.values.length) - 1];
    const low = comingBelow(model, later, Math.min(ceiling, highest), model.energies[0] - own.value);
    if (low.length === 0) return found;
    const guarded = solve([...found.vectors, ...select(low, places - settings.states)]);
    return { ...guarded, iterations: found.iterations + guarded.iterations };
  }
  if (bySpin) return bySpin();
  const hidden = lowerStatesOfOtherSpins(problem, model, precondition, found, settings, ceiling);
  if (hidden.length === 0) return found;
  const again = solve([...found.vectors, ...hidden]);
  return { ...again, iterations: found.iterations + again.iterations };
}

/** Seeds of one spin: one of every spatial symmetry that an Abelian point group can have. */
const MOST_SEEDS = 8;
/** Residuals, hartree, at which a spin's lowest state is looked at, first roughly and then, if it comes near, closely. */
const ROUGH_RESIDUAL = 1e-2;
const CLOSE_RESIDUAL = 1e-4;
/** What a rough value may still fall, hartree: ‖r‖² over a gap of 5 mEh. */
const ROUGH_ERROR = 0.02;

/**
 * States below the highest one found that it has missed. H and the preconditioner keep the spin of a vector, so the
 * lowest state of every spin is sought by itself: what spins compete for in one iteration, they cannot lose here.
 * Only where the lowest state of all sectors is strongly mixed, as at a stretched multiple bond; else guards are enough.
 * Where H keeps spin exactly and the vectors are not too long, `statesBySpin` does it more thoroughly instead.
 */
function lowerStatesOfOtherSpins(
  problem: SectorProblem,
  model: ModelSpace,
  precondition: ReturnType<typeof modelPreconditioner>,
  found: LowestStates,
  settings: StateSettings,
  ceiling: number,
): Float64Array[] {
  const { lowest, guards } = chooseGuesses(model, settings.states);
  const highest = Math.min(ceiling, found.values[Math.min(settings.states, found.values.length) - 1]);
  const seek = (
    guesses: DavidsonProblem['guesses'],
    closeness: Pick<DavidsonOptions, 'residualTolerance' | 'ceiling' | 'guards'>,
  ) =>
    lowestEigenpairs(asDavidsonProblem(problem, precondition, guesses, settings), {
      ...settings,
      roots: 1,
      ...closeness,
      maximumVectors: basisVectorLimit(1, problem.dimension),
    });
  const hidden: Float64Array[] = [];
  for (const spin of new Set([...lowest, ...guards].map((k) => model.spins[k]))) {
    const start = [
      ...seedsOfSpin(model, spin).map((k) => writeModelVector(model, k)),
      mixtureOfSpin(model, spin, problem.dimension),
    ];
    const rough = seek(start, { residualTolerance: ROUGH_RESIDUAL, ceiling: highest + ROUGH_ERROR });
    if (rough.values[0] > highest + ROUGH_ERROR) continue;
    const { values, vectors } = seek([rough.vectors[0]], {
      residualTolerance: CLOSE_RESIDUAL,
      ceiling: highest,
      guards: false,
    });
    if (values[0] < highest && !isKnown(vectors[0], found.vectors)) hidden.push(vectors[0]);
  }
  return hidden;
}

/** The lowest model vector of every sector of one spin, rising, at most `MOST_SEEDS`. */
function seedsOfSpin(model: ModelSpace, spin: number): number[] {
  const seen = new Set<string>();
  return Array.from(model.energies.keys())
    .filter((k) => {
      if (model.spins[k] !== Math.round(spin) || seen.has(model.sectors[k])) return false;
      seen.add(model.sectors[k]);
      return true;
    })
    .slice(0, MOST_SEEDS);
}

/**
 * All model vectors of one spin, lower ones more, in arbitrary proportions: it has a part in every symmetry that the
 * blocks of H do not show, as when the orbitals have broken the molecule's.
 */
function mixtureOfSpin(model: ModelSpace, spin: number, dimension: number): Float64Array {
  const mixture = new Float64Array(dimension);
  const proportions = arbitraryNumbers(model.energies.length);
  model.vectors.forEach((vector, k) => {
    if (model.spins[k] !== spin) return;
    const factor = proportions[k] / (model.energies[k] - model.energies[0] + PROBE_SHIFT) ** 2;
    model.places.forEach((place, i) => {
      mixture[place] += factor * vector[i];
    });
  });
  return mixture;
}

/**
 * Low-lying vectors without any symmetry: H may have symmetries that no single basis state shows, and a state of
 * a kind that all guesses lack would never be found. Arbitrary numbers, drawn towards low energies by the inverse of
 * the preconditioner's matrix.
 */
function probes(
  problem: SectorProblem,
  model: ModelSpace,
  precondition: ReturnType<typeof modelPreconditioner>,
): Float64Array[] {
  const arbitrary = arbitraryNumbers(problem.dimension);
  const parts = problem.partsOf?.(arbitrary) ?? [arbitrary];
  const shift = model.energies[0] - PROBE_SHIFT;
  const between = new Float64Array(problem.dimension);
  return parts.slice(0, PROBES).map((part) => {
    const probe = new Float64Array(problem.dimension);
    precondition(part, shift, between);
    precondition(between, shift, probe);
    return probe;
  });
}

/** A state may come down from its model by so many times what the lowest state has come down from its own. */
const LOWERING_FACTOR = 3;

/** Model vectors of the list that may come down below a value. */
function comingBelow(
  model: ModelSpace,
  list: readonly number[],
  highest: number,
  lowering: number,
): readonly number[] {
  return list.filter((k) => model.energies[k] - LOWERING_FACTOR * lowering <= highest);
}

/**
 * Model vectors to start from at once, and guards that wait until the states are known: where one determinant dominates
 * the lowest state, what that has come down from its model tells which of the others can come so far.
 */
function divideGuesses(
  model: ModelSpace,
  states: number,
  ceiling: number,
  known: KnownState | undefined,
  isMixed: (state: KnownState) => boolean,
): { readonly first: readonly number[]; readonly later: readonly number[] } {
  const { lowest, guards } = chooseGuesses(model, states);
  const all = [...lowest, ...guards];
  if (isMixed({ value: model.energies[0], vector: model.vectors[0] })) return { first: all, later: [] };
  if (!known) return { first: all.slice(0, states), later: all.slice(states) };
  if (known.lowering === undefined) return { first: all, later: [] };
  const further = comingBelow(model, all.slice(states), ceiling, known.lowering);
  return { first: [...all.slice(0, states), ...further], later: [] };
}

/**
 * The first of the model vectors, as many as are allowed. Where there are more, one product with H tells by second-order
 * perturbation theory which of them lead to the lowest states.
 */
function selectGuesses(
  problem: SectorProblem,
  model: ModelSpace,
  precondition: ReturnType<typeof modelPreconditioner>,
  candidates: readonly number[],
  places: number,
): readonly number[] {
  if (candidates.length <= places) return candidates;

  const residual = new Float64Array(problem.dimension);
  const correction = new Float64Array(problem.dimension);
  const estimated = candidates.map((k) => {
    const guess = spreadModelVector(model, k, problem.dimension);
    problem.apply(guess, residual);
    addScaledInto(residual, -model.energies[k], guess);
    precondition(residual, model.energies[k], correction);
    return {
      k,
      energy: model.energies[k] - Math.abs(dot(residual, correction)),
    };
  });
  estimated.sort((a, b) => a.energy - b.energy);
  return estimated.slice(0, places).map(({ k }) => k);
}

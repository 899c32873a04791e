import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { offZero } from '../linear-algebra/davidson';
import { multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { diagonaliseWithin, splitRuns } from './degenerate-states';
import { type DeterminantSpace, determinantAt } from './determinant-space';
import type { Determinant } from './determinants';
import { hamiltonianElement, spinSquaredElement } from './matrix-elements';
import { MAXIMUM_GUARDS } from './size';

/**
 * The determinants of lowest spin-averaged energy, with H diagonalised among them: where the guesses come from,
 * and the part of the preconditioner that is exact. A model space of all determinants is the dense solution.
 */
export interface ModelSpace {
  /** places in the CI vector */
  readonly places: Int32Array;
  /** rising */
  readonly energies: Float64Array;
  /** over `places`, one per energy; of one spin, and of one symmetry as far as blocks of H show it */
  readonly vectors: readonly Float64Array[];
  /** equal for vectors of the same block of H and the same spin */
  readonly sectors: readonly string[];
}

/** Spin-averaged energies this close, in hartree, belong to one configuration, which is not torn. */
const SAME_CONFIGURATION = 1e-9;
/** Matrix elements below this, in hartree, do not join determinants into one block. */
const UNCOUPLED = 1e-10;
/** Guards come from sectors whose lowest model energy is less than this above the highest state wanted, hartree. */
const GUARD_WINDOW = 0.5;
/** Preconditioner denominators are kept at least this far from zero, hartree. */
const SMALLEST_DENOMINATOR = 1e-2;

export function buildModelSpace(
  space: DeterminantSpace,
  diagonal: Float64Array,
  integrals: OrbitalIntegrals,
  size: number,
): ModelSpace {
  const places = lowestPlaces(diagonal, size);
  const determinants = Array.from(places, (place) => determinantAt(space, place));
  const count = places.length;
  const hamiltonian = denseMatrix(determinants, (left, right) => hamiltonianElement(left, right, integrals));
  const found: { energy: number; vector: Float64Array; sector: string }[] = [];
  coupledBlocks(hamiltonian, count).forEach((members, block) => {
    for (const state of diagonaliseBlock(hamiltonian, determinants, members)) {
      found.push({ energy: state.energy, vector: state.vector, sector: `${block}:${state.twiceSpin}` });
    }
  });
  found.sort((a, b) => a.energy - b.energy);
  return {
    places,
    energies: Float64Array.from(found, (state) => state.energy),
    vectors: found.map((state) => state.vector),
    sectors: found.map((state) => state.sector),
  };
}

/** About `size` places of lowest value, cut where the value makes a step. */
function lowestPlaces(diagonal: Float64Array, size: number): Int32Array {
  const sorted = diagonal.slice().sort();
  let count = Math.min(size, sorted.length);
  while (count > 1 && count < sorted.length && sorted[count] - sorted[count - 1] < SAME_CONFIGURATION)
    count--;
  // one great degenerate set: no cut is better than another
  const torn = count <= size / 2 && sorted.length > size;
  const highest = torn ? sorted[size - 1] : sorted[count - 1];
  const places: number[] = [];
  for (let place = 0; place < diagonal.length && places.length < Math.max(count, size); place++) {
    if (diagonal[place] <= highest) places.push(place);
  }
  return Int32Array.from(places);
}

function denseMatrix(
  determinants: readonly Determinant[],
  element: (left: Determinant, right: Determinant) => number,
): Float64Array {
  const n = determinants.length;
  const matrix = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const value = element(determinants[i], determinants[j]);
      matrix[i * n + j] = value;
      matrix[j * n + i] = value;
    }
  }
  return matrix;
}

/** Sets of indices that the matrix joins: its blocks under the symmetries of the molecule. */
function coupledBlocks(matrix: Float64Array, n: number): number[][] {
  const blockOf = new Int32Array(n).fill(-1);
  const blocks: number[][] = [];
  for (let seed = 0; seed < n; seed++) {
    if (blockOf[seed] >= 0) continue;
    const members = [seed];
    blockOf[seed] = blocks.length;
    for (const i of members) {
      for (let j = 0; j < n; j++) {
        if (blockOf[j] >= 0 || Math.abs(matrix[i * n + j]) < UNCOUPLED) continue;
        blockOf[j] = blocks.length;
        members.push(j);
      }
    }
    blocks.push(members);
  }
  return blocks;
}

/** Eigenvectors of one block, of pure spin also where spins are degenerate. */
function diagonaliseBlock(
  hamiltonian: Float64Array,
  determinants: readonly Determinant[],
  members: number[],
) {
  const n = determinants.length;
  const size = members.length;
  const block = new Float64Array(size * size);
  members.forEach((i, row) => {
    members.forEach((j, column) => {
      block[row * size + column] = hamiltonian[i * n + j];
    });
  });
  const { values, vectors: columns } = symmetricEigen(block, size);
  const vectors = Array.from({ length: size }, (_, k) => values.map((_, i) => columns[i * size + k]));
  const spinSquared = denseMatrix(
    members.map((i) => determinants[i]),
    spinSquaredElement,
  );
  const runs = splitRuns([{ first: 0, last: size }], values, UNCOUPLED);
  const spins = diagonaliseWithin(runs, values, vectors, (vector, product) => {
    product.set(multiply(spinSquared, vector, size, size, 1));
  });
  return vectors.map((vector, k) => {
    const whole = new Float64Array(n);
    members.forEach((i, row) => {
      whole[i] = vector[row];
    });
    const twiceSpin = Math.round(Math.sqrt(Math.max(0, 1 + 4 * spins[k])) - 1);
    return { energy: values[k], vector: whole, twiceSpin };
  });
}

/**
 * Which model vectors to start from: the lowest `states`, the next one, and the lowest of every other sector
 * near in energy, `MAXIMUM_GUARDS` at most beyond the states. A product with H never leaves the sectors of the
 * guesses, so a sector without a guess can have no root.
 */
export function chooseGuesses(model: ModelSpace, states: number): number[] {
  const total = model.energies.length;
  const wanted = Math.min(states, total);
  const chosen = Array.from({ length: wanted }, (_, k) => k);
  const sectors = new Set(chosen.map((k) => model.sectors[k]));
  const window = model.energies[wanted - 1] + GUARD_WINDOW;
  for (let k = wanted; k < total && chosen.length < wanted + MAXIMUM_GUARDS; k++) {
    const isNext = k === wanted;
    const isNewSector = !sectors.has(model.sectors[k]) && model.energies[k] < window;
    if (!isNext && !isNewSector) continue;
    chosen.push(k);
    sectors.add(model.sectors[k]);
  }
  return chosen;
}

/** A model vector spread over the CI space, into `vector`. */
export function spreadModelVector(model: ModelSpace, k: number, vector: Float64Array): void {
  vector.fill(0);
  model.places.forEach((place, i) => {
    vector[place] = model.vectors[k][i];
  });
}

/**
 * result ← (M − shift)⁻¹·vector, with M equal to H within the model space and diagonal (spin-averaged) outside:
 * sound also where several determinants lie close together.
 */
export function modelPreconditioner(model: ModelSpace, diagonal: Float64Array) {
  const size = model.places.length;
  const inside = new Float64Array(size);
  const solved = new Float64Array(size);
  return (vector: Float64Array, shift: number, result: Float64Array): void => {
    for (let i = 0; i < vector.length; i++) {
      result[i] = vector[i] / offZero(diagonal[i] - shift, SMALLEST_DENOMINATOR);
    }
    model.places.forEach((place, i) => {
      inside[i] = vector[place];
    });
    solved.fill(0);
    model.vectors.forEach((state, k) => {
      let overlap = 0;
      for (let i = 0; i < size; i++) overlap += state[i] * inside[i];
      const factor = overlap / offZero(model.energies[k] - shift, SMALLEST_DENOMINATOR);
      for (let i = 0; i < size; i++) solved[i] += factor * state[i];
    });
    model.places.forEach((place, i) => {
      result[place] = solved[i];
    });
  };
}

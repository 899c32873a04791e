import { offZero } from '../linear-algebra/davidson';
import { multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { diagonaliseWithin, splitRuns } from './degenerate-states';
import { MAXIMUM_GUARDS } from './size';

/**
 * The basis states of lowest diagonal energy, with H diagonalised among them: where the guesses come from, and
 * the part of the preconditioner that is exact. A model space of all basis states is the dense solution.
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

/** Elements of H, and of S² where states have spins to tell, among a few basis states. */
export interface ModelElements {
  hamiltonian(i: number, j: number): number;
  spinSquared?(i: number, j: number): number;
}

/**
 * @param diagonal - by whose values the places are chosen, hartree
 * @param size - about how many
 * @param elementsAmong - the elements among the places chosen, i and j counting in their list
 */
export function buildModelSpace(
  diagonal: Float64Array,
  size: number,
  elementsAmong: (places: Int32Array) => ModelElements,
): ModelSpace {
  const places = lowestPlaces(diagonal, size);
  const elements = elementsAmong(places);
  const count = places.length;
  const hamiltonian = symmetricMatrix(count, elements.hamiltonian);
  const found: { energy: number; vector: Float64Array; sector: string }[] = [];
  coupledBlocks(hamiltonian, count).forEach((members, block) => {
    for (const { energy, vector, spin } of diagonaliseBlock(
      hamiltonian,
      count,
      members,
      elements.spinSquared,
    )) {
      found.push({ energy, vector, sector: `${block}:${spin}` });
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

function symmetricMatrix(n: number, element: (i: number, j: number) => number): Float64Array {
  const matrix = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const value = element(i, j);
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

/** Eigenvectors of one block, of pure spin also where spins are degenerate; `spin` is ⟨S²⟩ rounded. */
function diagonaliseBlock(
  hamiltonian: Float64Array,
  n: number,
  members: readonly number[],
  spinSquared: ModelElements['spinSquared'],
) {
  const size = members.length;
  const block = symmetricMatrix(size, (row, column) => hamiltonian[members[row] * n + members[column]]);
  const { values, vectors: columns } = symmetricEigen(block, size);
  const vectors = Array.from({ length: size }, (_, k) => values.map((_, i) => columns[i * size + k]));
  let spins: Float64Array = new Float64Array(size);
  if (spinSquared) {
    const operator = symmetricMatrix(size, (row, column) => spinSquared(members[row], members[column]));
    const runs = splitRuns([{ first: 0, last: size }], values, UNCOUPLED);
    spins = diagonaliseWithin(runs, values, vectors, (vector, product) => {
      product.set(multiply(operator, vector, size, size, 1));
    });
  }
  return vectors.map((vector, k) => {
    const whole = new Float64Array(n);
    members.forEach((i, row) => {
      whole[i] = vector[row];
    });
    return { energy: values[k], vector: whole, spin: Math.round(spins[k]) };
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

/** A model vector as a vector of the whole space. */
export function spreadModelVector(model: ModelSpace, k: number, dimension: number): Float64Array {
  const vector = new Float64Array(dimension);
  model.places.forEach((place, i) => {
    vector[place] = model.vectors[k][i];
  });
  return vector;
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

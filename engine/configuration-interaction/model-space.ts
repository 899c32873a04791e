import { offZero } from '../linear-algebra/davidson';
import { congruence, multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { diagonaliseWithin, splitRuns } from './degenerate-states';

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
  /** ⟨S²⟩ of each, rounded; 0 where states have no spins to tell */
  readonly spins: readonly number[];
  /** lowest diagonal energy among `places` */
  readonly lowestDiagonal: number;
}

/** Spin-averaged energies this close, in hartree, belong to one configuration, which is not torn. */
const SAME_CONFIGURATION = 1e-9;
/** Matrix elements below this, in hartree, do not join determinants into one block. */
const UNCOUPLED = 1e-10;
/** Basis states of one block from which it pays to take one spin after the other. */
const FEWEST_BY_SPIN = 24;
/** Guards are taken up to this far above the highest state wanted, hartree … */
const GUARD_WINDOW = 0.5;
/** … and so many times the energy by which the model's lowest state lies below its lowest single configuration. */
const CORRELATION_FACTOR = 2;
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
  const found: { energy: number; vector: Float64Array; sector: string; spin: number }[] = [];
  coupledBlocks(hamiltonian, count).forEach((members, block) => {
    for (const { energy, vector, spin } of diagonaliseBlock(
      hamiltonian,
      count,
      members,
      elements.spinSquared,
    )) {
      found.push({ energy, vector, sector: `${block}:${spin}`, spin });
    }
  });
  found.sort((a, b) => a.energy - b.energy);
  return {
    places,
    energies: Float64Array.from(found, (state) => state.energy),
    vectors: found.map((state) => state.vector),
    sectors: found.map((state) => state.sector),
    spins: found.map((state) => state.spin),
    lowestDiagonal: places.reduce((low, place) => Math.min(low, diagonal[place]), Number.POSITIVE_INFINITY),
  };
}

/** The lowest values, rising: so many, or all. */
function lowestValues(values: Float64Array, count: number): Float64Array {
  const found = new Float64Array(Math.min(values.length, 8 * count));
  let size = 0;
  let highest = Number.POSITIVE_INFINITY;
  for (const value of values) {
    if (value >= highest) continue;
    found[size++] = value;
    if (size < found.length) continue;
    found.sort();
    size = Math.min(size, count);
    highest = found[size - 1];
  }
  return found.subarray(0, size).sort().subarray(0, count);
}

/** About `size` places of lowest value, cut where the value makes a step. */
function lowestPlaces(diagonal: Float64Array, size: number): Int32Array {
  const total = diagonal.length;
  const sorted = lowestValues(diagonal, size + 1);
  let count = Math.min(size, total);
  while (count > 1 && count < total && sorted[count] - sorted[count - 1] < SAME_CONFIGURATION) count--;
  // one great degenerate set: no cut is better than another
  const torn = count <= size / 2 && total > size;
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
  const operator =
    spinSquared && symmetricMatrix(size, (row, column) => spinSquared(members[row], members[column]));
  const found = (operator && diagonaliseBySpin(block, operator, size)) ?? diagonalise(block, operator, size);
  return found.map(({ energy, vector, spin }) => {
    const whole = new Float64Array(n);
    members.forEach((i, row) => {
      whole[i] = vector[row];
    });
    return { energy, vector: whole, spin: Math.round(spin) };
  });
}

interface BlockState {
  readonly energy: number;
  readonly vector: Float64Array;
  /** ⟨S²⟩ */
  readonly spin: number;
}

function diagonalise(block: Float64Array, operator: Float64Array | undefined, size: number): BlockState[] {
  const { values, vectors: columns } = symmetricEigen(block, size);
  const vectors = Array.from({ length: size }, (_, k) => columnOf(columns, size, k));
  let spins: Float64Array = new Float64Array(size);
  if (operator) {
    const runs = splitRuns([{ first: 0, last: size }], values, UNCOUPLED);
    spins = diagonaliseWithin(runs, values, vectors, (vector, product) => {
      product.set(multiply(operator, vector, size, size, 1));
    });
  }
  return vectors.map((vector, k) => ({ energy: values[k], vector, spin: spins[k] }));
}

/**
 * One spin after the other, over the eigenvectors of S²: smaller matrices, the largest half as wide or less.
 *
 * @returns undefined where the basis states do not close under spin, so that H joins those eigenvectors
 */
function diagonaliseBySpin(
  block: Float64Array,
  operator: Float64Array,
  size: number,
): BlockState[] | undefined {
  if (size < FEWEST_BY_SPIN) return undefined;
  const { columns, spins } = spinFunctions(operator, size);
  const transformed = congruence(block, columns, size, size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < i; j++) {
      if (spins[i] !== spins[j] && Math.abs(transformed[i * size + j]) > UNCOUPLED) return undefined;
    }
  }
  return [...new Set(spins)].flatMap((spin) => {
    const members = [...spins.keys()].filter((k) => spins[k] === spin);
    const count = members.length;
    const ofSpin = symmetricMatrix(count, (i, j) => transformed[members[i] * size + members[j]]);
    const { values, vectors } = symmetricEigen(ofSpin, count);
    const chosen = new Float64Array(size * count);
    for (let row = 0; row < size; row++) {
      for (let k = 0; k < count; k++) chosen[row * count + k] = columns[row * size + members[k]];
    }
    const whole = multiply(chosen, vectors, size, count, count);
    return Array.from(values, (energy, k) => ({ energy, vector: columnOf(whole, count, k), spin }));
  });
}

/** Eigenvectors of S², each within a set of basis states that S² joins, and their eigenvalues rounded. */
function spinFunctions(operator: Float64Array, size: number) {
  const columns = new Float64Array(size * size);
  const spins = new Float64Array(size);
  let place = 0;
  for (const members of coupledBlocks(operator, size)) {
    const count = members.length;
    const set = symmetricMatrix(count, (i, j) => operator[members[i] * size + members[j]]);
    const { values, vectors } = symmetricEigen(set, count);
    for (let k = 0; k < count; k++, place++) {
      spins[place] = Math.round(values[k]);
      for (let i = 0; i < count; i++) columns[members[i] * size + place] = vectors[i * count + k];
    }
  }
  return { columns, spins };
}

/** Column k of a matrix with so many columns. */
function columnOf(matrix: Float64Array, columns: number, k: number): Float64Array {
  return Float64Array.from({ length: matrix.length / columns }, (_, row) => matrix[row * columns + k]);
}

/** Model vectors by their number. */
export interface GuessChoice {
  /** the lowest `states`, and the one after them */
  readonly lowest: readonly number[];
  /** the next one of every sector in which a lower state may hide than the model shows */
  readonly guards: readonly number[];
}

/**
 * Which model vectors to start from. A product with H never leaves the sectors of the guesses, so a sector without
 * a guess can have no root. What the model lacks differs from sector to sector, the more the stronger the
 * configurations mix: so the window for guards grows with the correlation that the model shows.
 */
export function chooseGuesses(model: ModelSpace, states: number): GuessChoice {
  const total = model.energies.length;
  const lowest = Array.from({ length: Math.min(states + 1, total) }, (_, k) => k);
  const correlation = model.lowestDiagonal - model.energies[0];
  const highestWanted = model.energies[Math.min(states, total) - 1];
  const limit = highestWanted + GUARD_WINDOW + CORRELATION_FACTOR * correlation;
  const guards: number[] = [];
  const guarded = new Set<string>();
  for (let k = lowest.length; k < total && model.energies[k] < limit; k++) {
    if (guarded.has(model.sectors[k])) continue;
    guards.push(k);
    guarded.add(model.sectors[k]);
  }
  return { lowest, guards };
}

/** Writes a model vector into a vector of the whole space that holds zeros. */
export function writeModelVector(model: ModelSpace, k: number): (into: Float64Array) => void {
  return (into) => {
    model.places.forEach((place, i) => {
      into[place] = model.vectors[k][i];
    });
  };
}

/** A model vector as a vector of the whole space. */
export function spreadModelVector(model: ModelSpace, k: number, dimension: number): Float64Array {
  const vector = new Float64Array(dimension);
  writeModelVector(model, k)(vector);
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

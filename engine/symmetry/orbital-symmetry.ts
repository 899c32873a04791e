import type { PlacedBasis } from '../basis/contracted-gaussian';
import { congruence, multiply, multiplyLeftTransposed } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import type { Molecule } from '../molecule/molecule';
import { axialMomentum } from './axial-momentum';
import { applyAction, axialRotationAction, type BasisAction, operationAction } from './basis-action';
import type { MolecularSymmetry } from './point-group';
import { POINT_GROUPS } from './point-groups';

/** Orbitals of one spin (or of both alike) in a basis. */
export interface OrbitalSet {
  /** functions × orbitals, row-major, orthonormal */
  readonly coefficients: Float64Array;
  /** hartree */
  readonly energies: Float64Array;
}

/**
 * Orbitals of which each belongs to one irreducible representation, as far as symmetry allows, of the group in the
 * axes that were given.
 */
export interface SymmetricOrbitals extends OrbitalSet {
  /** number of each orbital's representation, multiplied by exclusive or; undefined where it has none */
  readonly irreps: readonly (number | undefined)[];
  /** ⟨p|R|q⟩ of the generators of the group, each orbitals × orbitals, row-major */
  readonly operations: readonly Float64Array[];
  /**
   * ⟨p| ∂/∂φ |q⟩ about the axis of a linear molecule, antisymmetric, orbitals × orbitals, row-major: i times the
   * angular momentum
   */
  readonly axialRotation?: Float64Array;
  /** |λ| of each orbital of a linear molecule; undefined where it has none */
  readonly lambdas: readonly (number | undefined)[];
}

/** Orbitals this close in energy, in hartree, may be turned among themselves: what convergence leaves of a degeneracy. */
export const SAME_ORBITAL_ENERGY = 1e-5;
/** Largest weight of other representations in an orbital that is said to belong to one. */
export const IMPURITY = 1e-4;

/**
 * Finds the representation of every orbital, and turns degenerate orbitals among themselves so that each has one.
 * Within a degenerate set the orbitals then stand in order of their representations. Orbitals of a determinant that
 * breaks the symmetry have none.
 *
 * @param overlap - of the functions, n×n
 * @param boundaries - numbers of orbitals that degenerate sets must not reach across: frozen, occupied
 */
export function symmetriseOrbitals(
  molecule: Molecule,
  basis: PlacedBasis,
  overlap: Float64Array,
  symmetry: MolecularSymmetry,
  orbitals: OrbitalSet,
  boundaries: readonly number[],
): SymmetricOrbitals {
  const n = basis.functionCount;
  const m = orbitals.energies.length;
  const actions = POINT_GROUPS[symmetry.pointGroup].generators.map((signs) =>
    operationAction(molecule, basis, symmetry, signs),
  );
  const rotation = symmetry.linear && axialRotationAction(basis, symmetry);

  const { coefficients, energies } = makePure(orbitals, overlap, n, actions, rotation, boundaries);
  const dual = multiply(overlap, coefficients, n, n, m);
  const operations = actions.map((action) =>
    multiplyLeftTransposed(dual, applyAction(action, coefficients, m), m, n, m),
  );
  const irreps = Array.from({ length: m }, (_, p) => {
    const isPure = operations.every((matrix) => (1 - Math.abs(matrix[p * (m + 1)])) / 2 <= IMPURITY);
    return isPure
      ? operations.reduce((bits, matrix, b) => bits | (Number(matrix[p * (m + 1)] < 0) << b), 0)
      : undefined;
  });
  const images = rotation && applyAction(rotation, coefficients, m);
  const squares = images && diagonal(multiply(overlap, images, n, n, m), images, n, m);
  return {
    coefficients,
    energies,
    irreps,
    operations,
    ...(images && { axialRotation: multiplyLeftTransposed(dual, images, m, n, m) }),
    lambdas: irreps.map((irrep, p) =>
      squares && irrep !== undefined ? axialMomentum(irrep, squares[p]) : undefined,
    ),
  };
}

/**
 * In every degenerate set makes one matrix diagonal that holds all commuting operators, each scaled so that no two
 * combinations of their eigenvalues come together: generators ±1, ±2, ±4, and the squared angular momentum, a whole
 * number, 16 times. What it leaves degenerate, the energy separates.
 */
function makePure(
  { coefficients, energies }: OrbitalSet,
  overlap: Float64Array,
  n: number,
  actions: readonly BasisAction[],
  rotation: BasisAction | undefined,
  boundaries: readonly number[],
): OrbitalSet {
  const m = energies.length;
  const pure = { coefficients: coefficients.slice(), energies: energies.slice() };
  for (const [first, end] of degenerateRuns(energies, boundaries)) {
    const size = end - first;
    if (size === 1) continue;
    const block = columns(coefficients, n, m, first, size);
    const dual = multiply(overlap, block, n, n, size);
    const labels = new Float64Array(size * size);
    actions.forEach((action, b) => {
      const matrix = multiplyLeftTransposed(dual, applyAction(action, block, size), size, n, size);
      // − so that the representations rise with their numbers
      for (let i = 0; i < labels.length; i++) labels[i] -= 2 ** b * matrix[i];
    });
    if (rotation) {
      const square = congruence(overlap, applyAction(rotation, block, size), n, size);
      for (let i = 0; i < labels.length; i++) labels[i] += 16 * square[i];
    }
    const turn = separateByEnergy(symmetricEigen(symmetrised(labels, size), size), energies, first);
    const turned = multiply(block, turn, n, size, size);
    for (let i = 0; i < n; i++) {
      pure.coefficients.set(turned.subarray(i * size, (i + 1) * size), i * m + first);
    }
    for (let k = 0; k < size; k++) {
      pure.energies[first + k] = energyOf(turn, energies, first, k);
    }
  }
  return pure;
}

/** Eigenvalues of the labels less than this apart are the same label. */
const SAME_LABEL = 0.5;

/** Turns vectors of one label among themselves so that they do not couple through the energies. */
function separateByEnergy(
  { values, vectors }: ReturnType<typeof symmetricEigen>,
  energies: Float64Array,
  first: number,
): Float64Array {
  const size = values.length;
  const turn = vectors.slice();
  for (let start = 0, end = 1; start < size; start = end++) {
    while (end < size && values[end] - values[end - 1] < SAME_LABEL) end++;
    const count = end - start;
    if (count === 1) continue;
    const block = columns(vectors, size, size, start, count);
    const scaled = block.map((value, index) => value * energies[first + Math.trunc(index / count)]);
    const coupling = multiplyLeftTransposed(block, scaled, count, size, count);
    const turned = multiply(block, symmetricEigen(coupling, count).vectors, size, count, count);
    for (let i = 0; i < size; i++) {
      turn.set(turned.subarray(i * count, (i + 1) * count), i * size + start);
    }
  }
  return turn;
}

function energyOf(turn: Float64Array, energies: Float64Array, first: number, k: number): number {
  const size = Math.sqrt(turn.length);
  let energy = 0;
  for (let i = 0; i < size; i++) energy += turn[i * size + k] ** 2 * energies[first + i];
  return energy;
}

/** First and end of every run of neighbours closer than `SAME_ORBITAL_ENERGY`. */
function degenerateRuns(energies: Float64Array, boundaries: readonly number[]): [number, number][] {
  const runs: [number, number][] = [];
  energies.forEach((energy, p) => {
    const last = runs.at(-1);
    if (last && Math.abs(energy - energies[p - 1]) < SAME_ORBITAL_ENERGY && !boundaries.includes(p))
      last[1] = p + 1;
    else runs.push([p, p + 1]);
  });
  return runs;
}

function columns(matrix: Float64Array, n: number, m: number, first: number, count: number): Float64Array {
  const part = new Float64Array(n * count);
  for (let i = 0; i < n; i++) part.set(matrix.subarray(i * m + first, i * m + first + count), i * count);
  return part;
}

function symmetrised(matrix: Float64Array, size: number): Float64Array {
  return matrix.map((value, index) => {
    const [i, j] = [Math.trunc(index / size), index % size];
    return (value + matrix[j * size + i]) / 2;
  });
}

/** ⟨p|image of p⟩ for every orbital. */
function diagonal(dual: Float64Array, images: Float64Array, n: number, m: number): Float64Array {
  const values = new Float64Array(m);
  for (let i = 0; i < n; i++) {
    for (let p = 0; p < m; p++) values[p] += dual[i * m + p] * images[i * m + p];
  }
  return values;
}

import { congruence, multiply } from '../linear-algebra/dense';
import type { MeanFieldProblem } from './mean-field-problem';
import type { RotationFunctional, RotationPoint } from './minimiser';
import { buildDensity, reorthonormalise } from './orbitals';
import type { Orthogonalisation } from './orthogonalisation';

/**
 * A determinant with what its energy and derivatives need. Where the spins have orbitals of their own, arrays hold
 * the alpha part followed by the beta part.
 */
export interface MeanFieldPoint extends RotationPoint {
  readonly fock: Float64Array;
}

/** One kind of Hartree–Fock: an energy over orbital rotations, and the aufbau step that extrapolation drives. */
export interface MeanFieldFunctional<P extends MeanFieldPoint> extends RotationFunctional<P> {
  readonly problem: MeanFieldProblem;
  /** orbitals of lowest energy in a Fock matrix, occupied ones first */
  aufbau(fock: Float64Array): Float64Array;
  /** FDS − SDF in orthonormal functions, hartree: zero at every stationary determinant */
  commutator(point: P): Float64Array;
  /** Fock matrix to begin with; undefined where the start is of no use */
  startingFock(start: StartingPoint): Float64Array | undefined;
}

/** Where a self-consistent field starts from. */
export type StartingPoint =
  /** spin-summed density, n×n */
  | { readonly kind: 'density'; readonly density: Float64Array }
  /** occupied orbitals, n×occupied row-major, orthonormal in this or a neighbouring geometry's overlap */
  | { readonly kind: 'occupiedOrbitals'; readonly alpha: Float64Array; readonly beta: Float64Array };

/** One-spin densities of a start, the alpha and beta electrons filling the given orbitals. */
export function startingDensities(
  start: StartingPoint,
  { overlap, functionCount: n }: MeanFieldProblem,
): { readonly alpha: Float64Array; readonly beta: Float64Array } | undefined {
  if (start.kind === 'density') {
    const half = start.density.map((value) => value / 2);
    return { alpha: half, beta: half };
  }
  const [alpha, beta] = [start.alpha, start.beta].map((coefficients) => {
    const occupied = coefficients.length / n;
    const orbitals = reorthonormalise(coefficients, overlap, n, occupied);
    return orbitals && buildDensity(orbitals, n, occupied, occupied);
  });
  return alpha && beta ? { alpha, beta } : undefined;
}

/** FDS − SDF over the functions X, m×m. */
export function fockCommutator(
  fock: Float64Array,
  density: Float64Array,
  overlap: Float64Array,
  n: number,
  { transformation, orbitalCount }: Orthogonalisation,
): Float64Array {
  const fds = multiply(multiply(fock, density, n, n, n), overlap, n, n, n);
  const difference = new Float64Array(n * n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) difference[i * n + j] = fds[i * n + j] - fds[j * n + i];
  return congruence(difference, transformation, n, orbitalCount);
}

/** The first columns of an n×m matrix: the occupied orbitals. */
export function firstColumns(matrix: Float64Array, n: number, m: number, count: number): Float64Array {
  return columnRange(matrix, n, m, 0, count);
}

/** Columns `first` to `end` (exclusive) of an n×m matrix. */
export function columnRange(
  matrix: Float64Array,
  n: number,
  m: number,
  first: number,
  end: number,
): Float64Array {
  const size = end - first;
  const part = new Float64Array(n * size);
  for (let i = 0; i < n; i++) part.set(matrix.subarray(i * m + first, i * m + end), i * size);
  return part;
}

import { congruence } from '../linear-algebra/dense';
import { coulombExchangeInto } from './coulomb-exchange';
import { HalfTransformed } from './half-transformed';
import { rowsOfPacked, transformMatrices } from './matrix-transformation';
import { type OrbitalIntegrals, packedPair } from './orbital-integrals';

/** Integrals over basis functions and the orbitals to bring them to. */
export interface OrbitalTransformationInput {
  /** core Hamiltonian over n basis functions, n×n symmetric, row-major, hartree */
  readonly oneElectron: Float64Array;
  /** 8-fold packed over basis functions, as `electronRepulsionTensor` gives it, hartree */
  readonly repulsion: Float64Array;
  /** n × m row-major, functions × orbitals, orthonormal */
  readonly coefficients: Float64Array;
  /** m */
  readonly orbitalCount: number;
  /** the first so many orbitals stay doubly occupied and are folded into energy and one-electron part */
  readonly frozen: number;
  /** the next so many orbitals are kept */
  readonly active: number;
  /** hartree */
  readonly nuclearRepulsion: number;
}

/**
 * Hamiltonian over the active orbitals, the mean field of the frozen ones included.
 *
 * Frozen orbitals enter through F = h + Σ_f (2J_f − K_f): the active one-electron part is F, and the core energy is
 * nuclear repulsion + Σ_f (h_ff + F_ff).
 *
 * Cost: two sweeps of O(n⁴·active/2) multiplications, by pairs of indices, the second about half; besides input and
 * result it holds the half-transformed integrals, n(n + 1)/2 × active(active + 1)/2 numbers.
 */
export function transformToOrbitals(input: OrbitalTransformationInput): OrbitalIntegrals {
  const { oneElectron, repulsion, coefficients, orbitalCount, frozen, active, nuclearRepulsion } = input;
  const n = coefficients.length / orbitalCount;
  const frozenOrbitals = selectColumns(coefficients, orbitalCount, 0, frozen);
  const activeOrbitals = selectColumns(coefficients, orbitalCount, frozen, active);

  const density = frozenDensity(frozenOrbitals, n, frozen);
  const meanField = frozen === 0 ? oneElectron : frozenMeanField(oneElectron, repulsion, density, density, n);
  let coreEnergy = nuclearRepulsion;
  const frozenCore = transformOneElectron(oneElectron, frozenOrbitals, n, frozen);
  const frozenField = transformOneElectron(meanField, frozenOrbitals, n, frozen);
  for (let f = 0; f < frozen; f++) coreEnergy += frozenCore[f * frozen + f] + frozenField[f * frozen + f];

  return {
    orbitalCount: active,
    coreEnergy,
    oneElectron: transformOneElectron(meanField, activeOrbitals, n, active),
    twoElectron: transformTwoElectron(repulsion, activeOrbitals, n, active),
  };
}

/**
 * CᵀMC of a symmetric matrix.
 *
 * @param matrix - n×n symmetric, row-major
 * @param coefficients - n×m, row-major
 * @returns m×m symmetric, row-major
 */
export function transformOneElectron(
  matrix: Float64Array,
  coefficients: Float64Array,
  n: number,
  m: number,
): Float64Array {
  const result = congruence(matrix, coefficients, n, m);
  for (let p = 0; p < m; p++) {
    for (let q = 0; q < p; q++) result[q * m + p] = result[p * m + q];
  }
  return result;
}

/** (pq|rs) over orbitals, 8-fold packed. */
export function transformTwoElectron(
  repulsion: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
): Float64Array {
  return transformFirstPair(repulsion, orbitals, n, m, (half) => transformEqualPair(half, orbitals, n));
}

/** Gives `use` the (pq|μν) of all p ≥ q; they end with it. */
export function transformFirstPair<Result>(
  repulsion: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
  use: (halfTransformed: HalfTransformed) => Result,
): Result {
  const functionPairs = (n * (n + 1)) / 2;
  return HalfTransformed.use(functionPairs, (m * (m + 1)) / 2, (halfTransformed) => {
    transformMatrices({
      matrices: rowsOfPacked(repulsion, functionPairs),
      n,
      left: orbitals,
      right: orbitals,
      take: (first, width, results) => halfTransformed.keep(first, width, results),
    });
    return use(halfTransformed);
  });
}

/** (pq|rs) with all four out of the same orbitals, 8-fold packed. */
export function transformEqualPair(
  halfTransformed: HalfTransformed,
  orbitals: Float64Array,
  n: number,
): Float64Array {
  const orbitalPairs = halfTransformed.count;
  const result = new Float64Array((orbitalPairs * (orbitalPairs + 1)) / 2);
  transformMatrices({
    matrices: halfTransformed,
    n,
    left: orbitals,
    right: orbitals,
    // rs ≤ pq, so that r is at most the higher orbital of the last pq
    orbitalsNeeded: (last) => Math.floor((Math.sqrt(8 * last + 1) - 1) / 2) + 1,
    take: (first, width, results) =>
      turnRoundInto(
        result,
        results,
        width,
        (k) => packedPair(first + k, 0),
        (k) => first + k + 1,
      ),
  });
  return result;
}

/** (pq|rs) with r, s out of other orbitals than p, q: pairs × pairs, a row for each pair pq. */
export function transformOtherPair(
  halfTransformed: HalfTransformed,
  orbitals: Float64Array,
  n: number,
): Float64Array {
  const orbitalPairs = halfTransformed.count;
  const result = new Float64Array(orbitalPairs ** 2);
  transformMatrices({
    matrices: halfTransformed,
    n,
    left: orbitals,
    right: orbitals,
    take: (first, width, results) =>
      turnRoundInto(
        result,
        results,
        width,
        (k) => (first + k) * orbitalPairs,
        () => orbitalPairs,
      ),
  });
  return result;
}

/** Columns that are turned into rows together: the numbers of one line of the cache. */
const TOGETHER = 8;

/** target[start(k) + i] ← results[i·width + k], for i below length(k), which never falls from one k to the next. */
function turnRoundInto(
  target: Float64Array,
  results: Float64Array,
  width: number,
  start: (k: number) => number,
  length: (k: number) => number,
): void {
  for (let first = 0; first < width; first += TOGETHER) {
    const end = Math.min(first + TOGETHER, width);
    const starts = Array.from({ length: end - first }, (_, j) => start(first + j));
    const common = length(first);
    for (let i = 0; i < common; i++) {
      const source = i * width + first;
      for (let j = 0; j < starts.length; j++) target[starts[j] + i] = results[source + j];
    }
    for (let k = first + 1; k < end; k++) {
      const row = start(k);
      for (let i = common; i < length(k); i++) target[row + i] = results[i * width + k];
    }
  }
}

/** Σ_f C_f C_fᵀ over n functions. */
export function frozenDensity(frozenOrbitals: Float64Array, n: number, frozen: number): Float64Array {
  const density = new Float64Array(n * n);
  for (let mu = 0; mu < n; mu++) {
    for (let nu = 0; nu < n; nu++) {
      for (let f = 0; f < frozen; f++) {
        density[mu * n + nu] += frozenOrbitals[mu * frozen + f] * frozenOrbitals[nu * frozen + f];
      }
    }
  }
  return density;
}

/** h + J − K over n functions, in the field of frozen electrons of the same and of the other spin. */
export function frozenMeanField(
  oneElectron: Float64Array,
  repulsion: Float64Array,
  sameSpin: Float64Array,
  otherSpin: Float64Array,
  n: number,
): Float64Array {
  const matrices = () => [new Float64Array(n * n), new Float64Array(n * n)];
  const [coulomb, exchange] = matrices();
  coulombExchangeInto(sameSpin, repulsion, n, coulomb, exchange);
  let otherCoulomb = coulomb;
  if (otherSpin !== sameSpin) {
    const [ofOther, unused] = matrices();
    coulombExchangeInto(otherSpin, repulsion, n, ofOther, unused);
    otherCoulomb = ofOther;
  }
  return oneElectron.map((h, i) => h + coulomb[i] + otherCoulomb[i] - exchange[i]);
}

/** `count` columns of a row-major matrix with `columns` columns, from `first` on. */
export function selectColumns(
  matrix: Float64Array,
  columns: number,
  first: number,
  count: number,
): Float64Array {
  const rows = matrix.length / columns;
  const selected = new Float64Array(rows * count);
  for (let row = 0; row < rows; row++) {
    for (let i = 0; i < count; i++) selected[row * count + i] = matrix[row * columns + first + i];
  }
  return selected;
}

import { transposedProductInto } from './contraction';
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
 * Cost: two sweeps of O(n⁴·active/2) multiplications, by pairs of indices; besides input and result it holds the
 * half-transformed integrals, n(n + 1)/2 × active(active + 1)/2 numbers.
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
  const result = new Float64Array(m * m);
  congruenceInto(matrix, coefficients, n, m, new Float64Array(n * m), result);
  return result;
}

/** result = CᵀMC for symmetric M; `half` holds MC, n×m. */
function congruenceInto(
  matrix: Float64Array,
  coefficients: Float64Array,
  n: number,
  m: number,
  half: Float64Array,
  result: Float64Array,
): void {
  transposedProductInto(matrix, n, coefficients, m, n, half);
  transposedProductInto(coefficients, m, half, m, n, result, true);
  for (let p = 0; p < m; p++) {
    for (let q = 0; q < p; q++) result[q * m + p] = result[p * m + q];
  }
}

/** (pq|rs) over orbitals, 8-fold packed. */
export function transformTwoElectron(
  repulsion: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
): Float64Array {
  return transformEqualPair(transformFirstPair(repulsion, orbitals, n, m), orbitals, n, m);
}

/** (pq|μν), a row for each orbital pair, so that the second sweep runs along memory. */
export function transformFirstPair(
  repulsion: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
): Float64Array {
  const functionPairs = (n * (n + 1)) / 2;
  const orbitalPairs = (m * (m + 1)) / 2;
  const square = new Float64Array(n * n);
  const half = new Float64Array(n * m);
  const transformed = new Float64Array(m * m);
  const halfTransformed = new Float64Array(orbitalPairs * functionPairs);
  for (let pair = 0; pair < functionPairs; pair++) {
    for (let mu = 0, other = 0; mu < n; mu++) {
      for (let nu = 0; nu <= mu; nu++, other++) {
        const value = repulsion[packedPair(pair, other)];
        square[mu * n + nu] = value;
        square[nu * n + mu] = value;
      }
    }
    congruenceInto(square, orbitals, n, m, half, transformed);
    for (let p = 0, orbitalPair = 0; p < m; p++) {
      for (let q = 0; q <= p; q++, orbitalPair++) {
        halfTransformed[orbitalPair * functionPairs + pair] = transformed[p * m + q];
      }
    }
  }
  return halfTransformed;
}

/** (pq|rs) with all four out of the same orbitals, 8-fold packed. */
export function transformEqualPair(
  halfTransformed: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
): Float64Array {
  const orbitalPairs = (m * (m + 1)) / 2;
  const result = new Float64Array((orbitalPairs * (orbitalPairs + 1)) / 2);
  let at = 0;
  forSecondPairs(halfTransformed, orbitals, n, m, (orbitalPair, transformed) => {
    for (let r = 0, other = 0; other <= orbitalPair; r++) {
      for (let s = 0; s <= r && other <= orbitalPair; s++, other++) result[at++] = transformed[r * m + s];
    }
  });
  return result;
}

/** (pq|rs) with r, s out of other orbitals than p, q: pairs × pairs, a row for each pair pq. */
export function transformOtherPair(
  halfTransformed: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
): Float64Array {
  const result = new Float64Array(((m * (m + 1)) / 2) ** 2);
  let at = 0;
  forSecondPairs(halfTransformed, orbitals, n, m, (_, transformed) => {
    for (let r = 0; r < m; r++) {
      for (let s = 0; s <= r; s++) result[at++] = transformed[r * m + s];
    }
  });
  return result;
}

/** (pq|rs) for all r, s, m×m, one pair pq after another. */
function forSecondPairs(
  halfTransformed: Float64Array,
  orbitals: Float64Array,
  n: number,
  m: number,
  take: (orbitalPair: number, transformed: Float64Array) => void,
): void {
  const functionPairs = (n * (n + 1)) / 2;
  const orbitalPairs = (m * (m + 1)) / 2;
  const square = new Float64Array(n * n);
  const half = new Float64Array(n * m);
  const transformed = new Float64Array(m * m);
  for (let orbitalPair = 0; orbitalPair < orbitalPairs; orbitalPair++) {
    for (let mu = 0, source = orbitalPair * functionPairs; mu < n; mu++) {
      for (let nu = 0; nu <= mu; nu++, source++) {
        square[mu * n + nu] = halfTransformed[source];
        square[nu * n + mu] = halfTransformed[source];
      }
    }
    congruenceInto(square, orbitals, n, m, half, transformed);
    take(orbitalPair, transformed);
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
  const field = Float64Array.from(oneElectron);
  for (let mu = 0; mu < n; mu++) {
    for (let nu = 0; nu < n; nu++) {
      let sum = 0;
      for (let lambda = 0; lambda < n; lambda++) {
        for (let sigma = 0; sigma < n; sigma++) {
          const coulomb = repulsion[packedPair(packedPair(mu, nu), packedPair(lambda, sigma))];
          const exchange = repulsion[packedPair(packedPair(mu, lambda), packedPair(nu, sigma))];
          const place = lambda * n + sigma;
          sum += (sameSpin[place] + otherSpin[place]) * coulomb - sameSpin[place] * exchange;
        }
      }
      field[mu * n + nu] += sum;
    }
  }
  return field;
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

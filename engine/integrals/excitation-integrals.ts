import { multiply, multiplyLeftTransposed } from '../linear-algebra/dense';
import { packedPair } from './orbital-integrals';

/** Occupied and virtual orbitals of one spin, n×count row-major. */
export interface ExcitationOrbitals {
  readonly occupied: Float64Array;
  readonly virtual: Float64Array;
}

/**
 * (ia|jb) between the single excitations of one spin (i, a) and of the same or the other spin (j, b), hartree.
 *
 * @param repulsion - over n functions, 8-fold packed
 * @returns row-major, excitations of `bra` × excitations of `ket`, an excitation at i·virtuals + a
 *
 * Cost: O(n⁴·occupied); holds occupied·virtual × n(n + 1)/2 numbers beside the result.
 */
export function excitationIntegrals(
  repulsion: Float64Array,
  n: number,
  bra: ExcitationOrbitals,
  ket: ExcitationOrbitals,
): Float64Array {
  const pairs = (n * (n + 1)) / 2;
  const square = new Float64Array(n * n);
  const ketExcitations = (ket.occupied.length / n) * (ket.virtual.length / n);
  const braExcitations = (bra.occupied.length / n) * (bra.virtual.length / n);

  // (μν|jb), a row for each excitation, so that the second sweep runs along memory
  const half = new Float64Array(ketExcitations * pairs);
  for (let pair = 0; pair < pairs; pair++) {
    unpackInto(square, n, (other) => repulsion[packedPair(pair, other)]);
    const block = betweenOrbitals(square, n, ket);
    for (let jb = 0; jb < ketExcitations; jb++) half[jb * pairs + pair] = block[jb];
  }
  const result = new Float64Array(braExcitations * ketExcitations);
  for (let jb = 0; jb < ketExcitations; jb++) {
    unpackInto(square, n, (pair) => half[jb * pairs + pair]);
    const block = betweenOrbitals(square, n, bra);
    for (let ia = 0; ia < braExcitations; ia++) result[ia * ketExcitations + jb] = block[ia];
  }
  return result;
}

/** Symmetric n×n from a packed triangle. */
function unpackInto(square: Float64Array, n: number, at: (pair: number) => number): void {
  for (let mu = 0, pair = 0; mu < n; mu++) {
    for (let nu = 0; nu <= mu; nu++, pair++) {
      const value = at(pair);
      square[mu * n + nu] = value;
      square[nu * n + mu] = value;
    }
  }
}

/** occupiedᵀ·M·virtual */
function betweenOrbitals(
  matrix: Float64Array,
  n: number,
  { occupied, virtual }: ExcitationOrbitals,
): Float64Array {
  const o = occupied.length / n;
  const v = virtual.length / n;
  return multiplyLeftTransposed(occupied, multiply(matrix, virtual, n, n, v), o, n, v);
}

import { HalfTransformed } from './half-transformed';
import { rowsOfPacked, transformMatrices } from './matrix-transformation';

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
  const ketOccupied = ket.occupied.length / n;
  const ketVirtual = ket.virtual.length / n;
  const ketExcitations = ketOccupied * ketVirtual;
  const braOccupied = bra.occupied.length / n;
  const braVirtual = bra.virtual.length / n;

  return HalfTransformed.use(pairs, ketExcitations, (half) => {
    transformMatrices({
      matrices: rowsOfPacked(repulsion, pairs),
      n,
      left: ket.virtual,
      right: ket.occupied,
      take: (first, width, results) => half.keep(first, width, results),
    });
    const result = new Float64Array(braOccupied * braVirtual * ketExcitations);
    transformMatrices({
      matrices: half,
      n,
      left: bra.virtual,
      right: bra.occupied,
      take: (first, width, results) => {
        for (let a = 0, source = 0; a < braVirtual; a++) {
          for (let i = 0; i < braOccupied; i++) {
            const row = (i * braVirtual + a) * ketExcitations;
            for (let k = 0; k < width; k++) {
              const [b, j] = [Math.floor((first + k) / ketOccupied), (first + k) % ketOccupied];
              result[row + j * ketVirtual + b] = results[source++];
            }
          }
        }
      },
    });
    return result;
  });
}

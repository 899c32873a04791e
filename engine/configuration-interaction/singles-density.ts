/**
 * One-particle density of single excitations from a closed shell, summed over the spins; of a triplet with M = 0, as of a
 * singlet, each spin has half of it:
 * γ(ij) = 2δ(ij) − Σ over a of X(ia)X(ja), γ(ab) = Σ over i of X(ia)X(ib).
 *
 * @param amplitudes - X(ia) over pairs of an occupied and a virtual orbital, row-major occupied×virtual, norm 1
 * @param occupied - doubly occupied orbitals of the reference
 * @param orbitalCount - n
 * @returns n×n symmetric, row-major, trace 2·occupied
 */
export function singlesDensity(
  amplitudes: Float64Array,
  occupied: number,
  orbitalCount: number,
): Float64Array {
  const n = orbitalCount;
  const virtuals = n - occupied;
  const density = new Float64Array(n * n);
  for (let i = 0; i < occupied; i++) {
    density[i * n + i] += 2;
    for (let j = 0; j < occupied; j++) {
      for (let a = 0; a < virtuals; a++) {
        density[i * n + j] -= amplitudes[i * virtuals + a] * amplitudes[j * virtuals + a];
      }
    }
    for (let a = 0; a < virtuals; a++) {
      for (let b = 0; b < virtuals; b++) {
        density[(occupied + a) * n + occupied + b] +=
          amplitudes[i * virtuals + a] * amplitudes[i * virtuals + b];
      }
    }
  }
  return density;
}

/**
 * The Hamiltonian over an orthonormal set of spatial orbitals (real, spin-restricted), as configuration
 * interaction needs it.
 */
export interface OrbitalIntegrals {
  readonly orbitalCount: number;
  /** nuclear repulsion plus the energy of frozen orbitals, hartree */
  readonly coreEnergy: number;
  /** (p|h|q), core Hamiltonian plus the mean field of frozen orbitals; row-major n×n, hartree */
  readonly oneElectron: Float64Array;
  /**
   * (pq|rs), chemists' order, 8-fold packed: index `packedPair(packedPair(p, q), packedPair(r, s))`, hartree
   */
  readonly twoElectron: Float64Array;
}

/** Place of an unordered pair in a packed lower triangle. */
export function packedPair(i: number, j: number): number {
  return i >= j ? (i * (i + 1)) / 2 + j : (j * (j + 1)) / 2 + i;
}

/**
 * The Hamiltonian over an orthonormal set of real spatial orbitals, as configuration interaction needs it: one set
 * for both spins, or one for each.
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
  /** where beta electrons have orbitals of their own; the arrays above are then those of the alpha ones */
  readonly beta?: BetaIntegrals;
}

/** What beta orbitals add that differ from the alpha ones. */
export interface BetaIntegrals extends Pick<OrbitalIntegrals, 'oneElectron' | 'twoElectron'> {
  /**
   * (pq|rs) of alpha orbitals p, q and beta orbitals r, s; a row for each alpha pair:
   * index `packedPair(p, q)·pairs + packedPair(r, s)`, hartree
   */
  readonly mixed: Float64Array;
  /**
   * ⟨p|r⟩ of every alpha with every beta orbital, m×m orthogonal, row-major: the frozen ones, the n of these
   * integrals, those left empty
   */
  readonly overlap: Float64Array;
  /** frozen orbitals of each spin */
  readonly frozen: number;
}

/** What electrons of one spin have among themselves. */
export type SameSpinIntegrals = Pick<OrbitalIntegrals, 'orbitalCount' | 'oneElectron' | 'twoElectron'>;

/** The part that beta electrons have among themselves. */
export function betaPart(integrals: OrbitalIntegrals): SameSpinIntegrals {
  const { orbitalCount, beta } = integrals;
  return beta ? { orbitalCount, oneElectron: beta.oneElectron, twoElectron: beta.twoElectron } : integrals;
}

/** Place of an unordered pair in a packed lower triangle. */
export function packedPair(i: number, j: number): number {
  return i >= j ? (i * (i + 1)) / 2 + j : (j * (j + 1)) / 2 + i;
}

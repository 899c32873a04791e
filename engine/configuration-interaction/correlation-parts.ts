/** What the energy of a CI state lies below (or above) that of the reference determinant, divided up; hartree. */
export interface CorrelationParts {
  /** energy of the state less that of the reference determinant */
  readonly total: number;
  /** by excitation rank against the reference, from rank 0; the energies add up to `total` */
  readonly byRank: readonly RankPart[];
  /** by occupied orbitals of the reference; adds up to `total` by itself */
  readonly projected: ProjectedEnergy;
}

export interface RankPart {
  /** Σ c² of the determinants of this rank */
  readonly weight: number;
  /** how much ⟨H − E(reference)⟩ changes when this rank is added to all lower ones, coefficients unchanged */
  readonly energy: number;
}

/** E − E(reference) = Σ over single and double excitations I of ⟨0|H|I⟩ c(I)/c(0). */
export type ProjectedEnergy =
  | {
      readonly kind: 'found';
      readonly singles: readonly OrbitalPart[];
      readonly pairs: readonly PairPart[];
    }
  /** the reference is hardly part of the state */
  | { readonly kind: 'none'; readonly reason: string };

/** Single excitations out of one spatial orbital, both spins together. */
export interface OrbitalPart {
  readonly orbital: number;
  readonly energy: number;
}

/** Double excitations out of two spatial orbitals, or out of one, all spins together. */
export interface PairPart {
  /** the lower first; equal: both electrons of one orbital */
  readonly orbitals: readonly [number, number];
  readonly energy: number;
  /** the part of `energy` from electrons of equal spin */
  readonly sameSpin: number;
}

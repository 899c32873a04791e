import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { determinantAt } from './determinant-space';
import type { HamiltonianProduct } from './hamiltonian-product';
import { hamiltonianElement } from './matrix-elements';
import { type ProjectedEnergy, projectedEnergy } from './projected-energy';
import { type RankPart, rankParts } from './rank-parts';

/** What the energy of a CI state lies below (or above) that of the reference determinant, divided up; hartree. */
export interface CorrelationParts {
  /** energy of the state less that of the reference determinant */
  readonly total: number;
  /** by excitation rank against the reference, from rank 0; the energies add up to `total` */
  readonly byRank: readonly RankPart[];
  /** by occupied orbitals of the reference; adds up to `total` by itself */
  readonly projected: ProjectedEnergy;
}

/**
 * Both divisions of the correlation energy of a normalised CI state, which complement each other: `projectedEnergy`
 * knows orbital pairs, and means most where the reference dominates; `rankParts` knows all ranks, and holds for any
 * vector.
 */
export function correlationParts(
  { space, apply }: Pick<HamiltonianProduct, 'space' | 'apply'>,
  vector: Float64Array,
  energy: number,
  integrals: OrbitalIntegrals,
): CorrelationParts {
  const reference = determinantAt(space, 0);
  const referenceEnergy = hamiltonianElement(reference, reference, integrals);
  const total = energy - referenceEnergy;
  return {
    total,
    byRank: rankParts(space, apply, vector, referenceEnergy),
    projected: projectedEnergy(space, vector, total, integrals),
  };
}

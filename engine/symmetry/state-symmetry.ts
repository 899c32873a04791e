import { axialMomentum } from './axial-momentum';
import { inversionName } from './orbital-labels';
import type { SymmetricOrbitals } from './orbital-symmetry';
import type { MolecularSymmetry } from './point-group';
import { character, POINT_GROUPS } from './point-groups';

/** Symmetry of a state of a linear molecule. */
export interface TermSymbol {
  /** |Λ|: 0 for Σ, 1 for Π, 2 for Δ, … */
  readonly lambda: number;
  /** of molecules with a centre of inversion */
  readonly inversion?: 'g' | 'u';
  /** of Σ states: what a reflection in a plane through the axis does */
  readonly reflection?: '+' | '-';
}

export interface StateSymmetry {
  /** irreducible representation of the point group, as `Ag` */
  readonly irrep: string;
  readonly term?: TermSymbol;
}

/** Largest weight of other representations in a state that is said to belong to one. */
export const STATE_IMPURITY = 1e-3;

/**
 * Names the symmetry of a state.
 *
 * @param irrepWeights - weight of each representation in its wave function, by number; sum 1
 * @param axialSquare - of linear molecules: expectation value of the squared angular momentum about the axis
 * @returns undefined where the state belongs to no single representation
 */
export function stateSymmetry(
  { pointGroup, linear }: Pick<MolecularSymmetry, 'pointGroup' | 'linear'>,
  irrepWeights: ArrayLike<number>,
  axialSquare?: number,
): StateSymmetry | undefined {
  const irrep = Array.from(irrepWeights).findIndex((weight) => weight >= 1 - STATE_IMPURITY);
  if (irrep < 0) return undefined;
  const lambda = linear && axialSquare !== undefined ? axialMomentum(irrep, axialSquare) : undefined;
  return {
    irrep: POINT_GROUPS[pointGroup].irreps[irrep],
    ...(lambda !== undefined && {
      term: {
        lambda,
        ...(linear === 'D∞h' && { inversion: inversionName(irrep) }),
        ...(lambda === 0 && { reflection: character(pointGroup, irrep, [1, -1, 1]) === 1 ? '+' : '-' }),
      },
    }),
  };
}

/**
 * Symmetry of a Hartree–Fock determinant: the product of its occupied orbitals. The angular momentum turns it into the
 * single excitations i → a, each with the factor ⟨a| ∂/∂φ |i⟩.
 *
 * @param orbitals - alpha, beta
 * @param occupied - how many of the first orbitals are occupied, alpha and beta
 */
export function symmetryOfDeterminant(
  symmetry: Pick<MolecularSymmetry, 'pointGroup' | 'linear'>,
  orbitals: readonly [SymmetricOrbitals, SymmetricOrbitals],
  occupied: readonly [number, number],
): StateSymmetry | undefined {
  let product = 0;
  let axialSquare = 0;
  for (const [spin, { irreps, axialRotation }] of orbitals.entries()) {
    const m = irreps.length;
    for (let i = 0; i < occupied[spin]; i++) {
      const irrep = irreps[i];
      if (irrep === undefined) return undefined;
      product ^= irrep;
      for (let a = occupied[spin]; axialRotation && a < m; a++) axialSquare += axialRotation[a * m + i] ** 2;
    }
  }
  const weights = POINT_GROUPS[symmetry.pointGroup].irreps.map((_, irrep) => Number(irrep === product));
  return stateSymmetry(symmetry, weights, axialSquare);
}

import { EngineError } from '../errors';

/** Everything that a self-consistent field needs of a molecule at one geometry; matrices n×n row-major. */
export interface MeanFieldProblem {
  readonly functionCount: number;
  readonly overlap: Float64Array;
  /** kinetic energy and attraction by the nuclei, hartree */
  readonly coreHamiltonian: Float64Array;
  /** (μν|λσ), 8-fold packed, hartree */
  readonly repulsion: Float64Array;
  readonly nuclearRepulsion: number;
}

export interface SelfConsistencyOptions {
  /** largest energy change between the last two iterations, hartree */
  readonly energyTolerance: number;
  /** largest element of the commutator FDS − SDF in orthonormal functions, hartree */
  readonly gradientTolerance: number;
  /** iterations with extrapolation before the second-order minimiser takes over */
  readonly extrapolatedIterations: number;
  readonly minimiserIterations: number;
  /** hartree; a determinant of this energy is known to be stable, and its stability is not looked into again */
  readonly stableEnergy?: number;
  /** false: closed shells are not looked at for lower determinants with different orbitals of the two spins */
  readonly turnsSpinsApart?: boolean;
}

export const DEFAULT_SELF_CONSISTENCY: SelfConsistencyOptions = Object.freeze({
  energyTolerance: 1e-10,
  // The energy error is quadratic in the gradient; dipoles and CI energies are first order in it.
  gradientTolerance: 1e-8,
  extrapolatedIterations: 60,
  minimiserIterations: 100,
});

/** @throws EngineError `basis.tooFewFunctions` */
export function requireOrbitals(orbitalCount: number, orbitalsNeeded: number, electrons: number): void {
  if (orbitalCount >= orbitalsNeeded) return;
  throw new EngineError(
    'basis.tooFewFunctions',
    `The basis gives ${orbitalCount} independent orbitals, but ${electrons} electrons need ${orbitalsNeeded}.`,
    'Take a larger basis set, or one made for these elements.',
    { functions: orbitalCount, orbitalsNeeded },
    'basis',
  );
}

import { dot } from '../linear-algebra/dense';
import { coulombExchangeInto } from '../self-consistent-field/coulomb-exchange';
import type { MolecularIntegrals } from './molecular-integrals';

/** What an energy is the sum of, hartree; frozen orbitals included. */
export interface EnergyParts {
  readonly kinetic: number;
  readonly nuclearAttraction: number;
  /** of the electrons among themselves: the next two together */
  readonly electronRepulsion: number;
  /** of the charge density with itself */
  readonly coulomb: number;
  /** the rest of the repulsion: the next two together */
  readonly exchangeCorrelation: number;
  /** of the electrons of each spin, from their one-particle density; absent in files of earlier versions */
  readonly exchange?: number;
  /** of the repulsion alone, what no one-particle density gives; in Hartree–Fock 0; absent as `exchange` is */
  readonly correlation?: number;
  readonly nuclearRepulsion: number;
  /** −V/T: 2 for exact wave functions at a stationary geometry, and where all lengths are optimised */
  readonly virialRatio: number;
}

/**
 * The parts of an energy that is an expectation value, E = ⟨H⟩. One-electron parts follow from the density; the
 * repulsion is what remains, so that no two-particle density need be formed.
 *
 * @param density - spin-summed over the basis functions, n×n
 */
export function energyParts(
  energy: number,
  density: Float64Array,
  { problem, kinetic: kineticMatrix }: MolecularIntegrals,
): EnergyParts {
  const { functionCount: n, coreHamiltonian, repulsion, nuclearRepulsion } = problem;
  const kinetic = dot(density, kineticMatrix);
  const oneElectron = dot(density, coreHamiltonian);
  const electronRepulsion = energy - nuclearRepulsion - oneElectron;
  const coulombMatrix = new Float64Array(n * n);
  coulombExchangeInto(density, repulsion, n, coulombMatrix, new Float64Array(n * n));
  const coulomb = dot(density, coulombMatrix) / 2;
  return {
    kinetic,
    nuclearAttraction: oneElectron - kinetic,
    electronRepulsion,
    coulomb,
    exchangeCorrelation: electronRepulsion - coulomb,
    nuclearRepulsion,
    virialRatio: (kinetic - energy) / kinetic,
  };
}

import type { SpinDensities } from '../configuration-interaction/one-particle-density';
import { coulombExchangeInto } from '../integrals/coulomb-exchange';
import { dot } from '../linear-algebra/dense';
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
 * The parts of an energy that is an expectation value, E = ⟨H⟩. One-electron parts follow from the density, Coulomb and
 * exchange repulsion from the densities γ of the two spins as if there were one determinant:
 * ½ Σ (μν|λσ) γ(μν)γ(λσ) and −½ Σ over spins of Σ (μλ|νσ) γ(μν)γ(λσ). What is left of the repulsion belongs to the
 * cumulant of the two-particle density, so that this one need not be formed.
 *
 * @param densities - alpha and beta over the basis functions, n×n each; the same array twice for a closed shell
 *
 * Source: W. Kutzelnigg, D. Mukherjee, J. Chem. Phys. 110, 2800 (1999).
 */
export function energyParts(
  energy: number,
  densities: SpinDensities,
  { problem, kinetic: kineticMatrix }: MolecularIntegrals,
): EnergyParts {
  const { functionCount: n, coreHamiltonian, repulsion, nuclearRepulsion } = problem;
  const ofBoth = (matrix: Float64Array) => dot(densities[0], matrix) + dot(densities[1], matrix);
  const kinetic = ofBoth(kineticMatrix);
  const oneElectron = ofBoth(coreHamiltonian);
  const electronRepulsion = energy - nuclearRepulsion - oneElectron;

  const coulombMatrix = new Float64Array(n * n);
  const exchangeMatrix = new Float64Array(n * n);
  const [alpha, beta] = densities;
  let coulomb = 0;
  let exchange = 0;
  for (const density of alpha === beta ? [alpha] : densities) {
    coulombExchangeInto(density, repulsion, n, coulombMatrix, exchangeMatrix);
    const times = alpha === beta ? 2 : 1;
    coulomb += (times * ofBoth(coulombMatrix)) / 2;
    exchange -= (times * dot(density, exchangeMatrix)) / 2;
  }
  return {
    kinetic,
    nuclearAttraction: oneElectron - kinetic,
    electronRepulsion,
    coulomb,
    exchangeCorrelation: electronRepulsion - coulomb,
    exchange,
    correlation: electronRepulsion - coulomb - exchange,
    nuclearRepulsion,
    virialRatio: (kinetic - energy) / kinetic,
  };
}

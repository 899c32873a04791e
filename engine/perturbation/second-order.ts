import { type ExcitationOrbitals, excitationIntegrals } from '../integrals/excitation-integrals';

/** Canonical orbitals of one spin with their energies, occupied and virtual apart; frozen ones left out. */
export interface SpinOrbitals extends ExcitationOrbitals {
  readonly occupiedEnergies: Float64Array;
  readonly virtualEnergies: Float64Array;
}

export interface SecondOrderEnergy {
  /** pairs of equal spin, hartree */
  readonly sameSpin: number;
  /** pairs of opposite spin, hartree */
  readonly oppositeSpin: number;
}

/**
 * Second-order correlation energy of a closed shell (MP2).
 *
 * Source: C. Møller, M. S. Plesset, Phys. Rev. 46, 618 (1934); Szabo and Ostlund, sec. 6.5, eq. (6.74).
 */
export function restrictedSecondOrder(
  repulsion: Float64Array,
  n: number,
  orbitals: SpinOrbitals,
): SecondOrderEnergy {
  const integrals = excitationIntegrals(repulsion, n, orbitals, orbitals);
  return {
    sameSpin: 2 * sameSpinEnergy(integrals, orbitals),
    oppositeSpin: oppositeSpinEnergy(integrals, orbitals, orbitals),
  };
}

/** The same with orbitals of their own for the two spins, from UHF. */
export function unrestrictedSecondOrder(
  repulsion: Float64Array,
  n: number,
  alpha: SpinOrbitals,
  beta: SpinOrbitals,
): SecondOrderEnergy {
  return {
    sameSpin:
      sameSpinEnergy(excitationIntegrals(repulsion, n, alpha, alpha), alpha) +
      sameSpinEnergy(excitationIntegrals(repulsion, n, beta, beta), beta),
    oppositeSpin: oppositeSpinEnergy(excitationIntegrals(repulsion, n, alpha, beta), alpha, beta),
  };
}

/** Σ_{i<j, a<b} [(ia|jb) − (ib|ja)]² / (ε_i + ε_j − ε_a − ε_b) */
function sameSpinEnergy(
  integrals: Float64Array,
  { occupiedEnergies, virtualEnergies }: SpinOrbitals,
): number {
  const v = virtualEnergies.length;
  const excitations = occupiedEnergies.length * v;
  let energy = 0;
  for (let i = 1; i < occupiedEnergies.length; i++) {
    for (let j = 0; j < i; j++) {
      for (let a = 1; a < v; a++) {
        for (let b = 0; b < a; b++) {
          const element =
            integrals[(i * v + a) * excitations + j * v + b] -
            integrals[(i * v + b) * excitations + j * v + a];
          energy +=
            element ** 2 /
            (occupiedEnergies[i] + occupiedEnergies[j] - virtualEnergies[a] - virtualEnergies[b]);
        }
      }
    }
  }
  return energy;
}

/** Σ_{i, j, a, b} (ia|jb)² / (ε_i + ε_j − ε_a − ε_b), i and a of one spin, j and b of the other */
function oppositeSpinEnergy(integrals: Float64Array, one: SpinOrbitals, other: SpinOrbitals): number {
  let energy = 0;
  let place = 0;
  for (const i of one.occupiedEnergies) {
    for (const a of one.virtualEnergies) {
      for (const j of other.occupiedEnergies) {
        for (const b of other.virtualEnergies) energy += integrals[place++] ** 2 / (i + j - a - b);
      }
    }
  }
  return energy;
}

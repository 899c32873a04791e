import type { Molecule } from '../molecule/molecule';

/**
 * Doubly occupied orbitals kept out of the CI by `frozenCore`: the noble-gas core of every atom – none for H and
 * He, 1s for Li–Ne, 1s2s2p for Na–Ar. Ghosts have none.
 */
export function frozenOrbitalCount(molecule: Molecule): number {
  return molecule.atoms.reduce((sum, atom) => sum + coreOrbitals(atom.nuclearCharge), 0);
}

/** Doubly occupied orbitals of the noble-gas core of an atom. */
export function coreOrbitals(nuclearCharge: number): number {
  if (nuclearCharge <= 2) return 0;
  return nuclearCharge <= 10 ? 1 : 5;
}

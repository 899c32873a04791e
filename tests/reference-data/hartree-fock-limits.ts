import type { PublishedRow } from './published-row';

/*
 * Numerical Hartree–Fock energies, hartree, all recalled. Atoms: C. Froese Fischer; with all electrons of a subshell in
 * one radial function, which a determinant over Gaussians obeys by itself only where every subshell is full or half
 * full.
 */

const ATOMS = 'C. Froese Fischer, The Hartree-Fock Method for Atoms, Wiley (1977), value from memory';

const atom = (system: string, printed: string, source = ATOMS): PublishedRow => ({
  system,
  quantity: 'Hartree–Fock limit',
  printed,
  unit: 'hartree',
  source,
});

export const ATOMIC_LIMITS = {
  He: atom('He', '-2.861679995'),
  Li: atom('Li', '-7.432726931'),
  Be: atom('Be', '-14.57302317'),
  N: atom('N', '-54.40093421'),
  Ne: atom('Ne', '-128.5470981'),
  Mg: atom(
    'Mg',
    '-199.6146361',
    'C. F. Bunge, J. A. Barrientos, A. V. Bunge, At. Data Nucl. Data Tables 53, 113 (1993), value from memory',
  ),
} as const satisfies Record<string, PublishedRow>;

export const ATOMIC_ORBITAL_ENERGIES: Readonly<Record<string, readonly string[]>> = {
  He: ['-0.91795555'],
  Be: ['-4.7326698', '-0.3092695'],
  Ne: ['-32.7724455', '-1.93039095', '-0.85040965'],
};

/** H2 at 1.4 bohr. */
export const HYDROGEN_MOLECULE_LIMIT: PublishedRow = atom(
  'H2',
  '-1.133629573',
  'D. Sundholm, Chem. Phys. Lett. 149, 251 (1988), value from memory',
);

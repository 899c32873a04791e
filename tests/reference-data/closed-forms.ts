import type { PublishedRow } from './published-row';

/*
 * Numbers that no publication prints, worked out in closed form from printed ones.
 */

const source =
  'closed form of a two-orbital model from the integrals of A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (1989): ';

/** CIS excitation energies of H2, R = 1.4 bohr, STO-3G with ζ = 1.24; hartree. */
export const HYDROGEN_SINGLES = {
  singlet: {
    system: 'H2',
    quantity: 'CIS excitation energy, singlet',
    printed: '0.947422',
    unit: 'hartree',
    source: `${source}ε2 − ε1 − J12 + 2K12`,
  },
  triplet: {
    system: 'H2',
    quantity: 'CIS excitation energy, triplet',
    printed: '0.584907',
    unit: 'hartree',
    source: `${source}ε2 − ε1 − J12`,
  },
} as const satisfies Record<string, PublishedRow>;

import type { PublishedRow } from './published-row';

/*
 * Numbers that no publication prints, worked out in closed form.
 */

const source = (formula: string): string =>
  `${formula} of a two-orbital model, from independently computed integrals of six decimals; derived, not printed`;
const rounding = {
  tolerance: 2.5e-6,
  because: 'the five terms were rounded to six decimals one by one',
} as const;

/** CIS excitation energies of H2, R = 1.4 bohr, STO-3G with ζ = 1.24; hartree. */
export const HYDROGEN_SINGLES = {
  singlet: {
    system: 'H2',
    quantity: 'CIS excitation energy, singlet',
    printed: '0.947422',
    unit: 'hartree',
    source: source('ε2 − ε1 − J12 + 2K12'),
    ...rounding,
  },
  triplet: {
    system: 'H2',
    quantity: 'CIS excitation energy, triplet',
    printed: '0.584907',
    unit: 'hartree',
    source: source('ε2 − ε1 − J12'),
    ...rounding,
  },
} as const satisfies Record<string, PublishedRow>;

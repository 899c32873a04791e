import type { PublishedRow } from './published-row';

/*
 * H2O in a double-zeta basis, all ten electrons correlated in 14 orbitals: the first full CI of its size.
 */

const source =
  'P. Saxe, H. F. Schaefer III, N. C. Handy, Chem. Phys. Lett. 79, 202 (1981), value from memory';
const row = { system: 'H2O', unit: 'hartree', source };

/** bohr */
export const WATER_GEOMETRY = {
  unit: 'bohr',
  atoms: [
    { element: 'O', at: [0, 0, -0.009] },
    { element: 'H', at: [1.515263, 0, -1.058898] },
    { element: 'H', at: [-1.515263, 0, -1.058898] },
  ],
} as const;

/** Total energies in the double-zeta basis at WATER_GEOMETRY; hartree. */
export const WATER_DOUBLE_ZETA = {
  RHF: { ...row, quantity: 'RHF total energy', printed: '-76.009838' },
  CISD: { ...row, quantity: 'CISD total energy', printed: '-76.150015' },
  FCI: { ...row, quantity: 'full CI total energy', printed: '-76.157866' },
} as const satisfies Record<string, PublishedRow>;

/** Share of the correlation energy that CISD recovers at the same geometry. */
export const WATER_CISD_SHARE: PublishedRow = {
  system: 'H2O',
  quantity: 'CISD correlation energy over full-CI correlation energy',
  printed: '94.70',
  unit: '%',
  source: 'R. J. Harrison, N. C. Handy, Chem. Phys. Lett. 95, 386 (1983), value from memory',
};

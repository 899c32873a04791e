import type { PublishedRow } from './published-row';

/** Non-relativistic Born–Oppenheimer energies, hartree; all recalled. */
export interface NearExactRow extends PublishedRow {
  /** bohr */
  readonly distance: number;
}

const row = (system: string, distance: number, printed: string, source: string): NearExactRow => ({
  system,
  distance,
  quantity: 'total energy',
  printed,
  unit: 'hartree',
  source: `${source}, value from memory`,
});

const hydrogen = (distance: number, printed: string) =>
  row('H2', distance, printed, 'J. S. Sims, S. A. Hagstrom, J. Chem. Phys. 124, 094101 (2006), Table VI');

export const HYDROGEN_NEAR_EXACT: readonly NearExactRow[] = [hydrogen(6, '-1.0008357076542279')];

export const HELIUM_NEAR_EXACT: PublishedRow = {
  system: 'He',
  quantity: 'total energy',
  printed: '-2.9037243770341196',
  unit: 'hartree',
  source: 'C. Schwartz, Int. J. Mod. Phys. E 15, 877 (2006), value from memory',
};

export const HELIUM_HYDRIDE_NEAR_EXACT: readonly NearExactRow[] = [
  row('HeH+', 1.46, '-2.9787066', 'K. Pachucki, Phys. Rev. A 85, 042511 (2012)'),
];

/** What the program computes, from the roughest to the complete. */
export const LEVELS = [
  { name: 'RHF', description: 'restricted Hartree–Fock: one determinant, electrons in pairs' },
  { name: 'UHF', description: 'unrestricted: each spin in orbitals of its own' },
  { name: 'ROHF', description: 'restricted open-shell: pairs, and unpaired electrons of one spin' },
  { name: 'MP2', description: 'second-order perturbation of Hartree–Fock' },
  { name: 'CIS', description: 'single excitations: excited states only' },
  { name: 'CISD', description: 'single and double excitations' },
  { name: 'CISDT', description: 'up to triple excitations' },
  { name: 'CISDTQ', description: 'up to quadruple excitations' },
  { name: 'CISDTQ5', description: 'up to quintuple excitations' },
  { name: 'CISDTQ56', description: 'up to sextuple excitations' },
  { name: 'FCI', description: 'all excitations: exact within the basis set' },
] as const;

/** With or without the level; known levels stand in the order of the list above, others behind them. */
export function withLevel(levels: readonly string[], level: string, isWanted: boolean): readonly string[] {
  const wanted = new Set(levels);
  if (isWanted) wanted.add(level);
  else wanted.delete(level);
  const known = LEVELS.map(({ name }) => name as string).filter((name) => wanted.has(name));
  return [...known, ...[...wanted].filter((name) => !known.includes(name))];
}

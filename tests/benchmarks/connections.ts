/** Determinants that H joins to one of full CI with so many electrons of either spin, itself included. */
export function connections(orbitals: number, electrons: number): number {
  const singles = electrons * (orbitals - electrons);
  const doubles = (singles * (electrons - 1) * (orbitals - electrons - 1)) / 4;
  return 1 + 2 * singles + 2 * doubles + singles ** 2;
}

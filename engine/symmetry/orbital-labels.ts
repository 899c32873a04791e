import type { SymmetricOrbitals } from './orbital-symmetry';
import type { MolecularSymmetry } from './point-group';
import { character, POINT_GROUPS } from './point-groups';

const GREEK = ['σ', 'π', 'δ', 'φ', 'γ'];

/**
 * Orbitals as they are usually written, counted within each representation from the lowest: `1a1`, `1b2`; of a
 * linear molecule `2σg`, `1πu`, the same for both partners of a pair; null where an orbital has no representation.
 */
export function orbitalLabels(
  symmetry: MolecularSymmetry,
  { irreps, lambdas }: Pick<SymmetricOrbitals, 'irreps' | 'lambdas'>,
): (string | null)[] {
  const counts = new Map<string, number>();
  return irreps.map((irrep, p) => {
    if (irrep === undefined) return null;
    const name = orbitalName(symmetry, irrep, lambdas[p]);
    const key = `${irrep} ${name}`;
    const count = (counts.get(key) ?? 0) + 1;
    counts.set(key, count);
    return `${count}${name}`;
  });
}

function orbitalName(
  { pointGroup, linear }: MolecularSymmetry,
  irrep: number,
  lambda: number | undefined,
): string {
  const greek = lambda === undefined ? undefined : GREEK[lambda];
  if (greek === undefined) return POINT_GROUPS[pointGroup].irreps[irrep].toLowerCase();
  return greek + (linear === 'D∞h' ? inversionName(irrep) : '');
}

/** Parity of a representation of D2h. */
export function inversionName(irrep: number): 'g' | 'u' {
  return character('D2h', irrep, [-1, -1, -1]) === 1 ? 'g' : 'u';
}

import type { Dissociation, StudyMolecule } from '#engine';
import { formula } from './formula';

/** The fragments of a limit as formulas, that of the first-named atom first: `He + H⁺`. */
export function fragmentsText(
  { atoms }: StudyMolecule,
  { fragments }: Extract<Dissociation, { readonly kind: 'found' }>,
): string {
  return fragments
    .map(({ atoms: indices, charge }) =>
      formula({ atoms: atoms.filter((_, index) => indices.includes(index)), charge }),
    )
    .join(' + ');
}

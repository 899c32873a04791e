import type { Dissociation, Fragment, StudyMolecule, WellDepth } from '#engine';
import { HARTREE_IN_EV } from '../../engine/constants';
import { formula } from './formula';

/** Components of one level of a fragment differ by less, hartree. */
const NO_EXCITATION = 1e-6;

/**
 * The fragments of a limit as formulas, that of the first-named atom first: `He + H⁺`. Of an excited one it is said how
 * far it lies above the lowest state of its charge: `Li (+1.937 eV) + H`.
 */
export function fragmentsText(
  { atoms }: StudyMolecule,
  { fragments }: Extract<Dissociation, { readonly kind: 'found' }>,
): string {
  return fragments
    .map(
      ({ atoms: indices, charge, excitation }) =>
        formula({ atoms: atoms.filter((_, index) => indices.includes(index)), charge }) +
        excitationText(excitation),
    )
    .join(' + ');
}

function excitationText(excitation: Fragment['excitation'] = 0): string {
  return excitation > NO_EXCITATION ? ` (+${(excitation * HARTREE_IN_EV).toFixed(3)} eV)` : '';
}

/** What a well depth stands against: the fragments, or the end of the curve. */
export function depthReference(
  molecule: StudyMolecule,
  depth: WellDepth,
  dissociation: Dissociation | undefined,
  placeText: (coordinate: number) => string,
): string {
  return depth.against === 'fragments' && dissociation?.kind === 'found'
    ? fragmentsText(molecule, dissociation)
    : placeText(depth.farEnd);
}

import type { StudyAtom, StudyMolecule } from '#engine';

/**
 * Order of the elements in formulas, from the one written first: nitrogen hydride is NH₃, oxygen hydride H₂O.
 *
 * Source: IUPAC, Nomenclature of Inorganic Chemistry (2005), Table VI, from its end; carbon compounds follow the
 * older custom of C, then H (HCN becomes CHN).
 */
const WRITING_ORDER = 'He Ne Ar Na Li Mg Be Al B Si C P N H S O Cl F'.split(' ');

/** A chemical formula with subscripts, charge and named isotopes: H₂O, HeH⁺, D₂O, ¹³CO. Ghosts are left out. */
export function formula({ atoms, charge = 0 }: Pick<StudyMolecule, 'atoms' | 'charge'>): string {
  const counts = new Map<string, { readonly atom: StudyAtom; count: number }>();
  for (const atom of atoms) {
    if (atom.ghost) continue;
    const label = atomLabel(atom);
    const entry = counts.get(label);
    if (entry) entry.count++;
    else counts.set(label, { atom, count: 1 });
  }
  const hasCarbon = atoms.some((atom) => atom.element === 'C' && !atom.ghost);
  const isHydroxide = counts.size === 2 && [...counts.values()].every(({ count }) => count === 1);
  const rank = ({ element }: StudyAtom) => {
    if (element === 'H' && hasCarbon) return WRITING_ORDER.indexOf('C') + 0.5;
    // OH and SH are written the other way round than H₂O and H₂S
    if (
      element === 'H' &&
      isHydroxide &&
      atoms.some((atom) => atom.element === 'O' || atom.element === 'S')
    ) {
      return WRITING_ORDER.length;
    }
    const index = WRITING_ORDER.indexOf(element);
    return index < 0 ? WRITING_ORDER.length : index;
  };
  const body = [...counts]
    .sort(([, a], [, b]) => rank(a.atom) - rank(b.atom) || (a.atom.isotope ?? 0) - (b.atom.isotope ?? 0))
    .map(([label, { count }]) => label + (count === 1 ? '' : digits(count, SUBSCRIPTS)))
    .join('');
  if (charge === 0) return body;
  const size = Math.abs(charge) === 1 ? '' : digits(Math.abs(charge), SUPERSCRIPTS);
  return `${body}${size}${charge > 0 ? '⁺' : '⁻'}`;
}

/** An atom as in formulas and bond names: D and T for hydrogen's isotopes, a raised mass number for others. */
export function atomLabel({ element, isotope }: StudyAtom): string {
  if (isotope === undefined || (element === 'H' && isotope === 1)) return element;
  if (element === 'H' && isotope === 2) return 'D';
  if (element === 'H' && isotope === 3) return 'T';
  return digits(isotope, SUPERSCRIPTS) + element;
}

const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

function digits(value: number, alphabet: string): string {
  return String(value).replace(/\d/g, (digit) => alphabet.charAt(Number(digit)));
}

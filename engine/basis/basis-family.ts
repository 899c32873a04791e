/** A basis set as a member of a family whose sets tend to completeness in regular steps. */
export interface FamilyPlace {
  /** as `cc-pVXZ` */
  readonly family: string;
  /** X */
  readonly cardinal: number;
}

const CARDINALS: Readonly<Record<string, number>> = { D: 2, T: 3, Q: 4, 5: 5, 6: 6 };

/**
 * The correlation-consistent sets, with and without diffuse functions, are systematic families; sets of Slater fits or
 * of split valence differ in more than their size.
 *
 * Source: T. H. Dunning, J. Chem. Phys. 90, 1007 (1989).
 *
 * @returns undefined for any other set
 */
export function familyPlace(name: string): FamilyPlace | undefined {
  const [, diffuse, letter] = /^(aug-)?cc-pv([dtq56])z$/i.exec(name.trim()) ?? [];
  if (letter === undefined) return undefined;
  return { family: `${diffuse ? 'aug-' : ''}cc-pVXZ`, cardinal: CARDINALS[letter.toUpperCase()] };
}

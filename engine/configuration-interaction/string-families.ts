import { isOccupied, type OccupationString } from './determinants';
import { buildStringSpace, placeOf, type StringSpace, stringAt } from './string-space';

/**
 * Strings of one spin that have all electrons but one, or two, in common: a family for each choice of the common ones.
 * All families of a whole string space have equally many members, and each string is a member once for each of its
 * electrons (or pairs of electrons).
 *
 * The sign of a string against its family is −1 to the number of common electrons below the added ones. That of orbital
 * p, the i-th that the common electrons leave empty (from 0), is (−1)^(p − i): the part with i is the members', and the
 * same in all families; the part with p goes into the integrals.
 */
export interface StringFamilies {
  readonly count: number;
  readonly members: number;
  /** of each family its members' strings, rising */
  readonly strings: Int32Array;
  /** orbital that each member adds, or pair of orbitals p > r at p(p − 1)/2 + r */
  readonly added: Int32Array;
  /** each member's part of the sign */
  readonly isNegative: Uint8Array;
}

/**
 * @param space - whole: no excitation rank is left out
 * @param missing - electrons that are not common, one or two; not more than there are
 */
export function findFamilies(space: StringSpace, missing: 1 | 2): StringFamilies {
  const common = buildStringSpace(space.orbitalCount, space.electrons - missing, Number.POSITIVE_INFINITY);
  const empty = space.orbitalCount - common.electrons;
  const members = missing === 1 ? empty : (empty * (empty - 1)) / 2;
  const strings = new Int32Array(common.count * members);
  const added = new Int32Array(strings.length);
  const isNegative = new Uint8Array(strings.length);
  const string = new Int32Array(space.words);
  for (let family = 0, entry = 0; family < common.count; family++) {
    const bits = stringAt(common, family);
    const reached: { place: number; orbitals: number; isOdd: number }[] = [];
    const reach = (orbitals: number, isOdd: number, ...additions: number[]) => {
      string.set(bits);
      for (const p of additions) string[p >> 5] |= 1 << (p & 31);
      reached.push({ place: placeOf(space, string), orbitals, isOdd });
    };
    const orbitals = emptyOrbitals(bits, space.orbitalCount);
    orbitals.forEach((p, i) => {
      if (missing === 1) reach(p, i % 2, p);
      else
        for (const [j, r] of orbitals.slice(0, i).entries()) reach((p * (p - 1)) / 2 + r, (i + j) % 2, p, r);
    });
    reached.sort((a, b) => a.place - b.place);
    for (const { place, orbitals, isOdd } of reached) {
      strings[entry] = place;
      added[entry] = orbitals;
      isNegative[entry++] = isOdd;
    }
  }
  return { count: common.count, members, strings, added, isNegative };
}

function emptyOrbitals(string: OccupationString, orbitalCount: number): number[] {
  return Array.from({ length: orbitalCount }, (_, p) => p).filter((p) => !isOccupied(string, p));
}

import { describe, expect, it } from 'vitest';
import {
  occupiedOrbitals,
  orbitalsOnlyIn,
  replacementPhase,
} from '../../../engine/configuration-interaction/determinants';
import { findFamilies } from '../../../engine/configuration-interaction/string-families';
import { buildStringSpace, stringAt } from '../../../engine/configuration-interaction/string-space';

const WHOLE = Number.POSITIVE_INFINITY;

describe('findFamilies', () => {
  it.each([1, 2] as const)(
    'identity: every string is in one family for each choice of %i of its electrons',
    (missing) => {
      const electrons = 4;
      const space = buildStringSpace(7, electrons, WHOLE);
      const { count, members, strings } = findFamilies(space, missing);
      const memberships = new Int32Array(space.count);
      for (const string of strings) memberships[string]++;
      expect(new Set(memberships)).toEqual(
        new Set([missing === 1 ? electrons : (electrons * (electrons - 1)) / 2]),
      );
      for (let family = 0; family < count; family++) {
        const ofFamily = strings.subarray(family * members, (family + 1) * members);
        expect(ofFamily).toEqual(ofFamily.slice().sort());
        const common = Array.from(ofFamily, (string) => occupiedOrbitals(stringAt(space, string))).reduce(
          (shared, orbitals) => shared.filter((p) => orbitals.includes(p)),
        );
        expect(common).toHaveLength(electrons - missing);
      }
    },
  );

  it('identity: signs of two members, and of the orbitals they add, make the sign of the replacement', () => {
    const space = buildStringSpace(34, 3, WHOLE);
    const { count, members, strings, added, isNegative } = findFamilies(space, 1);
    for (let family = 0; family < count; family += 50) {
      const first = family * members;
      for (let other = first + 1; other < first + members; other++) {
        const [from, to] = [stringAt(space, strings[first]), stringAt(space, strings[other])];
        expect(orbitalsOnlyIn(from, to)).toEqual([added[first]]);
        expect(orbitalsOnlyIn(to, from)).toEqual([added[other]]);
        const exponent = isNegative[first] + isNegative[other] + added[first] + added[other];
        expect(exponent % 2 === 0 ? 1 : -1).toBe(replacementPhase(from, added[first], added[other]));
      }
    }
  });
});

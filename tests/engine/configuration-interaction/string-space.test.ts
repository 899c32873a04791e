import { describe, expect, it } from 'vitest';
import { occupationString, occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import {
  buildStringSpace,
  placeOf,
  rankCounts,
  stringAt,
} from '../../../engine/configuration-interaction/string-space';
import { choices } from '../../support/operator-algebra';

describe('buildStringSpace', () => {
  it.each([
    [6, 3, Number.POSITIVE_INFINITY],
    [7, 2, 1],
    [8, 5, 2],
    [5, 0, 3],
    [5, 5, 3],
    [34, 2, 2],
    [66, 3, 2],
  ])(
    'identity: %i orbitals, %i electrons, rank %d: every string once, in order of rank, at its place',
    (n, electrons, limit) => {
      const space = buildStringSpace(n, electrons, limit);
      const rank = (occupied: number[]) => occupied.filter((p) => p >= electrons).length;
      const expected = choices(n, electrons).filter((occupied) => rank(occupied) <= limit);
      expect(space.count).toBe(expected.length);
      const seen = new Set<string>();
      for (let place = 0; place < space.count; place++) {
        const string = stringAt(space, place);
        const occupied = occupiedOrbitals(string);
        seen.add(occupied.join());
        if (placeOf(space, string) !== place || space.ranks[place] !== rank(occupied)) {
          expect.fail(`string ${occupied} stands at ${place}`);
        }
        if (place > 0) expect(space.ranks[place]).toBeGreaterThanOrEqual(space.ranks[place - 1]);
      }
      expect([...seen].sort()).toEqual(expected.map((occupied) => occupied.join()).sort());
      expect(rankCounts(space).reduce((sum, count) => sum + count, 0)).toBe(space.count);
      expect(occupiedOrbitals(stringAt(space, 0))).toEqual(Array.from({ length: electrons }, (_, p) => p));
    },
  );

  it('identity: a string beyond the highest rank has no place', () => {
    const space = buildStringSpace(40, 3, 1);
    expect(placeOf(space, occupationString(40, [0, 33, 39]))).toBe(-1);
    expect(placeOf(space, occupationString(40, [0, 1, 39]))).toBeGreaterThan(0);
  });
});

import { describe, expect, it } from 'vitest';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import {
  countSameSpinEntries,
  countSingleReplacements,
  findSingleReplacements,
  rankChange,
} from '../../../engine/configuration-interaction/replacements';
import {
  buildStringSpace,
  rankCounts,
  stringAt,
} from '../../../engine/configuration-interaction/string-space';
import { bruteOneElectron } from '../../support/operator-algebra';

const SPACES = [
  [5, 2, Number.POSITIVE_INFINITY],
  [6, 4, 1],
  [7, 3, 2],
  [4, 0, 2],
  [3, 3, 2],
] as const;

describe('findSingleReplacements', () => {
  it.each(SPACES)(
    'identity: %i orbitals, %i electrons, rank %d: all elements of a†p aq by operator algebra',
    (n, electrons, limit) => {
      const space = buildStringSpace(n, electrons, limit);
      const found = findSingleReplacements(space);
      const occupied = Array.from({ length: space.count }, (_, k) => occupiedOrbitals(stringAt(space, k)));
      const expected = new Map<string, number>();
      for (let p = 0; p < n; p++) {
        for (let q = 0; q < n; q++) {
          const operator = new Float64Array(n * n);
          operator[p * n + q] = 1;
          occupied.forEach((left, i) => {
            occupied.forEach((right, j) => {
              const element = bruteOneElectron(
                { alpha: left, beta: [] },
                { alpha: right, beta: [] },
                operator,
                n,
              );
              if (element !== 0) expected.set(`${p * n + q} ${i} ${j}`, element);
            });
          });
        }
      }
      const byString = new Map<string, number>();
      for (let i = 0; i < space.count; i++) {
        for (let e = found.byStringStart[i]; e < found.byStringStart[i + 1]; e++) {
          byString.set(`${found.pair[e]} ${i} ${found.source[e]}`, found.sign[e]);
        }
      }
      const byPair = new Map<string, number>();
      for (let pair = 0; pair < n * n; pair++) {
        for (let e = found.byPairStart[pair]; e < found.byPairStart[pair + 1]; e++) {
          byPair.set(`${pair} ${found.pairTarget[e]} ${found.pairSource[e]}`, found.pairSign[e]);
          const change = space.ranks[found.pairTarget[e]] - space.ranks[found.pairSource[e]];
          expect(change).toBe(rankChange(space, Math.trunc(pair / n), pair % n));
        }
      }
      expect(new Map([...byString].sort())).toEqual(new Map([...expected].sort()));
      expect(new Map([...byPair].sort())).toEqual(new Map([...expected].sort()));
      expect(countSingleReplacements(electrons, n - electrons, rankCounts(space))).toBe(expected.size);
      expect(found.pair).toHaveLength(expected.size);
    },
  );

  it.each(SPACES)(
    'identity: %i orbitals, %i electrons, rank %d: number of strings within two replacements',
    (n, electrons, limit) => {
      const space = buildStringSpace(n, electrons, limit);
      const occupied = Array.from({ length: space.count }, (_, k) => occupiedOrbitals(stringAt(space, k)));
      const near = occupied.flatMap((left) =>
        occupied.filter((right) => right.filter((p) => !left.includes(p)).length <= 2),
      );
      expect(countSameSpinEntries(electrons, n - electrons, rankCounts(space))).toBe(near.length);
    },
  );
});

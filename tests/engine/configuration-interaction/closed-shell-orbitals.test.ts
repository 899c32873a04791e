import { describe, expect, it } from 'vitest';
import {
  listPairs,
  listSingles,
  pairPlace,
  pairsOf,
  sortOrbitals,
} from '../../../engine/configuration-interaction/closed-shell-orbitals';

const IRREPS = [3, 0, 5, 0, 3, 3, 1];
const orbitals = sortOrbitals(4, IRREPS);

describe('sortOrbitals', () => {
  it('identity: keeps every orbital, those of one representation side by side and rising', () => {
    expect(orbitals.orbitals).toEqual([5, 7, 10, 4, 8, 9, 6]);
    expect(orbitals.irreps).toEqual([0, 0, 1, 3, 3, 3, 5]);
    expect(orbitals.start).toEqual([0, 2, 3, 3, 6, 6, 7, 7, 7]);
  });
});

describe('listPairs', () => {
  it.each([true, false])('identity: gives every pair its own place, strict %s', (isStrict) => {
    const list = listPairs(orbitals, isStrict);
    let count = 0;
    for (let irrep = 0; irrep < 8; irrep++) {
      const pairs = pairsOf(list, irrep);
      expect(pairs).toHaveLength(list.size[irrep]);
      pairs.forEach(([x, y], place) => {
        expect(orbitals.irreps[x] ^ orbitals.irreps[y]).toBe(irrep);
        expect(pairPlace(list, x, y)).toBe(place);
      });
      count += pairs.length;
    }
    expect(count).toBe(isStrict ? 21 : 28);
  });
});

describe('listSingles', () => {
  it('identity: runs of the particles that the representation leaves, and all excitations in one of them', () => {
    const holes = sortOrbitals(0, [3, 0, 1]);
    const { size, start } = listSingles(holes, orbitals);
    expect(size.reduce((sum, ofIrrep) => sum + ofIrrep, 0)).toBe(3 * IRREPS.length);
    // holes by place are of 0, 1 and 3: to 3 lead particles of 3, of 2 and of 0
    expect(start[3]).toEqual([0, 3, 3, 5]);
  });
});

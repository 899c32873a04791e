import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  countBits,
  isOccupied,
  moveElectron,
  occupationString,
  occupiedOrbitals,
  orbitalsOnlyIn,
  replacementPhase,
  replacementsBetween,
  wordsOf,
} from '../../../engine/configuration-interaction/determinants';
import { applyOperators, occupationBits } from '../../support/operator-algebra';

const orbitals = (n: number) => fc.uniqueArray(fc.nat(n - 1)).map((p) => p.sort((a, b) => a - b));

describe('occupation strings', () => {
  it('identity: hold any set of up to 130 orbitals', () => {
    fc.assert(
      fc.property(orbitals(130), (occupied) => {
        const string = occupationString(130, occupied);
        expect(string).toHaveLength(5);
        expect(occupiedOrbitals(string)).toEqual(occupied);
        for (let p = 0; p < 130; p++) expect(isOccupied(string, p)).toBe(occupied.includes(p));
      }),
      { seed: 1 },
    );
    expect([0, 1, 32, 33, 62, 64, 65].map(wordsOf)).toEqual([1, 1, 1, 2, 2, 2, 3]);
  });

  it('identity: bits of every pattern of a word are counted', () => {
    fc.assert(
      fc.property(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }), (word) => {
        expect(countBits(word)).toBe((word >>> 0).toString(2).replaceAll('0', '').length);
      }),
      { seed: 2 },
    );
    expect(countBits(-1)).toBe(32);
  });

  it('identity: the phase of a replacement is that of a†(to)·a(from) by operator algebra', () => {
    const n = 70;
    const cases = fc.tuple(orbitals(n), fc.nat(n - 1), fc.nat(n - 1)).filter(([p]) => p.length > 0);
    fc.assert(
      fc.property(cases, ([occupied, pick, to]) => {
        const from = occupied[pick % occupied.length];
        if (to !== from && occupied.includes(to)) return;
        const string = occupationString(n, occupied);
        const start = occupationBits({ alpha: occupied, beta: [] }, n);
        const replaced = applyOperators(
          [
            { create: true, spinOrbital: to },
            { create: false, spinOrbital: from },
          ],
          new Map([[start, 1]]),
        );
        const phase = replacementPhase(string, from, to);
        moveElectron(string, from, to);
        expect([...replaced]).toEqual([
          [occupationBits({ alpha: occupiedOrbitals(string), beta: [] }, n), phase],
        ]);
      }),
      { seed: 3, numRuns: 300 },
    );
  });

  it('identity: differences between strings', () => {
    const first = occupationString(64, [0, 5, 31, 32, 63]);
    const second = occupationString(64, [0, 6, 31, 33, 63]);
    expect(orbitalsOnlyIn(first, second)).toEqual([5, 32]);
    expect(orbitalsOnlyIn(second, first)).toEqual([6, 33]);
    expect(replacementsBetween(first, second)).toBe(2);
  });
});

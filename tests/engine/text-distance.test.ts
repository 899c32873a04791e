import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { editDistance, nearestOf } from '../../engine/text-distance';

describe('editDistance', () => {
  it('published: kitten to sitting takes three edits', () => {
    expect(editDistance('kitten', 'sitting')).toMatchPublished({
      printed: '3',
      source:
        'the usual example of edit distance, as in the article “Levenshtein distance” of Wikipedia; value from memory',
    });
  });

  it('identity: swapped neighbours count once', () => {
    expect(editDistance('RFH', 'RHF')).toBe(1);
  });

  it('identity: symmetric, zero only for equal texts, at most the longer length, at least the difference', () => {
    const word = fc.string({ maxLength: 12 });
    fc.assert(
      fc.property(word, word, (a, b) => {
        const distance = editDistance(a, b);
        const [m, n] = [[...a].length, [...b].length];
        expect(distance).toBe(editDistance(b, a));
        expect(distance === 0).toBe(a === b);
        expect(distance).toBeLessThanOrEqual(Math.max(m, n));
        expect(distance).toBeGreaterThanOrEqual(Math.abs(m - n));
      }),
      { seed: 3 },
    );
  });

  it('identity: one more edit changes the distance by at most one', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 10 }), fc.string({ maxLength: 10 }), fc.nat(10), (a, b, place) => {
        const shortened = a.slice(0, place) + a.slice(place + 1);
        expect(Math.abs(editDistance(a, b) - editDistance(shortened, b))).toBeLessThanOrEqual(1);
      }),
      { seed: 4 },
    );
  });
});

describe('nearestOf', () => {
  const names = ['STO-3G', 'STO-6G', '6-31G', '6-31G*', 'cc-pVDZ'];

  it('identity: a mistyped name finds the one that was meant, whatever its case', () => {
    expect(nearestOf('sto3g', names)).toBe('STO-3G');
    expect(nearestOf('6-13G*', names)).toBe('6-31G*');
    expect(nearestOf('CC-PVDZ', names)).toBe('cc-pVDZ');
  });

  it('identity: a name that is like none finds nothing', () => {
    expect(nearestOf('unheard-of', names)).toBeUndefined();
    expect(nearestOf('x'.repeat(1e6), names)).toBeUndefined();
    expect(nearestOf('', names)).toBeUndefined();
  });
});

import { describe, expect, it } from 'vitest';
import { citation, loadPublishedSet, type PublishedSet } from '../../../engine/basis/published-set';

const set: PublishedSet = {
  name: 'trial',
  aliases: [],
  description: '',
  harmonics: 'cartesian',
  remarks: [
    { elements: ['H'], text: 'about H' },
    { elements: ['C', 'N'], text: 'about C and N' },
  ],
  elements: {
    H: { citations: ['hehre1972a'], shells: [{ l: [0], exponents: [2], coefficients: [[1]] }] },
    C: {
      citations: ['hehre1972a', 'dunning1989a'],
      uncited: ['s shells', 'd shell'],
      suspect: [{ shell: 1, row: 1, corrected: [0.4, 0.7], why: 'a digit was lost' }],
      shells: [
        {
          l: [0, 1],
          exponents: [5, 1],
          coefficients: [
            [0.5, 0.6],
            [0.7, 0.4],
          ],
        },
        {
          l: [2],
          exponents: [3, 1],
          coefficients: [
            [1, 0],
            [0.4, 0.07],
          ],
        },
      ],
    },
  },
};

describe('loadPublishedSet', () => {
  it('identity: rows become shells, suspect rows are replaced, zeros are dropped', () => {
    const { elements, harmonics } = loadPublishedSet(set, ['C']);
    expect(harmonics).toBe('cartesian');
    expect(elements).toEqual({
      C: [
        { angularMomentum: 0, exponents: [5, 1], coefficients: [0.5, 0.6] },
        { angularMomentum: 1, exponents: [5, 1], coefficients: [0.7, 0.4] },
        { angularMomentum: 2, exponents: [3], coefficients: [1] },
        { angularMomentum: 2, exponents: [3, 1], coefficients: [0.4, 0.7] },
      ],
    });
  });

  it('identity: only what concerns the elements asked for is cited and remarked on', () => {
    const hydrogen = loadPublishedSet(set, ['H']);
    expect(hydrogen.citations).toEqual([citation('hehre1972a')]);
    expect(hydrogen.notes).toEqual(['about H']);
    const both = loadPublishedSet(set, ['C', 'H', 'C']);
    expect(both.citations.map(({ key }) => key)).toEqual(['hehre1972a', 'dunning1989a']);
    expect(both.notes.slice(0, 4)).toEqual([
      'about H',
      'about C and N',
      'C: no paper is known for the s shells and the d shell.',
      'C, shell 2: coefficients corrected to 0.4, 0.7; a digit was lost.',
    ]);
  });

  it('identity: an element that the set lacks is refused with those it has', () => {
    expect(() => loadPublishedSet(set, ['N'])).toThrow(
      expect.objectContaining({ code: 'basis.elementMissing', message: expect.stringContaining('H, C') }),
    );
    expect(() => loadPublishedSet(set, ['constructor'])).toThrow(
      expect.objectContaining({ code: 'basis.elementMissing' }),
    );
  });

  it('identity: a paper that is not on file is a mistake', () => {
    expect(() => citation('nobody1900a')).toThrow(RangeError);
  });
});

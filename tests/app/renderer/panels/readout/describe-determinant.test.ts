import { describe, expect, it } from 'vitest';
import { describeDeterminant } from '../../../../../app/renderer/panels/readout/describe-determinant';

describe('a determinant in the readout', () => {
  it.each([
    ['reference', [0, 1, 2], [0, 1, 2]],
    ['2² → 5²', [0, 1, 5], [0, 1, 5]],
    ['2↑ → 5↑', [0, 1, 5], [0, 1, 2]],
    ['1↓ 2↑ → 3↓ 4↑', [0, 1, 4], [0, 2, 3]],
  ])('reads %s', (words, alpha, beta) => {
    expect(describeDeterminant({ alpha, beta })).toBe(words);
  });
});

import { describe, expect, it } from 'vitest';
import { nearest } from '../../../app/study/nearest';

describe('nearest', () => {
  it.each([
    ['lable', 'label'],
    ['Labels', 'label'],
    ['elemnt', 'element'],
    ['lebal', 'label'],
    ['xyz', undefined],
    ['', undefined],
  ])('of “%s” is %s', (word, expected) => {
    expect(nearest(word, ['label', 'element'])).toBe(expected);
  });

  it('prefers the same length among candidates as near', () => {
    expect(nearest('CSID', ['CIS', 'CISD'])).toBe('CISD');
  });

  it('is nothing where there is nothing to choose from', () => {
    expect(nearest('word', [])).toBeUndefined();
  });
});

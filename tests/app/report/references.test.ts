import { expect, it } from 'vitest';
import { Citations } from '../../../app/report/references';

it('numbers references in the order in which they are first named, each once', () => {
  const citations = new Citations();
  expect(citations.cite('a', 'b')).toBe('[1, 2]');
  expect(citations.cite('b')).toBe('[2]');
  expect(citations.cite('c', 'a', 'e', 'b')).toBe('[1–4]');
  expect(citations.cite('e', 'f', 'a')).toBe('[1, 4, 5]');
  expect(citations.cite()).toBe('');
  expect(citations.list).toEqual(['a', 'b', 'c', 'e', 'f']);
});

import { describe, expect, it } from 'vitest';
import { EMPTY_DRAFT } from '../../../../app/renderer/state/draft';
import { localMemory } from '../../../../app/renderer/state/remembered';

describe('what the window remembers', () => {
  it('comes back as it was', () => {
    const kept = new Map<string, string>();
    const memory = localMemory({
      getItem: (key) => kept.get(key) ?? null,
      setItem: (key, value) => void kept.set(key, value),
    });
    expect(memory.load()).toEqual({});
    memory.save({ draft: { ...EMPTY_DRAFT, title: 'Ü' } });
    expect(memory.load()).toEqual({ draft: { ...EMPTY_DRAFT, title: 'Ü' } });
  });

  it('is nothing where storage is forbidden, full or damaged, and nothing fails', () => {
    const memory = localMemory({
      getItem: () => '{ "draft": ',
      setItem: () => {
        throw new DOMException('full', 'QuotaExceededError');
      },
    });
    memory.save({ draft: EMPTY_DRAFT });
    expect(memory.load()).toEqual({});
  });
});

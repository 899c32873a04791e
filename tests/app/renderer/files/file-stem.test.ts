import { describe, expect, it } from 'vitest';
import { fileStem } from '../../../../app/renderer/files/file-stem';

describe('suggested file names', () => {
  it('come from the title, in letters that every system takes', () => {
    expect(fileStem('Pulling HeH+ apart: once/twice?', 'x')).toBe('pulling-heh+-apart-once-twice');
    expect(fileStem('Wasserstoff in der Röhre', 'x')).toBe('wasserstoff-in-der-ro-hre');
  });

  it('come from what else there is when the title gives nothing', () => {
    expect(fileStem('…', 'Pull the H–H bond of H₂')).toBe('pull-the-h-h-bond-of-h2');
    expect(fileStem('', '')).toBe('study');
  });
});

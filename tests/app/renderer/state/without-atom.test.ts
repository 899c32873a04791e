import { describe, expect, it } from 'vitest';
import { EMPTY_ATOM, EMPTY_DRAFT } from '../../../../app/renderer/state/draft';
import { withoutAtom } from '../../../../app/renderer/state/without-atom';

describe('removing an atom', () => {
  it('renumbers what comes after it in the scan, and drops its bonds', () => {
    const draft = {
      ...EMPTY_DRAFT,
      atoms: ['O', 'H', 'C', 'N'].map((element) => ({ ...EMPTY_ATOM, element })),
      scan: {
        ...EMPTY_DRAFT.scan,
        bonds: [
          [0, 1],
          [2, 3],
        ] as const,
        angle: [0, 2, 3] as const,
        dihedral: [3, 2, 0, 1] as const,
      },
    };
    const { atoms, scan } = withoutAtom(draft, 1);
    expect(atoms.map(({ element }) => element)).toEqual(['O', 'C', 'N']);
    expect(scan.bonds).toEqual([[1, 2]]);
    expect(scan.angle).toEqual([0, 1, 2]);
    expect(scan.dihedral).toEqual([2, 1, 0, 1]);
  });
});

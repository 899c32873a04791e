import { describe, expect, it } from 'vitest';
import type { Fragment, StudyMolecule } from '#engine';
import { depthReference, fragmentsText } from '../../../app/study/fragments-text';

const molecule: StudyMolecule = {
  unit: 'angstrom',
  atoms: [
    { element: 'Li', at: [0, 0, 0] },
    { element: 'H', at: [0, 0, 1.6] },
  ],
};
const part = (atom: number, charge: number, excitation?: number): Fragment => ({
  atoms: [atom],
  charge,
  multiplicity: 2,
  energy: -1,
  level: 'FCI',
  ...(excitation !== undefined && { excitation }),
});
const limit = (one: Fragment, other: Fragment) =>
  ({ kind: 'found', energy: -2, fragments: [one, other] }) as const;

describe('fragmentsText', () => {
  it('names ions by their charges', () => {
    expect(fragmentsText(molecule, limit(part(0, 1), part(1, -1)))).toBe('Li⁺ + H⁻');
  });

  it('says how far an excited fragment lies above its lowest state', () => {
    expect(fragmentsText(molecule, limit(part(0, 0, 0.0712), part(1, 0, 0)))).toBe('Li (+1.937 eV) + H');
  });
});

describe('depthReference', () => {
  const place = (x: number) => `the end at ${x}`;

  it('is the fragments where they are known, else the end of the curve', () => {
    const depth = { value: 0.1, against: 'fragments', farEnd: 6, valueAgainstFarEnd: 0.1 } as const;
    expect(depthReference(molecule, depth, limit(part(0, 0), part(1, 0)), place)).toBe('Li + H');
    const without = { kind: 'none', reason: 'Too short.' } as const;
    expect(depthReference(molecule, { value: 0.1, against: 'farEnd', farEnd: 6 }, without, place)).toBe(
      'the end at 6',
    );
  });
});

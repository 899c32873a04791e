import { describe, expect, it } from 'vitest';
import { scalableBasis } from '../../../engine/basis/scalable-basis';
import { stoNgBasisSet } from '../../../engine/basis/sto-ng';

describe('scalableBasis', () => {
  it('identity: starts from the standard factors with those of the study in their place', () => {
    const scaleFactors = { Li: { '2sp': 0.7 } };
    const basis = scalableBasis({ name: 'sto-3g', scaleFactors, optimiseScale: true }, ['H', 'Li', 'H']);
    expect(basis?.start).toEqual({ H: { '1s': 1.24 }, Li: { '1s': 2.69, '2sp': 0.7 } });
  });

  it('identity: other factors give the set that a study with these factors gets', () => {
    const factors = { H: { '1s': 1.1 } };
    const basis = scalableBasis({ name: 'STO-4G', optimiseScale: true }, ['H']);
    expect(basis?.with(factors)).toEqual(stoNgBasisSet(4, ['H'], factors));
  });

  it('identity: nothing is optimised unless asked for', () => {
    expect(scalableBasis('STO-3G', ['H'])).toBeUndefined();
    expect(scalableBasis({ name: 'STO-3G', optimiseScale: false }, ['H'])).toBeUndefined();
    expect(scalableBasis({ name: 'STO-3G', scaleFactors: {} }, ['H'])).toBeUndefined();
  });

  it('identity: sets without Slater exponents are refused at their place', () => {
    expect(() => scalableBasis({ name: '6-31G', optimiseScale: true }, ['H'])).toThrow(
      expect.objectContaining({ code: 'basis.scaleFactor', place: 'basis.optimiseScale' }),
    );
  });
});

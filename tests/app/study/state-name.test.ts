import { describe, expect, it } from 'vitest';
import { curveName, stateName } from '../../../app/study/state-name';

describe('stateName', () => {
  it('writes terms of linear molecules with multiplicity, parity and reflection', () => {
    const term = { lambda: 0, inversion: 'g', reflection: '+' } as const;
    expect(stateName('singlet', { irrep: 'Ag', term })).toBe('¹Σg⁺');
    expect(stateName('triplet', { irrep: 'B1g', term: { ...term, reflection: '-' } })).toBe('³Σg⁻');
    expect(stateName('doublet', { irrep: 'B1', term: { lambda: 1 } })).toBe('²Π');
    expect(stateName('singlet', { irrep: 'Ag', term: { lambda: 2, inversion: 'g' } })).toBe('¹Δg');
  });

  it('writes representations where there is no term', () => {
    expect(stateName('singlet', { irrep: 'B1' })).toBe('¹B₁');
    expect(stateName('quintet', { irrep: 'B3u' })).toBe('⁵B₃u');
    expect(stateName('doublet', { irrep: 'A″' })).toBe('²A″');
  });

  it('says what is not known', () => {
    expect(stateName('triplet', undefined)).toBe('triplet');
    expect(stateName('mixed', undefined)).toBe('mixed');
    expect(stateName('mixed', { irrep: 'A1' })).toBe('A₁, mixed spin');
  });

  it('falls back to the representation where Λ has no letter', () => {
    expect(stateName('singlet', { irrep: 'Ag', term: { lambda: 6 } })).toBe('¹Ag');
  });
});

describe('curveName', () => {
  it('counts states of one kind, and tells the partners of a degenerate pair apart', () => {
    const sigma = { irrep: 'B1u', term: { lambda: 0, inversion: 'u', reflection: '+' } } as const;
    expect(curveName({ spin: 'triplet', symmetry: sigma, number: 2 })).toBe('2 ³Σu⁺');
    expect(
      curveName({
        spin: 'singlet',
        symmetry: { irrep: 'B2u', term: { lambda: 1, inversion: 'u' } },
        number: 1,
      }),
    ).toBe('1 ¹Πu (B₂u)');
    expect(curveName({ spin: 'doublet', symmetry: { irrep: 'A1' }, number: 3 })).toBe('3 ²A₁');
  });

  it('says what is not known, without a comma that would split a field of a table', () => {
    expect(curveName({ spin: 'singlet', number: 2 })).toBe('singlet 2');
    expect(curveName({ spin: 'mixed', number: 1 })).toBe('mixed spin 1');
    expect(curveName({ spin: 'mixed', symmetry: { irrep: 'A1' }, number: 1 })).toBe('1 A₁ mixed spin');
  });
});

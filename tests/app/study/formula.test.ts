import { describe, expect, it } from 'vitest';
import { atomLabel, formula } from '../../../app/study/formula';

/** Atoms from a row of symbols; "2H" is an isotope. */
function atoms(symbols: string) {
  return symbols.split(' ').map((symbol) => {
    const [, isotope, element = ''] = /^(\d*)(\w+)$/.exec(symbol) ?? [];
    return { element, at: [0, 0, 0] as const, ...(isotope ? { isotope: Number(isotope) } : {}) };
  });
}

describe('formula', () => {
  it.each([
    ['H H', 0, 'H₂'],
    ['H He', 1, 'HeH⁺'],
    ['H H H', 1, 'H₃⁺'],
    ['H Li', 0, 'LiH'],
    ['Li Li', 0, 'Li₂'],
    ['Be H H', 0, 'BeH₂'],
    ['H B', 0, 'BH'],
    ['N H H H', 0, 'NH₃'],
    ['H N H H H', 1, 'NH₄⁺'],
    ['H O H', 0, 'H₂O'],
    ['O H', -1, 'OH⁻'],
    ['H O H H', 1, 'H₃O⁺'],
    ['F H', 0, 'HF'],
    ['Cl Na', 0, 'NaCl'],
    ['O C', 0, 'CO'],
    ['O C O', 0, 'CO₂'],
    ['H H H H C', 0, 'CH₄'],
    ['N C H', 0, 'CHN'],
    ['C C C C C C H H H H H H H H H H H H', 0, 'C₆H₁₂'],
    ['S O O O O', -2, 'SO₄²⁻'],
    ['Ar H', 1, 'ArH⁺'],
  ])('writes %s with charge %i as %s', (symbols, charge, expected) => {
    expect(formula({ atoms: atoms(symbols), charge })).toBe(expected);
  });

  it('names isotopes: D and T, others by their mass number', () => {
    expect(formula({ atoms: atoms('2H 1H') })).toBe('HD');
    expect(formula({ atoms: atoms('2H O 2H') })).toBe('D₂O');
    expect(formula({ atoms: atoms('O 13C') })).toBe('¹³CO');
    expect(atoms('3H 7Li H').map(atomLabel)).toEqual(['T', '⁷Li', 'H']);
  });

  it('leaves ghosts out', () => {
    const [he, h] = atoms('He H');
    expect(formula({ atoms: [he!, { ...h!, ghost: true }] })).toBe('He');
  });
});

import { describe, expect, it } from 'vitest';
import { isotopologueFormula } from '../../../../../app/renderer/panels/findings/vibration-tables';

const atoms = (...elements: string[]) =>
  elements.map((element) => ({ element, at: [0, 0, 0] as [number, number, number] }));

describe('isotopologues', () => {
  it('are named by their isotopes', () => {
    expect(isotopologueFormula({ unit: 'bohr', atoms: atoms('H', 'H'), charge: 1 }, [1, 2])).toBe('HD⁺');
    expect(isotopologueFormula({ unit: 'bohr', atoms: atoms('Li', 'H') }, [6, 2])).toBe('⁶LiD');
  });
});

import { describe, expect, it } from 'vitest';
import { placeOf } from '../../../app/study/place';

describe('placeOf', () => {
  it('joins keys and indices as users write them', () => {
    expect(placeOf(['molecule', 'atoms', 1, 'element'])).toBe('molecule.atoms[1].element');
    expect(placeOf(['basis', 'shells', 'H', 0])).toBe('basis.shells.H[0]');
    expect(placeOf([])).toBe('');
  });

  it('puts odd keys in quotes and cuts long ones', () => {
    expect(placeOf(['basis', 'my key'])).toBe('basis["my key"]');
    expect(placeOf(['x'.repeat(1000)])).toHaveLength(60);
  });
});

import { describe, expect, it } from 'vitest';
import { readPastedAtoms } from '../../../../app/renderer/state/pasted-atoms';
import { geometryLines } from '../../../../app/report/geometry-lines';
import { sampleResults } from '../../../support/sample-results';

describe('pasted atoms', () => {
  it('reads element and coordinates as they stand, whatever parts them', () => {
    expect(readPastedAtoms('O 0 0 0.117\n\n  H\t0.0, 0.757; -4.7e-1 \r\n')).toEqual({
      ok: true,
      atoms: [
        { element: 'O', at: ['0', '0', '0.117'], isotope: '', ghost: false },
        { element: 'H', at: ['0.0', '0.757', '-4.7e-1'], isotope: '', ghost: false },
      ],
    });
  });

  it('reads what `farwell report --geometry` prints', () => {
    const pasted = readPastedAtoms(geometryLines(sampleResults(), 0.7));
    expect(pasted.ok && pasted.atoms.map(({ element, at }) => [element, ...at.map(Number)])).toEqual([
      ['H', 0, 0, 0],
      ['H', 0, 0, 0.7],
    ]);
  });

  it('names the first line that is not an atom, and takes none', () => {
    expect(readPastedAtoms('H 0 0 0\nwater\n')).toEqual({ ok: false, line: 2, text: 'water' });
    expect(readPastedAtoms('H 0 0 zero')).toEqual({ ok: false, line: 1, text: 'H 0 0 zero' });
    expect(readPastedAtoms('H 0 0 0 1')).toMatchObject({ ok: false, line: 1 });
    expect(readPastedAtoms('')).toMatchObject({ ok: false });
  });
});

import { describe, expect, it } from 'vitest';
import { flowRows, textWidth, wrapText } from '../../../app/report/text-layout';

describe('wrapText', () => {
  const text = 'Pull the H–H bond of H₂ from 0.4 to 4 Å in 37 steps, in STO-3G, with RHF, CISD and FCI.';

  it('loses no word and keeps lines within the width', () => {
    const lines = wrapText(text, 7, 150);
    expect(lines.join(' ')).toBe(text);
    expect(lines.length).toBeGreaterThan(1);
    for (const line of lines) expect(textWidth(line, 7)).toBeLessThanOrEqual(150);
  });

  it('leaves a word that is longer than a line whole', () => {
    expect(wrapText('a incomprehensibilities b', 10, 30)).toEqual(['a', 'incomprehensibilities', 'b']);
  });
});

describe('flowRows', () => {
  it('starts a new row where the next item would not fit', () => {
    expect(flowRows([40, 40, 40], 100, 10)).toEqual({
      places: [
        { x: 0, row: 0 },
        { x: 50, row: 0 },
        { x: 0, row: 1 },
      ],
      rows: 2,
    });
  });

  it('has no rows without items', () => {
    expect(flowRows([], 100, 10).rows).toBe(0);
  });
});

import { describe, expect, it } from 'vitest';
import { printFigure, wrap } from '../../../../app/renderer/charts/print-figure';
import { sampleResults } from '../../../support/sample-results';

const { study, points } = sampleResults();
const figureOf = (caption: string) =>
  printFigure(
    {
      study,
      points,
      hiddenLevels: [],
      levelsOf: undefined,
      energyUnit: 'hartree',
      energyReference: 'absolute',
      lengthUnit: 'angstrom',
    },
    caption,
  );

describe('the figure for print', () => {
  it('is on white, names its levels, and names only fonts that every machine has', () => {
    const { layout } = figureOf('');
    expect(layout).toMatchObject({ paper_bgcolor: '#ffffff', showlegend: true });
    expect(layout.font?.family).toBe('Helvetica, Arial, sans-serif');
  });

  it('has the study sentence below, in lines that fit, never as markup', () => {
    const caption = `Pull the <b>bond</b> & more: ${'word '.repeat(60)}`.trim();
    const { layout, height } = figureOf(caption);
    const text = String(layout.annotations?.at(-1)?.text);
    expect(text).toContain('&lt;b&gt;bond&lt;/b&gt; &amp; more');
    expect(text.split('<br>').length).toBeGreaterThan(2);
    expect(height).toBeGreaterThan(figureOf('short').height);
  });

  it('breaks lines at spaces only', () => {
    expect(wrap('one two three', 7)).toEqual(['one two', 'three']);
    expect(wrap('unbreakable', 3)).toEqual(['unbreakable']);
  });
});

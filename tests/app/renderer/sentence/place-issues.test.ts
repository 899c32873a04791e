import { describe, expect, it } from 'vitest';
import { placeIssues } from '../../../../app/renderer/sentence/place-issues';
import { sentenceParts } from '../../../../app/study/sentence';
import { sampleStudy } from '../../../support/sample-results';

const issue = (place: string) => ({ code: 'x', place, message: '', remedy: '' });
const placesOf = (places: readonly string[], study = sampleStudy) =>
  Object.fromEntries(
    [...placeIssues(places.map(issue), sentenceParts(study))].map(([place, issues]) => [
      place,
      issues.map((one) => one.place),
    ]),
  );

describe('where issues are shown', () => {
  it('is the word of the sentence that stands for the value', () => {
    expect(
      placesOf(['scan.to', 'molecule.atoms[1].element', 'molecule.charge', 'basis', 'levels[2]']),
    ).toEqual({
      to: ['scan.to'],
      molecule: ['molecule.atoms[1].element', 'molecule.charge'],
      basis: ['basis'],
      levels: ['levels[2]'],
    });
  });

  it('is the levels for what the sentence leaves unsaid, where it is edited', () => {
    expect(placesOf(['states', 'convergence.energy', 'frozenCore'])).toEqual({
      levels: ['states', 'convergence.energy', 'frozenCore'],
    });
    expect(placesOf(['states'], { ...sampleStudy, states: 3 })).toEqual({ states: ['states'] });
  });

  it('is below the sentence for everything else: nothing wrong goes unsaid', () => {
    expect(placesOf(['', 'notes'])).toEqual({ study: ['', 'notes'] });
    const { scan: _, ...single } = sampleStudy;
    expect(placesOf(['scan.from'], single as typeof sampleStudy)).toEqual({ study: ['scan.from'] });
  });
});

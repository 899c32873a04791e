import { describe, expect, it } from 'vitest';
import { cautionSummary } from '../../../app/report/caution-summary';
import { sampleResults } from '../../support/sample-results';

const asAngstrom = (coordinate: number) => `${coordinate} Å`;

describe('cautionSummary', () => {
  it('says a caution that many points share once, with where it holds', () => {
    expect(cautionSummary(sampleResults(), asAngstrom)).toEqual([
      {
        lead: 'RHF between 2.1 Å and 4 Å (20 points)',
        text: 'The closed-shell solution is not the lowest one here: breaking the spin pairing lowers the energy.',
      },
    ]);
  });

  it('keeps cautions of different levels apart, and those of the whole curve without a place', () => {
    const results = sampleResults();
    const point = {
      ...results.points[0]!,
      cautions: ['CISD', 'FCI'].map((level) => ({ code: 'x', level, message: 'm.' })),
    };
    const whole = { code: 'basis.dependent', message: 'Two functions were dropped.' };
    expect(cautionSummary({ ...results, points: [point], cautions: [whole] }, asAngstrom)).toEqual([
      { lead: '', text: 'Two functions were dropped.' },
      { lead: 'CISD at 0.4 Å', text: 'm.' },
      { lead: 'FCI at 0.4 Å', text: 'm.' },
    ]);
  });

  it('gives the words of the first and of the last point where they differ', () => {
    const sample = sampleResults();
    const points = [0, 1, 2].map((index) => ({
      ...sample.points[index]!,
      cautions: [{ code: 'weight', level: 'FCI', message: `Weight 0.${9 - index}.` }],
    }));
    expect(cautionSummary({ ...sample, points }, asAngstrom)).toEqual([
      {
        lead: 'FCI between 0.4 Å and 0.6 Å (3 points)',
        text: 'Weight 0.9. At 0.6 Å: Weight 0.7.',
      },
    ]);
  });

  it('says what a caution means and what to do, and the range that it names', () => {
    const caution = {
      code: 'limit.wrong',
      level: 'RHF',
      range: [3, 4] as const,
      message: 'The limit is wrong.',
      meaning: 'The far part is no dissociation curve',
      remedy: 'Use full CI there.',
    };
    expect(cautionSummary({ ...sampleResults(), points: [], cautions: [caution] }, asAngstrom)).toEqual([
      {
        lead: 'RHF between 3 Å and 4 Å',
        text: 'The limit is wrong. The far part is no dissociation curve. Use full CI there.',
      },
    ]);
  });
});

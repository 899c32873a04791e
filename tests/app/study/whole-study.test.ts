import { describe, expect, it } from 'vitest';
import { explainStudy } from '#engine';
import { programSeconds, wholeStudy } from '../../../app/study/whole-study';
import { atom, prepare, study } from '../../support/studies';

describe('programSeconds', () => {
  const prepared = prepare({
    ...study([atom('H'), atom('H', 0, 0, 1.4)], { levels: ['RHF', 'FCI'] }),
    scan: { coordinate: { bonds: [[0, 1]] }, from: 1, to: 3, count: 40 },
  });
  const explanation = explainStudy(prepared);

  it('shares the work among cores, but not the start of the program', () => {
    const [one, two, four] = [1, 2, 4].map((cores) => programSeconds(explanation, cores)) as [
      number,
      number,
      number,
    ];
    expect(one - two).toBeCloseTo(wholeStudy(explanation).seconds / 2, 12);
    expect(two - four).toBeCloseTo(wholeStudy(explanation).seconds / 4, 12);
    expect(four).toBeGreaterThan(wholeStudy(explanation).seconds / 4);
  });
});

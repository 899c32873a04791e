import { describe, expect, it } from 'vitest';
import { prepareStudy, type Study } from '#engine';
import { atom, study } from '../../support/studies';

const SCAN = { coordinate: { bonds: [[0, 1]] }, values: [1, 1.4, 2] } as const;
const hydride = (findings: Study['findings']): Study => ({
  ...study([atom('Li'), atom('H', 0, 0, 3)], { levels: ['RHF'], scan: SCAN }),
  findings,
});
const water = (findings: Study['findings']): Study => ({
  ...study([atom('O'), atom('H', 0, 0, 1.8), atom('H', 0, 1.8, 0)], { levels: ['RHF'], scan: SCAN }),
  findings,
});
const errorsOf = (asked: Study) => {
  const preparation = prepareStudy(asked);
  return preparation.ok ? [] : preparation.errors.map(({ code, place }) => ({ code, place }));
};

describe('rotations and isotopologues of a study', () => {
  it('identity: isotopes that exist are taken, in the order of the atoms', () => {
    expect(
      errorsOf(
        hydride({
          rotation: [0, 4],
          isotopologues: [
            [6, 1],
            [7, 2],
          ],
        }),
      ),
    ).toEqual([]);
  });

  it('identity: an isotope that does not exist is named with its place', () => {
    expect(
      errorsOf(
        hydride({
          isotopologues: [
            [7, 2],
            [7, 9],
          ],
        }),
      ),
    ).toEqual([{ code: 'molecule.unknownIsotope', place: 'findings.isotopologues[1][1]' }]);
  });

  it('identity: a mass number is missing where there are fewer than atoms', () => {
    expect(errorsOf(hydride({ isotopologues: [[7]] }))).toEqual([
      { code: 'study.isotopologue', place: 'findings.isotopologues[0]' },
    ]);
  });

  it.each([
    ['rotation', { rotation: [1] }],
    ['isotopologues', { isotopologues: [[16, 2, 2]] }],
  ] as const)('identity: %s of a molecule of three atoms is refused, not passed over', (key, findings) => {
    expect(errorsOf(water(findings))).toEqual([{ code: 'study.notDiatomic', place: `findings.${key}` }]);
  });
});

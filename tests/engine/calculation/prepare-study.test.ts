import { describe, expect, it } from 'vitest';
import { prepareStudy, type Study } from '#engine';
import { atom, prepare, study } from '../../support/studies';

function placesOf(request: Study): string[] {
  const preparation = prepareStudy(request);
  return preparation.ok ? [] : preparation.errors.map(({ code, place }) => `${code} ${place}`);
}

const H2 = [atom('H'), atom('H', 0, 0, 1.4)];

describe('prepareStudy', () => {
  it('identity: what is wrong beside a wrong charge is said with it', () => {
    const scan = { coordinate: { bonds: [[0, 7]] }, from: 1, to: 2, count: 3 } as const;
    expect(
      placesOf(study(H2, { charge: 0.5, scan, basis: 'STO-9G', levels: ['RHF', 'RHF'], states: 0 })).sort(),
    ).toEqual([
      'basis.unknown basis',
      'level.twice levels[1]',
      'molecule.charge molecule.charge',
      'scan.atomIndex scan.coordinate.bonds[0][1]',
      'study.states states',
    ]);
  });

  it('identity: an impossible spin hides neither the scan nor the basis', () => {
    const request = study(H2, {
      molecule: { unit: 'bohr', atoms: H2, multiplicity: 2 },
      scan: { coordinate: { bonds: [[0, 1]] }, values: [1, -1] },
      basis: { name: 'mine', shells: { He: [{ angularMomentum: 0, exponents: [1], coefficients: [1] }] } },
    });
    expect(placesOf(request)).toEqual([
      'molecule.spinMismatch molecule.multiplicity',
      'basis.elementMissing basis',
      'scan.value scan.values[1]',
    ]);
  });

  it('identity: an element that does not exist hides no wrong number of the scan', () => {
    const scan = { coordinate: { bonds: [[0, 1]] }, from: 1, to: 2, count: 1 } as const;
    expect(placesOf(study([atom('Xx'), atom('H', 0, 0, 1)], { scan }))).toEqual([
      'molecule.unknownElement molecule.atoms[0].element',
      'scan.count scan.count',
    ]);
  });

  it('identity: a threshold of the reference weight must lie between 0 and 1', () => {
    for (const referenceWeight of [0, 1, 90, -0.5, Number.NaN]) {
      expect(placesOf(study(H2, { findings: { referenceWeight } }))).toEqual([
        'study.referenceWeight findings.referenceWeight',
      ]);
    }
    expect(placesOf(study(H2, { findings: { referenceWeight: 0.5 } }))).toEqual([]);
  });
});

describe('prepareStudy in further bases', () => {
  it('identity: each basis has the same study with functions of its own', () => {
    const { functionCount, furtherBases } = prepare(
      study(H2, { findings: { bases: ['6-31G', 'cc-pVDZ'], counterpoise: true } }),
    );
    expect([functionCount, ...furtherBases.map((one) => one.functionCount)]).toEqual([2, 4, 10]);
    expect(furtherBases.map((one) => one.study.findings)).toEqual([
      { counterpoise: true },
      { counterpoise: true },
    ]);
  });

  it('identity: what is wrong with one of them is said at its place, what is wrong with all once', () => {
    const bases = ['cc-pVXZ', { name: '6-31G', scaleFactors: { H: { '1s': 1 } } }, { file: 'mine.json' }];
    expect(placesOf(study(H2, { states: 0, findings: { bases } }))).toEqual([
      'study.states states',
      'basis.unknown findings.bases[0]',
      'basis.scaleFactor findings.bases[1].scaleFactors',
      'basis.file findings.bases[2]',
    ]);
  });

  it('identity: a basis given twice is refused, other scale factors make another one', () => {
    const scaled = (factor: number) => ({ name: 'STO-3G', scaleFactors: { H: { '1s': factor } } });
    expect(placesOf(study(H2, { findings: { bases: ['6-31g', 'sto-3g', '6-31G'] } }))).toEqual([
      'basis.twice findings.bases[1]',
      'basis.twice findings.bases[2]',
    ]);
    expect(placesOf(study(H2, { findings: { bases: [scaled(1), scaled(1.1)] } }))).toEqual([]);
  });
});

import { describe, expect, it } from 'vitest';
import { evenTemperedBasisSet, explicitBasisSet } from '../../../engine/basis/explicit-basis';
import { findBasisSet } from '../../../engine/basis/library-index';
import { resolveBasis } from '../../../engine/basis/resolve-basis';
import { stoNgBasisSet } from '../../../engine/basis/sto-ng';

const shells = { H: [{ angularMomentum: 0, exponents: [3.4, 0.6], coefficients: [0.2, 0.9] }], He: [] };
const evenTempered = { H: [{ angularMomentum: 0, smallest: 0.03, ratio: 2.6, count: 9 }] };
const fileText = JSON.stringify({
  molssi_bse_schema: { schema_type: 'minimal', schema_version: '0.1' },
  function_types: ['gto'],
  elements: {
    1: {
      electron_shells: [
        {
          function_type: 'gto',
          region: '',
          angular_momentum: [0],
          exponents: ['0.5'],
          coefficients: [['1']],
        },
      ],
    },
  },
});

describe('resolveBasis', () => {
  it('identity: each form of request leads to its basis set', () => {
    expect(resolveBasis('6-31g', ['H', 'O'])).toEqual(findBasisSet('6-31G', ['H', 'O']));
    const scaleFactors = { He: { '1s': 2.0925 } };
    expect(resolveBasis({ name: 'STO-3G', scaleFactors }, ['He'])).toEqual(
      stoNgBasisSet(3, ['He'], scaleFactors),
    );
    const { H } = explicitBasisSet('my set', shells).elements;
    expect(resolveBasis({ name: 'my set', shells, harmonics: 'cartesian' }, ['H', 'H'])).toMatchObject({
      name: 'my set',
      harmonics: 'cartesian',
      elements: { H },
    });
    expect(resolveBasis({ name: 'even-tempered', evenTempered }, ['H'])).toEqual(
      evenTemperedBasisSet('even-tempered', evenTempered),
    );
    expect(resolveBasis({ file: 'sets/h.json' }, ['H'], { fileText }).elements).toEqual({
      H: [{ angularMomentum: 0, exponents: [0.5], coefficients: [1] }],
    });
  });

  it('identity: only elements of the molecule are kept', () => {
    expect(Object.keys(resolveBasis({ name: 'my set', shells }, ['He']).elements)).toEqual(['He']);
  });

  it('identity: an element of the molecule that a set of one’s own lacks is refused', () => {
    const refusal = expect.objectContaining({ code: 'basis.elementMissing' });
    expect(() => resolveBasis({ name: 'my set', shells }, ['H', 'Li'])).toThrow(refusal);
    expect(() => resolveBasis({ name: 'even-tempered', evenTempered }, ['He'])).toThrow(refusal);
    expect(() => resolveBasis({ file: 'h.json' }, ['C'], { fileText })).toThrow(refusal);
  });

  it('identity: a file that could not be read is refused by its name', () => {
    expect(() => resolveBasis({ file: 'lost.json' }, ['H'])).toThrow(
      expect.objectContaining({ code: 'basis.file', details: { file: 'lost.json' } }),
    );
  });
});

import { describe, expect, it } from 'vitest';
import type { BasisRequest, StudyAtom } from '#engine';
import { basisCautions } from '../../../engine/calculation/basis-cautions';
import { atom, prepare, study } from '../../support/studies';

const codesIn = (basis: BasisRequest, atoms: readonly StudyAtom[]) =>
  basisCautions(prepare(study(atoms, { basis }))).map(({ code }) => code);

describe('basisCautions', () => {
  it('identity: a function for each occupied shell is minimal, whatever the set is called', () => {
    const hydrogenFluoride = [atom('F'), atom('H', 0, 0, 1.7)];
    expect(codesIn('STO-6G', hydrogenFluoride)).toEqual(['basis.minimal']);
    const shells = { He: [{ angularMomentum: 0, exponents: [1.2], coefficients: [1] }] };
    expect(codesIn({ name: 'mine', shells }, [atom('He')])).toEqual(['basis.minimal']);
  });

  it('identity: more functions on any atom are more than that', () => {
    expect(codesIn('6-31G', [atom('He')])).toEqual([]);
    expect(codesIn('cc-pVDZ', [atom('H'), atom('H', 0, 0, 1.4)])).toEqual([]);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { prepareStudy, type Study } from '#engine';
import { canonicalJson, studyKey } from '../../../app/calculation/study-key';
import { helium } from '../../support/end-to-end-studies';

function keyOf(study: Study): string {
  const preparation = prepareStudy(study);
  if (!preparation.ok) throw preparation.errors[0];
  return studyKey(preparation.prepared);
}

describe('studyKey', () => {
  it('stays the same when only words or the order of keys change, or a default is written out', () => {
    const key = keyOf(helium);
    expect(key).toMatch(/^[0-9a-f]{64}$/);
    expect(keyOf({ ...helium, title: 'Another title', notes: 'Some notes' })).toBe(key);
    expect(keyOf(Object.fromEntries(Object.entries(helium).reverse()) as unknown as Study)).toBe(key);
    expect(
      keyOf({ ...helium, states: 1, frozenCore: false, molecule: { ...helium.molecule, multiplicity: 1 } }),
    ).toBe(key);
  });

  it('differs when anything differs that the numbers depend on', () => {
    const { molecule } = helium;
    const [first, second] = molecule.atoms;
    const changed: Study[] = [
      { ...helium, states: 2 },
      { ...helium, levels: ['RHF'] },
      { ...helium, basis: 'STO-6G' },
      { ...helium, basis: { name: 'STO-3G', scaleFactors: { H: { '1s': 1.3 } } } },
      { ...helium, convergence: { energy: 1e-9 } },
      { ...helium, scan: { coordinate: { bonds: [[0, 1]] }, from: 0.4, to: 4, count: 11 } },
      { ...helium, molecule: { ...molecule, unit: 'bohr' } },
      { ...helium, molecule: { ...molecule, atoms: [first!, { ...second!, isotope: 2 }] } },
    ];
    const keys = new Set([helium, ...changed].map(keyOf));
    expect(keys.size).toBe(changed.length + 1);
  });
});

describe('canonicalJson', () => {
  it('does not depend on the order of keys, and loses nothing', () => {
    fc.assert(
      fc.property(fc.dictionary(fc.string(), fc.jsonValue(), { noNullPrototype: true }), (object) => {
        const reversed = Object.fromEntries(Object.entries(object).reverse());
        expect(canonicalJson(reversed)).toBe(canonicalJson(object));
        expect(JSON.parse(canonicalJson(object))).toEqual(JSON.parse(JSON.stringify(object)));
      }),
      { seed: 20261201 },
    );
  });
});

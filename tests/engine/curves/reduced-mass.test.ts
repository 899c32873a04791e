import { describe, expect, it } from 'vitest';
import { reducedMass } from '../../../engine/curves/reduced-mass';

const H = { element: 'H' };

describe('reducedMass', () => {
  it('published: half a proton for bare H2, once the binding of the electrons is added', () => {
    const bindingInElectronMasses = 0.5 / 137.036 ** 2;
    expect(2 * reducedMass(H, H, 'nuclear') + bindingInElectronMasses).toMatchPublished({
      printed: '1836.15267',
      unit: 'electron masses',
      source:
        'proton–electron mass ratio, P. J. Mohr, D. B. Newell, B. N. Taylor, E. Tiesinga, Rev. Mod. Phys. 97, 025002 (2025), value from memory',
    });
  });

  it('identity: atoms are heavier than their nuclei by their electrons', () => {
    expect(2 * (reducedMass(H, H) - reducedMass(H, H, 'nuclear'))).toBeCloseTo(1, 9);
    const nitrogen = { element: 'N' };
    expect(2 * (reducedMass(nitrogen, nitrogen) - reducedMass(nitrogen, nitrogen, 'nuclear'))).toBeCloseTo(
      7,
      8,
    );
  });

  it('identity: the most abundant isotope stands where none is named, and order does not matter', () => {
    expect(reducedMass({ element: 'H', isotope: 1 }, { element: 'Cl', isotope: 35 })).toBe(
      reducedMass(H, { element: 'Cl' }),
    );
    const deuterium = { element: 'H', isotope: 2 };
    expect(reducedMass(H, deuterium)).toBeCloseTo(reducedMass(deuterium, H), 12);
  });

  it('identity: unknown elements and isotopes are refused', () => {
    expect(() => reducedMass(H, { element: 'Q' })).toThrow(/“Q”/);
    expect(() => reducedMass(H, { element: 'H', isotope: 9 })).toThrow(/mass number 9/);
  });
});

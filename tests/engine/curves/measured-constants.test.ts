import { describe, expect, it } from 'vitest';
import { BOHR_IN_ANGSTROM, HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import table from '../../../engine/curves/measured/diatomic-constants.json';
import {
  type MeasuredQuantity,
  type MeasuredState,
  measuredStates,
} from '../../../engine/curves/measured-constants';
import { reducedMass } from '../../../engine/curves/reduced-mass';

const HUBER_HERZBERG =
  'K. P. Huber, G. Herzberg, Constants of Diatomic Molecules, Van Nostrand Reinhold, New York (1979)';
const H = { element: 'H' };

const everyState = table.states.map(({ atoms: [first, second], charge, state }) => {
  const found = measuredStates(first, second, charge).find((candidate) => candidate.state === state);
  if (!found) throw new Error(`${state} is lost`);
  return {
    name: `${first.isotope}${first.element}${second.isotope}${second.element} ${charge} ${state}`,
    first,
    second,
    found,
  };
});
const measured = ({ constants }: MeasuredState, quantity: MeasuredQuantity) =>
  constants.find((constant) => constant.quantity === quantity)?.value;

describe('measuredStates', () => {
  it('published: constants of N2 and HF', () => {
    const [nitrogen] = measuredStates({ element: 'N' }, { element: 'N' }, 0);
    expect(measured(nitrogen, 'harmonicWavenumber')).toMatchPublished({
      printed: '2358.57',
      unit: 'cm⁻¹',
      source: HUBER_HERZBERG,
    });
    expect(measured(nitrogen, 'dissociationEnergy')).toMatchPublished({
      printed: '9.7594',
      unit: 'eV',
      source: HUBER_HERZBERG,
    });
    const [fluoride] = measuredStates({ element: 'F' }, H, 0);
    expect(measured(fluoride, 'equilibriumDistance')).toMatchPublished({
      printed: '0.916808',
      unit: 'Å',
      source: HUBER_HERZBERG,
    });
  });

  it('identity: Be is that of re and the masses, wherever both are given', () => {
    const compared = everyState.flatMap(({ name, first, second, found }) => {
      const [distance, constant] = [
        measured(found, 'equilibriumDistance'),
        measured(found, 'rotationalConstant'),
      ];
      // effective constants of NO are not related so simply; its note says so
      if (distance === undefined || constant === undefined || name.includes('14N16O')) return [];
      const exact =
        HARTREE_IN_WAVENUMBERS / (2 * reducedMass(first, second) * (distance / BOHR_IN_ANGSTROM) ** 2);
      expect(Math.abs(constant / exact - 1), name).toBeLessThan(0.004);
      return [name];
    });
    expect(compared.length).toBeGreaterThan(25);
  });

  it('identity: isotopologues follow the reduced mass: ωe as its root, ωexe as its inverse', () => {
    const [light] = measuredStates(H, H, 0);
    for (const isotope of [2, 3]) {
      const heavy = { element: 'H', isotope };
      const [state] = measuredStates(heavy, heavy, 0);
      const ratio = reducedMass(heavy, heavy) / reducedMass(H, H);
      expect(
        measured(light, 'harmonicWavenumber')! / measured(state, 'harmonicWavenumber')! / Math.sqrt(ratio),
      ).toBeCloseTo(1, 2);
      expect(measured(light, 'anharmonicity')! / measured(state, 'anharmonicity')! / ratio).toBeCloseTo(1, 1);
    }
  });

  it('identity: order of atoms does not matter; isotopologues, ions and excited states are kept apart', () => {
    const deuterium = { element: 'H', isotope: 2 };
    expect(measuredStates(H, deuterium, 0)).toEqual(measuredStates(deuterium, H, 0));
    expect(measuredStates(H, deuterium, 0)).not.toEqual(measuredStates(H, H, 0));
    expect(measuredStates(H, H, 1).map(({ state }) => state)).toEqual(['X ²Σg⁺']);
    const [ground, ...excited] = measuredStates(H, H, 0);
    expect(ground.isGroundState).toBe(true);
    expect(excited.length).toBeGreaterThan(3);
    expect(excited.every(({ isGroundState }) => !isGroundState)).toBe(true);
  });

  it('identity: what is not in the table is absent', () => {
    expect(measuredStates({ element: 'Ar' }, H, 1)).toEqual([]);
    expect(measuredStates(H, H, -1)).toEqual([]);
    expect(() => measuredStates(H, { element: 'Xx' }, 0)).toThrow(/Xx/);
  });

  it('identity: every constant is a number with a source and a known status', () => {
    for (const { name, found } of everyState)
      for (const { value, printed, source, status, unit } of found.constants) {
        expect(Number.isFinite(value), `${name} ${printed}`).toBe(true);
        expect(source, name).toMatch(/\(\d{4}\)/);
        expect(['seen', 'memory']).toContain(status);
        expect(['cm⁻¹', 'Å', 'eV', 'MHz']).toContain(unit);
      }
    expect(everyState.length).toBeGreaterThan(40);
  });
});

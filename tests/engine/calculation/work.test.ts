import { describe, expect, it } from 'vitest';
import { countWork, explainStudy, NOMINAL_SPEEDS, type Study } from '#engine';
import { secondsOf } from '../../../engine/calculation/work';
import { atom, prepare, study, waterAtoms } from '../../support/studies';

const water = (changes: Partial<Study> = {}) =>
  prepare(study(waterAtoms(1.8, 104.5), { levels: ['RHF', 'CIS', 'CISD', 'FCI'], ...changes }));
const workOf = (changes: Partial<Study> = {}) => countWork(water(changes)).together;

describe('countWork', () => {
  it('identity: repulsion integrals and their primitives are counted exactly for s functions', () => {
    // two functions of three primitives each: 6 integrals; 3 pairs of functions with 9 pairs of primitives each
    const { integrals } = countWork(prepare(study([atom('H'), atom('H', 0, 0, 1.4)]))).together;
    expect(integrals).toBe(6 * 10 + (3 * 9) ** 2 / 2);
  });

  it('identity: what levels share is counted once, and each level alone holds it', () => {
    const { shared, alone, together } = countWork(water());
    const own = (kind: keyof typeof shared) => alone.map((work) => work[kind] - shared[kind]);
    expect(together.integrals).toBe(shared.integrals);
    expect(together.products).toBe(own('products').reduce((sum, value) => sum + value, 0));
    // RHF needs no orbital integrals
    expect(alone.map(({ transformation }) => transformation > 0)).toEqual([false, true, true, true]);
  });

  it('identity: a point of a scan takes the more, the more bonds it breaks at once', () => {
    const modelOf = (one: string, other: string, isScan: boolean) => {
      const scan = { coordinate: { bonds: [[0, 1]] as const }, from: 1.8, to: 6, count: 9 };
      const atoms = [atom(one), atom(other, 0, 0, 2.2)];
      return countWork(prepare({ ...study(atoms, { levels: ['RHF', 'FCI'] }), ...(isScan && { scan }) }))
        .together.modelSpace;
    };
    const factors = [
      ['F', 'H'],
      ['C', 'O'],
      ['N', 'N'],
    ].map(([one, other]) => modelOf(one!, other!, true) / modelOf(one!, other!, false));
    expect(factors[1]).toBeCloseTo(2, 12);
    expect(factors[2]).toBeCloseTo(3, 12);
    expect(factors[0]).toBeGreaterThan(1);
    expect(factors[0]).toBeLessThan(factors[1]!);
  });

  it('identity: a larger basis, higher rank or more states are never less work', () => {
    const small = workOf();
    for (const more of [
      { basis: '6-31G' },
      { states: 3 },
      { orbitals: 'unrestricted', levels: ['RHF', 'CISD', 'FCI'] } as const,
    ]) {
      const large = workOf(more);
      expect(secondsOf(large, NOMINAL_SPEEDS)).toBeGreaterThan(secondsOf(small, NOMINAL_SPEEDS));
    }
    expect(workOf({ levels: ['CISDT'] }).products).toBeGreaterThan(workOf({ levels: ['CISD'] }).products);
    expect(workOf({ frozenCore: true }).products).toBeLessThan(small.products);
  });

  it('identity: seconds are in proportion to the speeds of the machine', () => {
    const half = Object.fromEntries(
      Object.entries(NOMINAL_SPEEDS).map(([kind, speed]) => [kind, speed / 2]),
    ) as typeof NOMINAL_SPEEDS;
    const prepared = water();
    expect(2 * explainStudy(prepared, half).pointSeconds).toBeCloseTo(
      explainStudy(prepared).pointSeconds,
      12,
    );
  });
});

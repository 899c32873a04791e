import { describe, expect, it } from 'vitest';
import type { CorrelatedResult, CorrelationParts, HartreeFockResult, Study } from '#engine';
import { atom, compute, correlated, study, waterAtoms } from '../../support/studies';

const energyOf = (point: ReturnType<typeof compute>, level: string) =>
  (point.levels[level] as HartreeFockResult).energy;

const sumOf = (parts: readonly { readonly energy: number }[]) =>
  parts.reduce((sum, { energy }) => sum + energy, 0);

function projectedParts({ projected }: CorrelationParts) {
  if (projected.kind === 'none') throw new Error(projected.reason);
  return projected;
}

const open = (atoms: Study['molecule']['atoms'], multiplicity: number, changes: Partial<Study>): Study => ({
  ...study(atoms, changes),
  molecule: { unit: 'bohr', atoms, multiplicity },
});
const water = waterAtoms(2.2, 104);
const CASES: readonly (readonly [string, 'RHF' | 'ROHF' | 'UHF', Study])[] = [
  ['a closed shell', 'RHF', study(water, { levels: ['CISD', 'CISDT'] })],
  ['frozen core', 'RHF', study(water, { levels: ['CISD', 'FCI'], frozenCore: true })],
  [
    'active orbitals',
    'RHF',
    study(water, { levels: ['CISD', 'CISDTQ'], active: { electrons: 6, orbitals: 5 } }),
  ],
  ['an open shell', 'ROHF', open([atom('O'), atom('H', 0, 0, 2.4)], 2, { levels: ['ROHF', 'CISD', 'FCI'] })],
  [
    'a triplet, frozen core',
    'ROHF',
    open([atom('O')], 3, { levels: ['ROHF', 'CISD'], basis: '6-31G', frozenCore: true }),
  ],
  [
    'UHF orbitals',
    'UHF',
    study(waterAtoms(4, 104), { levels: ['RHF', 'UHF', 'CISD', 'CISDT'], orbitals: 'unrestricted' }),
  ],
  [
    'UHF orbitals of an open shell, frozen core',
    'UHF',
    open([atom('O'), atom('H', 0, 0, 2.4)], 2, {
      levels: ['UHF', 'CISD'],
      orbitals: 'unrestricted',
      frozenCore: true,
    }),
  ],
];

describe('correlation of CI levels', () => {
  it.each(CASES)(
    'identity: %s: parts by rank and by pair each add up to E(CI) − E(%s)',
    (_, field, request) => {
      const point = compute({ ...request, levels: [...new Set([field, ...request.levels])] });
      const levels = Object.values(point.levels).filter((result) => result.kind === 'correlated');
      expect(levels.length).toBeGreaterThan(0);
      for (const { energy, correlationParts } of levels) {
        const correlation = energy - energyOf(point, field);
        expect(correlation).toBeLessThan(-1e-3);
        expect(Math.abs(correlationParts!.total - correlation)).toBeLessThan(1e-10);
        expect(Math.abs(sumOf(correlationParts!.byRank) - correlation)).toBeLessThan(1e-10);
        const { singles, pairs } = projectedParts(correlationParts!);
        expect(Math.abs(sumOf([...singles, ...pairs]) - correlation)).toBeLessThan(1e-10);
      }
    },
  );

  it('identity: orbitals are counted over all, frozen ones included', () => {
    const request = study(water, { levels: ['CISD'] });
    const [whole, frozen] = [request, { ...request, frozenCore: true }].map((each) =>
      correlated(compute(each), 'CISD'),
    );
    const pairsOf = ({ correlationParts }: CorrelatedResult) =>
      new Map(
        projectedParts(correlationParts!).pairs.map(({ orbitals, energy }) => [orbitals.join(), energy]),
      );
    const [all, outer] = [pairsOf(whole!), pairsOf(frozen!)];
    expect(outer.size).toBe(10);
    expect(all.size).toBe(15);
    // valence pairs hardly feel whether the core is correlated
    for (const [key, energy] of outer) expect(Math.abs(all.get(key)! - energy)).toBeLessThan(1e-3);
    const { configurations, leading } = frozen!.states[0]!;
    expect(configurations![0]!.doublyOccupied).toEqual(leading[0]!.alpha);
  });

  it('identity: of the two states of a Π term the one that holds the reference stands first, in any orientation', () => {
    const weights = [atom('H', 0, 0, 2.4), atom('H', 2.4, 0, 0), atom('H', 0, 2.4, 0)].map((hydrogen) => {
      const request = open([atom('O'), hydrogen], 2, { levels: ['FCI'], states: 2 });
      return correlated(compute(request)).states.map(({ referenceWeight }) => referenceWeight);
    });
    for (const [first, second] of weights) {
      expect(first).toBeGreaterThan(0.8);
      expect(second).toBeLessThan(1e-9);
    }
  });

  it('identity: Brillouin’s theorem: single excitations from a closed shell give nothing directly', () => {
    const { correlationParts } = correlated(compute(study(water, { levels: ['CISD'] })), 'CISD');
    for (const { energy } of projectedParts(correlationParts!).singles)
      expect(Math.abs(energy)).toBeLessThan(1e-7);
  });

  it('identity: H2 in a minimal basis: one pair, two configurations, occupations 2c², unpaired electrons', () => {
    const levels = ['RHF', 'FCI'];
    for (const distance of [1.4, 4]) {
      const point = compute(study([atom('H'), atom('H', 0, 0, distance)], { levels }));
      const { correlationParts, states, naturalOccupations, unpairedElectrons, correlation } =
        correlated(point);
      expect(projectedParts(correlationParts!).pairs).toHaveLength(1);
      expect(Math.abs(projectedParts(correlationParts!).pairs[0]!.energy - correlation)).toBeLessThan(1e-11);
      const { configurations } = states[0]!;
      expect(configurations!.map(({ doublyOccupied }) => doublyOccupied)).toEqual([[0], [1]]);
      configurations!.forEach(({ weight }, k) => {
        expect(Math.abs(2 * weight - naturalOccupations[k]!)).toBeLessThan(1e-10);
      });
      expect(unpairedElectrons!.linear).toBeCloseTo(2 * naturalOccupations[1]!, 10);
    }
  });

  it('identity: two hydrogen atoms far apart have two unpaired electrons, and a triplet has them at any distance', () => {
    const point = compute(
      study([atom('H'), atom('H', 0, 0, 14)], { levels: ['FCI'], states: 2, basis: '6-31G' }),
    );
    for (const { unpairedElectrons } of correlated(point).states) {
      expect(unpairedElectrons!.linear).toBeCloseTo(2, 5);
      expect(unpairedElectrons!.quartic).toBeCloseTo(2, 5);
    }
    const triplet = correlated(compute(open([atom('H'), atom('H', 0, 0, 1.4)], 3, { levels: ['FCI'] })));
    expect(triplet.unpairedElectrons!.quadratic).toBeCloseTo(2, 10);
    expect(triplet.states[0]!.configurations).toEqual([
      { weight: expect.closeTo(1, 10), doublyOccupied: [], singlyOccupied: [0, 1] },
    ]);
  });

  it('identity: configurations need orbitals that both spins share', () => {
    const request = study([atom('H'), atom('H', 0, 0, 5)], { levels: ['FCI'], orbitals: 'unrestricted' });
    expect(correlated(compute(request)).states[0]).not.toHaveProperty('configurations');
  });

  it('identity: MP2 says that it has no energy parts', () => {
    const point = compute(study(water, { levels: ['MP2'] }));
    expect(point.levels.MP2).toMatchObject({
      energyParts: { kind: 'none', reason: expect.stringContaining('expectation') },
    });
  });
});

import { describe, expect, it } from 'vitest';
import type { HartreeFockResult, StudyAtom } from '#engine';
import { anywhere } from '../../support/orientation';
import { seededRandom } from '../../support/random';
import { compute, study } from '../../support/studies';
import * as molecules from '../../support/symmetric-molecules';

const random = seededRandom(3);

function hartreeFock(
  atoms: readonly StudyAtom[],
  changes: Parameters<typeof study>[1] = {},
): HartreeFockResult {
  const result = compute(study(anywhere(atoms, random), changes)).levels[changes.levels?.[0] ?? 'RHF'];
  if (result?.kind !== 'hartreeFock') throw new Error(`is ${result?.kind}`);
  return result;
}

/** in the order of their energies; partners of a degenerate pair have equal names */
const labels = (result: HartreeFockResult) => result.orbitalSymmetries as readonly (string | null)[];

describe('orbital labels, in any orientation', () => {
  it.each([
    [
      'water',
      molecules.water,
      '1a1 2a1 1b2 3a1 1b1',
      'Szabo, Ostlund, Modern Quantum Chemistry (1989), sec. 3.7',
    ],
    ['nitrogen', molecules.nitrogen, '1σg 1σu 2σg 2σu 1πu 1πu 3σg', 'Szabo, Ostlund (1989), sec. 3.7'],
    ['carbon monoxide', molecules.carbonMonoxide, '1σ 2σ 3σ 4σ 1π 1π 5σ', 'Szabo, Ostlund (1989), sec. 3.7'],
    [
      'hydrogen fluoride',
      molecules.hydrogenFluoride,
      '1σ 2σ 3σ 1π 1π',
      'G. Herzberg, Diatomic Molecules (1950)',
    ],
    [
      'acetylene',
      molecules.acetylene,
      '1σg 1σu 2σg 2σu 3σg 1πu 1πu',
      'G. Herzberg, Polyatomic Molecules (1966)',
    ],
    [
      'ethylene',
      molecules.ethylene,
      '1ag 1b1u 2ag 2b1u 1b2u 3ag 1b3g 1b3u',
      'G. Herzberg, Polyatomic Molecules (1966), with z along CC and x normal to the plane',
    ],
    [
      'formaldehyde',
      molecules.formaldehyde,
      '1a1 2a1 3a1 4a1 1b2 5a1 1b1 2b2',
      'G. Herzberg, Polyatomic Molecules (1966)',
    ],
  ])('published: filled orbitals of %s (value from memory)', (_, atoms, order, source) => {
    expect(source).not.toBe('');
    expect(labels(hartreeFock(atoms)).slice(0, order.split(' ').length).join(' ')).toBe(order);
  });

  it('identity: the three 1t2 of methane become b1, b2, b3 of D2, the 2e and 1e of ammonia one a′ and one a″', () => {
    expect(labels(hartreeFock(molecules.methane)).slice(0, 5).join(' ')).toBe('1a 2a 1b1 1b2 1b3');
    const ammonia = labels(hartreeFock(molecules.ammonia));
    expect(ammonia.slice(2, 4)).toEqual(['3a′', '1a″']);
    expect(ammonia[4]).toBe('4a′');
  });

  it.each(['spherical', 'cartesian'] as const)(
    'identity: every %s orbital of N2 with s to g functions has a label, and pairs share one',
    (harmonics) => {
      const shells = [900, 140, 35, 9, 2, 0.5, 12, 2.5, 0.6, 0.8, 1, 1.2].map((exponent, k) => ({
        angularMomentum: [0, 0, 0, 0, 0, 0, 1, 1, 1, 2, 3, 4][k] ?? 0,
        exponents: [exponent],
        coefficients: [1],
      }));
      const found = hartreeFock(molecules.nitrogen, {
        basis: { name: 'to g', shells: { N: shells }, harmonics },
      });
      const counts = new Map<string | null, number>();
      for (const label of labels(found)) counts.set(label, (counts.get(label) ?? 0) + 1);
      for (const [label, count] of counts) {
        expect(label).toMatch(/^\d+[σπδφγ][gu]$/);
        expect(count, String(label)).toBe(label?.includes('σ') ? 1 : 2);
      }
      expect(counts.has('1γg') && counts.has('1φu')).toBe(true);
    },
  );

  it('identity: a determinant has the product of its orbitals: closed shells Σ⁺, a hole in π leaves Π', () => {
    expect(hartreeFock(molecules.nitrogen).symmetry).toEqual({
      irrep: 'Ag',
      term: { lambda: 0, inversion: 'g', reflection: '+' },
    });
    const ion = hartreeFock(molecules.hydrogenFluoride, { charge: 1, levels: ['ROHF'] });
    expect(ion.symmetry?.term).toEqual({ lambda: 1 });
    const spins = hartreeFock(molecules.hydrogenFluoride, { charge: 1, levels: ['UHF'] });
    expect(spins.symmetry?.term).toEqual({ lambda: 1 });
    expect(spins.orbitalSymmetries).toHaveProperty('alpha');
  });
});

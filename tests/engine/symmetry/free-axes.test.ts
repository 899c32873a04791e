import { describe, expect, it } from 'vitest';
import type { HartreeFockResult } from '#engine';
import { anywhere } from '../../support/orientation';
import { seededRandom } from '../../support/random';
import { atom, compute, study } from '../../support/studies';
import * as molecules from '../../support/symmetric-molecules';

const random = seededRandom(31);

describe('alignFreeAxes, by the labels that it makes possible', () => {
  it.each([
    ['HF⁺', molecules.hydrogenFluoride, 1, { irrep: expect.stringMatching(/^B[12]$/), term: { lambda: 1 } }],
    [
      'NO',
      [atom('N'), atom('O', 0, 0, 2.175)],
      0,
      { irrep: expect.stringMatching(/^B[12]$/), term: { lambda: 1 } },
    ],
  ])(
    'published: the ground state of %s is ²Π, wherever the hole points (Herzberg, Diatomic Molecules, 1950, value from memory)',
    (_, atoms, charge, expected) => {
      for (let trial = 0; trial < 3; trial++) {
        const point = compute(study(anywhere(atoms, random), { charge, levels: ['ROHF', 'UHF'] }));
        for (const level of ['ROHF', 'UHF']) {
          const { symmetry } = point.levels[level] as HartreeFockResult;
          expect(symmetry, level).toEqual(expected);
        }
      }
    },
  );

  it('identity: a p shell with a hole leaves the boron atom odd, and all orbitals have labels', () => {
    for (let trial = 0; trial < 3; trial++) {
      const point = compute(study(anywhere([atom('B')], random), { basis: '6-31G', levels: ['ROHF'] }));
      const { symmetry, orbitalSymmetries } = point.levels.ROHF as HartreeFockResult;
      expect(symmetry?.irrep).toMatch(/^B[123]u$/);
      expect(orbitalSymmetries).not.toContain(null);
    }
  });
});

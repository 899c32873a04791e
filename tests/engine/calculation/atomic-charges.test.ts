import { describe, expect, it } from 'vitest';
import type { AtomicCharges, CorrelatedResult, HartreeFockResult, PointResult } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import { STANDARD_GEOMETRIES } from '../../support/standard-geometries';
import { atom, compute, prepare, study, waterAtoms } from '../../support/studies';

const ofField = (point: PointResult, level = 'RHF') => (point.levels[level] as HartreeFockResult).charges!;
const ofState = (point: PointResult, level = 'FCI', state = 0) =>
  (point.levels[level] as CorrelatedResult).states[state]!.charges!;
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

function expectCharges({ mulliken, loewdin }: AtomicCharges, expected: readonly number[], tolerance: number) {
  for (const charges of [mulliken, loewdin]) {
    for (const [i, charge] of charges.entries())
      expect(Math.abs(charge - expected[i]!)).toBeLessThan(tolerance);
  }
}

describe('charges of atoms', () => {
  it('identity: charges add up to the molecule’s, spins to alpha minus beta electrons, at every level', () => {
    const closed = compute(
      study(waterAtoms(1.8, 104), { basis: '6-31G', levels: ['RHF', 'CISD'], frozenCore: true }),
    );
    const plain = study([atom('O'), atom('H', 0.5, 1, 1.4)], {
      charge: 1,
      basis: '6-31G',
      levels: ['UHF', 'ROHF', 'CISD'],
      states: 2,
      frozenCore: true,
    });
    const open = compute({ ...plain, molecule: { ...plain.molecule, multiplicity: 3 } });
    for (const [charges, total, spin] of [
      [ofField(closed), 0, undefined],
      [ofState(closed, 'CISD'), 0, undefined],
      [ofField(open, 'UHF'), 1, 2],
      [ofField(open, 'ROHF'), 1, 2],
      [ofState(open, 'CISD'), 1, undefined],
      [ofState(open, 'CISD', 1), 1, undefined],
    ] as const) {
      for (const values of [charges.mulliken, charges.loewdin]) {
        expect(Math.abs(sum(values) - total)).toBeLessThan(1e-9);
      }
      expect(charges.spin !== undefined).toBe(spin !== undefined);
      for (const values of charges.spin ? [charges.spin.mulliken, charges.spin.loewdin] : []) {
        expect(Math.abs(sum(values) - spin!)).toBeLessThan(1e-9);
      }
    }
  });

  it('identity: atoms that a symmetry exchanges carry the same charge, however the molecule lies', () => {
    const { atoms } = STANDARD_GEOMETRIES.NH3!;
    const point = compute(study(atoms, { basis: '6-31G**', levels: ['RHF'] }));
    const { mulliken, loewdin } = ofField(point);
    for (const [, ...hydrogens] of [mulliken, loewdin]) {
      for (const charge of hydrogens) {
        expect(charge).toBeGreaterThan(0.1);
        expect(Math.abs(charge - hydrogens[0]!)).toBeLessThan(1e-8);
      }
    }
    const turned = compute(
      study(
        atoms.map(({ element, at: [x, y, z] }) => ({
          element,
          at: [0.6 * x - 0.8 * z + 1, y - 2, 0.8 * x + 0.6 * z] as const,
        })),
        { basis: '6-31G**', levels: ['RHF'] },
      ),
    );
    for (const kind of ['mulliken', 'loewdin'] as const) {
      for (const [i, charge] of ofField(point)[kind].entries()) {
        expect(Math.abs(charge - ofField(turned)[kind][i]!)).toBeLessThan(1e-8);
      }
    }
  });

  it('identity: far apart, LiH by full CI is two neutral atoms, HeH+ is He and a proton', () => {
    const neutral = compute(study([atom('Li'), atom('H', 0, 0, 40)], { levels: ['FCI'] }));
    expectCharges(ofState(neutral), [0, 0], 1e-6);
    const proton = compute(study([atom('He'), atom('H', 0, 0, 30)], { charge: 1, levels: ['RHF', 'FCI'] }));
    expectCharges(ofField(proton), [0, 1], 1e-9);
    expectCharges(ofState(proton), [0, 1], 1e-9);
  });

  it('identity: UHF of H2 far apart leaves one electron of either spin on each atom', () => {
    const { spin, ...charges } = ofField(
      compute(study([atom('H'), atom('H', 0, 0, 20)], { levels: ['UHF'] })),
      'UHF',
    );
    expectCharges(charges, [0, 0], 1e-9);
    for (const [first, second] of [spin!.mulliken, spin!.loewdin]) {
      expect(Math.abs(Math.abs(first!) - 1)).toBeLessThan(1e-9);
      expect(Math.abs(first! + second!)).toBeLessThan(1e-9);
    }
  });

  it('identity: the full CI of two electrons in one orbital’s shells has the charges of its RHF', () => {
    const point = compute(study([atom('He'), atom('H', 0, 0, 80)], { charge: 1, levels: ['RHF', 'FCI'] }));
    expectCharges(ofState(point), ofField(point).mulliken, 1e-9);
  });

  it('identity: a ghost takes the electrons of its functions, and only those', () => {
    const ghost = { ...atom('H', 0, 0, 1.5), ghost: true };
    const { mulliken, loewdin } = ofField(compute(study([atom('He'), ghost], { basis: '6-31G' })));
    for (const [real, bare] of [mulliken, loewdin]) {
      expect(bare).toBeLessThan(0);
      expect(Math.abs(real! + bare!)).toBeLessThan(1e-10);
    }
  });

  it('independent: HeH+ in a minimal basis – both charges from coefficients and overlap by hand', () => {
    const request = study([atom('He'), atom('H', 0, 0, 1.4632)], { charge: 1 });
    const prepared = prepare(request);
    const s = overlapMatrix(placeBasis(prepared.basisSet, prepared.moleculeAt(null)))[1]!;
    const { mulliken, loewdin } = ofField(compute(request));
    // 2(c₁ + c₂s)c₁ = 2 − q with c₁² + c₂² + 2c₁c₂s = 1: the Mulliken charge fixes both coefficients
    const population = 2 - mulliken[0]!;
    const ratio = (() => {
      let [low, high] = [0, 1];
      for (let step = 0; step < 200; step++) {
        const x = (low + high) / 2;
        if ((2 * (1 + x * s)) / (1 + x * x + 2 * x * s) > population) low = x;
        else high = x;
      }
      return low;
    })();
    const norm = 1 / Math.sqrt(1 + ratio * ratio + 2 * ratio * s);
    // S^½ of a 2×2 overlap: (√(1 + s) ± √(1 − s))/2
    const same = (Math.sqrt(1 + s) + Math.sqrt(1 - s)) / 2;
    const other = (Math.sqrt(1 + s) - Math.sqrt(1 - s)) / 2;
    expect(Math.abs(loewdin[0]! - (2 - 2 * (norm * (same + other * ratio)) ** 2))).toBeLessThan(1e-10);
  });

  it('published: HeH+ in a minimal basis – the textbook’s density gives the Mulliken charge', () => {
    const scaleFactors = { He: { '1s': 2.0925 }, H: { '1s': 1.24 } };
    const basis = { name: 'STO-3G', scaleFactors };
    const { mulliken } = ofField(compute(study([atom('He'), atom('H', 0, 0, 1.4632)], { charge: 1, basis })));
    // P11 + P12·S12 of the printed P and S
    expect(2 - mulliken[0]!).toMatchPublished({
      printed: '1.5299',
      source:
        'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (1989), sec. 3.5.3: 1.2864 + 0.5402 × 0.4508 ' +
        '(value from memory)',
      tolerance: 5e-4,
      because: 'the printed density rests on an approximate error function',
    });
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PlacedBasis } from '../../../engine/basis/contracted-gaussian';
import { withQuartets } from '../../../engine/integrals/coulomb-quartets';
import { electronRepulsionTensor } from '../../../engine/integrals/electron-repulsion';
import { shellPairs } from '../../../engine/integrals/shell-pair';
import type { KernelForm } from '../../../engine/kernels/form';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { placedBasis, type ShellSketch } from '../../support/gaussian-integrals';
import { inForm } from '../../support/kernel-forms';

/** Blocks of all quartets of pairs, one after another. */
function quartetBlocks(basis: PlacedBasis, form: KernelForm, threshold = 0): Float64Array[] {
  const pairs = shellPairs(basis);
  return inForm(form, () =>
    withQuartets(pairs, (quartet) =>
      pairs.flatMap((bra, i) =>
        pairs.map((ket, j) => quartet(i, j, threshold).slice(0, bra.productCount * ket.productCount)),
      ),
    ),
  );
}

/** Largest difference of the two forms, beside the Schwarz bound √(ab|ab) √(cd|cd) of its quartet, of all quartets. */
function largestDisagreement(basis: PlacedBasis): number {
  const fast = quartetBlocks(basis, 'fast');
  const plain = quartetBlocks(basis, 'plain');
  const pairs = shellPairs(basis);
  const bounds = pairs.map(({ productCount }, i) => {
    const block = plain[i * pairs.length + i];
    return Math.sqrt(
      Math.max(...Array.from({ length: productCount }, (_, p) => block[p * (productCount + 1)])),
    );
  });
  let worst = 0;
  plain.forEach((block, q) => {
    const bound = bounds[Math.floor(q / pairs.length)] * bounds[q % pairs.length];
    block.forEach((value, i) => {
      worst = Math.max(worst, Math.abs(fast[q][i] - value) / bound);
    });
  });
  return worst;
}

const coordinate = fc.double({ min: -3, max: 3, noNaN: true });
const centre = fc.tuple(coordinate, coordinate, coordinate);

/** Up to two shells on each of up to three centres; the shells of a centre share their exponents, or do not. */
function basisOf(highestL: number, mostShells: number, mostPrimitives: number) {
  const shell = fc.record({
    place: fc.nat(2),
    l: fc.nat(highestL),
    exponents: fc.array(fc.double({ min: -3, max: 6, noNaN: true }), {
      minLength: 1,
      maxLength: mostPrimitives,
    }),
    shares: fc.boolean(),
  });
  return fc
    .record({
      centres: fc.tuple(centre, centre, centre),
      shells: fc.array(shell, { minLength: 1, maxLength: mostShells }),
      harmonics: fc.constantFrom('spherical' as const, 'cartesian' as const),
    })
    .map(({ centres, shells, harmonics }) => {
      const sketches = shells.map(
        ({ place, l, exponents, shares }): ShellSketch => ({
          centre: centres[place] as Vector3,
          l,
          exponents: (shares ? shells[0].exponents : exponents).map((power) => 2 ** power),
        }),
      );
      const placed = placedBasis(sketches, harmonics);
      // shells of one centre belong to one atom, so that those with equal exponents form a block
      return { ...placed, shells: placed.shells.map((s, i) => ({ ...s, atom: shells[i].place })) };
    });
}

describe('the fast quartets', () => {
  it('independent: equal the plain ones, s to d shells and general contractions anywhere', () => {
    fc.assert(
      fc.property(basisOf(2, 4, 5), (basis) => {
        expect(largestDisagreement(basis)).toBeLessThan(1e-13);
      }),
      { seed: 11, numRuns: 25 },
    );
  });

  it('independent: equal the plain ones, shells up to g', () => {
    fc.assert(
      fc.property(basisOf(4, 2, 2), (basis) => {
        expect(largestDisagreement(basis)).toBeLessThan(1e-13);
      }),
      { seed: 12, numRuns: 8 },
    );
  });

  it.each([6, 8.4, 8.6, 11, 12.1, 100])(
    'independent: equal the plain ones where arguments of the Boys function pass its ranges, %f bohr apart',
    (distance) => {
      const basis = placedBasis([
        { centre: [0, 0, 0], l: 2, exponents: [3, 1, 0.2] },
        { centre: [0, 0, distance], l: 2, exponents: [900, 2, 0.5, 0.01] },
      ]);
      expect(largestDisagreement(basis)).toBeLessThan(1e-13);
    },
  );

  it('identity: small primitives are skipped, to less than the threshold each', () => {
    const basis = placedBasis([
      { centre: [0, 0, 0], l: 1, exponents: [30, 5, 1, 0.2] },
      { centre: [0, 0, 7], l: 1, exponents: [20, 4, 0.9, 0.3] },
    ]);
    const threshold = 1e-9;
    const all = quartetBlocks(basis, 'fast');
    const primitiveQuartets = 4 ** 4;
    let changed = 0;
    quartetBlocks(basis, 'fast', threshold).forEach((block, q) => {
      block.forEach((value, i) => {
        if (value !== all[q][i]) changed++;
        expect(Math.abs(value - all[q][i])).toBeLessThan(primitiveQuartets * threshold);
      });
    });
    expect(changed).toBeGreaterThan(50);
    expect(
      quartetBlocks(basis, 'fast', Number.MAX_VALUE).every((block) => block.every((value) => value === 0)),
    ).toBe(true);
  });

  it('identity: memory is given back, so that a second molecule is as right as the first', () => {
    const small = placedBasis([{ centre: [0, 0, 0], l: 0, exponents: [1] }]);
    const large = placedBasis([{ centre: [0, 0.4, 0], l: 3, exponents: [1, 0.4] }], 'spherical');
    const tensorOf = (basis: PlacedBasis) => inForm('fast', () => electronRepulsionTensor(basis));
    const before = tensorOf(small);
    tensorOf(large);
    // four functions exp(−r²), normalised: 2/√π
    expect(before[0]).toBeCloseTo(2 / Math.sqrt(Math.PI), 14);
    expect(tensorOf(small)).toEqual(before);
  });
});

import { describe, expect, it } from 'vitest';
import type { PointResult } from '#engine';
import { matchOrbitals, stateOverlap } from '../../../engine/calculation/state-overlap';
import { correlated, hartreeFock, samplePoint } from '../../support/sample-results';

const withLabels = (orbitalSymmetries: (string | null)[]): PointResult => ({
  ...samplePoint(1),
  levels: { RHF: hartreeFock(-1, { orbitalSymmetries }) },
});
const matchOf = (from: (string | null)[], to: (string | null)[]) => {
  const { partner } = matchOrbitals(withLabels(from), withLabels(to), 'FCI');
  return from.map((_, orbital) => partner(orbital));
};
const same = { partner: (orbital: number) => orbital, isPaired: true };

describe('matchOrbitals', () => {
  it('identity: orbitals of one label go together, partners of a pair in their order', () => {
    expect(matchOf(['1σg', '1σu', '1πu', '1πu', '2σg'], ['1σg', '1πu', '1πu', '2σg', '1σu'])).toEqual([
      0, 4, 1, 2, 3,
    ]);
  });

  it('identity: the labels of RHF are not those of UHF orbitals', () => {
    const levels = { FCI: correlated(-1, -0.1, { reference: 'UHF' }) };
    const [first, second] = [
      ['1σg', '1σu'],
      ['1σu', '1σg'],
    ].map((labels) => ({ ...withLabels(labels), levels: { ...withLabels(labels).levels, ...levels } }));
    const { partner, isPaired } = matchOrbitals(first!, second!, 'FCI');
    expect([partner(0), partner(1), isPaired]).toEqual([0, 1, false]);
  });

  it('identity: orbitals without a partner go together by order, all of them where there are no labels', () => {
    expect(matchOf(['1a1', null, '2a1'], ['2a1', '1a1', null])).toEqual([1, 2, 0]);
    expect(matchOf([null, null], [null, null])).toEqual([0, 1]);
    expect(matchOf(['1a′', '2a′', '1a″'], ['1a', '2a', '3a'])).toEqual([0, 1, 2]);
    const unlabelled = { ...samplePoint(1), levels: {} };
    expect(matchOrbitals(unlabelled, unlabelled, 'FCI').partner(3)).toBe(3);
  });
});

describe('stateOverlap', () => {
  const half = Math.SQRT1_2;
  const closed = (coefficient: number, orbital: number) => ({
    coefficient,
    alpha: [orbital],
    beta: [orbital],
  });
  const open = (coefficient: number, alpha: number, beta: number) => ({
    coefficient,
    alpha: [alpha],
    beta: [beta],
  });

  it('identity: 1 with itself, whatever part of the norm the leading determinants hold', () => {
    const state = [closed(0.8, 0), closed(-0.3, 1)];
    expect(stateOverlap(state, state, same)).toBeCloseTo(1, 14);
  });

  it('identity: sum and difference of two closed shells are orthogonal, and so are those of open-shell partners', () => {
    expect(stateOverlap([closed(half, 0), closed(half, 1)], [closed(half, 0), closed(-half, 1)], same)).toBe(
      0,
    );
    expect(
      stateOverlap([open(half, 0, 1), open(half, 1, 0)], [open(half, 0, 1), open(-half, 1, 0)], same),
    ).toBe(0);
  });

  it('identity: a change of sign of any orbital leaves it', () => {
    const state = [closed(0.6, 0), closed(-0.5, 1), open(0.44, 0, 1), open(0.44, 1, 0)];
    const flipped = [closed(0.6, 0), closed(-0.5, 1), open(-0.44, 0, 1), open(-0.44, 1, 0)];
    expect(stateOverlap(state, flipped, same)).toBeCloseTo(1, 14);
  });

  it('identity: the order of orbitals is no change of the state, the signs that it brings included', () => {
    const exchanged = { partner: (orbital: number) => [1, 0, 2][orbital]!, isPaired: true };
    const before = [
      { coefficient: 0.8, alpha: [0, 1], beta: [2] },
      { coefficient: 0.5, alpha: [0, 2], beta: [1] },
      { coefficient: 0.3, alpha: [1, 2], beta: [0] },
    ];
    // a†(0)a†(1) becomes a†(1)a†(0)
    const after = [
      { coefficient: -0.8, alpha: [0, 1], beta: [2] },
      { coefficient: 0.5, alpha: [1, 2], beta: [0] },
      { coefficient: 0.3, alpha: [0, 2], beta: [1] },
    ];
    expect(stateOverlap(before, after, exchanged)).toBeCloseTo(1, 14);
    const wrong = after.map(({ coefficient, ...one }) => ({ ...one, coefficient: Math.abs(coefficient) }));
    expect(stateOverlap(before, wrong, exchanged)).toBeCloseTo((0.3 / 0.98) ** 2, 14);
  });

  it('identity: over UHF orbitals every determinant has signs of its own', () => {
    const before = [closed(0.8, 0), closed(0.6, 1)];
    const after = [closed(0.8, 0), closed(-0.6, 1)];
    expect(stateOverlap(before, after, { ...same, isPaired: false })).toBeCloseTo(1, 14);
    expect(stateOverlap(before, after, same)).toBeCloseTo(0.28 ** 2, 14);
  });

  it('identity: unknown without determinants', () => {
    expect(stateOverlap([], [closed(1, 0)], same)).toBeUndefined();
  });
});

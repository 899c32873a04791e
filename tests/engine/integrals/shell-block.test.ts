import { describe, expect, it } from 'vitest';
import { findBasisSet } from '../../../engine/basis/library-index';
import { placeBasis } from '../../../engine/basis/place-basis';
import { blockOfShells, groupShells, pairMembers } from '../../../engine/integrals/shell-block';
import { onOneAtom, placedBasis } from '../../support/gaussian-integrals';

const centre = [0, 0, 0] as const;

describe('groupShells', () => {
  it.each([
    // rows over the same primitives, and the outer primitive of each angular momentum by itself
    ['cc-pVDZ', 'C', ['0 0', '0', '1', '1', '2']],
    ['cc-pVDZ', 'Cl', ['0 0 0', '0', '1 1', '1', '2']],
    ['6-31G', 'C', ['0', '0 1', '0 1']],
    ['STO-3G', 'Cl', ['0', '0 1', '0 1']],
  ])('identity: shells that have their exponents in common are found: %s %s', (name, symbol, expected) => {
    const basis = placeBasis(findBasisSet(name, [symbol]), { atoms: [{ symbol, position: centre }] });
    const blocks = groupShells(basis);
    expect(blocks.map(({ shells }) => shells.map((s) => s.angularMomentum).join(' '))).toEqual(expected);
    for (const { shells, exponents } of blocks) {
      for (const shell of shells) expect([...shell.exponents]).toEqual([...exponents]);
    }
  });

  it('identity: every shell stands in one block; other exponents, another order or another atom keep shells apart', () => {
    const basis = placedBasis([
      { centre, l: 0, exponents: [3, 0.5] },
      { centre, l: 1, exponents: [3, 0.5] },
      { centre, l: 0, exponents: [0.5, 3] },
      { centre, l: 0, exponents: [3, 0.6] },
      { centre, l: 0, exponents: [3] },
    ]);
    const members = (shells: typeof basis.shells) =>
      groupShells({ ...basis, shells }).map((block) => block.shells.map((shell) => shells.indexOf(shell)));
    expect(members(onOneAtom(basis).shells)).toEqual([[0, 1], [2], [3], [4]]);
    expect(members(basis.shells)).toEqual([[0], [1], [2], [3], [4]]);
  });

  it('identity: a block holds at most 12 Cartesian functions, or one shell', () => {
    const basis = onOneAtom(
      placedBasis([1, 1, 1, 1, 1, 4, 3, 0].map((l) => ({ centre, l, exponents: [0.7] }))),
    );
    expect(groupShells(basis).map(({ shells }) => shells.map((s) => s.angularMomentum))).toEqual([
      [1, 1, 1, 1],
      [1, 0],
      [4],
      [3],
    ]);
  });
});

describe('pairMembers', () => {
  it('identity: all pairs of two blocks, each pair once inside one block', () => {
    const { shells } = placedBasis([0, 1, 2].map((l) => ({ centre, l, exponents: [0.7] })));
    const one = blockOfShells(shells.slice(0, 2));
    const other = blockOfShells(shells.slice(2));
    const momenta = (a: typeof one, b: typeof one) =>
      pairMembers(a, b).map(({ first, second }) => [first.angularMomentum, second.angularMomentum]);
    expect(momenta(one, other)).toEqual([
      [0, 2],
      [1, 2],
    ]);
    expect(momenta(one, one)).toEqual([
      [0, 0],
      [1, 0],
      [1, 1],
    ]);
  });
});

import { describe, expect, it } from 'vitest';
import type { MoleculeInput } from '../../../engine/molecule/build-molecule';
import { Connectivity } from '../../../engine/molecule/connectivity';

function line(...atoms: readonly [string, number][]): MoleculeInput {
  return { unit: 'angstrom', atoms: atoms.map(([element, z]) => ({ element, at: [0, 0, z] })) };
}

function isBonded(first: string, second: string, separation: number): boolean {
  return new Connectivity(line([first, 0], [second, separation]), []).partOf(0, []).has(1);
}

describe('Connectivity', () => {
  // measured bond lengths: K. P. Huber, G. Herzberg, Constants of Diatomic Molecules (1979)
  it.each([
    ['H', 'H', 0.74144],
    ['He', 'H', 0.774],
    ['Li', 'H', 1.5957],
    ['Li', 'Li', 2.6729],
    ['Be', 'H', 1.3426],
    ['B', 'H', 1.2324],
    ['B', 'F', 1.26259],
    ['C', 'C', 1.24253],
    ['N', 'N', 1.097685],
    ['C', 'O', 1.128323],
    ['O', 'O', 1.20752],
    ['H', 'F', 0.916808],
    ['F', 'F', 1.41193],
    ['Li', 'F', 1.563864],
    ['Na', 'Na', 3.07887],
    ['Al', 'H', 1.6478],
    ['H', 'Cl', 1.27455],
  ])('published: %s and %s at their measured bond length %d Å hang together', (first, second, separation) => {
    expect(isBonded(first, second, separation)).toBe(true);
  });

  it.each([
    ['water', 'H', 'H', 1.51],
    ['ammonia', 'H', 'H', 1.62],
    ['carbon dioxide', 'O', 'O', 2.32],
    ['linear Li2O', 'Li', 'Li', 3.2],
    ['tetrafluoromethane', 'F', 'F', 2.15],
  ])('published: the neighbours-but-one of %s (%s and %s, %d Å) do not', (_, first, second, separation) => {
    expect(isBonded(first, second, separation)).toBe(false);
  });

  it('identity: the unit of the study makes no difference', () => {
    const bohr = { ...line(['H', 0], ['H', 1.7], ['H', 3.5]), unit: 'bohr' } as const;
    expect([...new Connectivity(bohr, []).partOf(0, [])]).toEqual([0, 1]);
  });

  it('identity: parts and paths respect cut bonds, either way round', () => {
    const chain = new Connectivity(line(['H', 0], ['C', 1.06], ['C', 2.26], ['H', 3.32]), []);
    expect([...chain.partOf(3, [[1, 2]])].sort()).toEqual([2, 3]);
    expect([...chain.partOf(3, [[2, 1]])].sort()).toEqual([2, 3]);
    expect(chain.path(0, 3, [])).toEqual([0, 1, 2, 3]);
    expect(chain.path(0, 3, [[2, 1]])).toBeUndefined();
  });

  it('identity: a listed pair is joined at any distance, an unknown element only so', () => {
    const odd = line(['H', 0], ['Xx', 0.1], ['H', 50]);
    expect([...new Connectivity(odd, []).partOf(0, [])]).toEqual([0]);
    expect([...new Connectivity(odd, [[0, 2]]).partOf(0, [])]).toEqual([0, 2]);
  });
});

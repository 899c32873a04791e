import { BOHR_IN_ANGSTROM } from '../constants';
import { bohrPerUnit, type MoleculeInput } from './build-molecule';
import { distance } from './vector';

/** A pair of atom indices. */
export type AtomPair = readonly [number, number];

/**
 * Single-bond covalent radii of H to Ar in ångström.
 *
 * Source: B. Cordero et al., Covalent radii revisited, Dalton Trans. 2008, 2832, Table 2 (carbon: sp3); values
 * from memory. They only decide which atoms move together, never an energy.
 */
const COVALENT_RADIUS_ANGSTROM: Readonly<Record<string, number>> = {
  H: 0.31,
  He: 0.28,
  Li: 1.28,
  Be: 0.96,
  B: 0.84,
  C: 0.76,
  N: 0.71,
  O: 0.66,
  F: 0.57,
  Ne: 0.58,
  Na: 1.66,
  Mg: 1.41,
  Al: 1.21,
  Si: 1.11,
  P: 1.07,
  S: 1.05,
  Cl: 1.02,
  Ar: 1.06,
};

/**
 * Two atoms count as bonded up to this much beyond the sum of their radii, in ångström: enough for F2 (0.27) and
 * H3+ (0.25), too little for the Li···Li distance of Li2O (0.64) or the H···H distance of water (0.9).
 */
export const BOND_REACH_ANGSTROM = 0.3;

/** The longest distance in bohr at which two atoms count as bonded; 0 for an unknown element. */
export function longestBond(first: string, second: string): number {
  const sum = COVALENT_RADIUS_ANGSTROM[first] + COVALENT_RADIUS_ANGSTROM[second];
  return Number.isNaN(sum) ? 0 : (sum + BOND_REACH_ANGSTROM) / BOHR_IN_ANGSTROM;
}

/**
 * Which atoms hang together: those near enough for their covalent radii, and `listed` pairs whatever their
 * distance, so that a study may start from a stretched bond. Ghosts bind like atoms, so that a fragment and its
 * ghost copy (for a counterpoise correction) are moved alike.
 */
export class Connectivity {
  readonly #neighbours: readonly Set<number>[];

  constructor(molecule: Pick<MoleculeInput, 'unit' | 'atoms'>, listed: readonly AtomPair[]) {
    const { atoms } = molecule;
    const scale = bohrPerUnit(molecule.unit);
    this.#neighbours = atoms.map(() => new Set());
    for (let second = 1; second < atoms.length; second++) {
      for (let first = 0; first < second; first++) {
        const separation = distance(atoms[first].at, atoms[second].at) * scale;
        if (separation <= longestBond(atoms[first].element, atoms[second].element)) this.#join(first, second);
      }
    }
    for (const [first, second] of listed) this.#join(first, second);
  }

  #join(first: number, second: number): void {
    this.#neighbours[first].add(second);
    this.#neighbours[second].add(first);
  }

  /** Atoms that still hang together with `start` when the `cut` bonds are gone, each with the atom it was reached from. */
  #reach(start: number, cut: readonly AtomPair[]): Map<number, number> {
    const isCut = (a: number, b: number) =>
      cut.some(([c, d]) => (a === c && b === d) || (a === d && b === c));
    const cameFrom = new Map([[start, start]]);
    for (const atom of cameFrom.keys()) {
      for (const next of this.#neighbours[atom]) {
        if (!cameFrom.has(next) && !isCut(atom, next)) cameFrom.set(next, atom);
      }
    }
    return cameFrom;
  }

  /** The part that `start` belongs to when the `cut` bonds are gone. */
  partOf(start: number, cut: readonly AtomPair[]): ReadonlySet<number> {
    return new Set(this.#reach(start, cut).keys());
  }

  /** A shortest chain of bonds from one atom to another with the `cut` bonds gone; undefined if there is none. */
  path(from: number, to: number, cut: readonly AtomPair[]): readonly number[] | undefined {
    const cameFrom = this.#reach(from, cut);
    if (!cameFrom.has(to)) return undefined;
    const path = [to];
    while (path[0] !== from) path.unshift(cameFrom.get(path[0])!);
    return path;
  }
}

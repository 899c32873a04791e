import { EngineError } from '../errors';
import type { MoleculeInput } from './build-molecule';
import { type AtomPair, BOND_REACH_ANGSTROM, Connectivity } from './connectivity';
import {
  type BondsCoordinate,
  type Coordinate,
  chainOf,
  listedPairs,
  type TurnCoordinate,
  turnPlace,
} from './coordinate';

/** A part of the molecule that moves as one when a bond is cut. */
export interface Motion {
  /** the cut bond: its end in the part that stays, then its end in the part that moves */
  readonly bond: AtomPair;
  readonly moved: ReadonlySet<number>;
}

export interface MotionPlan {
  /** one for every listed bond, or the one that turns */
  readonly motions: readonly Motion[];
  readonly errors: readonly EngineError[];
}

/**
 * Which atoms move when a coordinate changes.
 *
 * Cutting a bond leaves two parts; the one with fewer atoms moves, and where both have as many, the part of the
 * atom named last. Atoms that hang together with neither end (see `Connectivity`) stay.
 *
 * @param coordinate - whose atoms exist and differ
 * @returns errors `scan.ring` where a ring leaves no part to move, `scan.tornTwoWays` where the listed bonds close
 * a ring among themselves, so that a part would be moved two ways at once
 */
export function planMotions(molecule: MoleculeInput, coordinate: Coordinate): MotionPlan {
  const connectivity = new Connectivity(molecule, listedPairs(coordinate));
  return 'bonds' in coordinate
    ? planStretch(molecule, connectivity, coordinate)
    : planTurn(molecule, connectivity, coordinate);
}

function planStretch(
  molecule: MoleculeInput,
  connectivity: Connectivity,
  { bonds }: BondsCoordinate,
): MotionPlan {
  const motions: Motion[] = [];
  const errors: EngineError[] = [];
  bonds.forEach((bond, index) => {
    const [a, b] = bond;
    const motion = smallestPart(connectivity, [[b, a], bond]);
    if (motion) {
      motions.push(motion);
      return;
    }
    const place = `scan.coordinate.bonds[${index}]`;
    const ring = connectivity.path(a, b, bonds);
    if (ring) {
      errors.push(ringError(molecule, bond, ring, place));
    } else {
      const torn = connectivity.partOf(a, bonds).size < connectivity.partOf(b, bonds).size ? a : b;
      errors.push(
        new EngineError(
          'scan.tornTwoWays',
          `The listed bonds close a ring, so ${atomName(molecule, torn)} would have to move two ways at once.`,
          'Leave one bond of the ring out, so that each bond can be pulled on its own.',
          { atom: torn },
          place,
        ),
      );
    }
  });
  return { motions, errors };
}

function planTurn(
  molecule: MoleculeInput,
  connectivity: Connectivity,
  coordinate: TurnCoordinate,
): MotionPlan {
  const chain = chainOf(coordinate);
  // an angle turns what is beyond either of its bonds, a dihedral either part that its middle bond joins
  const before: AtomPair = 'angle' in coordinate ? [chain[1], chain[0]] : [chain[2], chain[1]];
  const after: AtomPair = [chain[1], chain[2]];
  const motion = smallestPart(connectivity, [before, after]);
  if (motion) return { motions: [motion], errors: [] };
  const ring = connectivity.path(...after, [after])!;
  return { motions: [], errors: [ringError(molecule, after, ring, turnPlace(coordinate))] };
}

/** Of the parts beyond the second end of each bond, the smallest, or the last of these; undefined if rings leave none. */
function smallestPart(connectivity: Connectivity, bonds: readonly AtomPair[]): Motion | undefined {
  let smallest: Motion | undefined;
  for (const bond of bonds) {
    const moved = connectivity.partOf(bond[1], [bond]);
    const isRing = moved.has(bond[0]);
    if (!isRing && (!smallest || moved.size <= smallest.moved.size)) smallest = { bond, moved };
  }
  return smallest;
}

function ringError(
  molecule: MoleculeInput,
  bond: AtomPair,
  path: readonly number[],
  place: string,
): EngineError {
  const [first, second] = bond.map((index) => atomName(molecule, index));
  const ring = path.map((index) => atomName(molecule, index)).join(' – ');
  return new EngineError(
    'scan.ring',
    `The bond between ${first} and ${second} is part of a ring: ${ring}.`,
    'Choose a bond outside the ring. If no ring is meant, start from a geometry in which its atoms are farther ' +
      `apart: two count as bonded up to ${BOND_REACH_ANGSTROM} Å beyond the sum of their covalent radii.`,
    { bond },
    place,
  );
}

function atomName({ atoms }: MoleculeInput, index: number): string {
  return `${atoms[index].element} (atom ${index})`;
}

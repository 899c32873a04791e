import type { MoleculeInput } from './build-molecule';
import type { AtomPair } from './connectivity';
import { angleBetween, cross, distance, dot, length, subtract } from './vector';

/** What a scan changes; atoms by index. */
export type Coordinate = BondsCoordinate | TurnCoordinate;

export interface BondsCoordinate {
  readonly bonds: readonly AtomPair[];
}

export type TurnCoordinate =
  /** the second atom is the apex */
  | { readonly angle: readonly [number, number, number] }
  | { readonly dihedral: readonly [number, number, number, number] };

export const DEGREE = Math.PI / 180;

/** The atoms of an angle or dihedral, in the order in which they are named. */
export function chainOf(coordinate: TurnCoordinate): readonly number[] {
  return 'angle' in coordinate ? coordinate.angle : coordinate.dihedral;
}

/** Where an angle or dihedral stands in a study. */
export function turnPlace(coordinate: TurnCoordinate): string {
  return 'angle' in coordinate ? 'scan.coordinate.angle' : 'scan.coordinate.dihedral';
}

/** The pairs of atoms that a coordinate takes for bonded. */
export function listedPairs(coordinate: Coordinate): readonly AtomPair[] {
  if ('bonds' in coordinate) return coordinate.bonds;
  const chain = chainOf(coordinate);
  return chain.slice(1).map((atom, index) => [chain[index], atom]);
}

/**
 * The coordinate as the molecule has it: the length of every listed bond in the molecule's unit, or one angle
 * (0 … 180) or dihedral (−180 … 180, positive clockwise seen along the middle bond) in degrees.
 *
 * Source: dihedral in the form of A. Blondel, M. Karplus, J. Comput. Chem. 17, 1132 (1996), which keeps its digits
 * near 0 and 180 degrees.
 */
export function measureCoordinate(
  { atoms }: Pick<MoleculeInput, 'atoms'>,
  coordinate: Coordinate,
): readonly number[] {
  if ('bonds' in coordinate) return coordinate.bonds.map(([a, b]) => distance(atoms[a].at, atoms[b].at));
  const [a, b, c, d] = chainOf(coordinate).map((index) => atoms[index].at);
  if ('angle' in coordinate) return [angleBetween(subtract(a, b), subtract(c, b)) / DEGREE];
  const axis = subtract(c, b);
  const nearNormal = cross(subtract(b, a), axis);
  const farNormal = cross(axis, subtract(d, c));
  const sine = dot(cross(nearNormal, farNormal), axis) / length(axis);
  return [Math.atan2(sine, dot(nearNormal, farNormal)) / DEGREE];
}

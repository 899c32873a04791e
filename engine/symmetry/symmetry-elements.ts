import type { Molecule, Vector3 } from '../molecule/molecule';
import { add, cross, distance, dot, length, scale, subtract } from '../molecule/vector';

/**
 * How far, in bohr, an atom may lie from where an operation puts it. Coordinates that were typed or turned with five
 * decimals pass; a distortion that anyone would call one does not.
 */
export const COORDINATE_TOLERANCE = 1e-4;
/** Sine of the angle below which two directions are one; different axes of a molecule are much further apart. */
const SAME_DIRECTION = 0.01;

/** An atom without its isotope, seen from the centre of all atoms. */
export interface Site {
  /** equal for atoms that an operation may exchange; a ghost is exchanged with ghosts only */
  readonly kind: string;
  /** bohr */
  readonly position: Vector3;
}

export type PointOperation = (position: Vector3) => Vector3;

export const inversion: PointOperation = (r) => scale(r, -1);
/** Half a turn about a unit vector. */
export const halfTurn =
  (axis: Vector3): PointOperation =>
  (r) =>
    subtract(scale(axis, 2 * dot(axis, r)), r);
/** Reflection in the plane normal to a unit vector. */
export const reflection =
  (normal: Vector3): PointOperation =>
  (r) =>
    subtract(r, scale(normal, 2 * dot(normal, r)));

/** The mean position of all atoms: every symmetry operation leaves it in place. */
export function centreOf({ atoms }: Molecule): Vector3 {
  const sum = atoms.reduce<Vector3>((total, { position }) => add(total, position), [0, 0, 0]);
  return scale(sum, 1 / atoms.length);
}

export function sitesOf(molecule: Molecule): Site[] {
  const centre = centreOf(molecule);
  return molecule.atoms.map(({ symbol, nuclearCharge, position }) => ({
    kind: `${symbol} ${nuclearCharge}`,
    position: subtract(position, centre),
  }));
}

/** Where an operation puts every site, as indices; undefined where it is no symmetry. */
export function permutationOf(sites: readonly Site[], operation: PointOperation): number[] | undefined {
  const images: number[] = [];
  for (const { kind, position } of sites) {
    const image = operation(position);
    const found = sites.findIndex(
      (site) => site.kind === kind && distance(site.position, image) < COORDINATE_TOLERANCE,
    );
    if (found < 0 || images.includes(found)) return undefined;
    images.push(found);
  }
  return images;
}

/** Elements of order two, as unit vectors. */
export interface SymmetryElements {
  readonly twofoldAxes: readonly Vector3[];
  readonly mirrorNormals: readonly Vector3[];
  readonly hasInversion: boolean;
}

/** All elements of order two of a molecule that is not linear. */
export function findElements(sites: readonly Site[]): SymmetryElements {
  const directions = candidateDirections(sites);
  const isSymmetry = (operation: PointOperation) => permutationOf(sites, operation) !== undefined;
  return {
    twofoldAxes: withoutDuplicates(directions.filter((axis) => isSymmetry(halfTurn(axis)))),
    mirrorNormals: withoutDuplicates(directions.filter((normal) => isSymmetry(reflection(normal)))),
    hasInversion: isSymmetry(inversion),
  };
}

/**
 * Where an axis or the normal of a plane can point. An operation of order two that moves site i to j has its axis
 * along r(i) + r(j), or its plane normal to r(i) − r(j). Where that is zero for every i, the sites lie on the axis or
 * in the plane: then the axis goes through one of them, or the direction is the normal of a planar molecule.
 */
function candidateDirections(sites: readonly Site[]): Vector3[] {
  const directions: Vector3[] = [];
  const propose = (direction: Vector3) => {
    const size = length(direction);
    if (size > COORDINATE_TOLERANCE) directions.push(scale(direction, 1 / size));
  };
  const normal = planeNormal(sites);
  if (normal) propose(normal);
  sites.forEach(({ kind, position }, i) => {
    propose(position);
    for (const other of sites.slice(0, i)) {
      if (other.kind !== kind) continue;
      propose(add(position, other.position));
      propose(subtract(position, other.position));
    }
  });
  return directions;
}

/** Normal of the plane that holds all sites; undefined where there is none, or they stand in a line. */
export function planeNormal(sites: readonly Site[]): Vector3 | undefined {
  let widest: Vector3 = [0, 0, 0];
  for (const [i, { position }] of sites.entries()) {
    for (const other of sites.slice(0, i)) {
      const product = cross(position, other.position);
      if (length(product) > length(widest)) widest = product;
    }
  }
  const size = length(widest);
  if (size < COORDINATE_TOLERANCE) return undefined;
  const normal = scale(widest, 1 / size);
  return sites.every(({ position }) => Math.abs(dot(position, normal)) < COORDINATE_TOLERANCE)
    ? normal
    : undefined;
}

function withoutDuplicates(directions: readonly Vector3[]): Vector3[] {
  const kept: Vector3[] = [];
  for (const direction of directions) {
    if (kept.every((other) => length(cross(direction, other)) > SAME_DIRECTION)) kept.push(direction);
  }
  return kept;
}

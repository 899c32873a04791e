import type { Molecule, Vector3 } from '../molecule/molecule';
import { cross, dot, length, scale, subtract } from '../molecule/vector';
import type { PointGroupName } from './point-groups';
import {
  COORDINATE_TOLERANCE,
  centreOf,
  findElements,
  inversion,
  permutationOf,
  planeNormal,
  type Site,
  type SymmetryElements,
  sitesOf,
} from './symmetry-elements';

/** Orthonormal x, y, z, right-handed. */
export type Axes = readonly [Vector3, Vector3, Vector3];

/** What the positions of the atoms say about symmetry. */
export interface MolecularSymmetry {
  /** largest group of real one-dimensional representations */
  readonly pointGroup: PointGroupName;
  /** the whole group of a linear molecule of two atoms or more, whose axis is z */
  readonly linear?: 'C∞v' | 'D∞h';
  /** of all axes and planes, bohr */
  readonly centre: Vector3;
  readonly axes: Axes;
}

/** Cosine of the angle below which directions count as perpendicular. */
const PERPENDICULAR = 0.01;

/**
 * The largest Abelian point group of a molecule in any orientation, and the axes that its representations are named
 * in. Isotopes do not matter; ghosts are a kind of their own.
 *
 * Of D2 and C2v, D2 is taken (as in methane). The axes follow Mulliken's recommendations as far as they go: a planar
 * molecule of C2v or D2h lies in the plane yz; else z passes through the most atoms, then the plane yz holds the
 * most atoms, then the largest sum of atomic numbers; then z is where the molecule is longest. Cs has the mirror
 * plane xy. Choices that are still open lead to the same names, except between inequivalent axes of highly symmetric
 * molecules with equal counts: then the order of the atoms decides, and never the orientation.
 *
 * Source: R. S. Mulliken, J. Chem. Phys. 23, 1997 (1955).
 */
export function findSymmetry(molecule: Molecule): MolecularSymmetry {
  const sites = sitesOf(molecule);
  const centre = centreOf(molecule);
  const farthest = sites.reduce((far, site) => (length(site.position) > length(far.position) ? site : far));
  const extent = length(farthest.position);
  if (extent < COORDINATE_TOLERANCE) return { pointGroup: 'D2h', centre, axes: axesFrom([0, 0, 1]) };

  const direction = scale(farthest.position, 1 / extent);
  if (sites.every(({ position }) => length(cross(position, direction)) < COORDINATE_TOLERANCE)) {
    const isSymmetric = permutationOf(sites, inversion) !== undefined;
    return {
      pointGroup: isSymmetric ? 'D2h' : 'C2v',
      linear: isSymmetric ? 'D∞h' : 'C∞v',
      centre,
      axes: axesFrom(direction),
    };
  }
  return { centre, ...chooseGroup(findElements(sites), sites, molecule) };
}

type Frame = { readonly z: Vector3; readonly x?: Vector3 };

function chooseGroup(
  elements: SymmetryElements,
  sites: readonly Site[],
  molecule: Molecule,
): { readonly pointGroup: PointGroupName; readonly axes: Axes } {
  const { twofoldAxes, mirrorNormals, hasInversion } = elements;
  const options: readonly (readonly [PointGroupName, readonly Frame[]])[] = [
    [hasInversion ? 'D2h' : 'D2', dihedralFrames(twofoldAxes)],
    ['C2h', hasInversion ? twofoldAxes.map((z) => ({ z })) : []],
    ['C2v', pyramidalFrames(twofoldAxes, mirrorNormals)],
    ['C2', twofoldAxes.map((z) => ({ z }))],
    ['Cs', mirrorNormals.map((z) => ({ z }))],
    ['Ci', hasInversion ? [{ z: [0, 0, 1] }] : []],
    ['C1', [{ z: [0, 0, 1] }]],
  ];
  const [pointGroup, frames] = options.find(([, found]) => found.length > 0)!;
  const { z, x } = bestFrame(frames, sites, molecule);
  return { pointGroup, axes: axesFrom(z, x) };
}

/** z and x along two of three perpendicular axes. */
function dihedralFrames(axes: readonly Vector3[]): Frame[] {
  return axes.flatMap((z) =>
    axes
      .filter(
        (x) => isPerpendicular(x, z) && axes.some((y) => isPerpendicular(x, y) && isPerpendicular(y, z)),
      )
      .map((x) => ({ z, x })),
  );
}

/** z along an axis in which two perpendicular planes meet, x normal to one of them. */
function pyramidalFrames(axes: readonly Vector3[], normals: readonly Vector3[]): Frame[] {
  return axes.flatMap((z) => normals.filter((x) => isPerpendicular(x, z)).map((x) => ({ z, x })));
}

function bestFrame(frames: readonly Frame[], sites: readonly Site[], molecule: Molecule): Frame {
  const planar = planeNormal(sites);
  const rank = ({ z, x }: Frame): number[] => {
    const inPlane = sites.map(({ position }) => x && Math.abs(dot(position, x)) < COORDINATE_TOLERANCE);
    return [
      Number(planar && x ? !isPerpendicular(planar, x) : false),
      sites.filter(({ position }) => length(cross(position, z)) < COORDINATE_TOLERANCE).length,
      inPlane.filter(Boolean).length,
      molecule.atoms.reduce((sum, { atomicNumber }, i) => sum + (inPlane[i] ? atomicNumber : 0), 0),
      sites.reduce((sum, { position }) => sum + dot(position, z) ** 2, 0),
    ];
  };
  let [best] = frames;
  let bestRank = rank(best);
  for (const frame of frames.slice(1)) {
    const candidate = rank(frame);
    const differing = candidate.findIndex((value, i) => Math.abs(value - bestRank[i]) > COORDINATE_TOLERANCE);
    if (differing < 0 || candidate[differing] < bestRank[differing]) continue;
    best = frame;
    bestRank = candidate;
  }
  return best;
}

function isPerpendicular(a: Vector3, b: Vector3): boolean {
  return Math.abs(dot(a, b)) < PERPENDICULAR;
}

/** Axes with this z, and x as near to the given one as that allows; by default to a Cartesian axis. */
function axesFrom(z: Vector3, nearX?: Vector3): Axes {
  let least = 0;
  for (const axis of [1, 2]) if (Math.abs(z[axis]) < Math.abs(z[least]) - PERPENDICULAR) least = axis;
  const near = nearX ?? ([0, 1, 2].map((axis) => Number(axis === least)) as unknown as Vector3);
  const across = subtract(near, scale(z, dot(near, z)));
  const x = scale(across, 1 / length(across));
  return [x, cross(z, x), z];
}

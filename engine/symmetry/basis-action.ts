import type { PlacedBasis, PlacedShell } from '../basis/contracted-gaussian';
import type { Molecule, Vector3 } from '../molecule/molecule';
import { dot, scale } from '../molecule/vector';
import type { Axes, MolecularSymmetry } from './point-group';
import type { AxisSigns } from './point-groups';
import { type Matrix3, shellMapAction, shellRotationAction } from './shell-action';
import { permutationOf, sitesOf } from './symmetry-elements';

/** A linear map of the functions of a basis that takes every shell into one shell. */
export type BasisAction = readonly {
  readonly source: PlacedShell;
  readonly target: PlacedShell;
  /** row k: the image of function k of the source over the functions of the target */
  readonly matrix: Float64Array;
}[];

/**
 * What an operation of the molecule's group does to the functions of its basis.
 *
 * @throws RangeError if the operation does not map the molecule on itself
 */
export function operationAction(
  molecule: Molecule,
  basis: PlacedBasis,
  symmetry: MolecularSymmetry,
  signs: AxisSigns,
): BasisAction {
  const map = mapInAxes(symmetry.axes, signs);
  const permutation = permutationOf(sitesOf(molecule), (r) => [
    dot(map[0], r),
    dot(map[1], r),
    dot(map[2], r),
  ]);
  if (!permutation) throw new RangeError(`no symmetry of the molecule: signs ${signs.join(', ')}`);
  const shells = molecule.atoms.map((_, atom) => basis.shells.filter((shell) => shell.atom === atom));
  // the map turns every axis at most round, so it is its own inverse
  return shells.flatMap((ofAtom, atom) =>
    ofAtom.map((source, k) => ({
      source,
      target: shells[permutation[atom]][k],
      matrix: shellMapAction(source.angularMomentum, basis.harmonics, map),
    })),
  );
}

/** What a rotation about the axis of a linear molecule does to its functions, per radian at the angle 0. */
export function axialRotationAction(basis: PlacedBasis, { axes }: MolecularSymmetry): BasisAction {
  return basis.shells.map((shell) => ({
    source: shell,
    target: shell,
    matrix: shellRotationAction(shell.angularMomentum, basis.harmonics, axes[2]),
  }));
}

/**
 * The images of orbitals.
 *
 * @param coefficients - functions × orbitals, row-major
 */
export function applyAction(
  action: BasisAction,
  coefficients: Float64Array,
  orbitalCount: number,
): Float64Array {
  const images = new Float64Array(coefficients.length);
  for (const { source, target, matrix } of action) {
    const count = target.functionCount;
    for (let k = 0; k < source.functionCount; k++) {
      const from = (source.firstFunction + k) * orbitalCount;
      for (let j = 0; j < count; j++) {
        const factor = matrix[k * count + j];
        if (factor === 0) continue;
        const to = (target.firstFunction + j) * orbitalCount;
        for (let p = 0; p < orbitalCount; p++) images[to + p] += factor * coefficients[from + p];
      }
    }
  }
  return images;
}

/** Σ over axes of sign·a aᵀ. */
function mapInAxes(axes: Axes, signs: AxisSigns): Matrix3 {
  return [0, 1, 2].map((row) =>
    axes.reduce<Vector3>(
      ([x, y, z], axis, k) => {
        const [ax, ay, az] = scale(axis, signs[k] * axis[row]);
        return [x + ax, y + ay, z + az];
      },
      [0, 0, 0],
    ),
  ) as unknown as Matrix3;
}

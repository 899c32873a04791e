import type { PlacedBasis } from '../basis/contracted-gaussian';
import { secondMomentMatrices } from '../integrals/multipole';
import { dot as trace } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import type { Molecule, Vector3 } from '../molecule/molecule';
import { add, cross, scale } from '../molecule/vector';
import type { MolecularSymmetry } from './point-group';

/** A second moment of charge, in e·bohr², that differs less than this between two directions points nowhere. */
const ROUND = 1e-4;

/**
 * Lays the axes that the nuclei of an atom or a linear molecule leave open along those of its electrons: an unequally
 * filled π or p shell has a direction, and the orbitals are symmetric in no others. The charge is widest along x and
 * narrowest along y; of an atom, z is the axis about which it is most nearly round.
 *
 * @param density - over functions, n×n, spin-summed
 */
export function alignFreeAxes(
  molecule: Molecule,
  basis: PlacedBasis,
  symmetry: MolecularSymmetry,
  density: Float64Array,
): MolecularSymmetry {
  const isAtom = molecule.atoms.length === 1;
  if (!isAtom && !symmetry.linear) return symmetry;
  const [xx, xy, xz, yy, yz, zz] = secondMomentMatrices(basis, symmetry.centre).map((matrix) =>
    trace(matrix, density),
  );
  const moments: readonly Vector3[] = [
    [xx, xy, xz],
    [xy, yy, yz],
    [xz, yz, zz],
  ];
  if (!isAtom) return { ...symmetry, axes: turnAboutZ(symmetry.axes, moments) };

  const { values, vectors } = symmetricEigen(Float64Array.from(moments.flat()), 3);
  if (values[2] - values[0] < ROUND) return symmetry;
  const axis = (k: number): Vector3 => [vectors[k], vectors[3 + k], vectors[6 + k]];
  // the middle one is nearer to one of the others: these two make the plane xy
  const isNarrowAlongZ = values[2] - values[1] < values[1] - values[0];
  const [z, x] = isNarrowAlongZ ? [axis(0), axis(2)] : [axis(2), axis(1)];
  return { ...symmetry, axes: [x, cross(z, x), z] };
}

function turnAboutZ(axes: MolecularSymmetry['axes'], moments: readonly Vector3[]): MolecularSymmetry['axes'] {
  const [x, y, z] = axes;
  const moment = (a: Vector3, b: Vector3) =>
    a.reduce((sum, ai, i) => sum + ai * moments[i].reduce((row, m, j) => row + m * b[j], 0), 0);
  const difference = moment(x, x) - moment(y, y);
  const twist = 2 * moment(x, y);
  if (Math.hypot(difference, twist) < ROUND) return axes;
  const angle = Math.atan2(twist, difference) / 2;
  const turned = add(scale(x, Math.cos(angle)), scale(y, Math.sin(angle)));
  return [turned, cross(z, turned), z];
}

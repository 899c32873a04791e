/** The Abelian point groups whose irreducible representations are all real and one-dimensional. */
export type PointGroupName = 'C1' | 'Ci' | 'Cs' | 'C2' | 'C2v' | 'C2h' | 'D2' | 'D2h';

/** An operation that turns each of the axes x, y, z into itself (1) or its opposite (−1). */
export type AxisSigns = readonly [1 | -1, 1 | -1, 1 | -1];

export interface PointGroup {
  /** every operation is a product of some of these */
  readonly generators: readonly AxisSigns[];
  /**
   * Names of the irreducible representations, each at its number: bit b of the number is set where the character
   * of generator b is −1. The product of two representations is therefore the exclusive or of their numbers.
   */
  readonly irreps: readonly string[];
}

const INVERSION: AxisSigns = [-1, -1, -1];
const ROTATION_Y: AxisSigns = [-1, 1, -1];
const ROTATION_Z: AxisSigns = [-1, -1, 1];
const MIRROR_XY: AxisSigns = [1, 1, -1];
const MIRROR_XZ: AxisSigns = [1, -1, 1];

/**
 * The groups in the axes that `findSymmetry` lays: the main axis is z, the mirror plane of Cs is xy. B1, B2 and B3 of
 * D2 and D2h are symmetric about z, y and x; B1 and B2 of C2v are symmetric to the mirror planes xz and yz.
 *
 * Source: R. S. Mulliken, J. Chem. Phys. 23, 1997 (1955).
 */
export const POINT_GROUPS: Readonly<Record<PointGroupName, PointGroup>> = {
  C1: { generators: [], irreps: ['A'] },
  Ci: { generators: [INVERSION], irreps: ['Ag', 'Au'] },
  Cs: { generators: [MIRROR_XY], irreps: ['A′', 'A″'] },
  C2: { generators: [ROTATION_Z], irreps: ['A', 'B'] },
  C2v: { generators: [MIRROR_XZ, ROTATION_Z], irreps: ['A1', 'A2', 'B1', 'B2'] },
  C2h: { generators: [ROTATION_Z, INVERSION], irreps: ['Ag', 'Bg', 'Au', 'Bu'] },
  D2: { generators: [ROTATION_Y, ROTATION_Z], irreps: ['A', 'B1', 'B2', 'B3'] },
  D2h: {
    generators: [ROTATION_Y, ROTATION_Z, INVERSION],
    irreps: ['Ag', 'B1g', 'B2g', 'B3g', 'Au', 'B1u', 'B2u', 'B3u'],
  },
};

/** Character, 1 or −1, of a representation under an operation of its group. */
export function character(group: PointGroupName, irrep: number, operation: AxisSigns): 1 | -1 {
  const { generators } = POINT_GROUPS[group];
  for (let chosen = 0; chosen < 2 ** generators.length; chosen++) {
    const product = [0, 1, 2].map((axis) =>
      generators.reduce((sign, generator, b) => ((chosen >> b) & 1 ? sign * generator[axis] : sign), 1),
    );
    if (!product.every((sign, axis) => sign === operation[axis])) continue;
    let minus = 0;
    for (let b = 0; b < generators.length; b++) minus ^= (chosen >> b) & (irrep >> b) & 1;
    return minus === 1 ? -1 : 1;
  }
  throw new RangeError(`${group} has no operation with the signs ${operation.join(', ')}`);
}

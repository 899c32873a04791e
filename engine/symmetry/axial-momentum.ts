/**
 * How far the expectation value of the squared angular momentum about the axis may lie from Λ² in a state (or
 * orbital) that is said to have Λ. Symmetric orbitals give it to rounding; a truncated expansion over orbitals of an
 * unequally filled π shell has it only nearly.
 */
export const AXIAL_TOLERANCE = 0.05;

/** Of the representations of C2v and D2h, which of their bits tells that half a turn about z changes the sign. */
const HALF_TURN_BIT = 1;

/**
 * |Λ| of a state or orbital of a linear molecule.
 *
 * @param irrep - its representation in C2v or D2h, which tells even Λ from odd
 * @param square - expectation value of the squared angular momentum about the axis
 * @returns undefined where the two do not make a whole Λ
 */
export function axialMomentum(irrep: number, square: number): number | undefined {
  const lambda = Math.round(Math.sqrt(Math.max(0, square)));
  const isOdd = ((irrep >> HALF_TURN_BIT) & 1) === 1;
  return Math.abs(square - lambda ** 2) < AXIAL_TOLERANCE && (lambda % 2 === 1) === isOdd
    ? lambda
    : undefined;
}

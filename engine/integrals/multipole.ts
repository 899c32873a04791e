import type { PlacedBasis } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { separableMatrices } from './separable-operator';

type Moments = readonly [number, number, number];

const DIPOLE: readonly Moments[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

const SECOND: readonly Moments[] = [
  [2, 0, 0],
  [1, 1, 0],
  [1, 0, 1],
  [0, 2, 0],
  [0, 1, 1],
  [0, 0, 2],
];

/**
 * Position matrices ⟨μ| r − O |ν⟩, positive: the electron's charge of −1 is left to the caller.
 *
 * @param basis - n functions; centres in bohr, exponents in bohr⁻²
 * @param origin - O, bohr
 * @returns x, y, z; each n×n symmetric, row-major, in bohr
 *
 * Source: see `LineIntegrals`.   Cost: O(n²); allocates 3n².
 */
export function dipoleMatrices(
  basis: PlacedBasis,
  origin: Vector3,
): [x: Float64Array, y: Float64Array, z: Float64Array] {
  return momentMatrices(basis, origin, DIPOLE, 1) as [Float64Array, Float64Array, Float64Array];
}

/**
 * Second moments ⟨μ| (r − O)_s (r − O)_t |ν⟩, positive: the electron's charge of −1 is left to the caller.
 *
 * @param basis - n functions; centres in bohr, exponents in bohr⁻²
 * @param origin - O, bohr
 * @returns xx, xy, xz, yy, yz, zz; each n×n symmetric, row-major, in bohr²
 *
 * Source: see `LineIntegrals`.   Cost: O(n²); allocates 6n².
 */
export function secondMomentMatrices(
  basis: PlacedBasis,
  origin: Vector3,
): [
  xx: Float64Array,
  xy: Float64Array,
  xz: Float64Array,
  yy: Float64Array,
  yz: Float64Array,
  zz: Float64Array,
] {
  return momentMatrices(basis, origin, SECOND, 2) as ReturnType<typeof secondMomentMatrices>;
}

function momentMatrices(
  basis: PlacedBasis,
  origin: Vector3,
  moments: readonly Moments[],
  highestMoment: number,
): Float64Array[] {
  return separableMatrices(basis, {
    count: moments.length,
    extraPower: 0,
    highestMoment,
    origin,
    evaluateInto(target, line, first, _a, second) {
      moments.forEach((moment, index) => {
        target[index] =
          line.at(0, first[0], second[0], moment[0]) *
          line.at(1, first[1], second[1], moment[1]) *
          line.at(2, first[2], second[2], moment[2]);
      });
    },
  });
}

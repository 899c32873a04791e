import { inverse, Matrix } from 'ml-matrix';
import type { Harmonics } from '../basis/contracted-gaussian';
import { shellTransformation } from '../integrals/basis-transformation';
import {
  type CartesianPowers,
  cartesianComponents,
  cartesianCount,
  cartesianIndex,
} from '../integrals/cartesian-components';
import { multiply } from '../linear-algebra/dense';
import type { Vector3 } from '../molecule/molecule';

/** Rows of a real 3×3 matrix. */
export type Matrix3 = readonly [Vector3, Vector3, Vector3];

/**
 * What an orthogonal map R of space does to the functions of a shell: f(k)(R⁻¹r) = Σ over k' of action(k, k')·f(k')(r).
 *
 * @param inverseMap - R⁻¹
 * @returns functions × functions, row-major
 */
export function shellMapAction(l: number, harmonics: Harmonics, inverseMap: Matrix3): Float64Array {
  return shellAction(l, harmonics, (powers) => {
    let polynomial: Float64Array = Float64Array.of(1);
    let degree = 0;
    powers.forEach((power, axis) => {
      for (let k = 0; k < power; k++) polynomial = timesLinear(polynomial, degree++, inverseMap[axis]);
    });
    return polynomial;
  });
}

/**
 * What an infinitesimal rotation about a unit vector u does to the functions of a shell, per radian:
 * −(u × r)·∇ f(k) = Σ over k' of action(k, k')·f(k').
 *
 * @returns functions × functions, row-major
 */
export function shellRotationAction(l: number, harmonics: Harmonics, [ux, uy, uz]: Vector3): Float64Array {
  /** components of −u × r as linear forms */
  const flow: Matrix3 = [
    [0, uz, -uy],
    [-uz, 0, ux],
    [uy, -ux, 0],
  ];
  return shellAction(l, harmonics, (powers) => {
    const image = new Float64Array(cartesianCount(l));
    powers.forEach((power, axis) => {
      if (power === 0) return;
      const lowered = powers.map((p, other) => p - Number(other === axis)) as unknown as CartesianPowers;
      const derivative = new Float64Array(cartesianCount(l - 1));
      derivative[cartesianIndex(lowered[1], lowered[2])] = power;
      timesLinear(derivative, l - 1, flow[axis]).forEach((value, k) => {
        image[k] += value;
      });
    });
    return image;
  });
}

/**
 * A linear map of homogeneous polynomials in the functions of a shell, which it must not lead out of: with functions
 * A over products of coordinates and their images M, the action X solves X·A = A·M.
 */
function shellAction(
  l: number,
  harmonics: Harmonics,
  imageOf: (powers: CartesianPowers) => Float64Array,
): Float64Array {
  const { functionCount, cartesianCount: columns, matrix } = shellTransformation(l, harmonics);
  const images = new Float64Array(columns * columns);
  cartesianComponents(l).forEach((powers, row) => {
    images.set(imageOf(powers), row * columns);
  });
  const imagesOfFunctions = multiply(matrix, images, functionCount, columns, columns);
  return multiply(imagesOfFunctions, rightInverse(l, harmonics), functionCount, columns, functionCount);
}

const rightInverses = new Map<string, Float64Array>();

/** Aᵀ(A·Aᵀ)⁻¹ of the functions A of a shell, cartesianCount × functionCount, row-major. */
function rightInverse(l: number, harmonics: Harmonics): Float64Array {
  const key = `${l} ${harmonics}`;
  let result = rightInverses.get(key);
  if (!result) {
    const { functionCount, cartesianCount: columns, matrix } = shellTransformation(l, harmonics);
    const functions = Matrix.from1DArray(functionCount, columns, matrix as unknown as number[]);
    const transposed = functions.transpose();
    result = Float64Array.from(transposed.mmul(inverse(functions.mmul(transposed))).to1DArray());
    rightInverses.set(key, result);
  }
  return result;
}

/** A homogeneous polynomial of a degree times a·x + b·y + c·z, both over products in lexical order. */
function timesLinear(polynomial: Float64Array, degree: number, [a, b, c]: Vector3): Float64Array {
  const product = new Float64Array(cartesianCount(degree + 1));
  cartesianComponents(degree).forEach(([, j, k], index) => {
    const value = polynomial[index];
    product[cartesianIndex(j, k)] += a * value;
    product[cartesianIndex(j + 1, k)] += b * value;
    product[cartesianIndex(j, k + 1)] += c * value;
  });
  return product;
}

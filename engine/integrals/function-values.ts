import type { PlacedBasis } from '../basis/contracted-gaussian';
import { multiply } from '../linear-algebra/dense';
import { shellTransformation } from './basis-transformation';
import { cartesianComponents } from './cartesian-components';

/**
 * Values of all basis functions at points in space.
 *
 * @param points - x, y, z of each, bohr
 * @returns points × functions, row-major, bohr^(−3/2)
 */
export function functionValues(basis: PlacedBasis, points: Float64Array): Float64Array {
  const count = points.length / 3;
  const values = new Float64Array(count * basis.functionCount);
  for (const shell of basis.shells) {
    const { matrix, cartesianCount } = shellTransformation(shell.angularMomentum, basis.harmonics);
    const powers = cartesianComponents(shell.angularMomentum);
    const products = new Float64Array(cartesianCount);
    for (let point = 0; point < count; point++) {
      const x = points[3 * point] - shell.centre[0];
      const y = points[3 * point + 1] - shell.centre[1];
      const z = points[3 * point + 2] - shell.centre[2];
      const squared = x * x + y * y + z * z;
      let radial = 0;
      for (let k = 0; k < shell.exponents.length; k++) {
        radial += shell.coefficients[k] * Math.exp(-shell.exponents[k] * squared);
      }
      for (let c = 0; c < cartesianCount; c++) {
        const [i, j, k] = powers[c];
        products[c] = radial * x ** i * y ** j * z ** k;
      }
      const first = point * basis.functionCount + shell.firstFunction;
      for (let f = 0; f < shell.functionCount; f++) {
        let sum = 0;
        for (let c = 0; c < cartesianCount; c++) sum += matrix[f * cartesianCount + c] * products[c];
        values[first + f] = sum;
      }
    }
  }
  return values;
}

/**
 * Values of orbitals at points.
 *
 * @param values - of the basis functions, points × n
 * @param coefficients - n×m row-major
 * @returns points × m, row-major, bohr^(−3/2)
 */
export function orbitalValues(
  values: Float64Array,
  coefficients: Float64Array,
  n: number,
  m: number,
): Float64Array {
  return multiply(values, coefficients, values.length / n, n, m);
}

/**
 * Electron density Σ_μν D(μ,ν) χ_μ(r) χ_ν(r) at points.
 *
 * @param values - of the basis functions, points × n
 * @param density - n×n symmetric, row-major
 * @returns one value a point, bohr⁻³
 */
export function densityValues(values: Float64Array, density: Float64Array, n: number): Float64Array {
  const count = values.length / n;
  const half = multiply(values, density, count, n, n);
  const result = new Float64Array(count);
  for (let point = 0; point < count; point++) {
    let sum = 0;
    for (let i = point * n; i < (point + 1) * n; i++) sum += half[i] * values[i];
    result[point] = sum;
  }
  return result;
}

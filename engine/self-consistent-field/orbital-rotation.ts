import { multiply } from '../linear-algebra/dense';

/**
 * C·exp(K) for the antisymmetric K with K(a,i) = κ(a,i) = −K(i,a), a virtual and i occupied: mixes virtual
 * orbitals into occupied ones and keeps all orthonormal.
 *
 * @param coefficients - n×m row-major, the `occupied` first columns occupied
 * @param rotation - κ, virtual × occupied, row-major
 * @returns n×m row-major
 */
export function rotateOrbitals(
  coefficients: Float64Array,
  rotation: Float64Array,
  n: number,
  m: number,
  occupied: number,
): Float64Array {
  const generator = new Float64Array(m * m);
  for (let a = occupied; a < m; a++) {
    for (let i = 0; i < occupied; i++) {
      const kappa = rotation[(a - occupied) * occupied + i];
      generator[a * m + i] = kappa;
      generator[i * m + a] = -kappa;
    }
  }
  return rotateByGenerator(coefficients, generator, n, m);
}

/** C·exp(K) for an antisymmetric m×m generator. */
export function rotateByGenerator(
  coefficients: Float64Array,
  generator: Float64Array,
  n: number,
  m: number,
): Float64Array {
  return multiply(coefficients, exponential(generator, m), n, m, m);
}

/** Terms of the exponential below this are lost beside its unit matrix, as are the smaller ones after them. */
const NEGLIGIBLE_TERM = 1e-18;

/** Matrix exponential by scaling and squaring of the Taylor series; to rounding for the norms met here. */
function exponential(matrix: Float64Array, m: number): Float64Array {
  let norm = 0;
  for (let i = 0; i < m; i++) {
    let row = 0;
    for (let j = 0; j < m; j++) row += Math.abs(matrix[i * m + j]);
    norm = Math.max(norm, row);
  }
  const squarings = Math.max(0, Math.ceil(Math.log2(Math.max(norm, 1e-300) / 0.25)));
  const scaled = matrix.map((value) => value / 2 ** squarings);
  let result: Float64Array = new Float64Array(m * m);
  for (let i = 0; i < m; i++) result[i * m + i] = 1;
  let term: Float64Array = result.slice();
  // 0.25¹³/13! < 1e-17; small rotations need fewer terms
  for (let order = 1, largest = 1; order <= 13 && largest > NEGLIGIBLE_TERM; order++) {
    term = multiply(term, scaled, m, m, m);
    largest = 0;
    for (let i = 0; i < m * m; i++) {
      term[i] /= order;
      result[i] += term[i];
      largest = Math.max(largest, Math.abs(term[i]));
    }
  }
  for (let k = 0; k < squarings; k++) result = multiply(result, result, m, m, m);
  return result;
}

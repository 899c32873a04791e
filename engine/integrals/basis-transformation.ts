import type { Harmonics } from '../basis/contracted-gaussian';
import { cartesianComponents, cartesianCount, cartesianIndex } from './cartesian-components';

/** How the functions of a shell are made of the bare products x^i y^j z^k · Σ c exp(−αr²). */
export interface ShellTransformation {
  readonly functionCount: number;
  readonly cartesianCount: number;
  /** functionCount × cartesianCount, row-major */
  readonly matrix: Float64Array;
  /** s and p functions are the products themselves */
  readonly isIdentity: boolean;
}

/** by angular momentum */
const cache: Record<Harmonics, ShellTransformation[]> = { spherical: [], cartesian: [] };

/**
 * Transformation from bare Cartesian products to the functions of a shell, in the order and with the
 * normalisation that `PlacedShell` promises: contraction coefficients normalise x^l, and this matrix brings
 * every function to norm 1.
 *
 * @param l - angular momentum ≥ 0; s and p are the same in both kinds
 */
export function shellTransformation(l: number, harmonics: Harmonics): ShellTransformation {
  let transformation: ShellTransformation | undefined = cache[harmonics][l];
  if (!transformation) {
    const matrix = l < 2 || harmonics === 'cartesian' ? cartesianNormalisation(l) : solidHarmonics(l);
    const columns = cartesianCount(l);
    transformation = {
      functionCount: matrix.length / columns,
      cartesianCount: columns,
      matrix,
      isIdentity: l < 2,
    };
    cache[harmonics][l] = transformation;
  }
  return transformation;
}

/** ‖x^l‖ / ‖x^i y^j z^k‖ = √((2l−1)!! / ((2i−1)!! (2j−1)!! (2k−1)!!)) for a common radial part. */
function cartesianNormalisation(l: number): Float64Array {
  const components = cartesianComponents(l);
  const matrix = new Float64Array(components.length ** 2);
  components.forEach(([i, j, k], row) => {
    const ratio =
      oddFactorial(2 * l - 1) / (oddFactorial(2 * i - 1) * oddFactorial(2 * j - 1) * oddFactorial(2 * k - 1));
    matrix[row * components.length + row] = Math.sqrt(ratio);
  });
  return matrix;
}

/**
 * Real solid harmonics of degree l over x^i y^j z^k; rows m = −l … +l, columns in lexical order; (2l+1) × (l+1)(l+2)/2.
 *
 * Racah's normalisation, ∫ |S_lm|² dΩ = 4π/(2l+1) on the unit sphere, which is also the norm of x^l: so a radial
 * part that normalises x^l normalises every S_lm.
 *
 * Source: H. B. Schlegel, M. J. Frisch, Int. J. Quantum Chem. 54, 83 (1995); in the form of Helgaker, Jørgensen,
 * Olsen, Molecular Electronic-Structure Theory (2000), eqs. (6.4.47)–(6.4.50).
 */
export function solidHarmonics(l: number): Float64Array {
  const columns = cartesianCount(l);
  const matrix = new Float64Array((2 * l + 1) * columns);
  for (let m = -l; m <= l; m++) {
    const size = Math.abs(m);
    const odd = m < 0 ? 1 : 0;
    const norm =
      Math.sqrt((m === 0 ? 1 : 2) * factorial(l + size) * factorial(l - size)) / (2 ** size * factorial(l));
    for (let t = 0; 2 * t <= l - size; t++) {
      for (let u = 0; u <= t; u++) {
        // y enters as y^(2u + yPower) with yPower even for m ≥ 0 and odd for m < 0
        for (let yPower = odd; yPower <= size; yPower += 2) {
          const sign = (t + (yPower - odd) / 2) % 2 === 0 ? 1 : -1;
          const coefficient =
            sign *
            0.25 ** t *
            binomial(l, t) *
            binomial(l - t, size + t) *
            binomial(t, u) *
            binomial(size, yPower);
          const column = cartesianIndex(2 * u + yPower, l - 2 * t - size);
          matrix[(m + l) * columns + column] += norm * coefficient;
        }
      }
    }
  }
  return matrix;
}

/**
 * Brings a block over bare products of two shells to their functions: target = A · source · Bᵀ.
 *
 * @param source - A.cartesianCount × B.cartesianCount, row-major
 * @returns A.functionCount × B.functionCount, row-major; the source itself where there is nothing to do
 */
export function transformBlock(
  a: ShellTransformation,
  b: ShellTransformation,
  source: Float64Array,
): Float64Array {
  if (a.isIdentity && b.isIdentity) return source;
  const half = new Float64Array(a.functionCount * b.cartesianCount);
  for (let row = 0; row < a.functionCount; row++) {
    for (let i = 0; i < a.cartesianCount; i++) {
      const factor = a.matrix[row * a.cartesianCount + i];
      if (factor === 0) continue;
      for (let j = 0; j < b.cartesianCount; j++) {
        half[row * b.cartesianCount + j] += factor * source[i * b.cartesianCount + j];
      }
    }
  }
  const target = new Float64Array(a.functionCount * b.functionCount);
  for (let row = 0; row < a.functionCount; row++) {
    for (let column = 0; column < b.functionCount; column++) {
      let sum = 0;
      for (let j = 0; j < b.cartesianCount; j++) {
        sum += b.matrix[column * b.cartesianCount + j] * half[row * b.cartesianCount + j];
      }
      target[row * b.functionCount + column] = sum;
    }
  }
  return target;
}

/** n!! for odd n, 1 for n ≤ 0 */
function oddFactorial(n: number): number {
  let product = 1;
  for (let factor = n; factor > 1; factor -= 2) product *= factor;
  return product;
}

function factorial(n: number): number {
  let product = 1;
  for (let factor = 2; factor <= n; factor++) product *= factor;
  return product;
}

function binomial(n: number, k: number): number {
  if (k < 0 || k > n) return 0;
  return factorial(n) / (factorial(k) * factorial(n - k));
}

import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { slaterGaussianMoments } from './slater-moments';

/** A Slater function of exponent 1: radial part ∝ r^(principal − 1) exp(−r). */
export interface SlaterFunction {
  readonly principal: 1 | 2 | 3;
  readonly angularMomentum: 0 | 1;
}

/** The largest overlap that a normalised sum of Gaussians of given exponents reaches with a Slater function. */
export interface BestOverlap {
  readonly value: number;
  /** by ln α of each Gaussian, n×1 */
  readonly gradient: Matrix;
  /** second derivatives by ln α, n×n */
  readonly hessian: Matrix;
  /** multiply normalised primitives; the sum is normalised */
  readonly coefficients: readonly number[];
}

/** Γ(l + 3/2) for l = 0, 1. */
const GAMMA = [Math.sqrt(Math.PI) / 2, (3 * Math.sqrt(Math.PI)) / 4] as const;
/** (2n)! by principal quantum number n. */
const FACTORIAL_OF_TWICE = { 1: 2, 2: 24, 3: 720 } as const;

/**
 * Best overlap between a Slater function of exponent 1 and Gaussians of the same angular momentum.
 *
 * With S the overlap matrix of the normalised primitives and b their overlaps with the Slater function, the best
 * coefficients before normalisation are c = S⁻¹b, and the overlap is √Q with Q = bᵀS⁻¹b. Derivatives by u = ln α,
 * with v_j = ∂_j b − ∂_j S·c: ∂_j Q = 2cᵀ∂_j b − cᵀ∂_j S c and ∂_jk Q = 2cᵀ∂_jk b − cᵀ∂_jk S c + 2 v_jᵀS⁻¹v_k
 * (by differentiating the definition).
 *
 * @param exponents - n of them, bohr⁻², from 1e-3 to 1e3
 * @returns undefined if S is singular to working precision, that is, two exponents are nearly equal
 */
export function bestOverlap(target: SlaterFunction, exponents: readonly number[]): BestOverlap | undefined {
  const n = exponents.length;
  const { overlap, first, second } = primitiveOverlaps(exponents, target.angularMomentum + 1.5);
  const factor = new CholeskyDecomposition(overlap);
  if (!factor.isPositiveDefinite()) return undefined;
  const withSlater = exponents.map((exponent) => overlapWithSlater(target, exponent));
  const b = Matrix.columnVector(withSlater.map(({ value }) => value));
  const c = factor.solve(b);
  const value = Math.sqrt(b.dot(c));

  const derivative = new Matrix(n, n); // column j: v_j
  const gradient = new Matrix(n, 1);
  const curvature = new Matrix(n, n);
  for (let j = 0; j < n; j++) {
    const cj = c.get(j, 0);
    let own = withSlater[j].first;
    let ownSecond = withSlater[j].second;
    for (let k = 0; k < n; k++) {
      if (k === j) continue;
      const ck = c.get(k, 0);
      own -= first.get(j, k) * ck;
      ownSecond -= second.get(j, k) * ck;
      derivative.set(k, j, -first.get(j, k) * cj);
      curvature.set(j, k, 2 * second.get(j, k) * cj * ck);
    }
    derivative.set(j, j, own);
    gradient.set(j, 0, 2 * cj * own);
    curvature.set(j, j, 2 * cj * ownSecond);
  }
  const response = derivative.transpose().mmul(factor.solve(derivative));
  // symmetric but for rounding
  curvature.add(response).add(response.transpose());

  // from Q to √Q
  gradient.div(2 * value);
  const hessian = curvature.div(2 * value).sub(gradient.mmul(gradient.transpose()).div(value));
  return { value, gradient, hessian, coefficients: c.div(value).to1DArray() };
}

/** Overlap of a Slater function with a normalised Gaussian, and its first and second derivative by ln α. */
function overlapWithSlater({ principal, angularMomentum }: SlaterFunction, exponent: number) {
  const power = angularMomentum + 1.5;
  const slaterNorm = 2 ** (principal + 0.5) / Math.sqrt(FACTORIAL_OF_TWICE[principal]);
  const gaussianNorm = Math.sqrt((2 * (2 * exponent) ** power) / GAMMA[angularMomentum]);
  const k = principal + angularMomentum + 1;
  const moments = slaterGaussianMoments(exponent, k + 4);
  const norm = slaterNorm * gaussianNorm;
  // the norm goes as α^(power/2); each derivative of the integral by α brings down −r²
  const plain = norm * moments[k];
  const once = -norm * exponent * moments[k + 2];
  const twice = norm * exponent * exponent * moments[k + 4];
  return {
    value: plain,
    first: 0.5 * power * plain + once,
    second: 0.25 * power * power * plain + (power + 1) * once + twice,
  };
}

/**
 * Overlaps S of normalised Gaussians, (2√(αβ)/(α + β))^power; `first` is ∂S_jk/∂u_j = −∂S_jk/∂u_k and `second`
 * ∂²S_jk/∂u_j² = −∂²S_jk/∂u_j∂u_k, since S depends on u_j − u_k only.
 */
function primitiveOverlaps(exponents: readonly number[], power: number) {
  const n = exponents.length;
  const overlap = new Matrix(n, n);
  const first = new Matrix(n, n);
  const second = new Matrix(n, n);
  for (let j = 0; j < n; j++) {
    for (let k = 0; k < n; k++) {
      const sum = exponents[j] + exponents[k];
      const slope = (exponents[j] - exponents[k]) / sum;
      const value = ((2 * Math.sqrt(exponents[j] * exponents[k])) / sum) ** power;
      overlap.set(j, k, value);
      first.set(j, k, -0.5 * power * slope * value);
      second.set(j, k, 0.25 * power * ((power + 1) * slope * slope - 1) * value);
    }
  }
  return { overlap, first, second };
}

import {
  type FixedPoint,
  fixedPoint,
  ONE,
  PI,
  product,
  quotient,
  solvePositiveDefinite,
  squareRoot,
  toNumber,
} from './fixed-point';
import type { SlaterFunction } from './slater-overlap';

/** As `BestOverlap`, every number right to the last digit of a double, small ones and differences too. */
export interface PreciseOverlap {
  /** 1 − overlap */
  readonly deficit: number;
  /** of the overlap, by ln α of each Gaussian */
  readonly gradient: readonly number[];
  readonly coefficients: readonly number[];
}

/**
 * Best overlap between a Slater function and Gaussians in 60-digit arithmetic. In doubles the slope of the overlap is
 * a difference of numbers near 1 that leaves 1e-16, while the overlap of six Gaussians curves by 1e-6 only: exponents
 * would be uncertain by 1e-10. Here the slope is exact to 1e-40.
 *
 * The coefficients are stationary, so the derivative of √Q is taken at fixed coefficients:
 * ∂_j = c_j·(∂_j b_j − √Q·Σ_k ∂_j S_jk c_k), with normalised c.
 *
 * @param exponents - bohr⁻², 0.02 and more
 */
export function preciseOverlap(target: SlaterFunction, exponents: readonly number[]): PreciseOverlap {
  const { principal, angularMomentum: l } = target;
  const alphas = exponents.map(fixedPoint);
  const halfPower = (BigInt(2 * l + 3) * ONE) / 4n;
  const k = principal + l + 1;
  const withSlater: FixedPoint[] = [];
  const derivatives: FixedPoint[] = [];
  for (const alpha of alphas) {
    const moments = slaterGaussianMoments(alpha, k + 2);
    const norm = product(slaterNorm(principal), gaussianNorm(alpha, l));
    const value = product(norm, moments[k]);
    withSlater.push(value);
    derivatives.push(product(halfPower, value) - product(product(norm, alpha), moments[k + 2]));
  }
  const overlaps = alphas.map((alpha) => alphas.map((beta) => primitiveOverlap(alpha, beta, l)));
  const solution = solvePositiveDefinite(overlaps, withSlater);
  const overlap = squareRoot(solution.reduce((sum, c, j) => sum + product(c, withSlater[j]), 0n));
  const coefficients = solution.map((c) => quotient(c, overlap));
  const gradient = alphas.map((alpha, j) => {
    const slopes = alphas.map((beta, i) => {
      const slope = quotient(product(halfPower, beta - alpha), alpha + beta);
      return product(product(slope, overlaps[j][i]), coefficients[i]);
    });
    const ofFit = slopes.reduce((sum, slope) => sum + slope, 0n);
    return toNumber(product(coefficients[j], derivatives[j] - product(overlap, ofFit)));
  });
  return { deficit: toNumber(ONE - overlap), gradient, coefficients: coefficients.map(toNumber) };
}

/** Norm of r^(n − 1) exp(−r): 2^(n + 1/2)/√((2n)!). */
function slaterNorm(principal: number): FixedPoint {
  let square = 2n * ONE;
  for (let factor = 1; factor <= 2 * principal; factor++) square = (2n * square) / BigInt(factor);
  return squareRoot(square);
}

/** Norm of r^l exp(−αr²): √(2(2α)^(l + 3/2)/Γ(l + 3/2)), l = 0 or 1. */
function gaussianNorm(alpha: FixedPoint, l: 0 | 1): FixedPoint {
  const twice = 2n * alpha;
  const root = squareRoot(quotient(twice, PI));
  // (2α)^(3/2)/Γ(3/2) = 2·2α·√(2α/π), and a factor 2α/(3/2) more for p
  const s = 4n * product(twice, root);
  return squareRoot(l === 0 ? s : (2n * product(s, twice)) / 3n);
}

/** Overlap of normalised Gaussians, (2√(αβ)/(α + β))^(l + 3/2), l = 0 or 1. */
function primitiveOverlap(alpha: FixedPoint, beta: FixedPoint, l: 0 | 1): FixedPoint {
  const base = quotient(2n * squareRoot(product(alpha, beta)), alpha + beta);
  const s = product(base, squareRoot(base));
  return l === 0 ? s : product(base, s);
}

/**
 * ∫₀^∞ r^k exp(−r − αr²) dr for k = 0 … highest, from exp(z²)·erfc(z) = Σ (−z)^m/Γ(m/2 + 1), z = 1/(2√α), upwards:
 * there are digits enough to lose.
 */
function slaterGaussianMoments(alpha: FixedPoint, highest: number): FixedPoint[] {
  const z = quotient(ONE, 2n * squareRoot(alpha));
  const rootPi = squareRoot(PI);
  const square = product(z, z);
  let sum = 0n;
  let term = ONE;
  let next = -quotient(2n * z, rootPi);
  for (let m = 2n; term !== 0n; m++) {
    sum += term;
    [term, next] = [next, (2n * product(term, square)) / m];
  }
  const moments = [product(product(rootPi, z), sum)];
  moments.push(quotient(ONE - moments[0], 2n * alpha));
  for (let k = 1; k < highest; k++) {
    moments.push(quotient(BigInt(k) * moments[k - 1] - moments[k], 2n * alpha));
  }
  return moments;
}

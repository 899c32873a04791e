import { Matrix, solve } from 'ml-matrix';

/**
 * Taylor coefficients c_k of the polynomial Σ c_k (x − centre)^k through equally spaced points
 * centre + (i − (n−1)/2)·spacing.
 *
 * @param values - odd number n of values, in order of x
 * @returns n coefficients; c_k = f^(k)(centre)/k! to O(spacing^(n−k)) or better
 */
export function localExpansion(values: readonly number[], spacing: number): number[] {
  const n = values.length;
  const middle = (n - 1) / 2;
  // Solved in units of the spacing, where the Vandermonde matrix is well conditioned, about the middle value,
  // so that the large common part of total energies does not eat digits.
  const powers = new Matrix(n, n);
  for (let i = 0; i < n; i++) for (let k = 0; k < n; k++) powers.set(i, k, (i - middle) ** k);
  const reference = values[middle];
  const right = Matrix.columnVector(values.map((value) => value - reference));
  const scaled = solve(powers, right).to1DArray();
  return scaled.map((c, k) => (k === 0 ? reference + c : c / spacing ** k));
}

/** Σ k·c_k·t^(k−1) and its derivative. */
function slopeAndCurvature(coefficients: readonly number[], t: number): [number, number] {
  let slope = 0;
  let curvature = 0;
  for (let k = coefficients.length - 1; k >= 1; k--) {
    slope = slope * t + k * coefficients[k];
    if (k >= 2) curvature = curvature * t + k * (k - 1) * coefficients[k];
  }
  return [slope, curvature];
}

/** Newton steps allowed; from a bracketed well two or three are enough. */
const NEWTON_STEPS = 40;

/** Displacement from the centre at which the expansion has its minimum; undefined if it has none within `reach`. */
export function minimumOfExpansion(coefficients: readonly number[], reach: number): number | undefined {
  let t = 0;
  for (let step = 0; step < NEWTON_STEPS; step++) {
    const [slope, curvature] = slopeAndCurvature(coefficients, t);
    if (!(curvature > 0)) return undefined;
    const change = -slope / curvature;
    t += change;
    if (!(Math.abs(t) <= reach)) return undefined;
    if (Math.abs(change) <= 1e-14 * reach) return t;
  }
  return t;
}

/** Value of the expansion at a displacement. */
export function evaluateExpansion(coefficients: readonly number[], t: number): number {
  return coefficients.reduceRight((sum, c) => sum * t + c, 0);
}

/** Second derivative of the expansion at a displacement. */
export function curvatureOfExpansion(coefficients: readonly number[], t: number): number {
  return slopeAndCurvature(coefficients, t)[1];
}

/** A function through given points, smooth everywhere between and beyond them. */
export type Interpolant = (x: number) => number;

/**
 * Barycentric rational interpolant: polynomials through d + 1 neighbouring points, blended. It has no poles on the real
 * line for any spacing of the points, is infinitely often differentiable, and its error falls as h^(d+1).
 *
 * Source: M. S. Floater, K. Hormann, Numer. Math. 107, 315 (2007), eqs. (4), (18).
 *
 * @param abscissas - n rising, distinct values
 * @param values - n values
 * @param degree - d, less than n
 */
export function rationalInterpolant(
  abscissas: readonly number[],
  values: readonly number[],
  degree: number,
): Interpolant {
  const d = Math.min(degree, abscissas.length - 1);
  const weights = abscissas.map((_, k) => blendingWeight(abscissas, k, d));
  return (x) => blend(abscissas, values, weights, x);
}

/**
 * What each inner value would be by the interpolant through all others; the two at the ends, which have none beyond, as
 * they are.
 *
 * Only weights of points up to `degree` away change when one is left out.
 *
 * @param degree - d, less than n − 1
 */
export function predictFromOthers(
  abscissas: readonly number[],
  values: readonly number[],
  degree: number,
): number[] {
  const n = abscissas.length;
  const weights = abscissas.map((_, k) => blendingWeight(abscissas, k, degree));
  return values.map((value, left) => {
    if (left === 0 || left === n - 1) return value;
    let numerator = 0;
    let denominator = 0;
    for (let k = 0; k < n; k++) {
      if (k === left) continue;
      // among the others every point beyond stands one place further down, where the signs alternate the other way
      let weight = k < left ? weights[k] : -weights[k];
      if (Math.abs(k - left) <= degree) weight = blendingWeight(abscissas, k, degree, left);
      const term = weight / (abscissas[left] - abscissas[k]);
      numerator += term * values[k];
      denominator += term;
    }
    return numerator / denominator;
  });
}

/**
 * Σ over the polynomials that point k takes part in of Π 1/|x_k − x_j|, with alternating sign.
 *
 * @param left - a point that is left out, other than k
 */
function blendingWeight(abscissas: readonly number[], k: number, d: number, left = abscissas.length): number {
  const at = (place: number) => abscissas[place < left ? place : place + 1];
  const count = left < abscissas.length ? abscissas.length - 1 : abscissas.length;
  const place = k < left ? k : k - 1;
  const distance = (other: number) => Math.abs(abscissas[k] - at(other));
  const first = Math.max(0, place - d);
  let product = 1;
  for (let j = first; j <= first + d; j++) if (j !== place) product /= distance(j);
  let sum = product;
  // the next polynomial loses its lowest point and gains the one above
  for (let start = first; start < Math.min(place, count - 1 - d); start++) {
    product *= distance(start) / distance(start + d + 1);
    sum += product;
  }
  return place % 2 === 0 ? sum : -sum;
}

function blend(
  abscissas: readonly number[],
  values: readonly number[],
  weights: readonly number[],
  x: number,
): number {
  let numerator = 0;
  let denominator = 0;
  for (let k = 0; k < abscissas.length; k++) {
    const difference = x - abscissas[k];
    if (difference === 0) return values[k];
    const term = weights[k] / difference;
    numerator += term * values[k];
    denominator += term;
  }
  return numerator / denominator;
}

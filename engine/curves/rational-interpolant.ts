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
  const weights = abscissas.map((_, k) => blendingWeight(abscissas, k, degree));
  const last = abscissas.length - 1;
  return values.map((value, left) => {
    if (left === 0 || left === last) return value;
    const others = abscissas.toSpliced(left, 1);
    const ofOthers = others.map((_, k) => {
      if (k < left - degree) return weights[k];
      // one place further down, where the signs alternate the other way
      return k >= left + degree ? -weights[k + 1] : blendingWeight(others, k, degree);
    });
    return blend(others, values.toSpliced(left, 1), ofOthers, abscissas[left]);
  });
}

function blendingWeight(abscissas: readonly number[], k: number, d: number): number {
  const last = abscissas.length - 1 - d;
  let sum = 0;
  for (let start = Math.max(0, k - d); start <= Math.min(k, last); start++) {
    let product = 1;
    for (let j = start; j <= start + d; j++) if (j !== k) product /= Math.abs(abscissas[k] - abscissas[j]);
    sum += product;
  }
  return k % 2 === 0 ? sum : -sum;
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

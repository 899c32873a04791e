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
  const n = abscissas.length;
  const d = Math.min(degree, n - 1);
  const weights = abscissas.map((at, k) => {
    let sum = 0;
    for (let start = Math.max(0, k - d); start <= Math.min(k, n - 1 - d); start++) {
      let product = 1;
      for (let j = start; j <= start + d; j++) if (j !== k) product /= Math.abs(at - abscissas[j]);
      sum += product;
    }
    return k % 2 === 0 ? sum : -sum;
  });
  return (x) => {
    let numerator = 0;
    let denominator = 0;
    for (let k = 0; k < n; k++) {
      const difference = x - abscissas[k];
      if (difference === 0) return values[k];
      const term = weights[k] / difference;
      numerator += term * values[k];
      denominator += term;
    }
    return numerator / denominator;
  };
}

/** Nodes and weights of a quadrature rule. */
export interface QuadratureRule {
  readonly nodes: readonly number[];
  readonly weights: readonly number[];
}

/** Gauss–Legendre rule on (0, 1), by Newton iteration on the Legendre polynomial. */
export function gaussLegendre(count: number): QuadratureRule {
  const nodes: number[] = [];
  const weights: number[] = [];
  for (let i = 0; i < count; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (count + 0.5));
    let slope = 1;
    for (let step = 0; step < 30; step++) {
      let previous = 1;
      let value = x;
      for (let n = 2; n <= count; n++)
        [previous, value] = [value, ((2 * n - 1) * x * value - (n - 1) * previous) / n];
      slope = (count * (x * value - previous)) / (x * x - 1);
      const change = value / slope;
      x -= change;
      if (Math.abs(change) < 1e-16) break;
    }
    nodes.push((1 - x) / 2);
    weights.push(1 / ((1 - x * x) * slope * slope));
  }
  return { nodes, weights };
}

/** Gauss–Hermite rule for ∫ f(x) exp(−x²) dx, roots of the orthonormal Hermite function by bisection of sign changes. */
export function gaussHermite(count: number): QuadratureRule {
  const orthonormal = (n: number, x: number): number => {
    let previous = 0;
    let value = Math.PI ** -0.25;
    for (let k = 0; k < n; k++) {
      [previous, value] = [value, x * Math.sqrt(2 / (k + 1)) * value - Math.sqrt(k / (k + 1)) * previous];
    }
    return value;
  };
  const nodes: number[] = [];
  const weights: number[] = [];
  const reach = Math.sqrt(2 * count + 1) + 1;
  const intervals = 400 * count;
  for (let i = 0; i < intervals; i++) {
    let left = -reach + (2 * reach * (i + 0.5 / Math.PI)) / intervals;
    let right = left + (2 * reach) / intervals;
    const sign = Math.sign(orthonormal(count, left));
    if (sign === Math.sign(orthonormal(count, right))) continue;
    for (let step = 0; step < 60; step++) {
      const middle = (left + right) / 2;
      if (Math.sign(orthonormal(count, middle)) === sign) left = middle;
      else right = middle;
    }
    const x = (left + right) / 2;
    nodes.push(x);
    weights.push(1 / (count * orthonormal(count - 1, x) ** 2));
  }
  return { nodes, weights };
}

/** Exponents of x, y, z. */
export type CartesianPowers = readonly [number, number, number];

/** Number of products x^i y^j z^k of degree l. */
export function cartesianCount(l: number): number {
  return ((l + 1) * (l + 2)) / 2;
}

/** Place of x^i y^j z^k among the products of its degree, in the lexical order xx, xy, xz, yy, yz, zz. */
export function cartesianIndex(j: number, k: number): number {
  const rest = j + k;
  return (rest * (rest + 1)) / 2 + k;
}

const componentsOfDegree: (readonly CartesianPowers[])[] = [];

/** All products of degree l in lexical order (x exponent falling, then y). */
export function cartesianComponents(l: number): readonly CartesianPowers[] {
  componentsOfDegree[l] ??= listComponents(l);
  return componentsOfDegree[l];
}

function listComponents(l: number): readonly CartesianPowers[] {
  const components: CartesianPowers[] = [];
  for (let i = l; i >= 0; i--) {
    for (let j = l - i; j >= 0; j--) components.push([i, j, l - i - j]);
  }
  return components;
}

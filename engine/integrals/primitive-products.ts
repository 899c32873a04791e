import type { PairMember, ShellBlock } from './shell-block';

/**
 * Primitive products whose estimated size, √(product|product), is below this are left out. The estimate errs on the
 * large side; against the largest partner that occurs (about 20 for an exponent of 1e5) an integral changes by less
 * than 1e-16.
 */
const NEGLIGIBLE_PRODUCT = 1e-18;

/** √2 π^(5/4): squared, the constant of the Coulomb integral of two s products, 2 π^(5/2) / (p q √(p + q)). */
const COULOMB_PREFACTOR = Math.SQRT2 * Math.PI ** 1.25;

/** A product of two primitives, shared by all pairs of shells of two blocks. */
export interface PrimitiveProduct {
  readonly firstExponent: number;
  readonly secondExponent: number;
  /** √2 π^(5/4)/p times the overlap factor exp(−ab/p |A − B|²) */
  readonly prefactor: number;
  /** product of contraction coefficients for each pair of shells */
  readonly coefficients: readonly number[];
  /** estimate of √(product|product), the largest of the pairs of shells */
  readonly bound: number;
}

/**
 * The products worth keeping, largest first. On one centre those that agree in p are one Gaussian and are added up.
 */
export function primitiveProducts(
  first: ShellBlock,
  second: ShellBlock,
  members: readonly PairMember[],
): PrimitiveProduct[] {
  const [x, y, z] = first.centre.map((value, axis) => value - second.centre[axis]);
  const squaredDistance = x * x + y * y + z * z;
  const distance = Math.sqrt(squaredDistance);
  const products: PrimitiveProduct[] = [];
  for (const [i, j, coefficients] of indexPairs(first, second, members, distance === 0)) {
    const a = first.exponents[i];
    const b = second.exponents[j];
    const p = a + b;
    const prefactor = (Math.exp(-((a * b) / p) * squaredDistance) * COULOMB_PREFACTOR) / p;
    // (ss|ss) of the product with itself is (coefficient · prefactor)²/√(2p); each power of r adds at most about the
    // distance from its centre to P plus the width of the product
    const size = prefactor / (2 * p) ** 0.25;
    const reach = 1 + distance + 1 / Math.sqrt(p);
    let bound = 0;
    members.forEach((member, m) => {
      const totalL = member.first.angularMomentum + member.second.angularMomentum;
      bound = Math.max(bound, Math.abs(coefficients[m]) * size * reach ** totalL);
    });
    if (bound > NEGLIGIBLE_PRODUCT) {
      products.push({ firstExponent: a, secondExponent: b, prefactor, coefficients, bound });
    }
  }
  return products.sort((left, right) => right.bound - left.bound);
}

/** Indices of two primitives with the coefficients of their product, products of one p together if concentric. */
function indexPairs(
  first: ShellBlock,
  second: ShellBlock,
  members: readonly PairMember[],
  isConcentric: boolean,
): (readonly [number, number, number[]])[] {
  const pairs: (readonly [number, number, number[]])[] = [];
  const coefficientsOfSum = new Map<number, number[]>();
  for (let i = 0; i < first.exponents.length; i++) {
    for (let j = 0; j < second.exponents.length; j++) {
      const coefficients = members.map((pair) => pair.first.coefficients[i] * pair.second.coefficients[j]);
      const sum = first.exponents[i] + second.exponents[j];
      const same = isConcentric ? coefficientsOfSum.get(sum) : undefined;
      if (same) {
        for (let m = 0; m < same.length; m++) same[m] += coefficients[m];
        continue;
      }
      pairs.push([i, j, coefficients]);
      if (isConcentric) coefficientsOfSum.set(sum, coefficients);
    }
  }
  return pairs;
}

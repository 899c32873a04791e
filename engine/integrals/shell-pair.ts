import type { Harmonics, PlacedBasis, PlacedShell } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { shellTransformation, transformBlock } from './basis-transformation';
import { cartesianCount } from './cartesian-components';
import { columnMap, type PairLayout, pairLayout } from './pair-layout';
import type { ExpansionFactor } from './product-expansion';

/**
 * Primitive products whose estimated size, √(product|product), is below this are left out. The estimate errs on the
 * large side; against the largest partner that occurs (about 20 for an exponent of 1e5) an integral changes by less
 * than 1e-16.
 */
const NEGLIGIBLE_PRODUCT = 1e-18;

/** √2 π^(5/4): squared, the constant of the Coulomb integral of two s products, 2 π^(5/2) / (p q √(p + q)). */
const COULOMB_PREFACTOR = Math.SQRT2 * Math.PI ** 1.25;

/**
 * All that integrals need of the products of two contracted shells, made once a geometry.
 *
 * Contracted product of functions m, n = Σ_primitives Σ_factors factors[primitive, factor]
 * Σ_columns values[(m, n), column] Λ_column, where Λ is the Hermite Gaussian ∂_P^(tuv) exp(−p r_P²) and
 * √2 π^(5/4)/p is already inside `factors`.
 */
export interface ShellPair {
  readonly first: PlacedShell;
  readonly second: PlacedShell;
  readonly layout: PairLayout;
  /** primitive products kept, largest first */
  readonly primitiveCount: number;
  /** p = a + b, bohr⁻² */
  readonly exponents: Float64Array;
  readonly centreX: Float64Array;
  readonly centreY: Float64Array;
  readonly centreZ: Float64Array;
  /** primitiveCount × factors, row-major */
  readonly factors: Float64Array;
  /** the same times (−1)^degree, as the second partner of a Coulomb integral needs them */
  readonly signedFactors: Float64Array;
  /** estimate of √(product|product) of each primitive product, falling */
  readonly bounds: Float64Array;
  /** functions of the first shell × functions of the second */
  readonly productCount: number;
  /** compressed sparse rows, one a function product */
  readonly rowStart: Int32Array;
  readonly columns: Int32Array;
  readonly values: Float64Array;
}

interface PrimitiveProduct {
  readonly firstExponent: number;
  readonly secondExponent: number;
  readonly prefactor: number;
  readonly bound: number;
}

const pairsOfBasis = new WeakMap<PlacedBasis, readonly ShellPair[]>();

/** Every pair of shells i ≥ j that has a product worth keeping; made once a basis and kept as long as it lives. */
export function shellPairs(basis: PlacedBasis): readonly ShellPair[] {
  let pairs = pairsOfBasis.get(basis);
  if (!pairs) {
    pairs = buildShellPairs(basis);
    pairsOfBasis.set(basis, pairs);
  }
  return pairs;
}

function buildShellPairs(basis: PlacedBasis): ShellPair[] {
  const pairs: ShellPair[] = [];
  basis.shells.forEach((first, i) => {
    for (const second of basis.shells.slice(0, i + 1)) {
      const pair = buildShellPair(first, second, basis.harmonics);
      if (pair.primitiveCount > 0) pairs.push(pair);
    }
  });
  return pairs;
}

/** Data of one pair; `primitiveCount` is 0 if no product of primitives is worth keeping. */
export function buildShellPair(first: PlacedShell, second: PlacedShell, harmonics: Harmonics): ShellPair {
  const [x, y, z] = first.centre.map((value, axis) => value - second.centre[axis]);
  const isConcentric = x === 0 && y === 0 && z === 0;
  const products = primitiveProducts(first, second, x * x + y * y + z * z);
  const isMerged = products.length === 1;
  const layout = pairLayout(first.angularMomentum, second.angularMomentum, isMerged, isConcentric);
  const weights = layout.expansion.factors.map((factor) =>
    isMerged ? exponentFactor(factor, products[0].firstExponent, products[0].secondExponent) : 1,
  );
  const dense = expansionMatrix(first, second, layout, [x, y, z], weights, harmonics);
  const productCount = first.functionCount * second.functionCount;
  return {
    first,
    second,
    layout,
    productCount,
    ...primitiveArrays(first, second, layout, products),
    ...compressRows(dense, productCount, layout.columnCount),
  };
}

/** (−b/p)^M (a/p)^N (1/2p)^k */
function exponentFactor(factor: ExpansionFactor, a: number, b: number): number {
  const p = a + b;
  return (-b / p) ** factor.firstPower * (a / p) ** factor.secondPower * (0.5 / p) ** factor.widthPower;
}

function primitiveProducts(
  first: PlacedShell,
  second: PlacedShell,
  squaredDistance: number,
): PrimitiveProduct[] {
  const products: PrimitiveProduct[] = [];
  const distance = Math.sqrt(squaredDistance);
  const totalL = first.angularMomentum + second.angularMomentum;
  for (let i = 0; i < first.exponents.length; i++) {
    for (let j = 0; j < second.exponents.length; j++) {
      const a = first.exponents[i];
      const b = second.exponents[j];
      const p = a + b;
      const overlap = Math.exp(-((a * b) / p) * squaredDistance);
      const prefactor = (first.coefficients[i] * second.coefficients[j] * overlap * COULOMB_PREFACTOR) / p;
      // (ss|ss) of the product with itself is prefactor²/√(2p); each power of r adds at most about the distance
      // from its centre to P plus the width of the product
      const bound = (Math.abs(prefactor) / (2 * p) ** 0.25) * (1 + distance + 1 / Math.sqrt(p)) ** totalL;
      if (bound > NEGLIGIBLE_PRODUCT)
        products.push({ firstExponent: a, secondExponent: b, prefactor, bound });
    }
  }
  return products.sort((left, right) => right.bound - left.bound);
}

function primitiveArrays(
  first: PlacedShell,
  second: PlacedShell,
  layout: PairLayout,
  products: readonly PrimitiveProduct[],
) {
  const count = products.length;
  const factorCount = layout.factorDegrees.length;
  const exponents = new Float64Array(count);
  const centreX = new Float64Array(count);
  const centreY = new Float64Array(count);
  const centreZ = new Float64Array(count);
  const bounds = new Float64Array(count);
  const factors = new Float64Array(count * factorCount);
  const signedFactors = new Float64Array(count * factorCount);
  products.forEach(({ firstExponent: a, secondExponent: b, prefactor, bound }, i) => {
    const p = a + b;
    // A + (b/p)(B − A) rather than (aA + bB)/p: exact where A = B
    const along = b / p;
    exponents[i] = p;
    centreX[i] = first.centre[0] + along * (second.centre[0] - first.centre[0]);
    centreY[i] = first.centre[1] + along * (second.centre[1] - first.centre[1]);
    centreZ[i] = first.centre[2] + along * (second.centre[2] - first.centre[2]);
    bounds[i] = bound;
    layout.expansion.factors.forEach((factor, source) => {
      const target = layout.targetFactor[source];
      if (target < 0) return;
      const value = prefactor * (layout.isMerged ? 1 : exponentFactor(factor, a, b));
      factors[i * factorCount + target] = value;
      signedFactors[i * factorCount + target] = factor.degree % 2 === 0 ? value : -value;
    });
  });
  return { primitiveCount: count, exponents, centreX, centreY, centreZ, bounds, factors, signedFactors };
}

/** Function products × columns: geometry put into the expansion, then Cartesian products to shell functions. */
function expansionMatrix(
  first: PlacedShell,
  second: PlacedShell,
  layout: PairLayout,
  separation: Vector3,
  weights: readonly number[],
  harmonics: Harmonics,
): Float64Array {
  const { expansion, columnCount } = layout;
  const map = columnMap(layout);
  const weightOfColumn = new Float64Array(expansion.columnCount);
  expansion.factors.forEach(({ degree }, factor) => {
    const start = expansion.columnStart[factor];
    weightOfColumn.fill(weights[factor], start, start + cartesianCount(degree));
  });
  const powers = separation.map((value) => Array.from({ length: layout.degree + 1 }, (_, n) => value ** n));
  const blockSize = cartesianCount(first.angularMomentum) * cartesianCount(second.angularMomentum);
  const blocks = Array.from({ length: columnCount }, () => new Float64Array(blockSize));
  for (const { product, column, coefficient, powers: power } of expansion.terms) {
    const target = map[column];
    if (target < 0) continue;
    blocks[target][product] +=
      coefficient * weightOfColumn[column] * powers[0][power[0]] * powers[1][power[1]] * powers[2][power[2]];
  }
  const firstTransformation = shellTransformation(first.angularMomentum, harmonics);
  const secondTransformation = shellTransformation(second.angularMomentum, harmonics);
  const productCount = first.functionCount * second.functionCount;
  const dense = new Float64Array(productCount * columnCount);
  blocks.forEach((block, column) => {
    const transformed = transformBlock(firstTransformation, secondTransformation, block);
    for (let product = 0; product < productCount; product++) {
      dense[product * columnCount + column] = transformed[product];
    }
  });
  return dense;
}

function compressRows(dense: Float64Array, rows: number, columnCount: number) {
  const rowStart = new Int32Array(rows + 1);
  const columns: number[] = [];
  const values: number[] = [];
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columnCount; column++) {
      const value = dense[row * columnCount + column];
      if (value === 0) continue;
      columns.push(column);
      values.push(value);
    }
    rowStart[row + 1] = columns.length;
  }
  return { rowStart, columns: Int32Array.from(columns), values: Float64Array.from(values) };
}

import type { Harmonics, PlacedBasis } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { shellTransformation, transformBlock } from './basis-transformation';
import { cartesianCount } from './cartesian-components';
import { type PairLayout, pairLayout } from './pair-layout';
import { type PrimitiveProduct, primitiveProducts } from './primitive-products';
import type { ExpansionFactor, ProductExpansion } from './product-expansion';
import { groupShells, type PairMember, pairMembers, type ShellBlock } from './shell-block';

/**
 * All that integrals need of the products of two blocks of contracted shells, made once a geometry.
 *
 * Contracted product of functions m, n = Σ_primitives Σ_factors factors[primitive, factor]
 * Σ_columns values[(m, n), column] Λ_column, where Λ is the Hermite Gaussian ∂_P^(tuv) exp(−p r_P²) and
 * √2 π^(5/4)/p is already inside `factors`. The contraction coefficients of each pair of shells are inside its own
 * factors, so that all of them share the primitives.
 */
export interface ShellPair {
  readonly members: readonly PairMember[];
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
  /** function products of all members */
  readonly productCount: number;
  /** compressed sparse rows, one a function product */
  readonly rowStart: Int32Array;
  readonly columns: Int32Array;
  readonly values: Float64Array;
}

const pairsOfBasis = new WeakMap<PlacedBasis, readonly ShellPair[]>();

/** Every pair of blocks of shells that has a product worth keeping; made once a basis and kept as long as it lives. */
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
  const blocks = groupShells(basis);
  blocks.forEach((first, i) => {
    for (const second of blocks.slice(0, i + 1)) {
      const pair = buildShellPair(first, second, basis.harmonics);
      if (pair.primitiveCount > 0) pairs.push(pair);
    }
  });
  return pairs;
}

/** Data of one pair; `primitiveCount` is 0 if no product of primitives is worth keeping. */
export function buildShellPair(first: ShellBlock, second: ShellBlock, harmonics: Harmonics): ShellPair {
  const members = pairMembers(first, second);
  const products = primitiveProducts(first, second, members);
  const [x, y, z] = first.centre.map((value, axis) => value - second.centre[axis]);
  const momenta = members.map(
    (member) => [member.first.angularMomentum, member.second.angularMomentum] as const,
  );
  const layout = pairLayout(momenta, products.length === 1, x === 0 && y === 0 && z === 0);
  const rows = members.map((member, m) => expansionMatrix(member, m, layout, [x, y, z], products, harmonics));
  return {
    members,
    layout,
    ...primitiveArrays(first, second, layout, products),
    ...compressRows(rows, layout.columnCount),
  };
}

/** (−b/p)^M (a/p)^N (1/2p)^k */
function exponentFactor(factor: ExpansionFactor, a: number, b: number): number {
  const p = a + b;
  return (
    power(-b / p, factor.firstPower) * power(a / p, factor.secondPower) * power(0.5 / p, factor.widthPower)
  );
}

function power(base: number, exponent: number): number {
  let product = 1;
  for (let n = 0; n < exponent; n++) product *= base;
  return product;
}

function primitiveArrays(
  first: ShellBlock,
  second: ShellBlock,
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
  products.forEach(({ firstExponent: a, secondExponent: b, prefactor, coefficients, bound }, i) => {
    const p = a + b;
    // A + (b/p)(B − A) rather than (aA + bB)/p: exact where A = B
    const along = b / p;
    exponents[i] = p;
    centreX[i] = first.centre[0] + along * (second.centre[0] - first.centre[0]);
    centreY[i] = first.centre[1] + along * (second.centre[1] - first.centre[1]);
    centreZ[i] = first.centre[2] + along * (second.centre[2] - first.centre[2]);
    bounds[i] = bound;
    layout.members.forEach(({ expansion, targetFactor }, m) => {
      expansion.factors.forEach((factor, source) => {
        const target = targetFactor[source];
        if (target < 0) return;
        const value = layout.isMerged
          ? prefactor
          : prefactor * coefficients[m] * exponentFactor(factor, a, b);
        factors[i * factorCount + target] = value;
        signedFactors[i * factorCount + target] = factor.degree % 2 === 0 ? value : -value;
      });
    });
  });
  return { primitiveCount: count, exponents, centreX, centreY, centreZ, bounds, factors, signedFactors };
}

/**
 * Function products of one member × columns of the pair: geometry put into the expansion, then Cartesian products to
 * shell functions. If the pair is merged, what its single primitive product contributes is put in as well.
 */
function expansionMatrix(
  { first, second }: PairMember,
  member: number,
  layout: PairLayout,
  separation: Vector3,
  products: readonly PrimitiveProduct[],
  harmonics: Harmonics,
): Float64Array {
  const { columnCount, isMerged } = layout;
  const { expansion, targetColumn } = layout.members[member];
  const weightOfColumn = isMerged ? mergedWeights(expansion, products[0], member) : undefined;
  const blockSize = cartesianCount(first.angularMomentum) * cartesianCount(second.angularMomentum);
  const cartesian = new Float64Array(columnCount * blockSize);
  const isUsed = new Uint8Array(columnCount);
  for (const { product, column, coefficient, powers } of expansion.terms) {
    const target = targetColumn[column];
    if (target < 0) continue;
    let value = weightOfColumn ? coefficient * weightOfColumn[column] : coefficient;
    for (let axis = 0; axis < 3; axis++) value *= power(separation[axis], powers[axis]);
    if (value === 0) continue;
    cartesian[target * blockSize + product] += value;
    isUsed[target] = 1;
  }
  const firstTransformation = shellTransformation(first.angularMomentum, harmonics);
  const secondTransformation = shellTransformation(second.angularMomentum, harmonics);
  const productCount = first.functionCount * second.functionCount;
  const dense = new Float64Array(productCount * columnCount);
  for (let column = 0; column < columnCount; column++) {
    if (isUsed[column] === 0) continue;
    const block = cartesian.subarray(column * blockSize, (column + 1) * blockSize);
    const transformed = transformBlock(firstTransformation, secondTransformation, block);
    for (let product = 0; product < productCount; product++) {
      dense[product * columnCount + column] = transformed[product];
    }
  }
  return dense;
}

/** What the single primitive product of a merged pair contributes to each column of a member's expansion. */
function mergedWeights(
  expansion: ProductExpansion,
  { firstExponent, secondExponent, coefficients }: PrimitiveProduct,
  member: number,
): Float64Array {
  const weights = new Float64Array(expansion.columnCount);
  expansion.factors.forEach((factor, f) => {
    const weight = coefficients[member] * exponentFactor(factor, firstExponent, secondExponent);
    const start = expansion.columnStart[f];
    weights.fill(weight, start, start + cartesianCount(factor.degree));
  });
  return weights;
}

/** @param matrices - one a member, each products × columnCount */
function compressRows(matrices: readonly Float64Array[], columnCount: number) {
  let rows = 0;
  let entries = 0;
  for (const dense of matrices) {
    rows += dense.length / columnCount;
    for (let place = 0; place < dense.length; place++) if (dense[place] !== 0) entries++;
  }
  const rowStart = new Int32Array(rows + 1);
  const columns = new Int32Array(entries);
  const values = new Float64Array(entries);
  let row = 0;
  let entry = 0;
  for (const dense of matrices) {
    for (let place = 0; place < dense.length; place++) {
      if (place % columnCount === 0) rowStart[row++] = entry;
      if (dense[place] === 0) continue;
      columns[entry] = place % columnCount;
      values[entry++] = dense[place];
    }
  }
  rowStart[row] = entry;
  return { productCount: rows, rowStart, columns, values };
}

import type { Harmonics, PlacedBasis, PlacedShell } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { shellTransformation, transformBlock } from './basis-transformation';
import { type CartesianPowers, cartesianComponents } from './cartesian-components';
import { LineIntegrals } from './line-integrals';

/** One or more symmetric operators whose integrals are sums of products of one-dimensional integrals. */
export interface SeparableOperator {
  /** how many matrices `evaluateInto` fills */
  readonly count: number;
  /** how far derivatives raise the powers of the functions */
  readonly extraPower: number;
  readonly highestMoment: number;
  /** of the moments */
  readonly origin: Vector3;
  /** integral of each operator over two bare primitives x^i y^j z^k exp(−αr²) with exponents a and b */
  evaluateInto(
    target: Float64Array,
    line: LineIntegrals,
    first: CartesianPowers,
    a: number,
    second: CartesianPowers,
    b: number,
  ): void;
}

/** Matrices of a {@link SeparableOperator} over all functions: n×n symmetric, row-major. */
export function separableMatrices(basis: PlacedBasis, operator: SeparableOperator): Float64Array[] {
  const n = basis.functionCount;
  const matrices = Array.from({ length: operator.count }, () => new Float64Array(n * n));
  const highestL = basis.shells.reduce((highest, shell) => Math.max(highest, shell.angularMomentum), 0);
  const line = new LineIntegrals(highestL + operator.extraPower, operator.highestMoment);
  basis.shells.forEach((first, i) => {
    for (const second of basis.shells.slice(0, i + 1)) {
      shellBlocks(first, second, basis.harmonics, operator, line).forEach((block, index) => {
        placeSymmetric(matrices[index], n, block, first, second);
      });
    }
  });
  return matrices;
}

function shellBlocks(
  first: PlacedShell,
  second: PlacedShell,
  harmonics: Harmonics,
  operator: SeparableOperator,
  line: LineIntegrals,
): Float64Array[] {
  const firstComponents = cartesianComponents(first.angularMomentum);
  const secondComponents = cartesianComponents(second.angularMomentum);
  const size = firstComponents.length * secondComponents.length;
  const blocks = Array.from({ length: operator.count }, () => new Float64Array(size));
  const firstPower = first.angularMomentum + operator.extraPower;
  const secondPower = second.angularMomentum + operator.extraPower;
  const primitive = new Float64Array(operator.count);
  first.exponents.forEach((a, i) => {
    second.exponents.forEach((b, j) => {
      const coefficient = first.coefficients[i] * second.coefficients[j];
      line.compute(a, first.centre, firstPower, b, second.centre, secondPower, operator.origin);
      let at = 0;
      for (const firstPowers of firstComponents) {
        for (const secondPowers of secondComponents) {
          operator.evaluateInto(primitive, line, firstPowers, a, secondPowers, b);
          for (let index = 0; index < operator.count; index++) {
            blocks[index][at] += coefficient * primitive[index];
          }
          at++;
        }
      }
    });
  });
  const firstTransformation = shellTransformation(first.angularMomentum, harmonics);
  const secondTransformation = shellTransformation(second.angularMomentum, harmonics);
  return blocks.map((block) => transformBlock(firstTransformation, secondTransformation, block));
}

/** Writes a block of shell functions and its transpose into an n×n matrix. */
export function placeSymmetric(
  matrix: Float64Array,
  n: number,
  block: Float64Array,
  first: PlacedShell,
  second: PlacedShell,
): void {
  for (let i = 0; i < first.functionCount; i++) {
    for (let j = 0; j < second.functionCount; j++) {
      const row = first.firstFunction + i;
      const column = second.firstFunction + j;
      const value = block[i * second.functionCount + j];
      matrix[row * n + column] = value;
      matrix[column * n + row] = value;
    }
  }
}

import type { PlacedBasis, PlacedShell } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { shellTransformation, transformBlock } from './basis-transformation';
import { type CartesianPowers, cartesianComponents, cartesianCount } from './cartesian-components';
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
  const workspace = {
    line: new LineIntegrals(highestL + operator.extraPower, operator.highestMoment),
    blocks: matrices.map(() => new Float64Array(cartesianCount(highestL) ** 2)),
    primitive: new Float64Array(operator.count),
  };
  basis.shells.forEach((first, i) => {
    const firstTransformation = shellTransformation(first.angularMomentum, basis.harmonics);
    for (let j = 0; j <= i; j++) {
      const second = basis.shells[j];
      const secondTransformation = shellTransformation(second.angularMomentum, basis.harmonics);
      fillShellBlocks(first, second, operator, workspace);
      matrices.forEach((matrix, index) => {
        const block = transformBlock(firstTransformation, secondTransformation, workspace.blocks[index]);
        placeSymmetric(matrix, n, block, first, second);
      });
    }
  });
  return matrices;
}

interface Workspace {
  readonly line: LineIntegrals;
  /** one an operator, for the largest pair of shells */
  readonly blocks: readonly Float64Array[];
  /** the integrals of one pair of primitives */
  readonly primitive: Float64Array;
}

/** Integrals over bare products of coordinates, contracted, into the blocks of the workspace. */

function fillShellBlocks(
  first: PlacedShell,
  second: PlacedShell,
  operator: SeparableOperator,
  { line, blocks, primitive }: Workspace,
): void {
  const firstComponents = cartesianComponents(first.angularMomentum);
  const secondComponents = cartesianComponents(second.angularMomentum);
  const firstPower = first.angularMomentum + operator.extraPower;
  const secondPower = second.angularMomentum + operator.extraPower;
  for (const block of blocks) block.fill(0);
  for (let i = 0; i < first.exponents.length; i++) {
    const a = first.exponents[i];
    for (let j = 0; j < second.exponents.length; j++) {
      const b = second.exponents[j];
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
    }
  }
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

/**
 * Real numbers as integers in units of 2⁻²⁰⁰, for the few places where a double's 16 digits cancel away. Good for
 * magnitudes from about 1e-30 to 1e60.
 */
export type FixedPoint = bigint;

const FRACTION_BITS = 200n;
const FRACTION_UNIT = 2 ** 200;

export const ONE: FixedPoint = 1n << FRACTION_BITS;

/** π to 60 decimals. */
export const PI: FixedPoint =
  (3141592653589793238462643383279502884197169399375105820974944n << FRACTION_BITS) / 10n ** 60n;

/** Exact for doubles of magnitude 1e-30 and more. */
export function fixedPoint(value: number): FixedPoint {
  return BigInt(value * FRACTION_UNIT);
}

export function toNumber(value: FixedPoint): number {
  return Number(value) / FRACTION_UNIT;
}

export function product(first: FixedPoint, second: FixedPoint): FixedPoint {
  return (first * second) >> FRACTION_BITS;
}

export function quotient(dividend: FixedPoint, divisor: FixedPoint): FixedPoint {
  return (dividend << FRACTION_BITS) / divisor;
}

/** @param value - positive */
export function squareRoot(value: FixedPoint): FixedPoint {
  const radicand = value << FRACTION_BITS;
  // Heron's steps double the 50 digits of the start each time: 50, 100, 200, 400 bits.
  let root = BigInt(Math.floor(Math.sqrt(Number(radicand))));
  for (let step = 0; step < 3; step++) root = (root + radicand / root) >> 1n;
  return root;
}

/** Solves A·x = b for a symmetric positive definite A by elimination, which then needs no exchange of rows. */
export function solvePositiveDefinite(
  matrix: readonly (readonly FixedPoint[])[],
  rightHandSide: readonly FixedPoint[],
): FixedPoint[] {
  const n = rightHandSide.length;
  const rows = matrix.map((row, i) => [...row, rightHandSide[i]]);
  for (let pivot = 0; pivot < n; pivot++) {
    for (let i = pivot + 1; i < n; i++) {
      const factor = quotient(rows[i][pivot], rows[pivot][pivot]);
      for (let j = pivot; j <= n; j++) rows[i][j] -= product(factor, rows[pivot][j]);
    }
  }
  const solution = new Array<FixedPoint>(n).fill(0n);
  for (let i = n - 1; i >= 0; i--) {
    let rest = rows[i][n];
    for (let j = i + 1; j < n; j++) rest -= product(rows[i][j], solution[j]);
    solution[i] = quotient(rest, rows[i][i]);
  }
  return solution;
}

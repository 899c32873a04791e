import type { Sector } from './sector';

/** How far, against its largest element, a vector may be from its image under the exchange of spins … */
export const EXACT_PARITY = 1e-13;
/** … and where the difference is taken for the rounding errors of a small residual. */
export const NEAR_PARITY = 1e-6;

/** Edge of the square tiles in which a vector and its image are walked through, so that both stay in the fast cache. */
const TILE = 32;

/**
 * Calls for stretches of elements (row i, columns first … last − 1) on and below the diagonal, with where they start
 * and where their mirror images do; the images of neighbours are `imageStep(column)` apart. Only where alpha and
 * beta strings are the same.
 */
function forEachStretch(
  { irrep, rowStart }: Sector,
  take: (start: number, length: number, imageRows: Int32Array, firstColumn: number, row: number) => void,
): void {
  rowStart.forEach((rows, h) => {
    const x = h ^ irrep;
    if (h < x) return;
    const imageRows = rowStart[x];
    const count = rows.length - 1;
    for (let top = 0; top < count; top += TILE) {
      // rows of higher rank, which stand below, are not longer
      const longest = rows[top + 1] - rows[top];
      for (let left = 0; left < longest; left += TILE) {
        for (let row = top; row < Math.min(top + TILE, count); row++) {
          const end = Math.min(left + TILE, rows[row + 1] - rows[row], h === x ? row + 1 : longest);
          if (end > left) take(rows[row] + left, end - left, imageRows, left, row);
        }
      }
    }
  });
}

/**
 * 1 or −1 if exchanging alpha and beta multiplies the vector by that, 0 if neither. With as many alpha as beta
 * electrons a state has such a parity, (−1)^S; its product is then half the work.
 */
export function spinFlipParity(sector: Sector, vector: Float64Array, tolerance: number): -1 | 0 | 1 {
  let largest = 0;
  let difference = 0;
  let sum = 0;
  forEachStretch(sector, (start, length, imageRows, firstColumn, row) => {
    for (let k = 0; k < length; k++) {
      const value = vector[start + k];
      const image = vector[imageRows[firstColumn + k] + row];
      largest = Math.max(largest, Math.abs(value), Math.abs(image));
      difference = Math.max(difference, Math.abs(value - image));
      sum = Math.max(sum, Math.abs(value + image));
    }
  });
  if (difference <= tolerance * largest) return 1;
  return sum <= tolerance * largest ? -1 : 0;
}

/** Makes a vector even (1) or odd (−1) under the exchange, in place. */
export function makeEvenOrOdd(sector: Sector, vector: Float64Array, parity: number): void {
  forEachStretch(sector, (start, length, imageRows, firstColumn, row) => {
    for (let k = 0; k < length; k++) {
      const image = imageRows[firstColumn + k] + row;
      const value = (vector[start + k] + parity * vector[image]) / 2;
      vector[start + k] = value;
      vector[image] = parity * value;
    }
  });
}

/** Fills what lies above the diagonal from what lies below, in place. */
export function mirror(sector: Sector, vector: Float64Array, parity: number): void {
  forEachStretch(sector, (start, length, imageRows, firstColumn, row) => {
    for (let k = 0; k < length; k++) vector[imageRows[firstColumn + k] + row] = parity * vector[start + k];
  });
}

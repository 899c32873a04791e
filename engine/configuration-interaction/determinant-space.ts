import type { Determinant } from './determinants';
import { findSingleReplacements, type SingleReplacements } from './replacements';
import { buildStringSpace, type StringSpace, stringAt } from './string-space';

/**
 * The determinants up to an excitation rank, and where each stands in a CI vector.
 *
 * Excitation rank counts spin orbitals against the reference (the first alpha and the first beta orbitals
 * occupied). A vector is a list of rows, one per beta string; as strings stand in order of rank, the alpha
 * strings allowed beside a beta string of rank k are the first so many: all of rank ≤ maximumRank − k. Full CI
 * is the case where every row has full length.
 */
export interface DeterminantSpace {
  readonly orbitalCount: number;
  readonly maximumRank: number;
  readonly alpha: StringSpace;
  readonly beta: StringSpace;
  readonly alphaReplacements: SingleReplacements;
  readonly betaReplacements: SingleReplacements;
  readonly dimension: number;
  /** rows of alpha strings, one per beta string */
  readonly rows: Rows;
  /** the same determinants the other way round: rows of beta strings, one per alpha string */
  readonly transposedRows: Rows;
}

export interface Rows {
  /** where the row of a string starts; length count + 1 */
  readonly start: Int32Array;
}

export function rowLength(rows: Rows, string: number): number {
  return rows.start[string + 1] - rows.start[string];
}

/** Spaces of no more determinants are kept for the next point of a scan, a few of them. */
const SMALL_SPACE = 1000;
const MOST_KEPT = 8;
const kept = new Map<string, DeterminantSpace>();

/**
 * @param rankLimit - highest excitation rank; Infinity for full CI
 * @returns the same for the same numbers, where it is small
 */
export function buildDeterminantSpace(
  orbitalCount: number,
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
): DeterminantSpace {
  const key = `${orbitalCount} ${alphaElectrons} ${betaElectrons} ${rankLimit}`;
  const known = kept.get(key);
  if (known) return known;
  const space = layOut(orbitalCount, alphaElectrons, betaElectrons, rankLimit);
  if (space.dimension <= SMALL_SPACE) {
    if (kept.size >= MOST_KEPT) kept.clear();
    kept.set(key, space);
  }
  return space;
}

function layOut(
  orbitalCount: number,
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
): DeterminantSpace {
  const alpha = buildStringSpace(orbitalCount, alphaElectrons, rankLimit);
  const sameStrings = alphaElectrons === betaElectrons;
  const beta = sameStrings ? alpha : buildStringSpace(orbitalCount, betaElectrons, rankLimit);
  const maximumRank = Math.min(rankLimit, alpha.maximumRank + beta.maximumRank);
  const alphaReplacements = onceCalled(() => findSingleReplacements(alpha));
  const betaReplacements = sameStrings ? alphaReplacements : onceCalled(() => findSingleReplacements(beta));
  const rows = layRows(beta, alpha, maximumRank);
  const transposedRows = sameStrings ? rows : layRows(alpha, beta, maximumRank);
  return {
    orbitalCount,
    maximumRank,
    alpha,
    beta,
    // long lists, which not every product and every property needs
    get alphaReplacements() {
      return alphaReplacements();
    },
    get betaReplacements() {
      return betaReplacements();
    },
    dimension: rows.start[beta.count],
    rows,
    transposedRows,
  };
}

function onceCalled<Value>(make: () => Value): () => Value {
  let value: Value | undefined;
  return () => {
    value ??= make();
    return value;
  };
}

function layRows(outer: StringSpace, inner: StringSpace, maximumRank: number): Rows {
  const start = new Int32Array(outer.count + 1);
  for (let string = 0; string < outer.count; string++) {
    const innerRank = Math.min(maximumRank - outer.ranks[string], inner.maximumRank);
    start[string + 1] = start[string] + inner.rankStart[innerRank + 1];
  }
  return { start };
}

/** The beta string whose row holds a place in the vector. */
function betaStringAt(space: DeterminantSpace, place: number): number {
  let low = 0;
  let high = space.beta.count;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (space.rows.start[middle] <= place) low = middle;
    else high = middle;
  }
  return low;
}

export function determinantAt(space: DeterminantSpace, place: number): Determinant {
  const beta = betaStringAt(space, place);
  return {
    alpha: stringAt(space.alpha, place - space.rows.start[beta]),
    beta: stringAt(space.beta, beta),
  };
}

/** Edge of the square tiles of a transposition, so that reads and writes both stay in the fast cache. */
const TILE = 32;

/**
 * Copies a vector of rows of alpha strings into rows of beta strings. Each pair of ranks is a full rectangle in
 * both layouts.
 */
export function transposeInto(space: DeterminantSpace, vector: Float64Array, transposed: Float64Array): void {
  transposeRows(
    space.beta,
    space.alpha,
    space.maximumRank,
    space.rows,
    vector,
    space.transposedRows,
    transposed,
  );
}

/** The way back. */
export function transposeBackInto(
  space: DeterminantSpace,
  transposed: Float64Array,
  vector: Float64Array,
): void {
  transposeRows(
    space.alpha,
    space.beta,
    space.maximumRank,
    space.transposedRows,
    transposed,
    space.rows,
    vector,
  );
}

function transposeRows(
  outer: StringSpace,
  inner: StringSpace,
  maximumRank: number,
  from: Rows,
  source: Float64Array,
  to: Rows,
  target: Float64Array,
): void {
  for (let outerRank = 0; outerRank <= outer.maximumRank; outerRank++) {
    const innerEnd = inner.rankStart[Math.min(inner.maximumRank, maximumRank - outerRank) + 1];
    const outerEnd = outer.rankStart[outerRank + 1];
    for (let firstRow = outer.rankStart[outerRank]; firstRow < outerEnd; firstRow += TILE) {
      const lastRow = Math.min(firstRow + TILE, outerEnd);
      for (let firstColumn = 0; firstColumn < innerEnd; firstColumn += TILE) {
        const lastColumn = Math.min(firstColumn + TILE, innerEnd);
        for (let row = firstRow; row < lastRow; row++) {
          const start = from.start[row];
          for (let column = firstColumn; column < lastColumn; column++) {
            target[to.start[column] + row] = source[start + column];
          }
        }
      }
    }
  }
}

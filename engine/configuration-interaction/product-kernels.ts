/*
 * The inner loops of the matrix–vector product: plain arithmetic on typed arrays, no knowledge of determinants,
 * so that a compiled form with the same signatures can stand beside them.
 */

/** How many rows `addScaledRows` takes at once: every pass over the target then serves four source rows. */
const ROWS_AT_ONCE = 4;

/** A list of source rows with their factors, filled by the caller and used again and again. */
export interface RowList {
  count: number;
  /** where each row starts in the source */
  readonly start: Int32Array;
  readonly length: Int32Array;
  readonly factor: Float64Array;
}

export function emptyRowList(capacity: number): RowList {
  return {
    count: 0,
    start: new Int32Array(capacity),
    length: new Int32Array(capacity),
    factor: new Float64Array(capacity),
  };
}

/** target[targetStart + k] += Σ over rows of factor·source[start + k], for k below each row's own length. */
export function addScaledRows(
  target: Float64Array,
  targetStart: number,
  source: Float64Array,
  rows: RowList,
): void {
  const { count, start, length, factor } = rows;
  let row = 0;
  for (; row + ROWS_AT_ONCE <= count; row += ROWS_AT_ONCE) {
    const a = start[row];
    const b = start[row + 1];
    const c = start[row + 2];
    const d = start[row + 3];
    const fa = factor[row];
    const fb = factor[row + 1];
    const fc = factor[row + 2];
    const fd = factor[row + 3];
    const common = Math.min(length[row], length[row + 1], length[row + 2], length[row + 3]);
    for (let k = 0; k < common; k++) {
      target[targetStart + k] +=
        fa * source[a + k] + fb * source[b + k] + fc * source[c + k] + fd * source[d + k];
    }
    for (let r = row; r < row + ROWS_AT_ONCE; r++) {
      if (length[r] > common)
        addScaledRow(target, targetStart, source, start[r], factor[r], common, length[r]);
    }
  }
  for (; row < count; row++)
    addScaledRow(target, targetStart, source, start[row], factor[row], 0, length[row]);
}

function addScaledRow(
  target: Float64Array,
  targetStart: number,
  source: Float64Array,
  sourceStart: number,
  factor: number,
  from: number,
  to: number,
): void {
  for (let k = from; k < to; k++) target[targetStart + k] += factor * source[sourceStart + k];
}

/** target[targetStart + k] = sign·source[sourceStart + place], over the entries first … last − 1. */
export function gatherSigned(
  target: Float64Array,
  targetStart: number,
  source: Float64Array,
  sourceStart: number,
  place: Int32Array,
  sign: Int8Array,
  first: number,
  last: number,
): void {
  const shift = targetStart - first;
  for (let k = first; k < last; k++) target[shift + k] = sign[k] * source[sourceStart + place[k]];
}

/** target[targetStart + place] += source[k − first], over the entries first … last − 1 (no place twice). */
export function scatterAdd(
  target: Float64Array,
  targetStart: number,
  source: Float64Array,
  place: Int32Array,
  first: number,
  last: number,
): void {
  for (let k = first; k < last; k++) target[targetStart + place[k]] += source[k - first];
}

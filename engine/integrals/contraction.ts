/**
 * target[first + n] += Σ_k factors[factorAt + k·factorStep] · source[sourceAt + k·sourceStep + n] for n < length,
 * k < count.
 *
 * Three terms at a time: each sum is then read and written a third as often.
 */
export function contractRow(
  factors: Float64Array,
  factorAt: number,
  factorStep: number,
  source: Float64Array,
  sourceAt: number,
  sourceStep: number,
  count: number,
  target: Float64Array,
  first: number,
  length: number,
): void {
  let at = factorAt;
  let base = sourceAt;
  let k = 0;
  for (; k + 2 < count; k += 3) {
    const f0 = factors[at];
    const f1 = factors[at + factorStep];
    const f2 = factors[at + 2 * factorStep];
    const base1 = base + sourceStep;
    const base2 = base1 + sourceStep;
    for (let n = 0; n < length; n++) {
      target[first + n] += f0 * source[base + n] + f1 * source[base1 + n] + f2 * source[base2 + n];
    }
    at += 3 * factorStep;
    base += 3 * sourceStep;
  }
  for (; k < count; k++) {
    const f0 = factors[at];
    for (let n = 0; n < length; n++) target[first + n] += f0 * source[base + n];
    at += factorStep;
    base += sourceStep;
  }
}

/** {@link contractRow} with two neighbouring factors into two targets, so that the source is read once for both. */
export function contractTwoRows(
  factors: Float64Array,
  factorAt: number,
  factorStep: number,
  source: Float64Array,
  sourceAt: number,
  sourceStep: number,
  count: number,
  target: Float64Array,
  first: number,
  second: number,
  length: number,
): void {
  let at = factorAt;
  let base = sourceAt;
  let k = 0;
  for (; k + 2 < count; k += 3) {
    const f0 = factors[at];
    const f1 = factors[at + factorStep];
    const f2 = factors[at + 2 * factorStep];
    const g0 = factors[at + 1];
    const g1 = factors[at + factorStep + 1];
    const g2 = factors[at + 2 * factorStep + 1];
    const base1 = base + sourceStep;
    const base2 = base1 + sourceStep;
    for (let n = 0; n < length; n++) {
      const s0 = source[base + n];
      const s1 = source[base1 + n];
      const s2 = source[base2 + n];
      target[first + n] += f0 * s0 + f1 * s1 + f2 * s2;
      target[second + n] += g0 * s0 + g1 * s1 + g2 * s2;
    }
    at += 3 * factorStep;
    base += 3 * sourceStep;
  }
  for (; k < count; k++) {
    const f0 = factors[at];
    const g0 = factors[at + 1];
    for (let n = 0; n < length; n++) {
      const s0 = source[base + n];
      target[first + n] += f0 * s0;
      target[second + n] += g0 * s0;
    }
    at += factorStep;
    base += sourceStep;
  }
}

/**
 * target = Aᵀ B, row-major.
 *
 * @param a - rows × m
 * @param b - rows × n
 * @param target - m × n
 * @param isLowerTriangle - leave out what stands to the right of the diagonal (some of it may be written)
 */
export function transposedProductInto(
  a: Float64Array,
  m: number,
  b: Float64Array,
  n: number,
  rows: number,
  target: Float64Array,
  isLowerTriangle = false,
): void {
  target.fill(0, 0, m * n);
  let i = 0;
  for (; i + 1 < m; i += 2) {
    const length = isLowerTriangle ? i + 2 : n;
    contractTwoRows(a, i, m, b, 0, n, rows, target, i * n, (i + 1) * n, length);
  }
  if (i < m) contractRow(a, i, m, b, 0, n, rows, target, i * n, n);
}

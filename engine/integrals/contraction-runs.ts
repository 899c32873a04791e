/**
 * A contraction over primitives, target[t + n] += Σ_k factors[k, f] · source[k, s + n] for n = 0 … length − 1, as a list
 * of runs. Two factors that multiply the same numbers share a run, which halves the reading.
 */
export interface ContractionRun {
  readonly factor: number;
  readonly source: number;
  readonly length: number;
  readonly target: number;
  /** target of factor + 1, or −1 */
  readonly secondTarget: number;
}

/** Runs as numbers side by side, five each, in the order of {@link ContractionRun}. */
export type PackedRuns = Int32Array;

const RUN_LENGTH = 5;

/** Packs runs; neighbouring factors with the same source and length are joined. */
export function packRuns(runs: readonly Omit<ContractionRun, 'secondTarget'>[]): PackedRuns {
  const packed: number[] = [];
  for (let i = 0; i < runs.length; i++) {
    const { factor, source, length, target } = runs[i];
    const next = runs[i + 1];
    const isJoined = next?.factor === factor + 1 && next.source === source && next.length === length;
    packed.push(factor, source, length, target, isJoined ? next.target : -1);
    if (isJoined) i++;
  }
  return Int32Array.from(packed);
}

/**
 * Carries out all runs.
 *
 * @param factors - primitives × factorCount, row-major; used from row `firstPrimitive` on
 * @param source - count × sourceWidth, row-major
 * @param count - primitives to contract over
 * @param targetStart - added to every target of the runs
 */
export function contractRuns(
  runs: PackedRuns,
  factors: Float64Array,
  factorCount: number,
  firstPrimitive: number,
  source: Float64Array,
  sourceWidth: number,
  count: number,
  target: Float64Array,
  targetStart: number,
): void {
  const factorStart = firstPrimitive * factorCount;
  for (let run = 0; run < runs.length; run += RUN_LENGTH) {
    const factorAt = factorStart + runs[run];
    const sourceAt = runs[run + 1];
    const length = runs[run + 2];
    const first = targetStart + runs[run + 3];
    if (runs[run + 4] >= 0) {
      const second = targetStart + runs[run + 4];
      contractTwo(
        factors,
        factorAt,
        factorCount,
        source,
        sourceAt,
        sourceWidth,
        count,
        target,
        first,
        second,
        length,
      );
    } else {
      contractOne(
        factors,
        factorAt,
        factorCount,
        source,
        sourceAt,
        sourceWidth,
        count,
        target,
        first,
        length,
      );
    }
  }
}

/** Three primitives at a time: each sum is then read and written a third as often. */
function contractOne(
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

function contractTwo(
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

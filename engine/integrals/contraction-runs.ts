import { contractRow, contractTwoRows } from './contraction';

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
      contractTwoRows(
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
      contractRow(
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

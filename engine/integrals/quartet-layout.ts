import { cartesianCount, cartesianIndex } from './cartesian-components';
import { type PackedRuns, packRuns } from './contraction-runs';
import { hermiteStart } from './hermite-index';
import type { PairLayout } from './pair-layout';

/** Where everything stands while a quartet of shells of two kinds of pair is computed. */
export interface QuartetLayout {
  /** highest degree of Hermite Coulomb integrals needed */
  readonly degree: number;
  /** their number */
  readonly hermiteCount: number;
  /** contraction of the ket: Hermite integrals → one run of sums for each factor of the ket */
  readonly ketRuns: PackedRuns;
  readonly ketSumCount: number;
  /** contraction of the bra: sums of the ket → one run for each factor of the bra and of the ket */
  readonly braRuns: PackedRuns;
  readonly braSumCount: number;
  /** bra columns × ket columns: place of the sum that belongs to both */
  readonly gather: Int32Array;
}

const layouts: QuartetLayout[][] = [];

export function quartetLayout(bra: PairLayout, ket: PairLayout): QuartetLayout {
  layouts[bra.id] ??= [];
  layouts[bra.id][ket.id] ??= buildLayout(bra, ket);
  return layouts[bra.id][ket.id];
}

function buildLayout(bra: PairLayout, ket: PairLayout): QuartetLayout {
  let ketSumCount = 0;
  const ketRuns = ket.factorDegrees.map((degree, factor) => {
    const source = hermiteStart(degree);
    const length = hermiteStart(degree + bra.degree + 1) - source;
    const target = ketSumCount;
    ketSumCount += length;
    return { factor, source, length, target };
  });
  let braSumCount = 0;
  const braRuns = ketRuns.flatMap((ketRun, ketFactor) =>
    bra.factorDegrees.map((braDegree, factor) => {
      const degree = braDegree + ket.factorDegrees[ketFactor];
      const source = ketRun.target + hermiteStart(degree) - ketRun.source;
      const length = cartesianCount(degree);
      const target = braSumCount;
      braSumCount += length;
      return { factor, source, length, target };
    }),
  );

  const gather = new Int32Array(bra.columnCount * ket.columnCount);
  bra.columnPowers.forEach(([, v, w], row) => {
    ket.columnPowers.forEach(([, y, z], column) => {
      const run = braRuns[ket.columnFactor[column] * bra.factorDegrees.length + bra.columnFactor[row]];
      gather[row * ket.columnCount + column] = run.target + cartesianIndex(v + y, w + z);
    });
  });
  return {
    degree: bra.degree + ket.degree,
    hermiteCount: hermiteStart(bra.degree + ket.degree + 1),
    ketRuns: packRuns(ketRuns),
    ketSumCount,
    braRuns: packRuns(braRuns),
    braSumCount,
    gather,
  };
}

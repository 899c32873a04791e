import { cartesianCount, cartesianIndex } from './cartesian-components';
import { hermiteStart } from './hermite-index';
import type { PairLayout } from './pair-layout';

/** Where everything stands while a quartet of shells of two kinds of pair is computed. */
export interface QuartetLayout {
  /** highest degree of Hermite Coulomb integrals needed */
  readonly degree: number;
  /** their number */
  readonly hermiteCount: number;
  readonly braFactorCount: number;
  readonly ketFactorCount: number;
  /** for each factor of the ket: the run of Hermite integrals it multiplies, and where the products are summed */
  readonly ketStart: Int32Array;
  readonly ketLength: Int32Array;
  readonly ketTarget: Int32Array;
  readonly ketSumCount: number;
  /** for each factor of the bra and of the ket, bra first: the run of ket sums it multiplies, and their target */
  readonly braSource: Int32Array;
  readonly braLength: Int32Array;
  readonly braTarget: Int32Array;
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
  const braFactorCount = bra.factorDegrees.length;
  const ketFactorCount = ket.factorDegrees.length;
  const ketStart = new Int32Array(ketFactorCount);
  const ketLength = new Int32Array(ketFactorCount);
  const ketTarget = new Int32Array(ketFactorCount);
  let ketSumCount = 0;
  ket.factorDegrees.forEach((degree, factor) => {
    ketStart[factor] = hermiteStart(degree);
    ketLength[factor] = hermiteStart(degree + bra.degree + 1) - hermiteStart(degree);
    ketTarget[factor] = ketSumCount;
    ketSumCount += ketLength[factor];
  });

  const braSource = new Int32Array(braFactorCount * ketFactorCount);
  const braLength = new Int32Array(braFactorCount * ketFactorCount);
  const braTarget = new Int32Array(braFactorCount * ketFactorCount);
  let braSumCount = 0;
  bra.factorDegrees.forEach((braDegree, i) => {
    ket.factorDegrees.forEach((ketDegree, j) => {
      const at = i * ketFactorCount + j;
      braSource[at] = ketTarget[j] + hermiteStart(braDegree + ketDegree) - hermiteStart(ketDegree);
      braLength[at] = cartesianCount(braDegree + ketDegree);
      braTarget[at] = braSumCount;
      braSumCount += braLength[at];
    });
  });

  const gather = new Int32Array(bra.columnCount * ket.columnCount);
  let at = 0;
  forEachColumn(bra, (braFactor, [, v, w]) => {
    forEachColumn(ket, (ketFactor, [, y, z]) => {
      gather[at++] = braTarget[braFactor * ketFactorCount + ketFactor] + cartesianIndex(v + y, w + z);
    });
  });
  return {
    degree: bra.degree + ket.degree,
    hermiteCount: hermiteStart(bra.degree + ket.degree + 1),
    braFactorCount,
    ketFactorCount,
    ketStart,
    ketLength,
    ketTarget,
    ketSumCount,
    braSource,
    braLength,
    braTarget,
    braSumCount,
    gather,
  };
}

function forEachColumn(
  layout: PairLayout,
  visit: (factor: number, powers: PairLayout['columnPowers'][number]) => void,
): void {
  layout.factorDegrees.forEach((degree, factor) => {
    for (let i = 0; i < cartesianCount(degree); i++) {
      visit(factor, layout.columnPowers[layout.columnStart[factor] + i]);
    }
  });
}

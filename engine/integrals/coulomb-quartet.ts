import { boysFunctionsInto } from '../special-functions/boys-function';
import { contractRuns } from './contraction-runs';
import { HERMITE_BATCH, HermiteCoulombArguments, hermiteCoulombInto } from './hermite-coulomb';
import { type QuartetLayout, quartetLayout } from './quartet-layout';
import type { ShellPair } from './shell-pair';

/** Bra primitives whose contracted kets are held at once. */
const BRA_BATCH = 12;

/** Work arrays of the quartet kernel, grown as needed and used again for every quartet. */
export class QuartetWorkspace {
  readonly batch = new HermiteCoulombArguments();
  hermite: Float64Array = new Float64Array(0);
  ketSums: Float64Array = new Float64Array(0);
  braSums: Float64Array = new Float64Array(0);
  row: Float64Array = new Float64Array(0);
  half: Float64Array = new Float64Array(0);
  /** the integrals of the last quartet: bra products × ket products, row-major */
  block: Float64Array = new Float64Array(0);

  reserve(bra: ShellPair, ket: ShellPair, layout: QuartetLayout): void {
    this.hermite = grown(this.hermite, HERMITE_BATCH * layout.hermiteCount);
    this.ketSums = grown(this.ketSums, BRA_BATCH * layout.ketSumCount);
    this.braSums = grown(this.braSums, layout.braSumCount);
    this.row = grown(this.row, ket.layout.columnCount);
    this.half = grown(this.half, bra.layout.columnCount * ket.productCount);
    this.block = grown(this.block, bra.productCount * ket.productCount);
  }
}

function grown(array: Float64Array, length: number): Float64Array {
  return array.length >= length ? array : new Float64Array(length);
}

/**
 * All integrals (ab|cd) of two pairs of blocks of contracted shells, left in `workspace.block`.
 *
 * For each primitive product of the bra, Hermite Coulomb integrals with all primitive products of the ket are
 * made and contracted factor by factor; then the bra is contracted the same way; only then, once a quartet, are
 * Hermite terms turned into function products (see `productExpansion`).
 *
 * @param primitiveThreshold - pairs of primitive products whose estimated integral is below this are skipped
 *
 * Source: L. E. McMurchie, E. R. Davidson, J. Comput. Phys. 26, 218 (1978); order of contraction
 * after P. M. W. Gill, J. A. Pople, Int. J. Quantum Chem. 40, 753 (1991).
 */
export function coulombQuartet(
  bra: ShellPair,
  ket: ShellPair,
  workspace: QuartetWorkspace,
  primitiveThreshold: number,
): void {
  const layout = quartetLayout(bra.layout, ket.layout);
  workspace.reserve(bra, ket, layout);
  // a single function product is one of two s shells
  if (bra.productCount === 1 && ket.productCount === 1) {
    workspace.block[0] =
      sphericalQuartet(bra, ket, workspace, primitiveThreshold) * bra.values[0] * ket.values[0];
    return;
  }
  const { batch, hermite, ketSums, braSums } = workspace;
  const braFactorCount = bra.layout.factorDegrees.length;
  const ketFactorCount = ket.layout.factorDegrees.length;
  const braCount = significantPrimitives(bra, primitiveThreshold / ket.bounds[0]);
  braSums.fill(0, 0, layout.braSumCount);
  for (let braStart = 0; braStart < braCount; braStart += BRA_BATCH) {
    const rows = Math.min(BRA_BATCH, braCount - braStart);
    ketSums.fill(0, 0, rows * layout.ketSumCount);
    for (let row = 0; row < rows; row++) {
      const i = braStart + row;
      const ketCount = significantPrimitives(ket, primitiveThreshold / bra.bounds[i]);
      for (let start = 0; start < ketCount; start += HERMITE_BATCH) {
        const count = Math.min(HERMITE_BATCH, ketCount - start);
        fillBatch(bra, i, ket, start, count, batch);
        hermiteCoulombInto(layout.degree, batch, count, hermite);
        contractRuns(
          layout.ketRuns,
          ket.signedFactors,
          ketFactorCount,
          start,
          hermite,
          layout.hermiteCount,
          count,
          ketSums,
          row * layout.ketSumCount,
        );
      }
    }
    contractRuns(
      layout.braRuns,
      bra.factors,
      braFactorCount,
      braStart,
      ketSums,
      layout.ketSumCount,
      rows,
      braSums,
      0,
    );
  }
  expandKet(bra.layout.columnCount, ket, layout.gather, braSums, workspace.row, workspace.half);
  expandBra(bra, ket.productCount, workspace.half, workspace.block);
}

/** Primitive products are sorted by size, so the significant ones come first. */
function significantPrimitives(pair: ShellPair, threshold: number): number {
  let count = pair.primitiveCount;
  while (count > 0 && pair.bounds[count - 1] < threshold) count--;
  return count;
}

/** (ss|ss) = Σ factors F_0(aR²)/√(p + q): nothing to expand, so the sum is taken as the arguments are made. */
function sphericalQuartet(
  bra: ShellPair,
  ket: ShellPair,
  { batch, hermite }: QuartetWorkspace,
  primitiveThreshold: number,
): number {
  const { exponent: boysArguments, prefactor } = batch;
  let sum = 0;
  for (let i = 0; i < bra.primitiveCount; i++) {
    const ketCount = significantPrimitives(ket, primitiveThreshold / bra.bounds[i]);
    const p = bra.exponents[i];
    const px = bra.centreX[i];
    const py = bra.centreY[i];
    const pz = bra.centreZ[i];
    let inner = 0;
    for (let start = 0; start < ketCount; start += HERMITE_BATCH) {
      const count = Math.min(HERMITE_BATCH, ketCount - start);
      for (let k = 0; k < count; k++) {
        const j = start + k;
        const q = ket.exponents[j];
        const x = px - ket.centreX[j];
        const y = py - ket.centreY[j];
        const z = pz - ket.centreZ[j];
        const inverse = 1 / (p + q);
        boysArguments[k] = p * q * inverse * (x * x + y * y + z * z);
        prefactor[k] = ket.factors[j] * Math.sqrt(inverse);
      }
      boysFunctionsInto(0, boysArguments, count, hermite);
      for (let k = 0; k < count; k++) inner += prefactor[k] * hermite[k];
    }
    sum += bra.factors[i] * inner;
  }
  return sum;
}

/** One bra primitive with `count` ket primitives: a = pq/(p + q), P − Q and 1/√(p + q). */
function fillBatch(
  bra: ShellPair,
  braPrimitive: number,
  ket: ShellPair,
  start: number,
  count: number,
  batch: HermiteCoulombArguments,
): void {
  const p = bra.exponents[braPrimitive];
  const px = bra.centreX[braPrimitive];
  const py = bra.centreY[braPrimitive];
  const pz = bra.centreZ[braPrimitive];
  for (let k = 0; k < count; k++) {
    const j = start + k;
    const q = ket.exponents[j];
    const inverse = 1 / (p + q);
    batch.exponent[k] = p * q * inverse;
    batch.x[k] = px - ket.centreX[j];
    batch.y[k] = py - ket.centreY[j];
    batch.z[k] = pz - ket.centreZ[j];
    batch.prefactor[k] = Math.sqrt(inverse);
  }
}

/** half[bra column, cd] = Σ_(ket column) values[cd, ket column] · braSums[gather[bra column, ket column]] */
function expandKet(
  braColumns: number,
  ket: ShellPair,
  gather: Int32Array,
  braSums: Float64Array,
  row: Float64Array,
  half: Float64Array,
): void {
  const { productCount, rowStart, columns, values } = ket;
  const ketColumns = ket.layout.columnCount;
  let at = 0;
  let target = 0;
  for (let i = 0; i < braColumns; i++) {
    for (let j = 0; j < ketColumns; j++) row[j] = braSums[gather[at++]];
    let entry = 0;
    for (let product = 0; product < productCount; product++) {
      const end = rowStart[product + 1];
      let sum = 0;
      for (; entry < end; entry++) sum += values[entry] * row[columns[entry]];
      half[target++] = sum;
    }
  }
}

/** block[ab, cd] = Σ_(bra column) values[ab, bra column] · half[bra column, cd] */
function expandBra(bra: ShellPair, ketProducts: number, half: Float64Array, block: Float64Array): void {
  const { productCount, rowStart, columns, values } = bra;
  block.fill(0, 0, productCount * ketProducts);
  let entry = 0;
  for (let product = 0; product < productCount; product++) {
    const start = product * ketProducts;
    const end = start + ketProducts;
    for (; entry < rowStart[product + 1]; entry++) {
      const value = values[entry];
      let source = columns[entry] * ketProducts;
      for (let n = start; n < end; n++) block[n] += value * half[source++];
    }
  }
}

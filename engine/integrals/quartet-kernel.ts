import { electronRepulsionKernels } from '../kernels/electron-repulsion';
import { type KernelMemory, tablesMemory } from '../kernels/kernel-memory';
import { boysTaylorTable, INVERSE_ODD } from '../special-functions/boys-function';
import { cartesianIndex } from './cartesian-components';
import type { Quartet } from './coulomb-quartets';
import { HERMITE_RECURSION } from './hermite-coulomb';
import { hermiteStart } from './hermite-index';
import type { PairLayout } from './pair-layout';
import type { ShellPair } from './shell-pair';

/** Pairs of bra primitives whose contracted kets the kernel holds at once, and vectors of Hermite integrals. */
const BRA_BATCH = 6;
const HERMITE_BATCH = 1024;
/** three coordinates, and derivatives of order 0 … 16 */
const POINT_VECTORS = 20;
/** of the record of a pair */
const PAIR_FIELDS = 17;

/** Memory of this thread for integrals; the tables stand at its bottom and stay. */
interface IntegralMemory {
  readonly memory: KernelMemory;
  /** addresses of the tables of Boys functions, one a degree, as far as they were needed */
  readonly boysTables: number[];
  readonly inverseOdd: number;
  readonly recursion: number;
}

let integralMemory: IntegralMemory | undefined;

/**
 * The fast form of `coulombQuartet` on the given pairs, which are copied into kernel memory once; valid while `work`
 * runs, which must not ask for others. Records and their order: kernels/assembly/electron-repulsion.ts.
 */
export function withFastQuartets<Result>(
  pairs: readonly ShellPair[],
  work: (quartet: Quartet) => Result,
): Result {
  integralMemory ??= prepareMemory();
  const { memory, boysTables } = integralMemory;
  const highest = pairs.reduce((degree, { layout }) => Math.max(degree, layout.degree), 0);
  while (boysTables.length <= 2 * highest) {
    boysTables.push(putNumbers(memory, boysTaylorTable(boysTables.length)));
  }
  const { coulombQuartet } = electronRepulsionKernels(memory);
  return memory.scope(() => {
    const { workspace, block } = takeWorkspace(integralMemory!, highest, pairs);
    const records = pairs.map((pair) => writePair(memory, pair));
    return work((bra, ket, primitiveThreshold) => {
      coulombQuartet(records[bra], records[ket], workspace, primitiveThreshold);
      return block;
    });
  });
}

function prepareMemory(): IntegralMemory {
  const memory = tablesMemory();
  const { axis, parent, grandparent, multiplicity } = HERMITE_RECURSION;
  const recursion = memory.float64(3 * axis.length);
  const offsets = new Int32Array(recursion.view.buffer, recursion.address, 6 * axis.length);
  for (let index = 0; index < axis.length; index++) {
    offsets[6 * index] = 16 * axis[index];
    offsets[6 * index + 1] = 16 * parent[index];
    offsets[6 * index + 2] = 16 * grandparent[index];
    recursion.view[3 * index + 2] = multiplicity[index];
  }
  return {
    memory,
    boysTables: [],
    inverseOdd: putNumbers(memory, INVERSE_ODD),
    recursion: recursion.address,
  };
}

/** Room for the largest quartet of the pairs; bounds rather than exact lengths. */
function takeWorkspace(tables: IntegralMemory, degree: number, pairs: readonly ShellPair[]) {
  const { memory } = tables;
  let factors = 0;
  let columns = 0;
  let products = 0;
  for (const { layout, productCount } of pairs) {
    factors = Math.max(factors, layout.factorDegrees.length);
    columns = Math.max(columns, layout.columnCount);
    products = Math.max(products, productCount);
  }
  const hermiteCount = hermiteStart(2 * degree + 1);
  // sums over both lanes, then those of the joined lanes in the same place
  const ketSums = Math.max(2 * BRA_BATCH * factors * hermiteCount, columns * columns);
  const block = memory.float64(products * products);
  const boysTables = memory.int32(tables.boysTables.length);
  boysTables.view.set(tables.boysTables);
  const workspace = memory.int32(11);
  workspace.view.set([
    boysTables.address,
    tables.inverseOdd,
    tables.recursion,
    memory.float64(2 * POINT_VECTORS).address,
    memory.float64(2 * Math.max(HERMITE_BATCH, hermiteCount)).address,
    memory.float64(ketSums).address,
    memory.float64(2 * columns * columns).address,
    memory.int32(factors * factors).address,
    memory.float64(columns * Math.max(columns, products)).address,
    memory.float64(columns * products).address,
    block.address,
  ]);
  return { workspace: workspace.address, block: block.view };
}

function writePair(memory: KernelMemory, pair: ShellPair): number {
  const { layout, primitiveCount } = pair;
  const factorCount = layout.factorDegrees.length;
  // the second lane of an odd last primitive repeats it with factors 0
  const laneCount = 2 * Math.ceil(primitiveCount / 2);
  const perPrimitive = [pair.exponents, pair.centreX, pair.centreY, pair.centreZ, pair.bounds];
  const factorLength = 2 * primitiveCount * factorCount;
  const { address, view } = memory.float64(
    (perPrimitive.length + factorCount) * laneCount + factorLength + pair.values.length,
  );
  let at = 0;
  for (const values of perPrimitive) {
    view.set(values, at);
    at += laneCount;
    view[at - 1] = values[primitiveCount - 1];
  }
  const braFactors = at;
  const ketFactors = at + laneCount * factorCount;
  view.fill(0, braFactors, ketFactors);
  for (let i = 0; i < primitiveCount; i++) {
    for (let factor = 0; factor < factorCount; factor++) {
      const place = i * factorCount + factor;
      view[braFactors + 2 * ((i >> 1) * factorCount + factor) + (i & 1)] = pair.factors[place];
      view[ketFactors + 2 * place] = pair.signedFactors[place];
      view[ketFactors + 2 * place + 1] = pair.signedFactors[place];
    }
  }
  const values = ketFactors + factorLength;
  view.set(pair.values, values);

  const kind = layoutIntegers(layout);
  const integers = memory.int32(PAIR_FIELDS + kind.length + pair.rowStart.length + pair.columns.length);
  const rowStart = PAIR_FIELDS + kind.length;
  const columns = rowStart + pair.rowStart.length;
  integers.view.set(kind, PAIR_FIELDS);
  integers.view.set(pair.rowStart, rowStart);
  integers.view.set(pair.columns, columns);
  const number = (place: number) => address + 8 * place;
  const integer = (place: number) => integers.address + 4 * place;
  integers.view.set([
    primitiveCount,
    layout.degree,
    factorCount,
    layout.columnCount,
    pair.productCount,
    ...perPrimitive.map((_, array) => number(array * laneCount)),
    number(braFactors),
    number(ketFactors),
    integer(PAIR_FIELDS),
    integer(PAIR_FIELDS + factorCount),
    integer(rowStart),
    integer(columns),
    number(values),
  ]);
  return integers.address;
}

const integersOfLayout = new Map<PairLayout, Int32Array>();

/** The degree of each factor, then for each column what the kernel wants to know of it. */
function layoutIntegers(layout: PairLayout): Int32Array {
  let integers = integersOfLayout.get(layout);
  if (!integers) {
    const columns = layout.columnPowers.flatMap(([, v, w], column) => [
      layout.columnFactor[column],
      v + w,
      cartesianIndex(v, w),
    ]);
    integers = Int32Array.from([...layout.factorDegrees, ...columns]);
    integersOfLayout.set(layout, integers);
  }
  return integers;
}

function putNumbers(memory: KernelMemory, values: Float64Array): number {
  const { address, view } = memory.float64(values.length);
  view.set(values);
  return address;
}

import { boysInto } from './repulsion/boys';
import { contractInto, contractTwoInto, joinLanes, sparseProductInto } from './repulsion/contraction';
import { hermiteInto } from './repulsion/hermite';
import { add, at, mul, put, sub } from './repulsion/vector';

/*
 * Electron-repulsion integrals of two pairs of blocks of shells: the fast form of integrals/coulomb-quartet.ts, which
 * says what is done and why. Two primitive products of the bra stand side by side in a vector from the Boys function
 * to the contraction of the bra. Records (i32 fields, addresses among them) are written by kernels/electron-repulsion.ts.
 */

// a pair: counts, then addresses
const PRIMITIVE_COUNT: usize = 0;
const DEGREE: usize = 4;
const FACTOR_COUNT: usize = 8;
const COLUMN_COUNT: usize = 12;
const PRODUCT_COUNT: usize = 16;
const EXPONENTS: usize = 20;
const CENTRE_X: usize = 24;
const CENTRE_Y: usize = 28;
const CENTRE_Z: usize = 32;
const BOUNDS: usize = 36;
const BRA_FACTORS: usize = 40;
const KET_FACTORS: usize = 44;
const FACTOR_DEGREES: usize = 48;
const COLUMNS_OF_LAYOUT: usize = 52;
const ROW_START: usize = 56;
const ENTRY_COLUMNS: usize = 60;
const ENTRY_VALUES: usize = 64;

// the workspace: addresses; the first leads to those of the table for each degree
const BOYS_TABLES: usize = 0;
const INVERSE_ODD: usize = 4;
const RECURSION: usize = 8;
const POINT: usize = 12;
const HERMITE: usize = 16;
const KET_SUMS: usize = 20;
const BRA_SUMS: usize = 24;
const RUN_TARGETS: usize = 28;
const GATHERED: usize = 32;
const HALF: usize = 36;
const BLOCK: usize = 40;

/**
 * a column of a layout, i32 each: its factor, r = v + w of its Hermite index (t, v, w), and the place r(r + 1)/2 + w among
 * the indices of its degree
 */
const COLUMN_BYTES: usize = 12;

/** Pairs of bra primitives whose contracted kets are held at once; workspaces are sized for it. */
const BRA_BATCH: i32 = 6;
/** Hermite integrals of one pair of bra primitives held at once fill at most so many vectors, or one row. */
const HERMITE_BATCH: i32 = 1024;

function field(record: usize, place: usize): i32 {
  return load<i32>(record + place);
}

function address(record: usize, place: usize): usize {
  return <usize>load<u32>(record + place);
}

function hermiteStart(degree: i32): i32 {
  return (degree * (degree + 1) * (degree + 2)) / 6;
}

/** Leaves the integrals, bra products × ket products, in the block of the workspace. */
export function coulombQuartet(bra: usize, ket: usize, workspace: usize, primitiveThreshold: f64): void {
  const braPrimitives = significant(bra, primitiveThreshold / load<f64>(address(ket, BOUNDS)));
  const braLanes = (braPrimitives + 1) >> 1;
  if (field(bra, PRODUCT_COUNT) * field(ket, PRODUCT_COUNT) === 1) {
    // nothing to expand, and a single sum
    sphericalQuartet(bra, braLanes, ket, workspace, primitiveThreshold);
    return;
  }
  const ketSumCount = countKetSums(bra, ket);
  let braSumCount = 0;
  for (let lane = 0; lane < braLanes; lane += BRA_BATCH) {
    const lanes = min(BRA_BATCH, braLanes - lane);
    for (let i = 0; i < lanes; i++) {
      const bound = load<f64>(address(bra, BOUNDS) + ((<usize>(lane + i)) << 4));
      contractKet(
        bra,
        lane + i,
        ket,
        significant(ket, primitiveThreshold / bound),
        workspace,
        address(workspace, KET_SUMS) + ((<usize>(i * ketSumCount)) << 4),
      );
    }
    braSumCount = contractBra(bra, lane, lanes, ket, ketSumCount, workspace);
  }
  if (braLanes === 0) {
    memory.fill(address(workspace, BLOCK), 0, <usize>(field(bra, PRODUCT_COUNT) * field(ket, PRODUCT_COUNT)) << 3);
    return;
  }
  const sums = address(workspace, KET_SUMS);
  joinLanes(address(workspace, BRA_SUMS), braSumCount, sums);
  expand(bra, ket, sums, workspace);
}

/** (ss|ss) = Σ factors F_0(aR²)/√(p + q), summed as the arguments are made. */
function sphericalQuartet(bra: usize, braLanes: i32, ket: usize, workspace: usize, primitiveThreshold: f64): void {
  const values = address(workspace, HERMITE);
  let sum = f64x2.splat(0);
  for (let lane = 0; lane < braLanes; lane++) {
    const bound = load<f64>(address(bra, BOUNDS) + ((<usize>lane) << 4));
    const ketCount = significant(ket, primitiveThreshold / bound);
    let inner = f64x2.splat(0);
    for (let start = 0; start < ketCount; start += HERMITE_BATCH) {
      const count = min(HERMITE_BATCH, ketCount - start);
      hermiteOfPrimitives(bra, lane, ket, start, count, workspace, values, 16);
      const factors = address(ket, KET_FACTORS) + ((<usize>start) << 4);
      for (let k = 0; k < count; k++) inner = add(inner, mul(at(factors, k), at(values, k)));
    }
    sum = add(sum, mul(at(address(bra, BRA_FACTORS), lane), inner));
  }
  const both = f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
  const scale = load<f64>(address(bra, ENTRY_VALUES)) * load<f64>(address(ket, ENTRY_VALUES));
  store<f64>(address(workspace, BLOCK), both * scale);
}

/** Primitive products are sorted by size, so the significant ones come first. */
function significant(pair: usize, threshold: f64): i32 {
  const bounds = address(pair, BOUNDS);
  let count = field(pair, PRIMITIVE_COUNT);
  while (count > 0 && load<f64>(bounds + ((<usize>(count - 1)) << 3)) < threshold) count--;
  return count;
}

function countKetSums(bra: usize, ket: usize): i32 {
  const degrees = address(ket, FACTOR_DEGREES);
  const factorCount = field(ket, FACTOR_COUNT);
  let count = 0;
  for (let factor = 0; factor < factorCount; factor++) {
    const degree = load<i32>(degrees + ((<usize>factor) << 2));
    count += hermiteStart(degree + field(bra, DEGREE) + 1) - hermiteStart(degree);
  }
  return count;
}

/** One pair of bra primitives with all ket primitives, contracted over the latter factor by factor. */
function contractKet(bra: usize, lane: i32, ket: usize, ketCount: i32, workspace: usize, target: usize): void {
  const braDegree = field(bra, DEGREE);
  const width = hermiteStart(braDegree + field(ket, DEGREE) + 1);
  const rowBytes = (<usize>width) << 4;
  const batch = max(1, HERMITE_BATCH / width);
  const degrees = address(ket, FACTOR_DEGREES);
  const factorCount = field(ket, FACTOR_COUNT);
  const hermite = address(workspace, HERMITE);
  let start = 0;
  do {
    const count = min(batch, ketCount - start);
    hermiteOfPrimitives(bra, lane, ket, start, count, workspace, hermite, rowBytes);
    let sums = target;
    const factors = address(ket, KET_FACTORS) + ((<usize>(start * factorCount)) << 4);
    for (let factor = 0; factor < factorCount; factor++) {
      const degree = load<i32>(degrees + ((<usize>factor) << 2));
      const from = hermiteStart(degree);
      const length = hermiteStart(degree + braDegree + 1) - from;
      contractFactor(
        degrees,
        factorCount,
        factor,
        factors,
        hermite + ((<usize>from) << 4),
        rowBytes,
        count,
        sums,
        length,
        start === 0,
      );
      sums += (<usize>length) << 4;
      if (hasTwin(degrees, factorCount, factor)) {
        sums += (<usize>length) << 4;
        factor++;
      }
    }
    start += count;
  } while (start < ketCount);
}

/** Whether the factor after this one has its degree, and so multiplies the same numbers. */
function hasTwin(degrees: usize, factorCount: i32, factor: i32): bool {
  const place = degrees + ((<usize>factor) << 2);
  return factor + 1 < factorCount && load<i32>(place, 4) === load<i32>(place);
}

/** Contraction with one factor, and with its twin if it has one: its sums then follow. */
function contractFactor(
  degrees: usize,
  factorCount: i32,
  factor: i32,
  factors: usize,
  source: usize,
  sourceStep: usize,
  count: i32,
  target: usize,
  length: i32,
  isFirst: bool,
): void {
  const values = factors + ((<usize>factor) << 4);
  const factorStep = (<usize>factorCount) << 4;
  if (hasTwin(degrees, factorCount, factor)) {
    const second = target + ((<usize>length) << 4);
    contractTwoInto(values, factorStep, source, sourceStep, count, target, second, length, isFirst);
  } else {
    contractInto(values, factorStep, source, sourceStep, count, target, length, isFirst);
  }
}

/** Hermite Coulomb integrals of two primitives of the bra with `count` of the ket from `start` on. */
function hermiteOfPrimitives(
  bra: usize,
  lane: i32,
  ket: usize,
  start: i32,
  count: i32,
  workspace: usize,
  target: usize,
  rowBytes: usize,
): void {
  const degree = field(bra, DEGREE) + field(ket, DEGREE);
  const boysTable = address(address(workspace, BOYS_TABLES), (<usize>degree) << 2);
  const inverseOdd = address(workspace, INVERSE_ODD);
  const recursion = address(workspace, RECURSION);
  const coordinates = address(workspace, POINT);
  const derivatives = coordinates + 48;
  const braPlace = (<usize>lane) << 4;
  const p = v128.load(address(bra, EXPONENTS) + braPlace);
  const px = v128.load(address(bra, CENTRE_X) + braPlace);
  const py = v128.load(address(bra, CENTRE_Y) + braPlace);
  const pz = v128.load(address(bra, CENTRE_Z) + braPlace);
  const exponents = address(ket, EXPONENTS);
  const centreX = address(ket, CENTRE_X);
  const centreY = address(ket, CENTRE_Y);
  const centreZ = address(ket, CENTRE_Z);
  const end = (<usize>(start + count)) << 3;
  for (let place = (<usize>start) << 3; place < end; place += 8) {
    const q = v128.load64_splat(exponents + place);
    const x = sub(px, v128.load64_splat(centreX + place));
    const y = sub(py, v128.load64_splat(centreY + place));
    const z = sub(pz, v128.load64_splat(centreZ + place));
    const inverse = f64x2.div(f64x2.splat(1), add(p, q));
    const exponent = mul(mul(p, q), inverse);
    const argument = mul(exponent, add(add(mul(x, x), mul(y, y)), mul(z, z)));
    put(coordinates, 0, x);
    put(coordinates, 1, y);
    put(coordinates, 2, z);
    boysInto(degree, argument, boysTable, inverseOdd, derivatives);
    const ratio = mul(f64x2.splat(-2), exponent);
    let scale = f64x2.sqrt(inverse);
    for (let n = 0; n <= degree; n++) {
      put(derivatives, n, mul(scale, at(derivatives, n)));
      scale = mul(scale, ratio);
    }
    hermiteInto(degree, coordinates, derivatives, recursion, target);
    target += rowBytes;
  }
}

/** Contraction over pairs of bra primitives, for each factor of the ket and of the bra; gives the number of sums. */
function contractBra(bra: usize, lane: i32, lanes: i32, ket: usize, ketSumCount: i32, workspace: usize): i32 {
  const braDegree = field(bra, DEGREE);
  const braFactorCount = field(bra, FACTOR_COUNT);
  const ketFactorCount = field(ket, FACTOR_COUNT);
  const braDegrees = address(bra, FACTOR_DEGREES);
  const ketDegrees = address(ket, FACTOR_DEGREES);
  const factors = address(bra, BRA_FACTORS) + ((<usize>(lane * braFactorCount)) << 4);
  const sums = address(workspace, BRA_SUMS);
  let runTarget = address(workspace, RUN_TARGETS);
  let source = address(workspace, KET_SUMS);
  let target = 0;
  for (let ketFactor = 0; ketFactor < ketFactorCount; ketFactor++) {
    const ketDegree = load<i32>(ketDegrees + ((<usize>ketFactor) << 2));
    const ketFrom = hermiteStart(ketDegree);
    for (let factor = 0; factor < braFactorCount; factor++) {
      const degree = load<i32>(braDegrees + ((<usize>factor) << 2)) + ketDegree;
      const from = hermiteStart(degree);
      const length = hermiteStart(degree + 1) - from;
      contractFactor(
        braDegrees,
        braFactorCount,
        factor,
        factors,
        source + ((<usize>(from - ketFrom)) << 4),
        (<usize>ketSumCount) << 4,
        lanes,
        sums + ((<usize>target) << 4),
        length,
        lane === 0,
      );
      store<i32>(runTarget, target);
      runTarget += 4;
      target += length;
      if (hasTwin(braDegrees, braFactorCount, factor)) {
        store<i32>(runTarget, target);
        runTarget += 4;
        target += length;
        factor++;
      }
    }
    source += (<usize>(hermiteStart(ketDegree + braDegree + 1) - ketFrom)) << 4;
  }
  return target;
}

/** Hermite terms to function products, first those of the ket, then those of the bra. */
function expand(bra: usize, ket: usize, sums: usize, workspace: usize): void {
  const braColumns = field(bra, COLUMN_COUNT);
  const ketColumns = field(ket, COLUMN_COUNT);
  const ketProducts = field(ket, PRODUCT_COUNT);
  const gathered = address(workspace, GATHERED);
  const half = address(workspace, HALF);
  gather(bra, braColumns, ket, ketColumns, sums, address(workspace, RUN_TARGETS), gathered);
  sparseProductInto(
    ketProducts,
    address(ket, ROW_START),
    address(ket, ENTRY_COLUMNS),
    address(ket, ENTRY_VALUES),
    gathered,
    braColumns,
    half,
  );
  // gathered is free again
  transposeInto(half, ketProducts, braColumns, gathered);
  sparseProductInto(
    field(bra, PRODUCT_COUNT),
    address(bra, ROW_START),
    address(bra, ENTRY_COLUMNS),
    address(bra, ENTRY_VALUES),
    gathered,
    ketProducts,
    address(workspace, BLOCK),
  );
}

/** target[ket column, bra column] = the sum that belongs to both */
function gather(
  bra: usize,
  braColumns: i32,
  ket: usize,
  ketColumns: i32,
  sums: usize,
  runTargets: usize,
  target: usize,
): void {
  const braFactorCount = field(bra, FACTOR_COUNT);
  let ketColumn = address(ket, COLUMNS_OF_LAYOUT);
  for (let i = 0; i < ketColumns; i++) {
    const runs = runTargets + ((<usize>(load<i32>(ketColumn) * braFactorCount)) << 2);
    const ketRest = load<i32>(ketColumn, 4);
    const ketPlace = load<i32>(ketColumn, 8);
    let braColumn = address(bra, COLUMNS_OF_LAYOUT);
    for (let j = 0; j < braColumns; j++) {
      // the place of the sum of two indices
      const place = load<i32>(braColumn, 4) * ketRest + load<i32>(braColumn, 8) + ketPlace;
      const run = load<i32>(runs + ((<usize>load<u32>(braColumn)) << 2));
      store<f64>(target, load<f64>(sums + ((<usize>(run + place)) << 3)));
      target += 8;
      braColumn += COLUMN_BYTES;
    }
    ketColumn += COLUMN_BYTES;
  }
}

function transposeInto(source: usize, rows: i32, columns: i32, target: usize): void {
  const step = (<usize>rows) << 3;
  for (let i = 0; i < rows; i++) {
    let place = target + ((<usize>i) << 3);
    for (let j = 0; j < columns; j++) {
      store<f64>(place, load<f64>(source));
      source += 8;
      place += step;
    }
  }
}

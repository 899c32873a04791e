import { packRows } from './shared/packed-rows';

/*
 * σ = H·c over the determinants of one symmetry, a matrix with a row for every beta and a column for every alpha
 * string. Cut into tasks that share no element of σ: first blocks of rows, then blocks of columns. Every element is
 * summed in one order whatever thread takes which task.
 *
 * A block of rows is packed so that what belongs to one column stands side by side, 8 numbers; the lists of a
 * string then add whole stretches, and all reading and writing of c and σ runs along rows.
 *
 * Written in AssemblyScript; layouts as engine/configuration-interaction/product-plan.ts makes them, every field four
 * bytes.
 */

/** Numbers that are summed side by side: the stretch of a packed row. */
const WIDTH: i32 = 8;
const PACKED_BYTES: usize = 64;

/** Strings of one spin, in order of their representation, then of their rank. */
@unmanaged
class Strings {
  count: i32;
  /** number of ranks */
  ranks: i32;
  /** i32[9] */
  irrepStart: usize;
  /** i32[8·ranks]: strings of a representation up to a rank */
  upToRank: usize;
  /** i32[count] */
  rank: usize;
  /** i32[4·count]: start, and ends of the entries that raise the rank by at most 0, 1, 2 */
  energyRuns: usize;
  /** source, in bytes of its packed place, and factor, f64 */
  energies: usize;
  /** i32[8·4·count], by representation of the orbital pair: start, and ends for at most −1, 0, 1 */
  singleRuns: usize;
  /** source, and the place of ±(pq|rs) in the row of pq, both in bytes */
  singles: usize;
}

@unmanaged
class Plan {
  maximumRank: i32;
  irrep: i32;
  /** 1: c is even or odd under the exchange of spins, and only the part of σ below the diagonal is wanted */
  isMirrored: i32;
  vector: usize;
  product: usize;
  /** i32[count of rows]: where each row starts */
  rowStart: usize;
  /** f64[pairs][2·pairs], pq of the rows and rs of the columns: (pq|rs), −(pq|rs) */
  integrals: usize;
  integralRowBytes: usize;
  rows: Strings;
  columns: Strings;
  /** i32[6] each: irrep, rank, first, count, first group, end of groups */
  rowTasks: usize;
  /** i32[5] each: pair, irrep of the pair, rank change, first entry, count */
  groups: usize;
  /** number of the source row in its representation */
  entrySource: usize;
  /** target row, counted from the first of the task */
  entryTarget: usize;
  /** f64 */
  entrySign: usize;
  /** i32[4] each: irrep, rank, first, count ≤ WIDTH */
  columnTasks: usize;
  scratch: usize;
  /** of one thread */
  scratchBytes: usize;
}

// @ts-ignore: decorator
@inline
function number(address: usize, index: i32): i32 {
  return load<i32>(address + ((<usize>index) << 2));
}

// @ts-ignore: decorator
@inline
function countUpToRank(strings: Strings, irrep: i32, rank: i32): i32 {
  return rank < 0 ? 0 : number(strings.upToRank, irrep * strings.ranks + min(rank, strings.ranks - 1));
}

/** Width of a block of so many rows or columns: no wider than needed. */
// @ts-ignore: decorator
@inline
function blockWidth(count: i32): i32 {
  return count > 4 ? 8 : count > 2 ? 4 : 2;
}

/**
 * sum[0 … width) ← Σ over the entries of factor·packed(source). Entries are twelve bytes, a source and its factor, or,
 * `isIndirect`, eight: a source and the place of its factor in a row of integrals.
 */
// @ts-ignore: decorator
@inline
function sumEntries(
  isIndirect: bool,
  width: i32,
  sum: usize,
  packed: usize,
  entries: usize,
  row: usize,
  first: i32,
  end: i32,
): void {
  let a0 = f64x2.splat(0);
  let a1 = a0;
  let a2 = a0;
  let a3 = a0;
  const shift: usize = width == 8 ? 0 : width == 4 ? 1 : 2;
  const size: usize = isIndirect ? 8 : 12;
  const last = entries + <usize>end * size;
  for (let entry = entries + <usize>first * size; entry < last; entry += size) {
    const from = packed + (<usize>load<u32>(entry) >> shift);
    const factor = isIndirect ? v128.load64_splat(row + <usize>load<u32>(entry, 4)) : v128.load64_splat(entry, 4);
    a0 = f64x2.add(a0, f64x2.mul(factor, v128.load(from)));
    if (width > 2) a1 = f64x2.add(a1, f64x2.mul(factor, v128.load(from, 16)));
    if (width > 4) {
      a2 = f64x2.add(a2, f64x2.mul(factor, v128.load(from, 32)));
      a3 = f64x2.add(a3, f64x2.mul(factor, v128.load(from, 48)));
    }
  }
  v128.store(sum, a0);
  if (width > 2) v128.store(sum, a1, 16);
  if (width > 4) {
    v128.store(sum, a2, 32);
    v128.store(sum, a3, 48);
  }
}

/** The same for any width that a block can have. */
// @ts-ignore: decorator
@inline
function sumBlock(
  isIndirect: bool,
  width: i32,
  sum: usize,
  packed: usize,
  entries: usize,
  row: usize,
  first: i32,
  end: i32,
): void {
  if (width == 8) sumEntries(isIndirect, 8, sum, packed, entries, row, first, end);
  else if (width == 4) sumEntries(isIndirect, 4, sum, packed, entries, row, first, end);
  else sumEntries(isIndirect, 2, sum, packed, entries, row, first, end);
}

/** Where the entries end whose sources have at most a given rank; `lowest` is the smallest change of rank listed. */
// @ts-ignore: decorator
@inline
function runEnd(runs: usize, string: i32, change: i32, lowest: i32): i32 {
  return change < lowest ? number(runs, 4 * string) : number(runs, 4 * string + 1 + min(change - lowest, 2));
}

/** Where the scratch of a thread has its parts. */
const SUMS_BYTES: usize = 2 * PACKED_BYTES;
const ADDRESSES_BYTES: usize = 2 * 4 * <usize>WIDTH;
const SIGNS_BYTES: usize = PACKED_BYTES;

/** Adds sums to column `column` of so many rows, and those a packed stretch further to the next column. */
// @ts-ignore: decorator
@inline
function addToRows(sums: usize, rows: usize, present: i32, column: i32): void {
  const place = (<usize>column) << 3;
  for (let k = 0; k < present; k++) {
    const sum = sums + ((<usize>k) << 3);
    const target = <usize>load<u32>(rows + ((<usize>k) << 2)) + place;
    const both = v128.load64_lane(sum + PACKED_BYTES, v128.load64_zero(sum), 1);
    v128.store(target, f64x2.add(v128.load(target), both));
  }
}

// @ts-ignore: decorator
@inline
function addToColumn(sums: usize, rows: usize, present: i32, column: i32): void {
  const place = (<usize>column) << 3;
  for (let k = 0; k < present; k++) {
    const target = <usize>load<u32>(rows + ((<usize>k) << 2)) + place;
    store<f64>(target, load<f64>(target) + load<f64>(sums + ((<usize>k) << 3)));
  }
}

// @ts-ignore: decorator
@inline
function rowAddress(plan: Plan, base: usize, row: i32): u32 {
  return <u32>(base + ((<usize>number(plan.rowStart, row)) << 3));
}

/** Electrons of the columns' spin among themselves, and with those of the rows' spin, for a block of rows. */
export function rowTask(address: usize, task: i32, thread: i32): void {
  const plan = changetype<Plan>(address);
  const block = plan.rowTasks + 24 * <usize>task;
  const rowIrrep = number(block, 0);
  const rank = number(block, 1);
  const first = number(block, 2);
  const count = number(block, 3);
  const columnIrrep = rowIrrep ^ plan.irrep;
  if (plan.isMirrored && rowIrrep < columnIrrep) return;
  const limit = plan.maximumRank - rank;
  const length = countUpToRank(plan.columns, columnIrrep, limit);
  const columns = plan.isMirrored && rowIrrep == columnIrrep ? min(length, first + count) : length;
  if (columns == 0) return;
  const scratch = plan.scratch + <usize>thread * plan.scratchBytes;
  const firstRow = number(plan.rows.irrepStart, rowIrrep) + first;

  for (let part = 0; part < count; part += WIDTH) {
    amongColumns(plan, scratch, firstRow + part, min(count - part, WIDTH), columnIrrep, limit, length, columns);
  }
  const lastGroup = number(block, 5);
  for (let group = number(block, 4); group < lastGroup; group++) {
    rowsWithColumns(plan, scratch, plan.groups + 20 * <usize>group, rowIrrep, firstRow, limit, columns);
  }
}

/** The first to write into the rows. */
function amongColumns(
  plan: Plan,
  scratch: usize,
  firstRow: i32,
  present: i32,
  irrep: i32,
  limit: i32,
  length: i32,
  columns: i32,
): void {
  const strings = plan.columns;
  const sources = scratch + SUMS_BYTES;
  const targets = sources + ADDRESSES_BYTES / 2;
  const signs = sources + ADDRESSES_BYTES;
  const packed = signs + SIGNS_BYTES;
  const width = blockWidth(present);
  for (let k = 0; k <= (present | 1) && k < WIDTH; k++) {
    const row = firstRow + min(k, present - 1);
    store<u32>(sources + ((<usize>k) << 2), rowAddress(plan, plan.vector, row));
    store<u32>(targets + ((<usize>k) << 2), rowAddress(plan, plan.product, row));
    store<f64>(signs + ((<usize>k) << 3), k < present ? 1 : 0);
  }
  packRows(packed, (<usize>width) << 3, width, sources, signs, present, length);
  const start = number(strings.irrepStart, irrep);
  for (let i = 0; i < columns; i++) {
    const string = start + i;
    const end = runEnd(strings.energyRuns, string, limit - number(strings.rank, string), 0);
    const begin = number(strings.energyRuns, 4 * string);
    sumBlock(false, width, scratch, packed, strings.energies, 0, begin, end);
    for (let k = 0; k < present; k++) {
      const target = <usize>load<u32>(targets + ((<usize>k) << 2)) + ((<usize>i) << 3);
      store<f64>(target, load<f64>(scratch + ((<usize>k) << 3)));
    }
  }
}

/** Adds what replacements of one pair of orbitals among the rows bring, with all among the columns. */
function rowsWithColumns(
  plan: Plan,
  scratch: usize,
  group: usize,
  rowIrrep: i32,
  firstRow: i32,
  limit: i32,
  columns: i32,
): void {
  const strings = plan.columns;
  const integrals = plan.integrals + <usize>number(group, 0) * plan.integralRowBytes;
  const pairIrrep = number(group, 1);
  // highest rank that a column may have in the source rows
  const sourceLimit = limit + number(group, 2);
  const firstEntry = number(group, 3);
  const entries = number(group, 4);
  const sourceColumns = countUpToRank(strings, rowIrrep ^ pairIrrep ^ plan.irrep, sourceLimit);
  const sourceStart = number(plan.rows.irrepStart, rowIrrep ^ pairIrrep);
  const targetStart = number(strings.irrepStart, rowIrrep ^ plan.irrep);
  const runs = strings.singleRuns + ((<usize>(pairIrrep * strings.count)) << 4);
  const sources = scratch + SUMS_BYTES;
  const targets = sources + ADDRESSES_BYTES / 2;
  const signs = sources + ADDRESSES_BYTES;
  const packed = signs + SIGNS_BYTES;
  for (let block = 0; block < entries; block += WIDTH) {
    const present = min(entries - block, WIDTH);
    const width = blockWidth(present);
    for (let k = 0; k <= (present | 1) && k < WIDTH; k++) {
      const entry = firstEntry + block + min(k, present - 1);
      const source = sourceStart + number(plan.entrySource, entry);
      const target = firstRow + number(plan.entryTarget, entry);
      store<u32>(sources + ((<usize>k) << 2), rowAddress(plan, plan.vector, source));
      store<u32>(targets + ((<usize>k) << 2), rowAddress(plan, plan.product, target));
      const sign = load<f64>(plan.entrySign + ((<usize>entry) << 3));
      store<f64>(signs + ((<usize>k) << 3), k < present ? sign : 0);
    }
    packRows(packed, (<usize>width) << 3, width, sources, signs, present, sourceColumns);
    for (let i = 0; i < columns; i += 2) {
      const both = i + 1 < columns;
      for (let side = 0; side < 1 + <i32>both; side++) {
        const string = targetStart + i + side;
        const begin = number(runs, 4 * string);
        const end = runEnd(runs, string, sourceLimit - number(strings.rank, string), -1);
        const sum = scratch + (<usize>side) * PACKED_BYTES;
        sumBlock(true, width, sum, packed, strings.singles, integrals, begin, end);
      }
      if (both) addToRows(scratch, targets, present, i);
      else addToColumn(scratch, targets, present, i);
    }
  }
}

/** Electrons of the rows' spin among themselves, for a block of columns of one rank. After all row tasks. */
export function columnTask(address: usize, task: i32, thread: i32): void {
  const plan = changetype<Plan>(address);
  const strings = plan.rows;
  const block = plan.columnTasks + 16 * <usize>task;
  const columnIrrep = number(block, 0);
  const limit = plan.maximumRank - number(block, 1);
  const first = number(block, 2);
  const present = number(block, 3);
  const rowIrrep = columnIrrep ^ plan.irrep;
  if (plan.isMirrored && rowIrrep < columnIrrep) return;
  const rows = countUpToRank(strings, rowIrrep, limit);
  const firstRow = plan.isMirrored && rowIrrep == columnIrrep ? first : 0;
  if (firstRow >= rows) return;
  const width = blockWidth(present);
  const sum = plan.scratch + <usize>thread * plan.scratchBytes;
  const packed = sum + SUMS_BYTES + ADDRESSES_BYTES + SIGNS_BYTES;
  const start = number(strings.irrepStart, rowIrrep);
  const place = (<usize>first) << 3;
  for (let j = 0; j < rows; j++) {
    const from = <usize>rowAddress(plan, plan.vector, start + j) + place;
    const to = packed + <usize>j * ((<usize>width) << 3);
    for (let k = 0; k < width; k++) {
      store<f64>(to + ((<usize>k) << 3), k < present ? load<f64>(from + ((<usize>k) << 3)) : 0);
    }
  }
  for (let i = firstRow; i < rows; i++) {
    const string = start + i;
    const begin = number(strings.energyRuns, 4 * string);
    const end = runEnd(strings.energyRuns, string, limit - number(strings.rank, string), 0);
    sumBlock(false, width, sum, packed, strings.energies, 0, begin, end);
    const to = <usize>rowAddress(plan, plan.product, string) + place;
    for (let k = 0; k < present; k++) {
      const target = to + ((<usize>k) << 3);
      store<f64>(target, load<f64>(target) + load<f64>(sum + ((<usize>k) << 3)));
    }
  }
}

import { packRows, unpackRows } from './shared/packed-rows';

/*
 * σ = H·c over all determinants of full CI, a matrix with a row for every beta and a column for every alpha string,
 * without symmetry among the orbitals. Cut into tasks that share no element of σ: first blocks of rows, then blocks of
 * columns. Every element is summed in one order whatever thread takes which.
 *
 * Strings that have all electrons but one (or two) in common are a family. The operator joins each of a family to each,
 * and with the strings' signs taken out its elements are those of one small matrix of integrals: σ grows by products of
 * such matrices with a few packed rows of c, which go by tiles in registers. Families by one electron after
 * R. J. Harrison, S. Zarrabian, Chem. Phys. Lett. 158, 393 (1989), by two after S. Zarrabian, C. R. Sarma, J. Paldus,
 * Chem. Phys. Lett. 155, 183 (1989).
 *
 * Written in AssemblyScript; layouts as engine/configuration-interaction/full-product-plan.ts makes them, every field
 * four bytes.
 */

@unmanaged
class Families {
  count: i32;
  /** strings of each family */
  members: i32;
  /** of each member where its row of factors starts, its place in every row, and the place of its packed string: bytes */
  entries: usize;
}

@unmanaged
class Plan {
  rows: i32;
  columns: i32;
  /** numbers of a packed stretch, a multiple of `ACROSS` */
  width: i32;
  /** 1: c is even or odd under the exchange of spins, and only the part of σ below the diagonal is wanted */
  isMirrored: i32;
  vector: usize;
  product: usize;
  orbitals: i32;
  /** f64[pairs][pairs], pq of the rows' orbitals and rs of the columns': (pq|rs) */
  mixed: usize;
  columnSingles: usize;
  columnDoubles: usize;
  /** the columns' electrons among themselves, over pairs of their orbitals */
  columnFactors: usize;
  rowDoubles: usize;
  rowFactors: usize;
  /** i32[electrons] for every row: its orbitals */
  rowOrbitals: usize;
  rowElectrons: i32;
  rowTaskCount: i32;
  /** i32[6] each, of which the last four matter here: first, count, first group, end of groups */
  rowTasks: usize;
  /** i32[5] each: pair of different orbitals, two that do not matter here, first entry, count */
  groups: usize;
  entrySource: usize;
  /** target row, counted from the first of the task */
  entryTarget: usize;
  /** f64 */
  entrySign: usize;
  scratch: usize;
  /** of one thread */
  scratchBytes: usize;
}

/** Most rows or columns that are packed at once. */
const MOST_WIDTH: i32 = 32;
/** Where the scratch of a thread has its parts: addresses of sources and of targets, signs, packed rows, their sums. */
const TARGETS: usize = 4 * <usize>MOST_WIDTH;
const SIGNS: usize = 2 * TARGETS;
const FACTORS: usize = SIGNS + 8 * <usize>MOST_WIDTH;

/** Numbers of a stretch in one tile. */
const ACROSS: i32 = 8;

// @ts-ignore: decorator
@inline
function usedWidth(present: i32): i32 {
  return ((present + ACROSS - 1) / ACROSS) * ACROSS;
}

// @ts-ignore: decorator
@inline
function packedPlace(plan: Plan, scratch: usize): usize {
  return scratch + FACTORS + 24 * <usize>(plan.orbitals * plan.orbitals * plan.width);
}

// @ts-ignore: decorator
@inline
function number(address: usize, index: i32): i32 {
  return load<i32>(address + ((<usize>index) << 2));
}

/** A block of rows: the alpha electrons among themselves and beside beta ones that stay, then with beta ones that move. */
export function rowTask(address: usize, task: i32, thread: i32): void {
  const plan = changetype<Plan>(address);
  // below the diagonal the last rows are the longest: they go first, so that threads end together
  const block = plan.rowTasks + 24 * <usize>(plan.isMirrored ? plan.rowTaskCount - 1 - task : task);
  const first = number(block, 2);
  const count = number(block, 3);
  const end = number(block, 5);
  const columns = plan.isMirrored ? min(plan.columns, first + count) : plan.columns;
  const scratch = plan.scratch + <usize>thread * plan.scratchBytes;
  for (let part = 0; part < count; part += plan.width) {
    amongColumns(plan, scratch, first + part, min(count - part, plan.width), columns);
  }
  for (let group = number(block, 4); group < end; group++) {
    rowsWithColumns(plan, scratch, plan.groups + 20 * <usize>group, first, columns);
  }
}

// @ts-ignore: decorator
@inline
function rowAddress(plan: Plan, base: usize, row: i32): u32 {
  return <u32>(base + ((<usize>row * <usize>plan.columns) << 3));
}

/** The first to write into the rows. */
function amongColumns(plan: Plan, scratch: usize, firstRow: i32, present: i32, columns: i32): void {
  const width = plan.width;
  for (let k = 0; k <= (present | 1) && k < width; k++) {
    const row = firstRow + min(k, present - 1);
    store<u32>(scratch + ((<usize>k) << 2), rowAddress(plan, plan.vector, row));
    store<u32>(scratch + TARGETS + ((<usize>k) << 2), rowAddress(plan, plan.product, row));
    store<f64>(scratch + SIGNS + ((<usize>k) << 3), k < present ? 1 : 0);
  }
  const stretch = (<usize>width) << 3;
  const packed = packedPlace(plan, scratch);
  const sums = packed + <usize>plan.columns * stretch;
  const used = usedWidth(present);
  packRows(packed, stretch, used, scratch, scratch + SIGNS, present, plan.columns);
  memory.fill(sums, 0, <usize>columns * stretch);
  const end = <u32>(<usize>columns * stretch);
  addFamilies(plan.columnDoubles, plan.columnFactors, 0, end, packed, sums, used);
  const factors = scratch + FACTORS;
  factorsOfRows(plan, firstRow, present, factors);
  addFamiliesOfRows(plan.columnSingles, factors, width, end, packed, sums, used);
  unpackRows(false, sums, stretch, scratch + TARGETS, present, columns);
}

/** Adds what replacements of one pair of different orbitals among the rows, in both directions, bring with all among the columns. */
function rowsWithColumns(plan: Plan, scratch: usize, group: usize, firstRow: i32, columns: i32): void {
  const pair = number(group, 0);
  const factors = scratch + FACTORS;
  signedFactors(plan, pair, factors);
  const firstEntry = number(group, 3);
  const entries = number(group, 4);
  const width = plan.width;
  const stretch = (<usize>width) << 3;
  const packed = packedPlace(plan, scratch);
  const sums = packed + <usize>plan.columns * stretch;
  for (let block = 0; block < entries; block += width) {
    const present = min(entries - block, width);
    for (let k = 0; k <= (present | 1) && k < width; k++) {
      const entry = firstEntry + block + min(k, present - 1);
      const source = number(plan.entrySource, entry);
      const target = firstRow + number(plan.entryTarget, entry);
      store<u32>(scratch + ((<usize>k) << 2), rowAddress(plan, plan.vector, source));
      store<u32>(scratch + TARGETS + ((<usize>k) << 2), rowAddress(plan, plan.product, target));
      const sign = load<f64>(plan.entrySign + ((<usize>entry) << 3));
      store<f64>(scratch + SIGNS + ((<usize>k) << 3), k < present ? sign : 0);
    }
    const used = usedWidth(present);
    packRows(packed, stretch, used, scratch, scratch + SIGNS, present, plan.columns);
    memory.fill(sums, 0, <usize>columns * stretch);
    addFamilies(plan.columnSingles, factors, 0, <u32>(<usize>columns * stretch), packed, sums, used);
    unpackRows(true, sums, stretch, scratch + TARGETS, present, columns);
  }
}

/** Electrons of the rows' spin among themselves, for a block of columns. After all row tasks. */
export function columnTask(address: usize, task: i32, thread: i32): void {
  const plan = changetype<Plan>(address);
  const width = plan.width;
  const first = task * width;
  const present = min(width, plan.columns - first);
  const stretch = (<usize>width) << 3;
  const packed = packedPlace(plan, plan.scratch + <usize>thread * plan.scratchBytes);
  const sums = packed + <usize>plan.rows * stretch;
  const used = usedWidth(present);
  const place = (<usize>first) << 3;
  for (let j = 0; j < plan.rows; j++) {
    const from = <usize>rowAddress(plan, plan.vector, j) + place;
    const to = packed + <usize>j * stretch;
    for (let k = 0; k < used; k++) {
      store<f64>(to + ((<usize>k) << 3), k < present ? load<f64>(from + ((<usize>k) << 3)) : 0);
    }
  }
  const firstRow = plan.isMirrored ? first : 0;
  memory.fill(sums, 0, <usize>plan.rows * stretch);
  const rowsEnd = <u32>(<usize>plan.rows * stretch);
  addFamilies(plan.rowDoubles, plan.rowFactors, <u32>(<usize>firstRow * stretch), rowsEnd, packed, sums, used);
  for (let j = firstRow; j < plan.rows; j++) {
    const to = <usize>rowAddress(plan, plan.product, j) + place;
    const from = sums + <usize>j * stretch;
    for (let k = 0; k < present; k++) {
      const target = to + ((<usize>k) << 3);
      store<f64>(target, load<f64>(target) + load<f64>(from + ((<usize>k) << 3)));
    }
  }
}

/**
 * (pq|rs) over all r and s, times the part (−1)^(r + s) of the strings' signs, then its negative, then itself again: members
 * of positive and of negative sign find theirs a matrix further each.
 */
function signedFactors(plan: Plan, pair: i32, factors: usize): void {
  const n = plan.orbitals;
  const size = (<usize>(n * n)) << 3;
  let from = plan.mixed + (<usize>(pair * ((n * (n + 1)) >> 1)) << 3);
  for (let r = 0; r < n; r++) {
    for (let s = 0; s <= r; s++) {
      let value = load<f64>(from);
      if ((r + s) & 1) value = -value;
      for (let side = 0; side < 2; side++) {
        const at = factors + ((<usize>(side ? s * n + r : r * n + s)) << 3);
        store<f64>(at, value);
        store<f64>(at + size, -value);
        store<f64>(at + 2 * size, value);
      }
      from += 8;
    }
  }
}

/**
 * The same for beta electrons that stay where they are, those of a row together: Σ (pp|rs) over its orbitals p. For every
 * r and s a stretch, with a number for each of so many rows.
 */
function factorsOfRows(plan: Plan, firstRow: i32, present: i32, factors: usize): void {
  const n = plan.orbitals;
  const electrons = plan.rowElectrons;
  const stretch = (<usize>plan.width) << 3;
  const size = <usize>(n * n) * stretch;
  const pairBytes = (<usize>((n * (n + 1)) >> 1)) << 3;
  let from = plan.mixed;
  for (let r = 0; r < n; r++) {
    for (let s = 0; s <= r; s++) {
      const ofRow = factors + <usize>(r * n + s) * stretch;
      const ofColumn = factors + <usize>(s * n + r) * stretch;
      for (let k = 0; k < plan.width; k++) {
        let value: f64 = 0;
        if (k < present) {
          for (let i = 0; i < electrons; i++) {
            const p = number(plan.rowOrbitals, (firstRow + k) * electrons + i);
            value += load<f64>(from + <usize>((p * (p + 3)) >> 1) * pairBytes);
          }
        }
        if ((r + s) & 1) value = -value;
        const place = (<usize>k) << 3;
        for (let copy = 0; copy < 3; copy++) {
          const shift = <usize>copy * size + place;
          store<f64>(ofRow + shift, copy == 1 ? -value : value);
          store<f64>(ofColumn + shift, copy == 1 ? -value : value);
        }
      }
      from += 8;
    }
  }
}

/** As `addFamilies` from the first string on, where every number of a stretch has factors of its own. */
function addFamiliesOfRows(
  address: usize,
  factors: usize,
  width: i32,
  end: u32,
  packed: usize,
  sums: usize,
  used: i32,
): void {
  const families = changetype<Families>(address);
  const bytes = <usize>families.members * 12;
  const familiesEnd = families.entries + <usize>families.count * bytes;
  const columns = (<usize>used) << 3;
  for (let first = families.entries; first < familiesEnd; first += bytes) {
    const last = first + bytes;
    for (let target = first; target < last && load<u32>(target, 8) < end; target += 12) {
      const row = factors + <usize>load<u32>(target) * <usize>width;
      const to = sums + <usize>load<u32>(target, 8);
      for (let column: usize = 0; column < columns; column += 8 * ACROSS) {
        let a0 = v128.load(to + column);
        let a1 = v128.load(to + column, 16);
        let a2 = v128.load(to + column, 32);
        let a3 = v128.load(to + column, 48);
        for (let entry = first; entry < last; entry += 12) {
          const x = row + <usize>load<u32>(entry, 4) * <usize>width + column;
          const source = packed + <usize>load<u32>(entry, 8) + column;
          a0 = f64x2.add(a0, f64x2.mul(v128.load(x), v128.load(source)));
          a1 = f64x2.add(a1, f64x2.mul(v128.load(x, 16), v128.load(source, 16)));
          a2 = f64x2.add(a2, f64x2.mul(v128.load(x, 32), v128.load(source, 32)));
          a3 = f64x2.add(a3, f64x2.mul(v128.load(x, 48), v128.load(source, 48)));
        }
        v128.store(to + column, a0);
        v128.store(to + column, a1, 16);
        v128.store(to + column, a2, 32);
        v128.store(to + column, a3, 48);
      }
    }
  }
}

/**
 * sums(I) += Σ over the families of I, Σ over the members J of each, ± factors(I, J)·packed(J), for `used` numbers of
 * every stretch.
 *
 * @param lowest - packed place of the first string I that is wanted, in bytes; `end` is that behind the last one
 */
function addFamilies(
  address: usize,
  factors: usize,
  lowest: u32,
  end: u32,
  packed: usize,
  sums: usize,
  used: i32,
): void {
  const families = changetype<Families>(address);
  const bytes = <usize>families.members * 12;
  const familiesEnd = families.entries + <usize>families.count * bytes;
  const columns = (<usize>used) << 3;
  for (let first = families.entries; first < familiesEnd; first += bytes) {
    const last = first + bytes;
    let target = first;
    let lastTarget = last;
    // members stand in order of their strings
    while (target < lastTarget && load<u32>(target, 8) < lowest) target += 12;
    while (target < lastTarget && load<u32>(lastTarget - 12, 8) >= end) lastTarget -= 12;
    for (; target + 12 < lastTarget; target += 24) {
      for (let column: usize = 0; column < columns; column += 8 * ACROSS) {
        tile(2, target, factors, first, last, packed + column, sums + column);
      }
    }
    if (target < lastTarget) {
      for (let column: usize = 0; column < columns; column += 8 * ACROSS) {
        tile(1, target, factors, first, last, packed + column, sums + column);
      }
    }
  }
}

/** Eight numbers of `size` targets. */
// @ts-ignore: decorator
@inline
function tile(size: i32, targets: usize, factors: usize, first: usize, last: usize, packed: usize, sums: usize): void {
  const r0 = factors + <usize>load<u32>(targets);
  const r1 = size > 1 ? factors + <usize>load<u32>(targets, 12) : 0;
  let a0 = f64x2.splat(0);
  let a1 = a0;
  let a2 = a0;
  let a3 = a0;
  let b0 = a0;
  let b1 = a0;
  let b2 = a0;
  let b3 = a0;
  for (let entry = first; entry < last; entry += 12) {
    const place = <usize>load<u32>(entry, 4);
    const source = packed + <usize>load<u32>(entry, 8);
    const s0 = v128.load(source);
    const s1 = v128.load(source, 16);
    const s2 = v128.load(source, 32);
    const s3 = v128.load(source, 48);
    let x = v128.load64_splat(r0 + place);
    a0 = f64x2.add(a0, f64x2.mul(x, s0));
    a1 = f64x2.add(a1, f64x2.mul(x, s1));
    a2 = f64x2.add(a2, f64x2.mul(x, s2));
    a3 = f64x2.add(a3, f64x2.mul(x, s3));
    if (size > 1) {
      x = v128.load64_splat(r1 + place);
      b0 = f64x2.add(b0, f64x2.mul(x, s0));
      b1 = f64x2.add(b1, f64x2.mul(x, s1));
      b2 = f64x2.add(b2, f64x2.mul(x, s2));
      b3 = f64x2.add(b3, f64x2.mul(x, s3));
    }
  }
  addTo(sums + <usize>load<u32>(targets, 8), a0, a1, a2, a3);
  if (size > 1) addTo(sums + <usize>load<u32>(targets, 20), b0, b1, b2, b3);
}

// @ts-ignore: decorator
@inline
function addTo(target: usize, a: v128, b: v128, c: v128, d: v128): void {
  v128.store(target, f64x2.add(v128.load(target), a));
  v128.store(target, f64x2.add(v128.load(target, 16), b), 16);
  v128.store(target, f64x2.add(v128.load(target, 32), c), 32);
  v128.store(target, f64x2.add(v128.load(target, 48), d), 48);
}

import {
  betaPart,
  type OrbitalIntegrals,
  packedPair,
  type SameSpinIntegrals,
} from '../integrals/orbital-integrals';
import { type KernelMemory, placeInt32 } from '../kernels/kernel-memory';
import { occupiedOrbitals } from './determinants';
import type { PlannedProduct } from './fast-product';
import { layRowTasks, type RowTasks } from './row-tasks';
import { NEGLIGIBLE_FACTOR } from './same-spin';
import type { Sector } from './sector';
import { findFamilies } from './string-families';
import { type StringSpace, stringAt } from './string-space';

/*
 * What engine/kernels/assembly/full-product.ts works on: families of strings and integrals in a kernel memory, once
 * for a space. Fields stand in the order of the classes there.
 */

/**
 * Rows of one row task: a pair of orbitals should lead to several stretches of them, and there should be tasks for all
 * threads.
 */
const FEWEST_ROWS = 96;
const MOST_ROWS = 256;
const TASKS = 8;
/** Numbers that are packed side by side, where packed rows and their sums then fit into the second cache; and else. */
const WIDTH = 16;
const NARROW_WIDTH = 8;
const CACHE_BYTES = 1 << 19;
/** Beside the packed rows and their sums a thread has addresses of 2·32 rows, and 32 signs. */
const THREAD_BYTES = 2 * 4 * 32 + 8 * 32;

/** Lists in a kernel memory. */
export interface FullProductLists extends RowTasks {
  readonly memory: KernelMemory;
  readonly width: number;
  readonly columnTaskCount: number;
  readonly columnSingles: number;
  readonly alpha: SameSpinLists;
  readonly beta: SameSpinLists;
  /** of every beta string */
  readonly rowOrbitals: number;
  /** integrals of alpha with beta electrons */
  readonly mixed: number;
}

/** Electrons of one spin among themselves. */
interface SameSpinLists {
  readonly doubles: number;
  readonly factors: number;
}

export function layFullProductLists(
  memory: KernelMemory,
  { space, beta: betaClasses }: Pick<Sector, 'space' | 'beta'>,
  integrals: OrbitalIntegrals,
): FullProductLists {
  const { alpha, beta } = space;
  const mostStrings = Math.max(alpha.count, beta.count);
  const width = 2 * 8 * WIDTH * mostStrings <= CACHE_BYTES ? WIDTH : NARROW_WIDTH;
  const alphaLists = laySameSpin(memory, alpha, integrals, width);
  const isSame = alpha === beta && !integrals.beta;
  const pairIrreps = new Uint8Array(space.orbitalCount ** 2);
  const rowsAtOnce = Math.min(MOST_ROWS, Math.max(FEWEST_ROWS, Math.ceil(beta.count / TASKS)));
  return {
    memory,
    width,
    ...layRowTasks(memory, betaClasses, true, space.betaReplacements, pairIrreps, {
      rowsAtOnce,
      isMoving: true,
    }),
    columnTaskCount: Math.ceil(alpha.count / width),
    columnSingles: layFamilies(memory, alpha, 1, width),
    alpha: alphaLists,
    beta: isSame ? alphaLists : laySameSpin(memory, beta, betaPart(integrals), width),
    rowOrbitals: placeInt32(
      memory,
      Array.from({ length: beta.count }, (_, string) => occupiedOrbitals(stringAt(beta, string))).flat(),
    ),
    mixed: layMixed(memory, integrals),
  };
}

/** Takes the working room of the threads in the memory of the lists. @returns the address of the plan */
export function layFullProductPlan(
  lists: FullProductLists,
  { sector: { space }, vector, product, threads, isMirrored }: PlannedProduct,
): number {
  const { memory } = lists;
  const packedBytes = 8 * lists.width * Math.max(space.alpha.count, space.beta.count);
  const scratchBytes = THREAD_BYTES + 24 * lists.width * space.orbitalCount ** 2 + 2 * packedBytes;
  const scratch = memory.float64((threads * scratchBytes) / 8);
  return placeInt32(memory, [
    space.beta.count,
    space.alpha.count,
    lists.width,
    Number(isMirrored),
    vector,
    product,
    space.orbitalCount,
    lists.mixed,
    lists.columnSingles,
    lists.alpha.doubles,
    lists.alpha.factors,
    lists.beta.doubles,
    lists.beta.factors,
    lists.rowOrbitals,
    space.beta.electrons,
    lists.rowTaskCount,
    lists.rowTasks,
    lists.groups,
    lists.entrySource,
    lists.entryTarget,
    lists.entrySign,
    scratch.address,
    scratchBytes,
  ]);
}

function layFamilies(memory: KernelMemory, strings: StringSpace, missing: 1 | 2, width: number): number {
  if (strings.electrons < missing) return placeInt32(memory, [0, 0, 0]);
  const { count, members, isNegative, added, strings: places } = findFamilies(strings, missing);
  const n = strings.orbitalCount;
  const factors = missing === 1 ? n : (n * (n - 1)) / 2;
  const entries = memory.int32(3 * Math.max(1, added.length));
  for (let i = 0; i < added.length; i++) {
    const shift = isNegative[i] ? factors * factors : 0;
    entries.view[3 * i] = 8 * (factors * added[i] + shift);
    entries.view[3 * i + 1] = 8 * (added[i] + shift);
    entries.view[3 * i + 2] = 8 * width * places[i];
  }
  return placeInt32(memory, [count, members, entries.address]);
}

/** (pq|rs) of beta pairs pq and alpha pairs rs. */
function layMixed(memory: KernelMemory, { orbitalCount: n, twoElectron, beta }: OrbitalIntegrals): number {
  const pairs = (n * (n + 1)) / 2;
  const { address, view } = memory.float64(pairs * pairs);
  for (let pq = 0; pq < pairs; pq++) {
    for (let rs = 0; rs < pairs; rs++) {
      view[pq * pairs + rs] = kept(beta ? beta.mixed[rs * pairs + pq] : twoElectron[packedPair(pq, rs)]);
    }
  }
  return address;
}

function laySameSpin(
  memory: KernelMemory,
  strings: StringSpace,
  integrals: SameSpinIntegrals,
  width: number,
): SameSpinLists {
  const n = integrals.orbitalCount;
  const missing = strings.electrons > 1 ? 2 : 1;
  const factors =
    missing === 2
      ? pairFactors(integrals, strings.electrons)
      : integrals.oneElectron.map((element, place) => element * parity(Math.trunc(place / n) + (place % n)));
  const { address, view } = memory.float64(3 * factors.length);
  for (let k = 0; k < factors.length; k++) {
    view[k] = factors[k];
    view[factors.length + k] = -factors[k];
    view[2 * factors.length + k] = factors[k];
  }
  return { doubles: layFamilies(memory, strings, missing, width), factors: address };
}

/**
 * (pq|rs) − (ps|rq) over pairs p > r and q > s, with the share that each of an electron's pairs has in its one-electron
 * energy, and the sign (−1)^(p + q + r + s).
 */
function pairFactors(
  { orbitalCount: n, oneElectron, twoElectron }: SameSpinIntegrals,
  electrons: number,
): Float64Array {
  const pairs = (n * (n - 1)) / 2;
  const factors = new Float64Array(pairs * pairs);
  const repulsion = (p: number, q: number, r: number, s: number) =>
    twoElectron[packedPair(packedPair(p, q), packedPair(r, s))];
  const share = (p: number, q: number, r: number, s: number) =>
    r === s ? oneElectron[p * n + q] / (electrons - 1) : 0;
  let entry = 0;
  for (let p = 0; p < n; p++) {
    for (let r = 0; r < p; r++) {
      for (let q = 0; q < n; q++) {
        for (let s = 0; s < q; s++) {
          const element =
            repulsion(p, q, r, s) -
            repulsion(p, s, r, q) +
            share(p, q, r, s) +
            share(r, s, p, q) -
            share(p, s, r, q) -
            share(r, q, p, s);
          factors[entry++] = kept(element) * parity(p + q + r + s);
        }
      }
    }
  }
  return factors;
}

function kept(factor: number): number {
  return Math.abs(factor) < NEGLIGIBLE_FACTOR ? 0 : factor;
}

function parity(exponent: number): number {
  return exponent % 2 === 0 ? 1 : -1;
}

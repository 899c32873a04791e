import { moveElectron, occupiedOrbitals, replacementPhase } from './determinants';
import { placeOf, rankCounts, type StringSpace, stringAt } from './string-space';

/**
 * Single replacements: all non-zero ⟨I| a†(p) a(q) |J⟩ between strings of a space, p = q included. The same
 * entries in two orders.
 */
export interface SingleReplacements {
  /** entries of string I: `byStringStart[I]` … `byStringStart[I + 1]`, in order of the pair */
  readonly byStringStart: Int32Array;
  /** p·n + q */
  readonly pair: Int32Array;
  /** the string J */
  readonly source: Int32Array;
  readonly sign: Int8Array;

  /** entries of a pair: `byPairStart[p·n + q]` … `byPairStart[p·n + q + 1]`, in order of I */
  readonly byPairStart: Int32Array;
  readonly pairTarget: Int32Array;
  readonly pairSource: Int32Array;
  readonly pairSign: Int8Array;
  /**
   * how many entries of a pair have a target of rank ≤ k, at pair·(maximumRank + 1) + k. As the ranks of I and J
   * differ by the same amount for all entries of a pair, a limit on either rank picks the first so many entries.
   */
  readonly pairCountUpToRank: Int32Array;
}

/** How far a†(p) a(q) raises the excitation rank: 1, 0 or −1. */
export function rankChange(space: StringSpace, p: number, q: number): number {
  return Number(p >= space.electrons) - Number(q >= space.electrons);
}

/**
 * The number of entries that `findSingleReplacements` will make.
 *
 * @param strings - how many strings there are of each rank
 */
export function countSingleReplacements(
  electrons: number,
  virtuals: number,
  strings: readonly number[],
): number {
  let entries = 0;
  strings.forEach((count, rank) => {
    entries += count * (electrons + countMoves(electrons, virtuals, rank, strings.length, 1));
  });
  return entries;
}

/** Entries of the Hamiltonian among electrons of one spin: diagonal, single and double replacements. */
export function countSameSpinEntries(
  electrons: number,
  virtuals: number,
  strings: readonly number[],
): number {
  let entries = 0;
  strings.forEach((count, rank) => {
    const singles = countMoves(electrons, virtuals, rank, strings.length, 1);
    entries += count * (1 + singles + countMoves(electrons, virtuals, rank, strings.length, 2));
  });
  return entries;
}

/** How many strings within `ranks` ranks a string of one rank reaches by moving so many electrons. */
function countMoves(electrons: number, virtuals: number, rank: number, ranks: number, moves: number): number {
  let reached = 0;
  // `leave` electrons quit the reference's occupied orbitals, `arrive` enter its virtual ones
  for (let leave = 0; leave <= moves; leave++) {
    for (let arrive = 0; arrive <= moves; arrive++) {
      const newRank = rank + leave + arrive - moves;
      if (newRank < 0 || newRank >= ranks) continue;
      reached +=
        choose(electrons - rank, leave) *
        choose(rank, moves - leave) *
        choose(virtuals - rank, arrive) *
        choose(rank, moves - arrive);
    }
  }
  return reached;
}

/** C(n, k) for k ≤ 2. */
function choose(n: number, k: number): number {
  if (k === 0) return 1;
  return k === 1 ? n : (n * (n - 1)) / 2;
}

export function findSingleReplacements(space: StringSpace): SingleReplacements {
  const n = space.orbitalCount;
  const entries = countSingleReplacements(space.electrons, n - space.electrons, rankCounts(space));
  const byStringStart = new Int32Array(space.count + 1);
  const pair = new Int32Array(entries);
  const source = new Int32Array(entries);
  const sign = new Int8Array(entries);

  let entry = 0;
  const moved = new Int32Array(space.words);
  for (let target = 0; target < space.count; target++) {
    const string = stringAt(space, target);
    for (const p of occupiedOrbitals(string)) {
      for (let q = 0; q < n; q++) {
        if (q !== p && (string[q >> 5] >>> (q & 31)) & 1) continue;
        moved.set(string);
        moveElectron(moved, p, q);
        const place = placeOf(space, moved);
        if (place < 0) continue;
        pair[entry] = p * n + q;
        source[entry] = place;
        sign[entry++] = replacementPhase(string, p, q);
      }
    }
    byStringStart[target + 1] = entry;
  }
  return {
    byStringStart,
    pair,
    source,
    sign,
    ...orderByPair(space, byStringStart, pair, source, sign),
  };
}

function orderByPair(
  space: StringSpace,
  byStringStart: Int32Array,
  pair: Int32Array,
  source: Int32Array,
  sign: Int8Array,
) {
  const pairs = space.orbitalCount ** 2;
  const ranks = space.maximumRank + 1;
  const byPairStart = new Int32Array(pairs + 1);
  for (const index of pair) byPairStart[index + 1]++;
  for (let index = 0; index < pairs; index++) byPairStart[index + 1] += byPairStart[index];

  const filled = byPairStart.slice();
  const pairTarget = new Int32Array(pair.length);
  const pairSource = new Int32Array(pair.length);
  const pairSign = new Int8Array(pair.length);
  const pairCountUpToRank = new Int32Array(pairs * ranks);
  for (let target = 0; target < space.count; target++) {
    for (let entry = byStringStart[target]; entry < byStringStart[target + 1]; entry++) {
      const place = filled[pair[entry]]++;
      pairTarget[place] = target;
      pairSource[place] = source[entry];
      pairSign[place] = sign[entry];
      for (let k = space.ranks[target]; k < ranks; k++) pairCountUpToRank[pair[entry] * ranks + k]++;
    }
  }
  return { byPairStart, pairTarget, pairSource, pairSign, pairCountUpToRank };
}

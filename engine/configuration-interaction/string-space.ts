import { countBits, lowestBit, type OccupationString, occupationString, wordsOf } from './determinants';

/**
 * All strings of one spin up to an excitation rank, counted from the reference in which the lowest orbitals are
 * occupied. Strings stand in order of rank; within a rank the holes, then the particles run through their
 * combinations in colexicographic order, so that a string's place follows from its bits by a sum of binomial
 * coefficients (as in P. J. Knowles, N. C. Handy, Chem. Phys. Lett. 111, 315 (1984), for each rank on its own).
 */
export interface StringSpace {
  readonly orbitalCount: number;
  readonly electrons: number;
  readonly maximumRank: number;
  readonly count: number;
  /** `rankStart[k]` strings have a rank below k; length maximumRank + 2 */
  readonly rankStart: Int32Array;
  /** rank of every string */
  readonly ranks: Uint8Array;
  /** words per string */
  readonly words: number;
  /** count × words */
  readonly bits: Int32Array;
  readonly reference: OccupationString;
  /** C(n, k) at k·(orbitalCount + 1) + n */
  readonly binomials: Float64Array;
}

/** The largest rank that so many electrons in so many orbitals can reach. */
export function highestRank(orbitalCount: number, electrons: number, limit: number): number {
  return Math.min(limit, electrons, orbitalCount - electrons);
}

export function buildStringSpace(orbitalCount: number, electrons: number, rankLimit: number): StringSpace {
  const maximumRank = highestRank(orbitalCount, electrons, rankLimit);
  const virtuals = orbitalCount - electrons;
  const binomials = binomialTable(orbitalCount, maximumRank);
  const choose = (n: number, k: number) => binomials[k * (orbitalCount + 1) + n];

  const rankStart = new Int32Array(maximumRank + 2);
  for (let rank = 0; rank <= maximumRank; rank++) {
    rankStart[rank + 1] = rankStart[rank] + choose(electrons, rank) * choose(virtuals, rank);
  }
  const count = rankStart[maximumRank + 1];
  const words = wordsOf(orbitalCount);
  const bits = new Int32Array(count * words);
  const ranks = new Uint8Array(count);
  const reference = occupationString(orbitalCount, Array(electrons).keys());

  let place = 0;
  for (let rank = 0; rank <= maximumRank; rank++) {
    const particleSets = combinations(virtuals, rank);
    for (const holes of combinations(electrons, rank)) {
      for (const particles of particleSets) {
        const string = bits.subarray(place * words, (place + 1) * words);
        string.set(reference);
        for (const hole of holes) string[hole >> 5] ^= 1 << (hole & 31);
        for (const particle of particles) {
          const p = electrons + particle;
          string[p >> 5] ^= 1 << (p & 31);
        }
        ranks[place++] = rank;
      }
    }
  }
  return {
    orbitalCount,
    electrons,
    maximumRank,
    count,
    rankStart,
    ranks,
    words,
    bits,
    reference,
    binomials,
  };
}

/** How many strings there are of each rank. */
export function rankCounts(space: StringSpace): number[] {
  return Array.from({ length: space.maximumRank + 1 }, (_, k) => space.rankStart[k + 1] - space.rankStart[k]);
}

/** A view of one string's words. */
export function stringAt(space: StringSpace, place: number): OccupationString {
  return space.bits.subarray(place * space.words, (place + 1) * space.words);
}

/** Where a string stands in its space, or −1 if its rank is beyond the space. */
export function placeOf(space: StringSpace, string: OccupationString): number {
  const { reference, binomials, electrons, orbitalCount } = space;
  const stride = orbitalCount + 1;
  let rank = 0;
  for (let w = 0; w < string.length; w++) rank += countBits(reference[w] & ~string[w]);
  if (rank > space.maximumRank) return -1;
  let holes = 0;
  let particles = 0;
  let holesSeen = 0;
  let particlesSeen = 0;
  for (let w = 0; w < string.length; w++) {
    for (let rest = reference[w] & ~string[w]; rest !== 0; rest &= rest - 1) {
      holes += binomials[++holesSeen * stride + 32 * w + lowestBit(rest)];
    }
    for (let rest = string[w] & ~reference[w]; rest !== 0; rest &= rest - 1) {
      particles += binomials[++particlesSeen * stride + 32 * w + lowestBit(rest) - electrons];
    }
  }
  const particleSets = binomials[rank * stride + orbitalCount - electrons];
  return space.rankStart[rank] + holes * particleSets + particles;
}

function binomialTable(n: number, k: number): Float64Array {
  const table = new Float64Array((k + 1) * (n + 1));
  for (let m = 0; m <= n; m++) table[m] = 1;
  for (let j = 1; j <= k; j++) {
    for (let m = j; m <= n; m++) {
      table[j * (n + 1) + m] = table[j * (n + 1) + m - 1] + table[(j - 1) * (n + 1) + m - 1];
    }
  }
  return table;
}

/** Every choice of k out of 0 … n − 1, each rising, in colexicographic order. */
function combinations(n: number, k: number): number[][] {
  const all: number[][] = [];
  const chosen = Array.from({ length: k }, (_, i) => i);
  for (;;) {
    all.push(chosen.slice());
    let i = 0;
    while (i < k && chosen[i] + 1 === (i + 1 < k ? chosen[i + 1] : n)) i++;
    if (i === k) return all;
    chosen[i]++;
    for (let j = 0; j < i; j++) chosen[j] = j;
  }
}

import { lowestBit } from './determinants';
import type { StringSpace } from './string-space';

/** Representations have numbers below this. */
export const IRREPS = 8;

/** The strings of one spin sorted by their representation; within one they keep their order, that of rank. */
export interface StringClasses {
  readonly strings: StringSpace;
  /** representation of each string */
  readonly irreps: Uint8Array;
  /** place of each string among those of its representation */
  readonly places: Int32Array;
  /** strings of each representation */
  readonly members: readonly Int32Array[];
}

/** @param orbitalIrreps - absent: all strings are of one kind, numbered 0 */
export function classifyStrings(
  strings: StringSpace,
  orbitalIrreps: readonly number[] | undefined,
): StringClasses {
  const irreps = orbitalIrreps ? stringIrreps(strings, orbitalIrreps) : new Uint8Array(strings.count);
  const counts = new Int32Array(IRREPS);
  const places = Int32Array.from(irreps, (irrep) => counts[irrep]++);
  const members = Array.from(counts, (count) => new Int32Array(count));
  irreps.forEach((irrep, string) => {
    members[irrep][places[string]] = string;
  });
  return { strings, irreps, places, members };
}

/** The product of the representations of the occupied orbitals. */
export function stringIrreps(strings: StringSpace, orbitalIrreps: readonly number[]): Uint8Array {
  const { words, bits } = strings;
  const irreps = new Uint8Array(strings.count);
  for (let string = 0; string < strings.count; string++) {
    for (let w = 0; w < words; w++) {
      for (let rest = bits[string * words + w]; rest !== 0; rest &= rest - 1) {
        irreps[string] ^= orbitalIrreps[32 * w + lowestBit(rest)];
      }
    }
  }
  return irreps;
}

/** How many strings of a representation have a rank of at most so much. */
export function countUpToRank({ strings, members }: StringClasses, irrep: number, rank: number): number {
  if (rank < 0) return 0;
  const limit = strings.rankStart[Math.min(rank, strings.maximumRank) + 1];
  const all = members[irrep];
  let low = 0;
  let high = all.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (all[middle] < limit) low = middle + 1;
    else high = middle;
  }
  return low;
}

import { packedPair } from '../integrals/orbital-integrals';
import { type KernelMemory, placeFloat64, placeInt32 } from '../kernels/kernel-memory';
import { rankChange, type SingleReplacements } from './replacements';
import { countUpToRank, type StringClasses } from './string-classes';

/*
 * The rows of a matrix of determinants cut into tasks for the kernels, in their memory.
 */

export interface RowTasks {
  /** i32[6] each: irrep, rank, first, count, first group, end of groups */
  readonly rowTasks: number;
  readonly rowTaskCount: number;
  /** i32[5] each: pair, irrep of the pair, rank change, first entry, count */
  readonly groups: number;
  readonly entrySource: number;
  readonly entryTarget: number;
  readonly entrySign: number;
}

/** Pieces of at most `most` strings of one representation and one rank: [irrep, rank, first, count]. */
export function cutTasks(classes: StringClasses, isWhole: boolean, most: number): number[][] {
  const { maximumRank } = classes.strings;
  const ranks = isWhole ? [maximumRank] : Array.from({ length: maximumRank + 1 }, (_, rank) => rank);
  const tasks: number[][] = [];
  classes.members.forEach((_, irrep) => {
    let first = 0;
    for (const rank of ranks) {
      const end = countUpToRank(classes, irrep, rank);
      for (; first < end; first += most) {
        tasks.push([irrep, isWhole ? 0 : rank, first, Math.min(most, end - first)]);
      }
      first = end;
    }
  });
  return tasks;
}

/**
 * The beta strings in blocks, with the replacements that lead to them grouped by the pair of orbitals; those that leave
 * every electron where it is are left out if `isMoving`.
 */
export function layRowTasks(
  memory: KernelMemory,
  classes: StringClasses,
  isWhole: boolean,
  replacements: SingleReplacements,
  pairIrreps: Uint8Array,
  { rowsAtOnce, isMoving = false }: { readonly rowsAtOnce: number; readonly isMoving?: boolean },
): RowTasks {
  const { strings, members, places } = classes;
  const n = strings.orbitalCount;
  const tasks: number[][] = [];
  const groups: number[][] = [];
  const source: number[] = [];
  const target: number[] = [];
  const sign: number[] = [];
  for (const task of cutTasks(classes, isWhole, rowsAtOnce)) {
    const [irrep, , first, count] = task;
    const byGroup = new Map<number, { pair: number; change: number; entries: number[]; targets: number[] }>();
    for (let row = 0; row < count; row++) {
      const string = members[irrep][first + row];
      const end = replacements.byStringStart[string + 1];
      for (let entry = replacements.byStringStart[string]; entry < end; entry++) {
        const pair = replacements.pair[entry];
        const [p, q] = [Math.trunc(pair / n), pair % n];
        if (isMoving && p === q) continue;
        const change = isWhole ? 0 : rankChange(strings, p, q);
        const key = 3 * packedPair(p, q) + change + 1;
        let group = byGroup.get(key);
        if (!group) {
          group = { pair, change, entries: [], targets: [] };
          byGroup.set(key, group);
        }
        group.entries.push(entry);
        group.targets.push(row);
      }
    }
    const firstGroup = groups.length;
    for (const [key, { pair, change, entries, targets }] of [...byGroup].sort(([a], [b]) => a - b)) {
      groups.push([Math.trunc(key / 3), pairIrreps[pair], change, source.length, entries.length]);
      for (const entry of entries) {
        source.push(places[replacements.source[entry]]);
        sign.push(replacements.sign[entry]);
      }
      target.push(...targets);
    }
    tasks.push([...task, firstGroup, groups.length]);
  }
  return {
    rowTasks: placeInt32(memory, tasks.flat()),
    rowTaskCount: tasks.length,
    groups: placeInt32(memory, groups.flat()),
    entrySource: placeInt32(memory, source),
    entryTarget: placeInt32(memory, target),
    entrySign: placeFloat64(memory, sign),
  };
}

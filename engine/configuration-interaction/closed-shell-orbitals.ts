import { IRREPS } from './string-classes';

/** Orbitals of one kind, those of one representation side by side. */
export interface OrbitalClass {
  readonly count: number;
  /** number among the orbitals of the space, by place */
  readonly orbitals: readonly number[];
  /** by place */
  readonly irreps: readonly number[];
  /** first place of each representation; one more at the end */
  readonly start: readonly number[];
  /** orbitals of each representation */
  readonly counts: readonly number[];
}

/** @param irreps - of the orbitals first, first + 1 … */
export function sortOrbitals(first: number, irreps: readonly number[]): OrbitalClass {
  const order = Array.from(irreps.keys()).sort((a, b) => irreps[a] - irreps[b] || a - b);
  const counts = byIrrep((h) => irreps.filter((irrep) => irrep === h).length);
  return {
    count: irreps.length,
    orbitals: order.map((k) => first + k),
    irreps: order.map((k) => irreps[k]),
    start: runningSum(counts),
    counts,
  };
}

/**
 * Single excitations by representation: for each hole in turn a run of all particles of the representation that is left.
 */
export interface SingleList {
  /** by representation */
  readonly size: readonly number[];
  /** by representation, then by place of the hole: where its run starts */
  readonly start: readonly (readonly number[])[];
}

export function listSingles(holes: OrbitalClass, particles: OrbitalClass): SingleList {
  const sums = byIrrep((h) => runningSum(holes.irreps.map((irrep) => particles.counts[irrep ^ h])));
  return { size: sums.map((ofIrrep) => ofIrrep[holes.count]), start: sums };
}

/** Unordered pairs of orbitals of one class by representation, x ≥ y, or x > y where it is strict. */
export interface PairList {
  readonly orbitals: OrbitalClass;
  readonly isStrict: boolean;
  /** by representation */
  readonly size: readonly number[];
  /** where the pairs of x of one representation with y of another start: [of x][of y], of x not below that of y */
  readonly start: readonly (readonly number[])[];
}

export function listPairs(orbitals: OrbitalClass, isStrict: boolean): PairList {
  const size = byIrrep(() => 0);
  const start = byIrrep((x) =>
    byIrrep((y) => {
      if (y > x) return 0;
      const first = size[x ^ y];
      const [ofX, ofY] = [orbitals.counts[x], orbitals.counts[y]];
      size[x ^ y] += x === y ? (ofX * (ofX + (isStrict ? -1 : 1))) / 2 : ofX * ofY;
      return first;
    }),
  );
  return { orbitals, isStrict, size, start };
}

/** Place of the pair of places x ≥ y among those of its representation. */
export function pairPlace(list: PairList, x: number, y: number): number {
  const { irreps, start } = list.orbitals;
  const [ofX, ofY] = [irreps[x], irreps[y]];
  return placeOfRun(list, ofX, ofY, x - start[ofX]) + y - start[ofY];
}

/** Where the pairs of one orbital with those of a representation start; the orbital counted among its own. */
export function placeOfRun(
  { orbitals, isStrict, start }: PairList,
  ofX: number,
  ofY: number,
  x: number,
): number {
  const before = ofX === ofY ? (x * (x + (isStrict ? -1 : 1))) / 2 : x * orbitals.counts[ofY];
  return start[ofX][ofY] + before;
}

/** The pairs of one representation in their order. */
export function pairsOf({ orbitals, isStrict }: PairList, irrep: number): [number, number][] {
  const pairs: [number, number][] = [];
  for (let ofX = 0; ofX < IRREPS; ofX++) {
    const ofY = ofX ^ irrep;
    if (ofY > ofX) continue;
    for (let x = orbitals.start[ofX]; x < orbitals.start[ofX + 1]; x++) {
      const end = ofX === ofY ? x + Number(!isStrict) : orbitals.start[ofY + 1];
      for (let y = orbitals.start[ofY]; y < end; y++) pairs.push([x, y]);
    }
  }
  return pairs;
}

export function byIrrep<Value>(value: (irrep: number) => Value): Value[] {
  return Array.from({ length: IRREPS }, (_, irrep) => value(irrep));
}

function runningSum(counts: readonly number[]): number[] {
  let sum = 0;
  return [0, ...counts.map((count) => (sum += count))];
}

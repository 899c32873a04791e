import { type OrbitalIntegrals, packedPair } from '../integrals/orbital-integrals';
import type { Block, KernelMemory } from '../kernels/kernel-memory';
import {
  byIrrep,
  listPairs,
  listSingles,
  type OrbitalClass,
  type PairList,
  pairsOf,
  type SingleList,
  sortOrbitals,
} from './closed-shell-orbitals';

type Numbers = Block<Float64Array>;

/** Of a pair of holes or particles under their exchange. */
export type PairSymmetry = 'symmetric' | 'antisymmetric';

/**
 * The integrals of CISD on a closed shell as dense matrices in a kernel memory, without what symmetry forbids. Holes
 * i, j, k, l, particles a, b, c, d; f is the Fock matrix of the reference.
 */
export interface ClosedShellIntegrals {
  readonly holes: OrbitalClass;
  readonly particles: OrbitalClass;
  readonly singles: SingleList;
  readonly holePairs: Readonly<Record<PairSymmetry, PairList>>;
  readonly particlePairs: Readonly<Record<PairSymmetry, PairList>>;
  /** of the reference determinant without the core energy, hartree */
  readonly referenceEnergy: number;
  /** f(i, j), f(a, b), by place; and f(i, a) over the totally symmetric single excitations */
  readonly fockOfHoles: Float64Array;
  readonly fockOfParticles: Float64Array;
  readonly fockBetween: Float64Array;
  /** (ia|jb) over single excitations of one representation */
  readonly coulomb: readonly Numbers[];
  /** (ij|ab) − ½(f(a, b)·δ(i, j) − f(i, j)·δ(a, b)), the same */
  readonly exchange: readonly Numbers[];
  /** (ac|bd) ± (ad|bc), a row for each pair cd and a column for each ab; the row of c = d halved */
  readonly ofParticles: Readonly<Record<PairSymmetry, readonly Numbers[]>>;
  /** (ki|lj) ± (kj|li), a row for each pair ij and a column for each kl; the column of k = l halved */
  readonly ofHoles: Readonly<Record<PairSymmetry, readonly Numbers[]>>;
  /** (ca|jb) by representations of c and a: [c][a][jb] */
  readonly particlesWithSingle: readonly (readonly Numbers[])[];
  /** (ki|jb) by representations of k and i: [k][i][jb] */
  readonly holesWithSingle: readonly (readonly Numbers[])[];
}

/** @param orbitalIrreps - of each orbital, where the integrals have that symmetry */
export function layClosedShellIntegrals(
  memory: KernelMemory,
  integrals: OrbitalIntegrals,
  electronPairs: number,
  orbitalIrreps: readonly number[] | undefined,
): ClosedShellIntegrals {
  const { orbitalCount: n, twoElectron } = integrals;
  const irreps = orbitalIrreps ?? Array<number>(n).fill(0);
  const holes = sortOrbitals(0, irreps.slice(0, electronPairs));
  const particles = sortOrbitals(electronPairs, irreps.slice(electronPairs));
  const singles = listSingles(holes, particles);
  const pairs = Int32Array.from({ length: n * n }, (_, pq) => packedPair(Math.trunc(pq / n), pq % n));
  const repulsion = (p: number, q: number, r: number, s: number) =>
    twoElectron[packedPair(pairs[p * n + q], pairs[r * n + s])];

  const fock = fockMatrix(integrals, electronPairs, repulsion);
  const fockAt = (p: number, q: number) => fock[p * n + q];
  const over = (rows: OrbitalClass, columns: OrbitalClass) =>
    Float64Array.from({ length: rows.count * columns.count }, (_, place) =>
      fockAt(rows.orbitals[Math.trunc(place / columns.count)], columns.orbitals[place % columns.count]),
    );
  const excitations = byIrrep((irrep) => excitationsOf(holes, particles, irrep));
  /** an element for each pair of single excitations of one representation */
  const overSingles = (element: (i: number, a: number, j: number, b: number) => number) =>
    excitations.map((list) => {
      const block = memory.float64(list.length ** 2);
      list.forEach(([i, a], row) => {
        for (let column = 0; column <= row; column++) {
          const [j, b] = list[column];
          const value = element(i, a, j, b);
          block.view[row * list.length + column] = value;
          block.view[column * list.length + row] = value;
        }
      });
      return block;
    });
  const pairsOfExcitations = excitations.map((list) => Int32Array.from(list, ([j, b]) => pairs[j * n + b]));
  /** (xy|jb) of two orbitals of one class */
  const withSingle = ({ orbitals, start }: OrbitalClass) =>
    byIrrep((ofX) =>
      byIrrep((ofY) => {
        const [first, second] = [ofX, ofY].map((irrep) => orbitals.slice(start[irrep], start[irrep + 1]));
        const xyPairs = Int32Array.from(first.flatMap((x) => second.map((y) => pairs[x * n + y])));
        return layWithSingle(memory, xyPairs, pairsOfExcitations[ofX ^ ofY], twoElectron);
      }),
    );

  const pairLists = (orbitals: OrbitalClass) => ({
    symmetric: listPairs(orbitals, false),
    antisymmetric: listPairs(orbitals, true),
  });
  const [holePairs, particlePairs] = [holes, particles].map(pairLists);
  const amongPairs = (lists: ReturnType<typeof pairLists>, isOfColumn: boolean) => ({
    symmetric: layPairMatrices(memory, lists.symmetric, isOfColumn, repulsion),
    antisymmetric: layPairMatrices(memory, lists.antisymmetric, isOfColumn, repulsion),
  });
  const occupied = holes.orbitals;
  return {
    holes,
    particles,
    singles,
    holePairs,
    particlePairs,
    referenceEnergy: occupied.reduce((sum, i) => sum + integrals.oneElectron[i * n + i] + fockAt(i, i), 0),
    fockOfHoles: over(holes, holes),
    fockOfParticles: over(particles, particles),
    fockBetween: Float64Array.from(excitations[0], ([i, a]) => fockAt(i, a)),
    coulomb: overSingles(repulsion),
    exchange: overSingles((i, a, j, b) => {
      const fockPart = (i === j ? fockAt(a, b) : 0) - (a === b ? fockAt(i, j) : 0);
      return repulsion(i, j, a, b) - fockPart / 2;
    }),
    ofParticles: amongPairs(particlePairs, false),
    ofHoles: amongPairs(holePairs, true),
    particlesWithSingle: withSingle(particles),
    holesWithSingle: withSingle(holes),
  };
}

type Repulsion = (p: number, q: number, r: number, s: number) => number;

/** h + Σ over occupied k of 2J(k) − K(k), n×n. */
function fockMatrix(
  { orbitalCount: n, oneElectron }: OrbitalIntegrals,
  electronPairs: number,
  repulsion: Repulsion,
): Float64Array {
  return oneElectron.map((element, place) => {
    const [p, q] = [Math.trunc(place / n), place % n];
    for (let k = 0; k < electronPairs; k++) element += 2 * repulsion(p, q, k, k) - repulsion(p, k, k, q);
    return element;
  });
}

/** Hole and particle, by orbital, of all single excitations of one representation, in the order of `listSingles`. */
function excitationsOf(holes: OrbitalClass, particles: OrbitalClass, irrep: number): [number, number][] {
  return holes.orbitals.flatMap((i, place) => {
    const ofParticle = holes.irreps[place] ^ irrep;
    return particles.orbitals
      .slice(particles.start[ofParticle], particles.start[ofParticle + 1])
      .map((a): [number, number] => [i, a]);
  });
}

/** (xy|jb), by pairs: [x][y] a row each, the jb of a list. */
function layWithSingle(
  memory: KernelMemory,
  xyPairs: Int32Array,
  jbPairs: Int32Array,
  twoElectron: Float64Array,
): Numbers {
  const { address, view } = memory.float64(xyPairs.length * jbPairs.length);
  let place = 0;
  for (let row = 0; row < xyPairs.length; row++) {
    const xy = xyPairs[row];
    for (let k = 0; k < jbPairs.length; k++) view[place++] = twoElectron[packedPair(xy, jbPairs[k])];
  }
  return { address, view };
}

/** (xz|yw) ± (xw|yz) among the pairs xy and zw of each representation; those of equal orbitals, of row or column, halved. */
function layPairMatrices(
  memory: KernelMemory,
  list: PairList,
  isOfColumn: boolean,
  repulsion: Repulsion,
): readonly Numbers[] {
  const { orbitals } = list.orbitals;
  const sign = list.isStrict ? -1 : 1;
  return byIrrep((irrep) => {
    const pairs = pairsOf(list, irrep);
    const count = pairs.length;
    const [first, second] = [0, 1].map((k) => Int32Array.from(pairs, (pair) => orbitals[pair[k]]));
    const { address, view } = memory.float64(count * count);
    for (let row = 0; row < count; row++) {
      const [x, y] = [first[row], second[row]];
      for (let column = 0; column <= row; column++) {
        const [z, w] = [first[column], second[column]];
        const value = repulsion(x, z, y, w) + sign * repulsion(x, w, y, z);
        view[row * count + column] = value;
        view[column * count + row] = value;
      }
    }
    for (let k = 0; k < count; k++) {
      if (first[k] !== second[k]) continue;
      for (let other = 0; other < count; other++) {
        view[isOfColumn ? other * count + k : k * count + other] /= 2;
      }
    }
    return { address, view };
  });
}

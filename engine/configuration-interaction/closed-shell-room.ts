import type { Block, KernelMemory } from '../kernels/kernel-memory';
import type { ClosedShellIntegrals, PairSymmetry } from './closed-shell-integrals';
import { byIrrep, type OrbitalClass, type PairList } from './closed-shell-orbitals';

type Numbers = Block<Float64Array>;

/**
 * Working memory of one product: amplitudes of a vector that has a parity under the exchange of spins, and what H makes
 * of them. Matrices over single excitations stand one after the other, by representation of their rows; rows are of
 * beta spin.
 */
export interface ClosedShellRoom {
  readonly integrals: ClosedShellIntegrals;
  /** of the sector */
  readonly irrep: number;
  readonly parity: 1 | -1;
  /** of beta electrons */
  readonly singles: Numbers;
  readonly ofSingles: Numbers;
  /** where the elements of the following stand */
  readonly layout: SinglesLayout;
  /** U(ia, jb): i to a of beta, j to b of alpha spin */
  readonly opposite: Numbers;
  /** N(ia, jb) = U(ib, ja) */
  readonly exchanged: Numbers;
  /** D(ia, jb): both of beta spin */
  readonly same: Numbers;
  /** U + D */
  readonly both: Numbers;
  /** what the first three bring */
  readonly ofOpposite: Numbers;
  readonly ofExchanged: Numbers;
  readonly ofSame: Numbers;
  /** doubles again, by the symmetry of their particle pairs */
  readonly pairs: Readonly<Record<PairSymmetry, PairMatrices>>;
}

/** Rows of hole pairs, columns of particle pairs, by representation of the latter. */
export interface PairMatrices {
  /** of opposite spins; among antisymmetric ones, those of equal spin stand in the rows below */
  readonly holePairs: PairList;
  readonly particlePairs: PairList;
  readonly amplitudes: readonly Numbers[];
  readonly results: readonly Numbers[];
}

export function takeClosedShellRoom(
  memory: KernelMemory,
  integrals: ClosedShellIntegrals,
  irrep: number,
  parity: 1 | -1,
): ClosedShellRoom {
  const { singles, holePairs, particlePairs } = integrals;
  const layout = roomLayout(integrals, irrep);
  const total = singles.size.reduce((sum, size, ofRow) => sum + size * singles.size[ofRow ^ irrep], 0);
  const overPairs = (kind: PairSymmetry, ofHoles: PairList): PairMatrices => {
    const ofEqualSpin = (e: number) => (kind === 'antisymmetric' ? holePairs.antisymmetric.size[e] : 0);
    const take = () =>
      particlePairs[kind].size.map((size, h) =>
        memory.float64((ofHoles.size[h ^ irrep] + ofEqualSpin(h ^ irrep)) * size),
      );
    return { holePairs: ofHoles, particlePairs: particlePairs[kind], amplitudes: take(), results: take() };
  };
  // even vectors are symmetric under the exchange of holes where they are under that of particles, odd ones where not
  const isEven = parity > 0;
  return {
    integrals,
    irrep,
    parity,
    singles: memory.float64(singles.size[irrep]),
    ofSingles: memory.float64(singles.size[irrep]),
    layout,
    opposite: memory.float64(total),
    exchanged: memory.float64(total),
    same: memory.float64(total),
    both: memory.float64(total),
    ofOpposite: memory.float64(total),
    ofExchanged: memory.float64(total),
    ofSame: memory.float64(total),
    pairs: {
      symmetric: overPairs('symmetric', isEven ? holePairs.symmetric : holePairs.antisymmetric),
      antisymmetric: overPairs('antisymmetric', isEven ? holePairs.antisymmetric : holePairs.symmetric),
    },
  };
}

/** How the matrices over single excitations of one sector lie. */
export function roomLayout({ singles }: ClosedShellIntegrals, irrep: number): SinglesLayout {
  let total = 0;
  const start = singles.size.map((size, ofRow) => {
    const before = total;
    total += size * singles.size[ofRow ^ irrep];
    return before;
  });
  return { start, stride: byIrrep((ofRow) => singles.size[ofRow ^ irrep]), runs: singles.start };
}

/** How elements over pairs of single excitations lie. */
export interface SinglesLayout {
  /** by representation of the row: where rows start, and how far they are apart */
  readonly start: readonly number[];
  readonly stride: readonly number[];
  /** by representation, then place of the hole: where its run starts among rows or columns */
  readonly runs: readonly (readonly number[])[];
}

/** A hole pair i ≥ j, and a particle x with those y ≤ x of one representation: what stands side by side. */
export interface PairStretch {
  /** places */
  readonly i: number;
  readonly j: number;
  readonly ofX: number;
  readonly ofY: number;
  /** among its representation */
  readonly x: number;
  /** how many y, from the first of their representation on */
  readonly count: number;
}

/** All that a sector has. */
export function listStretches(
  { holes, particles }: ClosedShellIntegrals,
  irrep: number,
): readonly PairStretch[] {
  const stretches: PairStretch[] = [];
  for (let i = 0; i < holes.count; i++) {
    for (let j = 0; j <= i; j++) {
      const ofParticles = holes.irreps[i] ^ holes.irreps[j] ^ irrep;
      particles.counts.forEach((count, ofX) => {
        const ofY = ofX ^ ofParticles;
        if (ofY > ofX || particles.counts[ofY] === 0) return;
        for (let x = 0; x < count; x++) {
          stretches.push({ i, j, ofX, ofY, x, count: ofX === ofY ? x + 1 : particles.counts[ofY] });
        }
      });
    }
  }
  return stretches;
}

/** Where the elements of a stretch stand in a layout, and those with particles, holes or both exchanged. */
export interface FourPlaces {
  /** (ix, jy), the next y beside it */
  readonly straight: number;
  /** (iy, jx), the next y a step further */
  readonly crossed: number;
  readonly crossedStep: number;
  /** (jx, iy), the next y beside it */
  readonly turned: number;
  /** (jy, ix), the next y a step further */
  readonly mirrored: number;
  readonly mirroredStep: number;
}

export function fourPlaces(
  { start, stride, runs }: SinglesLayout,
  { i, j, ofX, ofY, x }: PairStretch,
  { irreps }: OrbitalClass,
): FourPlaces {
  const [ofIX, ofJY, ofIY, ofJX] = [irreps[i] ^ ofX, irreps[j] ^ ofY, irreps[i] ^ ofY, irreps[j] ^ ofX];
  const row = (irrep: number, place: number) => start[irrep] + place * stride[irrep];
  const [ix, jy, iy, jx] = [runs[ofIX][i] + x, runs[ofJY][j], runs[ofIY][i], runs[ofJX][j] + x];
  return {
    straight: row(ofIX, ix) + jy,
    crossed: row(ofIY, iy) + jx,
    crossedStep: stride[ofIY],
    turned: row(ofJX, jx) + iy,
    mirrored: row(ofJY, jy) + ix,
    mirroredStep: stride[ofJY],
  };
}

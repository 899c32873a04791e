import type { ClosedShellIntegrals } from './closed-shell-integrals';
import { byIrrep, type OrbitalClass, pairPlace } from './closed-shell-orbitals';
import {
  type FourPlaces,
  fourPlaces,
  listStretches,
  type PairStretch,
  roomLayout,
  type SinglesLayout,
} from './closed-shell-room';
import type { Sector } from './sector';

/**
 * Where the excitations stand in a vector over the determinants of a sector, and with which signs: an element is the
 * sign times the coefficient of a†(a)a(i) or a†(a)a(i) a†(b)a(j) on the reference. Rows are excitations of beta
 * electrons, columns of alpha electrons; orbitals by place (see `OrbitalClass`).
 */
export interface ClosedShellPlaces {
  /** where it is in the sector */
  readonly reference?: number;
  /** of single excitations by the place of the hole */
  readonly signs: readonly number[];
  /** single excitations of both spins */
  readonly mixed: SinglesLayout;
  readonly alphaSingles: number;
  readonly betaSingles: number;
  readonly betaSinglesStride: number;
  readonly alphaDoubles: number;
  readonly betaDoubles: number;
  readonly pairs: readonly HolePairPlaces[];
  /** by representation of a pair of particles */
  readonly particlePairs: readonly ParticlePairPlaces[];
  readonly stretches: readonly PlacedStretch[];
}

/** A stretch of determinants excited in both spins: where it stands in the vector, and in the matrices of the room. */
export interface PlacedStretch {
  readonly stretch: PairStretch;
  readonly inVector: FourPlaces;
  readonly inRoom: FourPlaces;
  readonly sign: number;
}

/** Double excitations of one spin out of one pair of holes: a run of all pairs of particles. */
export interface HolePairPlaces {
  /** from the first double excitation */
  readonly start: number;
  readonly holeIrrep: number;
  /** of the pair among those of its representation */
  readonly place: number;
  readonly sign: number;
}

/** Of each particle pair in the order of the strings, its place in the order of `PairList`, and the sign. */
export interface ParticlePairPlaces {
  readonly place: Int32Array;
  readonly sign: Float64Array;
}

/** @param ofParticles - of `particlePairPlaces`, the same for all sectors */
export function closedShellPlaces(
  sector: Sector,
  integrals: ClosedShellIntegrals,
  ofParticles: readonly ParticlePairPlaces[],
): ClosedShellPlaces {
  const { holes, particles, singles, holePairs, particlePairs } = integrals;
  const { irrep, rowStart, beta } = sector;
  const ofReference = beta.irreps[0];
  const hasReference = irrep === 0;
  const first = rowStart[ofReference][0];
  const rowsBefore = (ofRow: number) => Number(ofRow === 0);
  let start = 0;
  const pairs = colexPairs(holes).map(([i, j]): HolePairPlaces => {
    const holeIrrep = holes.irreps[i] ^ holes.irreps[j];
    const before = start;
    start += particlePairs.antisymmetric.size[holeIrrep ^ irrep];
    return {
      start: before,
      holeIrrep,
      place: pairPlace(holePairs.antisymmetric, Math.max(i, j), Math.min(i, j)),
      sign: ((holes.orbitals[i] + holes.orbitals[j]) % 2 === 0 ? -1 : 1) * (i < j ? 1 : -1),
    };
  });
  const rowOf = (ofRow: number, row: number) => rowStart[ofReference ^ ofRow][rowsBefore(ofRow) + row];
  const stride = byIrrep((ofRow) => singles.size[ofRow ^ irrep] + rowsBefore(ofRow ^ irrep));
  const signs = holes.orbitals.map((i) => ((holes.count - 1 - i) % 2 === 0 ? 1 : -1));
  const mixed: SinglesLayout = {
    start: byIrrep((ofRow) => (singles.size[ofRow] === 0 ? 0 : rowOf(ofRow, 0) + rowsBefore(ofRow ^ irrep))),
    stride,
    runs: byIrrep((ofSingle) => runsInStrings(holes, particles, ofSingle)),
  };
  const layout = roomLayout(integrals, irrep);
  return {
    ...(hasReference && { reference: first }),
    signs,
    mixed,
    alphaSingles: first + Number(hasReference),
    betaSingles: singles.size[irrep] === 0 ? 0 : rowOf(irrep, 0),
    betaSinglesStride: stride[irrep],
    alphaDoubles: first + Number(hasReference) + singles.size[irrep],
    betaDoubles: start === 0 ? 0 : rowOf(irrep, singles.size[irrep]),
    pairs,
    particlePairs: ofParticles,
    stretches: listStretches(integrals, irrep).map((stretch) => ({
      stretch,
      inVector: fourPlaces(mixed, stretch, holes),
      inRoom: fourPlaces(layout, stretch, holes),
      sign: signs[stretch.i] * signs[stretch.j],
    })),
  };
}

/** Places of the pairs of orbitals p < q, q slower. */
function colexPairs({ orbitals }: OrbitalClass): [number, number][] {
  const rising = Array.from(orbitals.keys()).sort((x, y) => orbitals[x] - orbitals[y]);
  return rising.flatMap((q, k) => rising.slice(0, k).map((p): [number, number] => [p, q]));
}

/** By representation of the pair. */
export function particlePairPlaces({
  particles,
  particlePairs: { antisymmetric },
}: ClosedShellIntegrals): readonly ParticlePairPlaces[] {
  const found = byIrrep((): { place: number[]; sign: number[] } => ({ place: [], sign: [] }));
  for (const [a, b] of colexPairs(particles)) {
    const { place, sign } = found[particles.irreps[a] ^ particles.irreps[b]];
    place.push(pairPlace(antisymmetric, Math.max(a, b), Math.min(a, b)));
    sign.push(a < b ? 1 : -1);
  }
  return found.map(({ place, sign }) => ({
    place: Int32Array.from(place),
    sign: Float64Array.from(sign),
  }));
}

/** In the strings, holes run in the order of the orbitals. */
function runsInStrings(holes: OrbitalClass, particles: OrbitalClass, irrep: number): number[] {
  const starts: number[] = Array(holes.count).fill(0);
  let start = 0;
  const rising = Array.from(holes.orbitals.keys()).sort((x, y) => holes.orbitals[x] - holes.orbitals[y]);
  for (const hole of rising) {
    starts[hole] = start;
    start += particles.counts[holes.irreps[hole] ^ irrep];
  }
  return starts;
}

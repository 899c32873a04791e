import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { type DeterminantSpace, determinantAt, rowLength } from './determinant-space';
import { occupiedOrbitals, replacementPhase } from './determinants';
import { hamiltonianElement, mixedRepulsion } from './matrix-elements';
import type { StringSpace } from './string-space';

/** E − E(reference) = Σ over single and double excitations I of ⟨0|H|I⟩ c(I)/c(0). */
export type ProjectedEnergy =
  | {
      readonly kind: 'found';
      readonly singles: readonly OrbitalPart[];
      readonly pairs: readonly PairPart[];
    }
  /** the reference is hardly part of the state */
  | { readonly kind: 'none'; readonly reason: string };

/**
 * Single excitations out of one spatial orbital, both spins together; where beta orbitals differ, out of the two of one
 * number.
 */
export interface OrbitalPart {
  readonly orbital: number;
  /** hartree */
  readonly energy: number;
}

/** Double excitations out of two spatial orbitals, or out of one, all spins together; as in `OrbitalPart`. */
export interface PairPart {
  /** the lower first; equal: both electrons of one orbital */
  readonly orbitals: readonly [number, number];
  /** hartree */
  readonly energy: number;
  /** the part of `energy` from electrons of equal spin */
  readonly sameSpin: number;
}

/** Below this weight of the reference, c(0) tells more of what else is in the state than of its correlation. */
const SMALLEST_REFERENCE_WEIGHT = 0.01;

/**
 * Divides the correlation energy of a CI state by the orbitals that electrons leave. H joins the reference to singles
 * and doubles only, so that these give the whole; higher ranks act through their coefficients and have no pair.
 *
 * An iterated vector has a residual r, by which the sum misses the energy by r(0)/c(0): 1e-5 hartree at most, mostly far
 * less. That is shared out in proportion to the sizes of the parts, each of which is uncertain by as much.
 *
 * @param correlation - energy less that of the reference determinant, which the parts add up to
 *
 * Source: O. Sinanoğlu, J. Chem. Phys. 36, 706 (1962); A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, sec. 4.1.
 */
export function projectedEnergy(
  space: DeterminantSpace,
  vector: Float64Array,
  correlation: number,
  integrals: OrbitalIntegrals,
): ProjectedEnergy {
  if (vector[0] ** 2 < SMALLEST_REFERENCE_WEIGHT) {
    return {
      kind: 'none',
      reason:
        `The reference determinant has a weight below ${SMALLEST_REFERENCE_WEIGHT} in this state, ` +
        'and the projected energy divides by its coefficient.',
    };
  }
  const parts = projectedParts(space, vector, integrals);
  shareOut(correlation, [parts.singles, parts.sameSpin, parts.oppositeSpin]);
  return { kind: 'found', ...listParts(space, parts) };
}

/** Makes numbers add up to what they should, each changed by the same fraction of its size. */
function shareOut(whole: number, lists: readonly Float64Array[]): void {
  let [sum, size] = [0, 0];
  for (const list of lists) {
    for (const value of list) {
      sum += value;
      size += Math.abs(value);
    }
  }
  if (size === 0) return;
  const fraction = (whole - sum) / size;
  for (const list of lists) {
    for (let i = 0; i < list.length; i++) list[i] += fraction * Math.abs(list[i]);
  }
}

/** Σ ⟨0|H|I⟩ c(I)/c(0) by orbital, and by pair of orbitals: o numbers, and o×o with the lower orbital first. */
interface ProjectedParts {
  readonly singles: Float64Array;
  readonly sameSpin: Float64Array;
  readonly oppositeSpin: Float64Array;
}

function projectedParts(
  space: DeterminantSpace,
  vector: Float64Array,
  integrals: OrbitalIntegrals,
): ProjectedParts {
  const occupied = occupiedCount(space);
  const parts = {
    singles: new Float64Array(occupied),
    sameSpin: new Float64Array(occupied ** 2),
    oppositeSpin: new Float64Array(occupied ** 2),
  };
  const reference = determinantAt(space, 0);
  const ofAlpha = excitationsUpToRankTwo(space.alpha);
  const ofBeta = space.beta === space.alpha ? ofAlpha : excitationsUpToRankTwo(space.beta);
  ofBeta.forEach((beta, row) => {
    const start = space.rows.start[row];
    const length = Math.min(rowLength(space.rows, row), ofAlpha.length);
    for (let column = 0; column < length; column++) {
      const alpha = ofAlpha[column];
      if (alpha.holes.length + beta.holes.length > 2) break;
      const place = start + column;
      if (place === 0 || vector[place] === 0) continue;
      if (alpha.particle !== undefined && beta.particle !== undefined) {
        const [i, j] = [alpha.holes[0], beta.holes[0]];
        const element =
          alpha.phase! * beta.phase! * mixedRepulsion(integrals, i, alpha.particle, j, beta.particle);
        const pair = i < j ? i * occupied + j : j * occupied + i;
        parts.oppositeSpin[pair] += (element * vector[place]) / vector[0];
        continue;
      }
      const element = hamiltonianElement(reference, determinantAt(space, place), integrals);
      const energy = (element * vector[place]) / vector[0];
      const [i, j] = alpha.holes.length > 0 ? alpha.holes : beta.holes;
      if (j === undefined) parts.singles[i] += energy;
      else parts.sameSpin[i * occupied + j] += energy;
    }
  });
  return parts;
}

/** What a string differs in from the reference. */
interface StringExcitation {
  /** orbitals left, rising */
  readonly holes: readonly number[];
  /** of a single excitation: the orbital entered, and the sign */
  readonly particle?: number;
  readonly phase?: number;
}

/** Of every string up to rank 2; these stand first. */
function excitationsUpToRankTwo(strings: StringSpace): StringExcitation[] {
  const { reference, words, bits } = strings;
  const count = strings.rankStart[Math.min(2, strings.maximumRank) + 1];
  const only = new Int32Array(words);
  return Array.from({ length: count }, (_, place) => {
    for (let w = 0; w < words; w++) only[w] = reference[w] & ~bits[place * words + w];
    const holes = occupiedOrbitals(only);
    if (holes.length !== 1) return { holes };
    for (let w = 0; w < words; w++) only[w] = bits[place * words + w] & ~reference[w];
    const [particle] = occupiedOrbitals(only);
    return { holes, particle, phase: replacementPhase(reference, holes[0], particle) };
  });
}

function listParts(
  space: DeterminantSpace,
  { singles, sameSpin, oppositeSpin }: ProjectedParts,
): { readonly singles: readonly OrbitalPart[]; readonly pairs: readonly PairPart[] } {
  const occupied = occupiedCount(space);
  const doublyOccupied = Math.min(space.alpha.electrons, space.beta.electrons);
  const pairs: PairPart[] = [];
  for (let i = 0; i < occupied; i++) {
    for (let j = i < doublyOccupied ? i : i + 1; j < occupied; j++) {
      const place = i * occupied + j;
      pairs.push({
        orbitals: [i, j],
        energy: sameSpin[place] + oppositeSpin[place],
        sameSpin: sameSpin[place],
      });
    }
  }
  return { singles: Array.from(singles, (energy, orbital) => ({ orbital, energy })), pairs };
}

/** Spatial orbitals with one or two electrons in the reference. */
function occupiedCount({ alpha, beta }: DeterminantSpace): number {
  return Math.max(alpha.electrons, beta.electrons);
}

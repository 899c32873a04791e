import { betaPart, type OrbitalIntegrals, packedPair } from '../integrals/orbital-integrals';
import {
  type DeterminantSpace,
  type Rows,
  rowLength,
  transposeBackInto,
  transposeInto,
} from './determinant-space';
import { addScaledRows, emptyRowList, gatherSigned, type RowList, scatterAdd } from './product-kernels';
import { rankChange } from './replacements';
import { buildSameSpinHamiltonian, NEGLIGIBLE_FACTOR, type SameSpinHamiltonian } from './same-spin';

/**
 * The product H·c over determinants, in the three parts of J. Olsen, B. O. Roos, P. Jørgensen,
 * H. J. Aa. Jensen, J. Chem. Phys. 89, 2185 (1988): electrons of alpha spin among themselves, of beta spin among
 * themselves, and alpha with beta. Every inner loop runs along a row of alpha (or, transposed, beta) strings.
 *
 * Cost: determinants × (same-spin replacements of a string + alpha singles × beta singles).
 */
export interface HamiltonianProduct {
  readonly space: DeterminantSpace;
  /** product ← H·vector; core energy included */
  apply(vector: Float64Array, product: Float64Array): void;
  /** Makes a vector that is nearly even or odd under the exchange of alpha and beta exactly so, in place. */
  restoreSpinFlip(vector: Float64Array): void;
  /** What of a vector is even and what is odd under that exchange; the vector itself where there is none. */
  spinFlipParts(vector: Float64Array): readonly Float64Array[];
}

/**
 * Alpha replacements of one orbital pair are taken in blocks of so many, so that the gathered block (this many
 * numbers for each beta string) stays in the cache.
 */
export const GATHER_BLOCK = 256;

export function prepareHamiltonianProduct(
  space: DeterminantSpace,
  integrals: OrbitalIntegrals,
): HamiltonianProduct {
  /** the exchange of alpha and beta is a symmetry of H */
  const isFlippable = space.alpha === space.beta && !integrals.beta;
  const alphaHamiltonian = buildSameSpinHamiltonian(space.alpha, space.alphaReplacements, integrals);
  const betaHamiltonian = isFlippable
    ? alphaHamiltonian
    : buildSameSpinHamiltonian(space.beta, space.betaReplacements, betaPart(integrals));
  const transposed = new Float64Array(space.dimension);
  const transposedProduct = new Float64Array(space.dimension);
  const oppositeSpin = prepareOppositeSpin(space, integrals);

  return {
    space,
    apply(vector, product) {
      transposeInto(space, vector, transposed);
      const parity = isFlippable ? spinFlipParity(vector, transposed, EXACT_PARITY) : 0;
      if (parity === 0) {
        // alpha–alpha first: it ends in a copy, the others add
        transposedProduct.fill(0);
        addSameSpin(alphaHamiltonian, space.transposedRows, transposed, transposedProduct);
        transposeBackInto(space, transposedProduct, product);
        addSameSpin(betaHamiltonian, space.rows, vector, product);
        oppositeSpin(vector, product, false);
      } else {
        product.fill(0);
        addSameSpin(betaHamiltonian, space.rows, vector, product);
        oppositeSpin(vector, product, true);
        transposeInto(space, product, transposed);
        for (let i = 0; i < product.length; i++) product[i] += parity * transposed[i];
      }
      for (let i = 0; i < product.length; i++) product[i] += integrals.coreEnergy * vector[i];
    },
    restoreSpinFlip(vector) {
      if (!isFlippable) return;
      transposeInto(space, vector, transposed);
      const parity = spinFlipParity(vector, transposed, NEAR_PARITY);
      if (parity === 0) return;
      for (let i = 0; i < vector.length; i++) vector[i] = (vector[i] + parity * transposed[i]) / 2;
    },
    spinFlipParts(vector) {
      if (!isFlippable) return [vector];
      transposeInto(space, vector, transposed);
      return [1, -1].map((parity) => vector.map((value, i) => (value + parity * transposed[i]) / 2));
    },
  };
}

/** How far, against its largest element, a vector may be from its image under the exchange of spins … */
const EXACT_PARITY = 1e-13;
/** … and where the difference is taken for the rounding errors of a small residual. */
const NEAR_PARITY = 1e-6;

/**
 * 1 or −1 if exchanging alpha and beta multiplies the vector by that, 0 if neither. With as many alpha as beta
 * electrons a state has such a parity, (−1)^S; its product is then half the work: one half of the operator, and
 * the transpose of what it gives.
 */
function spinFlipParity(vector: Float64Array, transposed: Float64Array, tolerance: number): -1 | 0 | 1 {
  let largest = 0;
  let difference = 0;
  let sum = 0;
  for (let i = 0; i < vector.length; i++) {
    largest = Math.max(largest, Math.abs(vector[i]));
    difference = Math.max(difference, Math.abs(vector[i] - transposed[i]));
    sum = Math.max(sum, Math.abs(vector[i] + transposed[i]));
  }
  if (difference <= tolerance * largest) return 1;
  return sum <= tolerance * largest ? -1 : 0;
}

/** product(row I) += Σ_J H(I, J)·vector(row J), as far as both rows reach. */
function addSameSpin(
  hamiltonian: SameSpinHamiltonian,
  rows: Rows,
  vector: Float64Array,
  product: Float64Array,
): void {
  const { rowStart, column, value } = hamiltonian;
  let longest = 0;
  for (let i = 0; i + 1 < rowStart.length; i++) longest = Math.max(longest, rowStart[i + 1] - rowStart[i]);
  const list = emptyRowList(longest);
  for (let target = 0; target + 1 < rowStart.length; target++) {
    const length = rowLength(rows, target);
    list.count = 0;
    for (let entry = rowStart[target]; entry < rowStart[target + 1]; entry++) {
      appendRow(
        list,
        rows.start[column[entry]],
        Math.min(length, rowLength(rows, column[entry])),
        value[entry],
      );
    }
    addScaledRows(product, rows.start[target], vector, list);
  }
}

function appendRow(list: RowList, start: number, length: number, factor: number): void {
  list.start[list.count] = start;
  list.length[list.count] = length;
  list.factor[list.count++] = factor;
}

/**
 * product(I) += Σ (pq|rs) ⟨Iα| a†p aq |Jα⟩ ⟨Iβ| a†r as |Jβ⟩ c(J): for every pair pq the columns Jα that it
 * reaches are gathered with their signs, combined over Jβ by dense rows, and scattered to Iα. Halved: only the terms
 * with rs before pq, and half of those with rs = pq.
 */
function prepareOppositeSpin(space: DeterminantSpace, integrals: OrbitalIntegrals) {
  const { alpha, beta, alphaReplacements, betaReplacements, rows, orbitalCount: n } = space;
  const gathered = new Float64Array(gatheredLength(space));
  const gatheredStart = new Int32Array(beta.count);
  const combined = new Float64Array(GATHER_BLOCK);
  const integralRow = new Float64Array(n * n);
  let mostSingles = 0;
  for (let i = 0; i < beta.count; i++) {
    mostSingles = Math.max(
      mostSingles,
      betaReplacements.byStringStart[i + 1] - betaReplacements.byStringStart[i],
    );
  }
  const list = emptyRowList(mostSingles);
  /** by beta rank: how many entries of the present pair have a source, or a target, inside the row */
  const sources = new Int32Array(beta.maximumRank + 1);
  const targets = new Int32Array(beta.maximumRank + 1);

  return (vector: Float64Array, product: Float64Array, isHalved: boolean): void => {
    const { byPairStart, pairSource, pairTarget, pairSign, pairCountUpToRank } = alphaReplacements;
    const ranks = alpha.maximumRank + 1;
    for (let p = 0; p < n; p++) {
      for (let q = 0; q < n; q++) {
        const pair = p * n + q;
        const pairStart = byPairStart[pair];
        if (byPairStart[pair + 1] === pairStart) continue;
        if (!fillIntegralRow(integralRow, integrals, p, q)) continue;
        const change = rankChange(alpha, p, q);
        for (let betaRank = 0; betaRank <= beta.maximumRank; betaRank++) {
          // highest alpha rank of a target, or of a source (source rank = target rank − change)
          const allowed = space.maximumRank - betaRank;
          targets[betaRank] = upToRank(pairCountUpToRank, pair * ranks, ranks, allowed);
          sources[betaRank] = upToRank(pairCountUpToRank, pair * ranks, ranks, allowed + change);
        }
        const entries = Math.max(targets[0], 0);
        for (let block = 0; block < entries; block += GATHER_BLOCK) {
          const blockEnd = Math.min(block + GATHER_BLOCK, entries);
          const first = pairStart + block;
          let filled = 0;
          for (let j = 0; j < beta.count; j++) {
            const length = Math.min(sources[beta.ranks[j]], blockEnd) - block;
            if (length <= 0) continue;
            gatheredStart[j] = filled;
            gatherSigned(
              gathered,
              filled,
              vector,
              rows.start[j],
              pairSource,
              pairSign,
              first,
              first + length,
            );
            filled += length;
          }
          for (let i = 0; i < beta.count; i++) {
            const last = Math.min(targets[beta.ranks[i]], blockEnd);
            // strings stand in order of rank: the rows only get shorter
            if (last <= block) break;
            list.count = 0;
            for (let e = betaReplacements.byStringStart[i]; e < betaReplacements.byStringStart[i + 1]; e++) {
              const otherPair = betaReplacements.pair[e];
              // entries stand in order of the pair
              if (isHalved && otherPair > pair) break;
              const j = betaReplacements.source[e];
              const length = Math.min(last, sources[beta.ranks[j]]) - block;
              const integral = (isHalved && otherPair === pair ? 0.5 : 1) * integralRow[otherPair];
              if (length > 0 && integral !== 0) {
                appendRow(list, gatheredStart[j], length, betaReplacements.sign[e] * integral);
              }
            }
            if (list.count === 0) continue;
            combined.fill(0, 0, last - block);
            addScaledRows(combined, 0, gathered, list);
            scatterAdd(product, rows.start[i], combined, pairTarget, first, pairStart + last);
          }
        }
      }
    }
  };
}

/** Room for one gathered block: no row gives more than its own length. */
function gatheredLength({ beta, rows }: DeterminantSpace): number {
  let length = 0;
  for (let j = 0; j < beta.count; j++) length += Math.min(GATHER_BLOCK, rowLength(rows, j));
  return length;
}

function upToRank(counts: Int32Array, offset: number, ranks: number, rank: number): number {
  return rank < 0 ? 0 : counts[offset + Math.min(rank, ranks - 1)];
}

/** (pq|rs) for all r, s of the beta electrons; what is negligible becomes exactly zero. False: nothing is left. */
function fillIntegralRow(row: Float64Array, integrals: OrbitalIntegrals, p: number, q: number): boolean {
  const n = integrals.orbitalCount;
  const pq = packedPair(p, q);
  const { twoElectron, beta } = integrals;
  const mixedStart = (pq * n * (n + 1)) / 2;
  let any = false;
  for (let r = 0; r < n; r++) {
    for (let s = 0; s <= r; s++) {
      const rs = packedPair(r, s);
      const integral = beta ? beta.mixed[mixedStart + rs] : twoElectron[packedPair(pq, rs)];
      const kept = Math.abs(integral) < NEGLIGIBLE_FACTOR ? 0 : integral;
      row[r * n + s] = kept;
      row[s * n + r] = kept;
      if (kept !== 0) any = true;
    }
  }
  return any;
}

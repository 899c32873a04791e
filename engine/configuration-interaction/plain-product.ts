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
 * Alpha replacements of one orbital pair are taken in blocks of so many, so that the gathered block (this many
 * numbers for each beta string) stays in the cache.
 */
export const GATHER_BLOCK = 256;

/**
 * The product in the three parts of J. Olsen, B. O. Roos, P. Jørgensen,
 * H. J. Aa. Jensen, J. Chem. Phys. 89, 2185 (1988): electrons of alpha spin among themselves, of beta spin among
 * themselves, and alpha with beta. Every inner loop runs along a row of alpha (or, transposed, beta) strings.
 *
 * Cost: determinants × (same-spin replacements of a string + alpha singles × beta singles).
 *
 * @returns product ← H·vector over the whole space, without the core energy; `parity` is 1 or −1 where exchanging
 * alpha and beta, a symmetry of H, multiplies the vector by that, and else 0: a product with parity is half the work,
 * one half of the operator and the transpose of what it gives
 */
export function preparePlainProduct(
  space: DeterminantSpace,
  integrals: OrbitalIntegrals,
): (vector: Float64Array, product: Float64Array, parity: number) => void {
  const alphaHamiltonian = buildSameSpinHamiltonian(space.alpha, space.alphaReplacements, integrals);
  const betaHamiltonian =
    space.alpha === space.beta && !integrals.beta
      ? alphaHamiltonian
      : buildSameSpinHamiltonian(space.beta, space.betaReplacements, betaPart(integrals));
  const transposed = new Float64Array(space.dimension);
  const transposedProduct = new Float64Array(space.dimension);
  const oppositeSpin = prepareOppositeSpin(space, integrals);

  return (vector, product, parity) => {
    if (parity === 0) {
      // alpha–alpha first: it ends in a copy, the others add
      transposeInto(space, vector, transposed);
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
  };
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

import { type DeterminantSpace, rowLength } from './determinant-space';

/** What determinants of one excitation rank have in a state. */
export interface RankPart {
  /** Σ c² of the determinants of this rank */
  readonly weight: number;
  /** how much ⟨H − E(reference)⟩ changes when this rank is added to all lower ones, coefficients unchanged */
  readonly energy: number;
}

/**
 * Divides ⟨H⟩ − E(reference) of one vector by excitation rank: with P(k) keeping the ranks up to k,
 * E(k) = ⟨P(k)Ψ| H − E(reference) |P(k)Ψ⟩, and the energy of rank k is E(k) − E(k − 1): what having that rank costs, and
 * what its coupling to lower ones gains. (Σ over I of rank k of c(I) ((H − E(reference))c)(I) would tell nothing: of an
 * eigenvector it is the weight of the rank times the sum over all.)
 *
 * H changes the rank by at most two. One product with every third rank therefore gives each rank its elements with
 * itself, or with the next lower and the next but one higher, or the other way round; by symmetry, and from rank 0 up,
 * these come apart.
 *
 * @param apply - product ← H·vector
 * @returns from rank 0, whose energy is 0
 *
 * Cost: three products with H, two vectors.
 */
export function rankParts(
  space: DeterminantSpace,
  apply: (vector: Float64Array, product: Float64Array) => void,
  vector: Float64Array,
  referenceEnergy: number,
): readonly RankPart[] {
  const source = new Float64Array(vector.length);
  const product = new Float64Array(vector.length);
  /** by remainder of the source's rank on division by 3, then by rank of the target */
  const elements = [0, 1, 2].map((remainder) => {
    forEachRank(space, (rank, start, end) => {
      if (rank % 3 === remainder) source.set(vector.subarray(start, end), start);
      else source.fill(0, start, end);
    });
    apply(source, product);
    return sumByRank(space, vector, product);
  });
  const weights = sumByRank(space, vector, vector);
  /** elements of each rank with the next, and with the next but one */
  const withNext: number[] = [];
  const withSecond: number[] = [];
  return Array.from(weights, (weight, rank) => {
    const own = elements[rank % 3][rank] - referenceEnergy * weight;
    withNext.push(elements[(rank + 1) % 3][rank] - (withSecond[rank - 2] ?? 0));
    withSecond.push(elements[(rank + 2) % 3][rank] - (withNext[rank - 1] ?? 0));
    return { weight, energy: own + 2 * ((withNext[rank - 1] ?? 0) + (withSecond[rank - 2] ?? 0)) };
  });
}

/** Calls back for every run of places of one rank. */
function forEachRank(
  { alpha, beta, rows }: DeterminantSpace,
  visit: (rank: number, start: number, end: number) => void,
): void {
  for (let row = 0; row < beta.count; row++) {
    const length = rowLength(rows, row);
    for (let rank = 0; alpha.rankStart[rank] < length; rank++) {
      const start = rows.start[row];
      visit(beta.ranks[row] + rank, start + alpha.rankStart[rank], start + alpha.rankStart[rank + 1]);
    }
  }
}

function sumByRank(space: DeterminantSpace, left: Float64Array, right: Float64Array): Float64Array {
  const sums = new Float64Array(space.maximumRank + 1);
  forEachRank(space, (rank, start, end) => {
    let sum = 0;
    for (let place = start; place < end; place++) sum += left[place] * right[place];
    sums[rank] += sum;
  });
  return sums;
}

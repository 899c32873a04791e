import { type SymmetricEigen, symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { type DeterminantSpace, type Rows, transposeInto } from './determinant-space';
import { rankChange, type SingleReplacements } from './replacements';
import type { StringSpace } from './string-space';

/**
 * Spin-summed one-particle density γ(pq) = Σ over spins of ⟨Ψ| a†p aq |Ψ⟩ of a normalised CI vector.
 *
 * @returns n×n symmetric, row-major; its trace is the number of electrons
 */
export function oneParticleDensity(space: DeterminantSpace, vector: Float64Array): Float64Array {
  const density = new Float64Array(space.orbitalCount ** 2);
  addSpinDensity(
    density,
    space.alpha,
    space.alphaReplacements,
    space.beta,
    space.rows,
    space.maximumRank,
    vector,
  );
  const transposed = new Float64Array(vector.length);
  transposeInto(space, vector, transposed);
  addSpinDensity(
    density,
    space.beta,
    space.betaReplacements,
    space.alpha,
    space.transposedRows,
    space.maximumRank,
    transposed,
  );
  return density;
}

/** Adds Σ over rows and replacements of a pair: sign·c(row, I)·c(row, J). */
function addSpinDensity(
  density: Float64Array,
  inner: StringSpace,
  replacements: SingleReplacements,
  outer: StringSpace,
  rows: Rows,
  maximumRank: number,
  vector: Float64Array,
): void {
  const n = inner.orbitalCount;
  const { byPairStart, pairSource, pairTarget, pairSign, pairCountUpToRank } = replacements;
  const ranks = inner.maximumRank + 1;
  for (let p = 0; p < n; p++) {
    for (let q = 0; q <= p; q++) {
      const pair = p * n + q;
      const first = byPairStart[pair];
      const change = rankChange(inner, p, q);
      let sum = 0;
      for (let row = 0; row < outer.count; row++) {
        const limit = maximumRank - outer.ranks[row] + Math.min(0, change);
        if (limit < 0) break;
        const last = first + pairCountUpToRank[pair * ranks + Math.min(limit, ranks - 1)];
        const start = rows.start[row];
        for (let k = first; k < last; k++) {
          sum += pairSign[k] * vector[start + pairTarget[k]] * vector[start + pairSource[k]];
        }
      }
      density[pair] += sum;
      if (p !== q) density[q * n + p] += sum;
    }
  }
}

/** Natural occupations, falling, and the natural orbitals as columns in the same order. */
export function naturalOrbitals(density: Float64Array, orbitalCount: number): SymmetricEigen {
  const negative = density.map((value) => -value);
  const { values, vectors } = symmetricEigen(negative, orbitalCount);
  return { values: values.map((value) => -value), vectors };
}

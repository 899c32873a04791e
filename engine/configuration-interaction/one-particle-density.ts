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
  return transitionDensity(space, vector, vector);
}

/**
 * Spin-summed one-particle transition density, its symmetric part ½ Σ over spins of ⟨Φ| a†p aq + a†q ap |Ψ⟩: all
 * that a real symmetric operator sees.
 *
 * @returns n×n symmetric, row-major
 */
export function transitionDensity(
  space: DeterminantSpace,
  left: Float64Array,
  right: Float64Array,
): Float64Array {
  const density = new Float64Array(space.orbitalCount ** 2);
  addSpinDensity(
    density,
    space.alpha,
    space.alphaReplacements,
    space.beta,
    space.rows,
    space.maximumRank,
    left,
    right,
  );
  const transposed = (vector: Float64Array): Float64Array => {
    const turned = new Float64Array(vector.length);
    transposeInto(space, vector, turned);
    return turned;
  };
  const turnedLeft = transposed(left);
  addSpinDensity(
    density,
    space.beta,
    space.betaReplacements,
    space.alpha,
    space.transposedRows,
    space.maximumRank,
    turnedLeft,
    left === right ? turnedLeft : transposed(right),
  );
  return density;
}

/** Adds Σ over rows and replacements of a pair: sign·½(l(row, I)·r(row, J) + l(row, J)·r(row, I)). */
function addSpinDensity(
  density: Float64Array,
  inner: StringSpace,
  replacements: SingleReplacements,
  outer: StringSpace,
  rows: Rows,
  maximumRank: number,
  left: Float64Array,
  right: Float64Array,
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
          const target = start + pairTarget[k];
          const source = start + pairSource[k];
          sum += 0.5 * pairSign[k] * (left[target] * right[source] + left[source] * right[target]);
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

import type { BetaIntegrals } from '../integrals/orbital-integrals';
import { congruence, transpose } from '../linear-algebra/dense';
import { type SymmetricEigen, symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { type DeterminantSpace, type Rows, transposeInto } from './determinant-space';
import { doublesDensity } from './doubles-density';
import { rankChange, type SingleReplacements } from './replacements';
import type { StringSpace } from './string-space';

/** Of alpha and of beta electrons, each symmetric and row-major. */
export type SpinDensities = readonly [Float64Array, Float64Array];

/** What an operator without spin sees. */
export function spinSummed([alpha, beta]: SpinDensities): Float64Array {
  return alpha.map((value, i) => value + beta[i]);
}

/**
 * One-particle densities γ(pq) = ⟨Φ| a†p aq |Ψ⟩ of each spin, of one normalised CI vector or between two; their
 * symmetric parts ½ ⟨Φ| a†p aq + a†q ap |Ψ⟩, which are all that a real symmetric operator sees.
 *
 * @returns n×n; of one vector with the number of electrons of that spin as trace
 */
export function spinDensities(
  space: DeterminantSpace,
  left: Float64Array,
  right: Float64Array,
): SpinDensities {
  const transposed = (vector: Float64Array): Float64Array => {
    const turned = new Float64Array(vector.length);
    transposeInto(space, vector, turned);
    return turned;
  };
  const { alpha, beta, maximumRank, rows, transposedRows } = space;
  const turnedLeft = transposed(left);
  const turnedRight = left === right ? turnedLeft : transposed(right);
  if (maximumRank === 2) {
    return [
      doublesDensity(alpha, beta, transposedRows, turnedLeft, turnedRight),
      doublesDensity(beta, alpha, rows, left, right),
    ];
  }
  const { alphaReplacements, betaReplacements } = space;
  const ofAlpha = new Float64Array(space.orbitalCount ** 2);
  addSpinDensity(ofAlpha, alpha, alphaReplacements, beta, rows, maximumRank, left, right);
  const parity = alpha === beta ? parityBetween(left, turnedLeft) * parityBetween(right, turnedRight) : 0;
  if (parity !== 0) return [ofAlpha, ofAlpha.map((value) => parity * value)];
  const ofBeta = new Float64Array(space.orbitalCount ** 2);
  addSpinDensity(ofBeta, beta, betaReplacements, alpha, transposedRows, maximumRank, turnedLeft, turnedRight);
  return [ofAlpha, ofBeta];
}

/**
 * The same where beta orbitals differ, brought to the alpha orbitals: γ(α) and S γ(β) Sᵀ, frozen
 * electrons included.
 *
 * @returns over all m alpha orbitals, m×m
 */
export function unrestrictedSpinDensities(
  space: DeterminantSpace,
  left: Float64Array,
  right: Float64Array,
  { overlap, frozen }: BetaIntegrals,
): SpinDensities {
  const m = Math.sqrt(overlap.length);
  // different states are orthogonal, and nothing of the frozen orbitals is between them
  const occupation = left === right ? 1 : 0;
  const [alpha, beta] = spinDensities(space, left, right).map((density) =>
    padDensity(density, m, frozen, occupation),
  );
  return [alpha, congruence(beta, transpose(overlap, m, m), m, m)];
}

/** A density over n orbitals as one over m: `frozen` orbitals of equal occupation before them, empty ones after. */
export function padDensity(
  density: Float64Array,
  m: number,
  frozen: number,
  occupation: number,
): Float64Array {
  const n = Math.sqrt(density.length);
  if (n === m) return density;
  const padded = new Float64Array(m * m);
  for (let i = 0; i < frozen; i++) padded[i * m + i] = occupation;
  for (let p = 0; p < n; p++) {
    padded.set(density.subarray(p * n, (p + 1) * n), (p + frozen) * m + frozen);
  }
  return padded;
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
  const isSame = left === right;
  // row by row, so that one row stays in the fast cache for all pairs
  for (let row = 0; row < outer.count; row++) {
    const start = rows.start[row];
    for (let p = 0; p < n; p++) {
      for (let q = 0; q <= p; q++) {
        const pair = p * n + q;
        const limit = maximumRank - outer.ranks[row] + Math.min(0, rankChange(inner, p, q));
        if (limit < 0) continue;
        const first = byPairStart[pair];
        const last = first + pairCountUpToRank[pair * ranks + Math.min(limit, ranks - 1)];
        let sum = 0;
        for (let k = first; k < last; k++) {
          const target = start + pairTarget[k];
          const source = start + pairSource[k];
          const product = left[target] * right[source];
          sum += 0.5 * pairSign[k] * (product + (isSame ? product : left[source] * right[target]));
        }
        density[pair] += sum;
        if (p !== q) density[q * n + p] += sum;
      }
    }
  }
}

/** Differences between a vector and its image that are rounding, against its largest element. */
const SAME_ELEMENTS = 1e-12;

/** 1 or −1 if exchanging alpha and beta multiplies the vector by that, 0 if neither. */
function parityBetween(vector: Float64Array, turned: Float64Array): -1 | 0 | 1 {
  let [largest, difference, sum] = [0, 0, 0];
  for (let i = 0; i < vector.length; i++) {
    largest = Math.max(largest, Math.abs(vector[i]));
    difference = Math.max(difference, Math.abs(vector[i] - turned[i]));
    sum = Math.max(sum, Math.abs(vector[i] + turned[i]));
  }
  if (difference <= SAME_ELEMENTS * largest) return 1;
  return sum <= SAME_ELEMENTS * largest ? -1 : 0;
}

/** Natural occupations, falling, and the natural orbitals as columns in the same order. */
export function naturalOrbitals(density: Float64Array, orbitalCount: number): SymmetricEigen {
  const negative = density.map((value) => -value);
  const { values, vectors } = symmetricEigen(negative, orbitalCount);
  return { values: values.map((value) => -value), vectors };
}

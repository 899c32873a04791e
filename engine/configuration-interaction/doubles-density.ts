import { multiplyRightTransposed } from '../linear-algebra/dense';
import type { Rows } from './determinant-space';
import type { StringSpace } from './string-space';

/**
 * The one-particle density ½ ⟨L| a†p aq + a†q ap |R⟩ of the electrons whose strings are the rows of two vectors, in a space
 * of at most double excitations: dense products instead of lists of replacements.
 *
 * Let V(ia, K) be the coefficients of all determinants with a single excitation i → a of that spin, K what the other spin
 * does, beside them those of double excitations ia, jb of that spin divided by √2 (every pair is there twice), and w
 * the same of the reference in place of ia, the last part multiplied by √2. Then
 *
 *   γ(ij) = δ(ij)⟨L|R⟩ − Σ V(ia, K) V(ja, K),  γ(ab) = Σ V(ia, K) V(ib, K),  γ(ia) = Σ V(ia, K) w(K).
 *
 * @returns n×n, symmetric
 *
 * Cost: o²v³ multiplications for o electrons of that spin and v empty orbitals.
 */
export function doublesDensity(
  outer: StringSpace,
  inner: StringSpace,
  rows: Rows,
  left: Float64Array,
  right: Float64Array,
): Float64Array {
  const { electrons: o, orbitalCount: n } = outer;
  const v = n - o;
  const ofLeft = excitationRows(outer, inner, rows, left);
  const ofRight = left === right ? ofLeft : excitationRows(outer, inner, rows, right);
  const width = ofLeft.reference.length;
  const density = new Float64Array(n * n);
  const add = (p: number, q: number, value: number) => {
    density[p * n + q] += value / 2;
    density[q * n + p] += value / 2;
  };
  let overlap = 0;
  for (let i = 0; i < left.length; i++) overlap += left[i] * right[i];
  const ofHoles = multiplyRightTransposed(ofLeft.singles, ofRight.singles, o, v * width, o);
  for (let i = 0; i < o; i++) {
    add(i, i, overlap);
    for (let j = 0; j < o; j++) add(i, j, -ofHoles[i * o + j]);
    const [ofI, ofIRight] = [ofLeft, ofRight].map(({ singles }) =>
      singles.subarray(i * v * width, (i + 1) * v * width),
    );
    const ofParticles = multiplyRightTransposed(ofI, ofIRight, v, width, v);
    for (let a = 0; a < v; a++) {
      for (let b = 0; b < v; b++) add(o + a, o + b, ofParticles[a * v + b]);
      add(i, o + a, dotAt(ofI, a * width, ofRight.reference) + dotAt(ofIRight, a * width, ofLeft.reference));
    }
  }
  return density;
}

/** V, a row for each single excitation, and w of `doublesDensity`. */
function excitationRows(outer: StringSpace, inner: StringSpace, { start }: Rows, vector: Float64Array) {
  const { electrons: o, orbitalCount: n, rankStart } = outer;
  const v = n - o;
  const ofInner = inner.rankStart[Math.min(1, inner.maximumRank) + 1];
  const width = ofInner + o * v;
  const singles = new Float64Array(o * v * width);
  const reference = new Float64Array(width);
  // a†(a)a(i) meets the electrons behind i
  const sign = (i: number) => ((o - 1 - i) % 2 === 0 ? 1 : -1);
  for (let k = 0; k < ofInner; k++) reference[k] = vector[k];
  for (let i = 0, row = 0; i < o; i++) {
    for (let a = 0; a < v; a++, row++) {
      const from = start[rankStart[1] + row];
      for (let k = 0; k < ofInner; k++) singles[row * width + k] = sign(i) * vector[from + k];
      reference[ofInner + row] = Math.SQRT2 * sign(i) * vector[from];
    }
  }
  if (outer.maximumRank < 2) return { singles, reference };
  let place = start[rankStart[2]];
  for (let j = 1; j < o; j++) {
    for (let i = 0; i < j; i++) {
      const factor = -Math.SQRT1_2 * sign(i) * sign(j);
      for (let b = 1; b < v; b++) {
        for (let a = 0; a < b; a++) {
          const value = factor * vector[place++];
          const [ia, jb, ib, ja] = [i * v + a, j * v + b, i * v + b, j * v + a];
          singles[ia * width + ofInner + jb] = value;
          singles[jb * width + ofInner + ia] = value;
          singles[ib * width + ofInner + ja] = -value;
          singles[ja * width + ofInner + ib] = -value;
        }
      }
    }
  }
  return { singles, reference };
}

function dotAt(rows: Float64Array, start: number, vector: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < vector.length; k++) sum += rows[start + k] * vector[k];
  return sum;
}

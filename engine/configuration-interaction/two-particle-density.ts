import { type DeterminantSpace, type Rows, rowLength, transposeInto } from './determinant-space';
import { type OccupationString, occupiedOrbitals, replacementPhase } from './determinants';
import { rankChange } from './replacements';
import { placeOf, type StringSpace, stringAt } from './string-space';

/**
 * Spin-summed two-particle density Γ(pq, rs) = Σ over spins of ⟨Ψ| a†p a†r as aq |Ψ⟩ of a normalised CI vector, in the
 * order of (pq|rs): ⟨H⟩ = core energy + Σ h(pq) γ(pq) + ½ Σ (pq|rs) Γ(pq, rs).
 *
 * Formed in the three parts of the product H·c, at the cost of one such product without its long inner loops.
 *
 * @returns n⁴ numbers, place ((p·n + q)·n + r)·n + s; Σ Γ(pp, rr) = N(N − 1)
 */
export function twoParticleDensity(space: DeterminantSpace, vector: Float64Array): Float64Array {
  const density = new Float64Array(space.orbitalCount ** 4);
  addOppositeSpin(density, space, vector);
  addSameSpin(density, space.beta, space.rows, vector);
  const transposed = new Float64Array(vector.length);
  transposeInto(space, vector, transposed);
  addSameSpin(density, space.alpha, space.transposedRows, transposed);
  return density;
}

/** Γ(pq, rs) and Γ(rs, pq) += Σ c(I) c(J) ⟨Iα| a†p aq |Jα⟩ ⟨Iβ| a†r as |Jβ⟩. */
function addOppositeSpin(density: Float64Array, space: DeterminantSpace, vector: Float64Array): void {
  const { alpha, beta, alphaReplacements, betaReplacements, rows, maximumRank, orbitalCount: n } = space;
  const { byPairStart, pairSource, pairTarget, pairSign, pairCountUpToRank } = alphaReplacements;
  const ranks = alpha.maximumRank + 1;
  const pairs = n * n;
  for (let target = 0; target < beta.count; target++) {
    const start = rows.start[target];
    for (
      let e = betaReplacements.byStringStart[target];
      e < betaReplacements.byStringStart[target + 1];
      e++
    ) {
      const source = betaReplacements.source[e];
      const sourceStart = rows.start[source];
      const otherPair = betaReplacements.pair[e];
      for (let pair = 0; pair < pairs; pair++) {
        // highest alpha rank of a target that both rows allow (source rank = target rank − change)
        const change = rankChange(alpha, Math.trunc(pair / n), pair % n);
        const limit = Math.min(
          maximumRank - beta.ranks[target],
          maximumRank - beta.ranks[source] + change,
          alpha.maximumRank,
        );
        if (limit < 0) continue;
        const first = byPairStart[pair];
        const last = first + pairCountUpToRank[pair * ranks + limit];
        let sum = 0;
        for (let k = first; k < last; k++) {
          sum += pairSign[k] * vector[start + pairTarget[k]] * vector[sourceStart + pairSource[k]];
        }
        density[pair * pairs + otherPair] += betaReplacements.sign[e] * sum;
        density[otherPair * pairs + pair] += betaReplacements.sign[e] * sum;
      }
    }
  }
}

/**
 * Adds Σ over pairs of strings I, J of D(I, J) ⟨I| a†p a†r as aq |J⟩, where D(I, J) sums c(I, k) c(J, k) over the
 * strings k of the other spin, that is, along the rows of I and J.
 */
function addSameSpin(density: Float64Array, strings: StringSpace, rows: Rows, vector: Float64Array): void {
  const n = strings.orbitalCount;
  const place = (p: number, q: number, r: number, s: number) => ((p * n + q) * n + r) * n + s;
  const target = new Int32Array(strings.words);
  for (let right = 0; right < strings.count; right++) {
    const string = stringAt(strings, right);
    const occupied = occupiedOrbitals(string);
    for (let j = 1; j < occupied.length; j++) {
      for (let i = 0; i < j; i++) {
        const q = occupied[i];
        const s = occupied[j];
        for (const [p, r] of emptyPairs(string, n, q, s)) {
          target.set(string);
          target[q >> 5] &= ~(1 << (q & 31));
          target[s >> 5] &= ~(1 << (s & 31));
          target[p >> 5] |= 1 << (p & 31);
          target[r >> 5] |= 1 << (r & 31);
          const left = placeOf(strings, target);
          if (left < 0) continue;
          const overlap = rowOverlap(rows, vector, left, right);
          if (overlap === 0) continue;
          // taking out q < s costs the sign of the electrons between them
          const value = replacementPhase(string, q, s) * replacementPhase(target, p, r) * overlap;
          density[place(p, q, r, s)] += value;
          density[place(r, s, p, q)] += value;
          density[place(p, s, r, q)] -= value;
          density[place(r, q, p, s)] -= value;
        }
      }
    }
  }
}

/** Pairs p < r that are empty once q and s are. */
function emptyPairs(
  string: OccupationString,
  n: number,
  q: number,
  s: number,
): (readonly [number, number])[] {
  const free: number[] = [];
  for (let p = 0; p < n; p++) {
    if (p === q || p === s || ((string[p >> 5] >>> (p & 31)) & 1) === 0) free.push(p);
  }
  return free.flatMap((r, k) => free.slice(0, k).map((p) => [p, r] as const));
}

function rowOverlap(rows: Rows, vector: Float64Array, left: number, right: number): number {
  const length = Math.min(rowLength(rows, left), rowLength(rows, right));
  const [a, b] = [rows.start[left], rows.start[right]];
  let sum = 0;
  for (let k = 0; k < length; k++) sum += vector[a + k] * vector[b + k];
  return sum;
}

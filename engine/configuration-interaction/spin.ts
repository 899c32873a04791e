import { applyClosedShellSpinSquared, isClosedShellSpace } from './closed-shell-spin';
import type { DeterminantSpace } from './determinant-space';
import { rankChange } from './replacements';

export type SpinName =
  | 'singlet'
  | 'doublet'
  | 'triplet'
  | 'quartet'
  | 'quintet'
  | 'sextet'
  | 'septet'
  | 'mixed';

/** Of 2S + 1 = 1, 2 … in turn. */
export const SPIN_NAMES: readonly SpinName[] = [
  'singlet',
  'doublet',
  'triplet',
  'quartet',
  'quintet',
  'sextet',
  'septet',
];

/**
 * How far ⟨S²⟩ may lie from S(S + 1) for a state to bear the name of spin S. A converged state of a space that
 * is closed under spin has ⟨S²⟩ right to about 1e-9; truncated open-shell spaces lack some partners.
 */
export const SPIN_NAME_TOLERANCE = 1e-3;

/**
 * @returns 'mixed' where ⟨S²⟩ is not S(S + 1) of any S within `SPIN_NAME_TOLERANCE`, or S is above 3
 */
export function spinName(sSquared: number): SpinName {
  const twiceSpin = Math.round(Math.sqrt(Math.max(0, 1 + 4 * sSquared)) - 1);
  const exact = (twiceSpin / 2) * (twiceSpin / 2 + 1);
  if (Math.abs(sSquared - exact) > SPIN_NAME_TOLERANCE) return 'mixed';
  return SPIN_NAMES[twiceSpin] ?? 'mixed';
}

/**
 * product ← P S² P·vector, P the projector on the space: S² leads out of a truncated open-shell space, yet
 * ⟨Ψ|S²|Ψ⟩ of a vector inside needs no more than this and is exact.
 *
 * S² = M(M + 1) + N(β) − Σ over p, q of a†(qα)a(pα) a†(pβ)a(qβ), M = (N(α) − N(β))/2.
 */
export function applySpinSquared(space: DeterminantSpace, vector: Float64Array, product: Float64Array): void {
  if (isClosedShellSpace(space)) {
    applyClosedShellSpinSquared(space, vector, product);
    return;
  }
  const { alpha, beta, betaReplacements, orbitalCount: n } = space;
  const projection = (alpha.electrons - beta.electrons) / 2;
  const diagonal = projection * (projection + 1) + beta.electrons;
  for (let i = 0; i < vector.length; i++) product[i] = diagonal * vector[i];

  for (let target = 0; target < beta.count; target++) {
    for (
      let e = betaReplacements.byStringStart[target];
      e < betaReplacements.byStringStart[target + 1];
      e++
    ) {
      const source = betaReplacements.source[e];
      const p = Math.trunc(betaReplacements.pair[e] / n);
      const q = betaReplacements.pair[e] % n;
      addAlphaReplacements(space, vector, product, target, source, q, p, -betaReplacements.sign[e]);
    }
  }
}

/** product(row target) += factor·a†(pα)a(qα) vector(row source), rows of beta strings. */
export function addAlphaReplacements(
  space: DeterminantSpace,
  vector: Float64Array,
  product: Float64Array,
  target: number,
  source: number,
  p: number,
  q: number,
  factor: number,
): void {
  const { alpha, beta, alphaReplacements, rows, maximumRank, orbitalCount: n } = space;
  const { byPairStart, pairSource, pairTarget, pairSign, pairCountUpToRank } = alphaReplacements;
  const ranks = alpha.maximumRank + 1;
  const pair = p * n + q;
  const limit = Math.min(
    maximumRank - beta.ranks[target],
    maximumRank - beta.ranks[source] + rankChange(alpha, p, q),
  );
  if (limit < 0) return;
  const first = byPairStart[pair];
  const last = first + pairCountUpToRank[pair * ranks + Math.min(limit, ranks - 1)];
  const targetStart = rows.start[target];
  const sourceStart = rows.start[source];
  for (let k = first; k < last; k++) {
    product[targetStart + pairTarget[k]] += factor * pairSign[k] * vector[sourceStart + pairSource[k]];
  }
}

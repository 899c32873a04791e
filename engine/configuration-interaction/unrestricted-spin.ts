import type { BetaIntegrals } from '../integrals/orbital-integrals';
import { type DeterminantSpace, rowLength } from './determinant-space';
import {
  type Determinant,
  firstOrbitalOnlyIn,
  occupiedOrbitals,
  replacementPhase,
  replacementsBetween,
} from './determinants';
import { addAlphaReplacements } from './spin';

/**
 * S² where the spins have orbitals of their own. With S(pr) = ⟨p|r⟩ of alpha p and beta r,
 *
 *   S² = M(M + 1) + N(β) − Σ S(pr) S(qs) a†(qα)a(pα) a†(rβ)a(sβ), M = (N(α) − N(β))/2,
 *
 * from S² = S₋S₊ + S_z(S_z + 1), S₊ = Σ S(pr) a†(pα)a(rβ), and beta orbitals that lie in the span of the alpha ones.
 * Frozen orbitals, always filled, leave a number and a one-electron operator of each spin behind.
 */
export interface UnrestrictedSpin {
  readonly constant: number;
  /** to be multiplied by a†(pα)a(qα) and a†(pβ)a(qβ); n×n symmetric */
  readonly alpha: Float64Array;
  readonly beta: Float64Array;
  /** ⟨p|r⟩ of the n alpha and n beta orbitals that are not frozen, n×n */
  readonly overlap: Float64Array;
}

/** @param electrons - alpha and beta, frozen ones not counted */
export function unrestrictedSpin(
  { overlap: all, frozen }: BetaIntegrals,
  n: number,
  [alphaElectrons, betaElectrons]: readonly [number, number],
): UnrestrictedSpin {
  const m = Math.sqrt(all.length);
  const projection = (alphaElectrons - betaElectrons) / 2;
  let constant = projection * (projection + 1) + betaElectrons + frozen;
  for (let f = 0; f < frozen; f++) for (let g = 0; g < frozen; g++) constant -= all[f * m + g] ** 2;
  const alpha = new Float64Array(n * n);
  const beta = new Float64Array(n * n);
  const overlap = new Float64Array(n * n);
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < n; q++) {
      const [row, column] = [frozen + p, frozen + q];
      overlap[p * n + q] = all[row * m + column];
      for (let f = 0; f < frozen; f++) {
        alpha[p * n + q] -= all[row * m + f] * all[column * m + f];
        beta[p * n + q] -= all[f * m + row] * all[f * m + column];
      }
    }
  }
  return { constant, alpha, beta, overlap };
}

/** product ← P S² P·vector, P the projector on the space; at about the cost of a product with H. */
export function applyUnrestrictedSpinSquared(
  space: DeterminantSpace,
  spin: UnrestrictedSpin,
  vector: Float64Array,
  product: Float64Array,
): void {
  const { beta, betaReplacements, rows, orbitalCount: n } = space;
  const { constant, overlap } = spin;
  for (let i = 0; i < vector.length; i++) product[i] = constant * vector[i];

  for (let target = 0; target < beta.count; target++) {
    addAlphaOperator(space, vector, product, target, target, (p, q) => spin.alpha[p * n + q]);
    for (
      let e = betaReplacements.byStringStart[target];
      e < betaReplacements.byStringStart[target + 1];
      e++
    ) {
      const source = betaReplacements.source[e];
      const sign = betaReplacements.sign[e];
      const r = Math.trunc(betaReplacements.pair[e] / n);
      const s = betaReplacements.pair[e] % n;
      const length = Math.min(rowLength(rows, target), rowLength(rows, source));
      for (let k = 0; k < length; k++) {
        product[rows.start[target] + k] += sign * spin.beta[r * n + s] * vector[rows.start[source] + k];
      }
      addAlphaOperator(
        space,
        vector,
        product,
        target,
        source,
        (p, q) => -sign * overlap[q * n + r] * overlap[p * n + s],
      );
    }
  }
}

/** product(row target) += Σ factor(p, q) a†(pα)a(qα) vector(row source). */
function addAlphaOperator(
  space: DeterminantSpace,
  vector: Float64Array,
  product: Float64Array,
  target: number,
  source: number,
  factor: (p: number, q: number) => number,
): void {
  for (let p = 0; p < space.orbitalCount; p++) {
    for (let q = 0; q < space.orbitalCount; q++) {
      const value = factor(p, q);
      if (value !== 0) addAlphaReplacements(space, vector, product, target, source, p, q, value);
    }
  }
}

/** ⟨left|S²|right⟩ by the rules of Slater and Condon. */
export function unrestrictedSpinSquaredElement(
  left: Determinant,
  right: Determinant,
  { constant, alpha, beta, overlap }: UnrestrictedSpin,
): number {
  const n = Math.sqrt(overlap.length);
  const alphaMoves = replacementsBetween(left.alpha, right.alpha);
  const betaMoves = replacementsBetween(left.beta, right.beta);
  if (alphaMoves > 1 || betaMoves > 1) return 0;
  const alphaOccupied = occupiedOrbitals(right.alpha);
  const betaOccupied = occupiedOrbitals(right.beta);
  const p = firstOrbitalOnlyIn(left.alpha, right.alpha);
  const q = firstOrbitalOnlyIn(right.alpha, left.alpha);
  const r = firstOrbitalOnlyIn(left.beta, right.beta);
  const s = firstOrbitalOnlyIn(right.beta, left.beta);
  if (alphaMoves === 1 && betaMoves === 1) {
    const phase = replacementPhase(right.alpha, q, p) * replacementPhase(right.beta, s, r);
    return -phase * overlap[q * n + r] * overlap[p * n + s];
  }
  if (alphaMoves === 1) {
    let element = alpha[p * n + q];
    for (const k of betaOccupied) element -= overlap[p * n + k] * overlap[q * n + k];
    return replacementPhase(right.alpha, q, p) * element;
  }
  if (betaMoves === 1) {
    let element = beta[r * n + s];
    for (const k of alphaOccupied) element -= overlap[k * n + r] * overlap[k * n + s];
    return replacementPhase(right.beta, s, r) * element;
  }
  let element = constant;
  for (const i of alphaOccupied) element += alpha[i * n + i];
  for (const j of betaOccupied) element += beta[j * n + j];
  for (const i of alphaOccupied) for (const j of betaOccupied) element -= overlap[i * n + j] ** 2;
  return element;
}

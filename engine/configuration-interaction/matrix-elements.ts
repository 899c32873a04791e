import {
  betaPart,
  type OrbitalIntegrals,
  packedPair,
  type SameSpinIntegrals,
} from '../integrals/orbital-integrals';
import {
  type Determinant,
  firstOrbitalOnlyIn,
  isOccupied,
  moveElectron,
  type OccupationString,
  occupiedOrbitals,
  orbitalsOnlyIn,
  replacementPhase,
  replacementsBetween,
} from './determinants';

/*
 * The rules of Slater and Condon: J. C. Slater, Phys. Rev. 34, 1293 (1929); E. U. Condon, Phys. Rev. 36, 1121
 * (1930). Written for clarity; the yardstick of every faster form in this folder.
 *
 * Symbols: i, j, k occupied orbitals; q, s orbitals emptied and p, r orbitals filled on the way from the right
 * determinant to the left one.
 */

/** (pq|rs) of electrons of one spin, out of the packed array, hartree. */
export function repulsion(integrals: SameSpinIntegrals, p: number, q: number, r: number, s: number): number {
  return integrals.twoElectron[packedPair(packedPair(p, q), packedPair(r, s))];
}

/** (pq|rs) with p, q alpha and r, s beta orbitals, hartree. */
export function mixedRepulsion(
  integrals: OrbitalIntegrals,
  p: number,
  q: number,
  r: number,
  s: number,
): number {
  const { beta, orbitalCount: n } = integrals;
  return beta
    ? beta.mixed[(packedPair(p, q) * n * (n + 1)) / 2 + packedPair(r, s)]
    : repulsion(integrals, p, q, r, s);
}

/**
 * ⟨left|H|right⟩ between two determinants with the same numbers of alpha and of beta electrons, hartree;
 * `coreEnergy` included on the diagonal. Determinants that differ in more than two spin orbitals give zero.
 */
export function hamiltonianElement(
  left: Determinant,
  right: Determinant,
  integrals: OrbitalIntegrals,
): number {
  const alphaMoves = replacementsBetween(left.alpha, right.alpha);
  const betaMoves = replacementsBetween(left.beta, right.beta);
  if (alphaMoves + betaMoves > 2) return 0;
  if (alphaMoves === 1 && betaMoves === 1) return oppositeSpinDouble(left, right, integrals);
  if (alphaMoves === 2) return sameSpinDouble(left.alpha, right.alpha, integrals);
  if (betaMoves === 2) return sameSpinDouble(left.beta, right.beta, betaPart(integrals));
  if (alphaMoves === 1) {
    return single(left.alpha, right.alpha, integrals, right.beta, (p, q, k) =>
      mixedRepulsion(integrals, p, q, k, k),
    );
  }
  if (betaMoves === 1) {
    return single(left.beta, right.beta, betaPart(integrals), right.alpha, (p, q, k) =>
      mixedRepulsion(integrals, k, k, p, q),
    );
  }
  return diagonal(right, integrals);
}

/** Identical: Σᵢ (i|h|i) + Σ over pairs of (ii|jj), less (ij|ji) for equal spins. */
function diagonal(determinant: Determinant, integrals: OrbitalIntegrals): number {
  const alpha = occupiedOrbitals(determinant.alpha);
  const beta = occupiedOrbitals(determinant.beta);
  let energy = integrals.coreEnergy;
  for (const [occupied, ofSpin] of [
    [alpha, integrals],
    [beta, betaPart(integrals)],
  ] as const) {
    for (const i of occupied) {
      energy += ofSpin.oneElectron[i * ofSpin.orbitalCount + i];
      for (const j of occupied) {
        if (j < i) energy += repulsion(ofSpin, i, i, j, j) - repulsion(ofSpin, i, j, j, i);
      }
    }
  }
  for (const i of alpha) for (const j of beta) energy += mixedRepulsion(integrals, i, i, j, j);
  return energy;
}

/** One spin orbital differs: ±[(p|h|q) + Σₖ (pq|kk) − Σ over equal spins (pk|kq)]. */
function single(
  left: OccupationString,
  right: OccupationString,
  integrals: SameSpinIntegrals,
  otherSpin: OccupationString,
  coulombOfOther: (p: number, q: number, k: number) => number,
): number {
  const q = firstOrbitalOnlyIn(right, left);
  const p = firstOrbitalOnlyIn(left, right);
  let element = integrals.oneElectron[p * integrals.orbitalCount + q];
  for (const k of occupiedOrbitals(right)) {
    element += repulsion(integrals, p, q, k, k) - repulsion(integrals, p, k, k, q);
  }
  for (const k of occupiedOrbitals(otherSpin)) element += coulombOfOther(p, q, k);
  return replacementPhase(right, q, p) * element;
}

/** Two spin orbitals of equal spin differ: ±[(pq|rs) − (ps|rq)]. */
function sameSpinDouble(
  left: OccupationString,
  right: OccupationString,
  integrals: SameSpinIntegrals,
): number {
  const [q, s] = orbitalsOnlyIn(right, left);
  const [p, r] = orbitalsOnlyIn(left, right);
  const between = right.slice();
  moveElectron(between, q, p);
  const phase = replacementPhase(right, q, p) * replacementPhase(between, s, r);
  return phase * (repulsion(integrals, p, q, r, s) - repulsion(integrals, p, s, r, q));
}

/** One alpha and one beta spin orbital differ: ±(pq|rs). */
function oppositeSpinDouble(left: Determinant, right: Determinant, integrals: OrbitalIntegrals): number {
  const q = firstOrbitalOnlyIn(right.alpha, left.alpha);
  const p = firstOrbitalOnlyIn(left.alpha, right.alpha);
  const s = firstOrbitalOnlyIn(right.beta, left.beta);
  const r = firstOrbitalOnlyIn(left.beta, right.beta);
  const phase = replacementPhase(right.alpha, q, p) * replacementPhase(right.beta, s, r);
  return phase * mixedRepulsion(integrals, p, q, r, s);
}

/**
 * ⟨left|F|right⟩ for a spin-free one-electron operator F.
 *
 * @param operator - (p|f|q), row-major n×n
 */
export function oneElectronElement(
  left: Determinant,
  right: Determinant,
  operator: Float64Array,
  orbitalCount: number,
): number {
  const alphaMoves = replacementsBetween(left.alpha, right.alpha);
  const betaMoves = replacementsBetween(left.beta, right.beta);
  if (alphaMoves + betaMoves > 1) return 0;
  if (alphaMoves + betaMoves === 0) {
    let sum = 0;
    for (const i of occupiedOrbitals(right.alpha)) sum += operator[i * orbitalCount + i];
    for (const i of occupiedOrbitals(right.beta)) sum += operator[i * orbitalCount + i];
    return sum;
  }
  const [to, from] = alphaMoves === 1 ? [left.alpha, right.alpha] : [left.beta, right.beta];
  const q = firstOrbitalOnlyIn(from, to);
  const p = firstOrbitalOnlyIn(to, from);
  return replacementPhase(from, q, p) * operator[p * orbitalCount + q];
}

/**
 * ⟨left|S²|right⟩ = [M(M + 1) + N(β)] δ − Σ over p, q of ⟨left| a†(qα)a(pα) a†(pβ)a(qβ) |right⟩, with
 * M = (N(α) − N(β))/2; from S² = S₋S₊ + S_z(S_z + 1). Off the diagonal: −1 times the phase where two singly
 * occupied orbitals have exchanged their spins.
 */
export function spinSquaredElement(left: Determinant, right: Determinant): number {
  const alphaMoves = replacementsBetween(left.alpha, right.alpha);
  const betaMoves = replacementsBetween(left.beta, right.beta);
  if (alphaMoves === 0 && betaMoves === 0) {
    const alpha = occupiedOrbitals(right.alpha);
    const beta = occupiedOrbitals(right.beta);
    const projection = (alpha.length - beta.length) / 2;
    const paired = beta.filter((p) => isOccupied(right.alpha, p)).length;
    return projection * (projection + 1) + beta.length - paired;
  }
  if (alphaMoves !== 1 || betaMoves !== 1) return 0;
  const p = firstOrbitalOnlyIn(right.alpha, left.alpha);
  const q = firstOrbitalOnlyIn(left.alpha, right.alpha);
  if (!isOccupied(right.beta, q) || isOccupied(left.beta, q)) return 0;
  if (isOccupied(right.beta, p) || !isOccupied(left.beta, p)) return 0;
  return -replacementPhase(right.alpha, p, q) * replacementPhase(right.beta, q, p);
}

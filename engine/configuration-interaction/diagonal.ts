import {
  betaPart,
  type OrbitalIntegrals,
  packedPair,
  type SameSpinIntegrals,
} from '../integrals/orbital-integrals';
import { type DeterminantSpace, rowLength } from './determinant-space';
import { lowestBit } from './determinants';
import { mixedRepulsion } from './matrix-elements';
import { stringEnergy } from './same-spin';
import type { StringSpace } from './string-space';

/**
 * ⟨D|H|D⟩ averaged over all ways to give the open shells of D their spins (M fixed), for every determinant of the
 * space, hartree. Determinants that differ only in those spins share one value; so a preconditioner made of it
 * commutes with S² and never mixes spins.
 *
 * The average replaces −K(ij) of open shells with equal spins by −f·K(ij) for every pair of open shells, where f
 * is the fraction of pairs with equal spins.
 */
export function spinAveragedDiagonal(space: DeterminantSpace, integrals: OrbitalIntegrals): Float64Array {
  const n = space.orbitalCount;
  const coulomb = new Float64Array(n * n);
  const exchange = new Float64Array(n * n);
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < n; q++) {
      coulomb[p * n + q] = integrals.twoElectron[packedPair(packedPair(p, p), packedPair(q, q))];
      exchange[p * n + q] = integrals.twoElectron[packedPair(packedPair(p, q), packedPair(p, q))];
    }
  }
  const alpha = describeStrings(space.alpha, integrals);
  const beta = space.beta === space.alpha ? alpha : describeStrings(space.beta, integrals);
  const betaCoulomb = new Float64Array(n);
  const openAlpha = new Int32Array(n);
  const openBeta = new Int32Array(n);
  const diagonal = new Float64Array(space.dimension);

  const { words } = space.alpha;
  const { electrons } = alpha;
  for (let b = 0; b < space.beta.count; b++) {
    for (let p = 0; p < n; p++) {
      let sum = 0;
      for (let k = b * beta.electrons; k < (b + 1) * beta.electrons; k++) {
        sum += coulomb[p * n + beta.orbitals[k]];
      }
      betaCoulomb[p] = sum;
    }
    const start = space.rows.start[b];
    const length = rowLength(space.rows, b);
    for (let a = 0; a < length; a++) {
      let value = integrals.coreEnergy + alpha.energy[a] + beta.energy[b];
      for (let k = a * electrons; k < (a + 1) * electrons; k++) value += betaCoulomb[alpha.orbitals[k]];
      let alphaOpen = 0;
      let betaOpen = 0;
      for (let w = 0; w < words; w++) {
        const [ofAlpha, ofBeta] = [space.alpha.bits[a * words + w], space.beta.bits[b * words + w]];
        for (let rest = ofAlpha & ~ofBeta; rest !== 0; rest &= rest - 1) {
          openAlpha[alphaOpen++] = 32 * w + lowestBit(rest);
        }
        for (let rest = ofBeta & ~ofAlpha; rest !== 0; rest &= rest - 1) {
          openBeta[betaOpen++] = 32 * w + lowestBit(rest);
        }
      }
      diagonal[start + a] =
        value + averagingCorrection(exchange, n, openAlpha, alphaOpen, openBeta, betaOpen);
    }
  }
  return diagonal;
}

/** ⟨D|H|D⟩ of every determinant of the space, hartree, where beta orbitals differ: none has partners of another spin. */
export function unrestrictedDiagonal(space: DeterminantSpace, integrals: OrbitalIntegrals): Float64Array {
  const n = space.orbitalCount;
  const alpha = describeStrings(space.alpha, integrals);
  const beta = describeStrings(space.beta, betaPart(integrals));
  const betaCoulomb = new Float64Array(n);
  const diagonal = new Float64Array(space.dimension);
  for (let b = 0; b < space.beta.count; b++) {
    for (let p = 0; p < n; p++) {
      betaCoulomb[p] = occupiedBy(beta, b).reduce((sum, j) => sum + mixedRepulsion(integrals, p, p, j, j), 0);
    }
    const start = space.rows.start[b];
    for (let a = 0; start + a < space.rows.start[b + 1]; a++) {
      let value = integrals.coreEnergy + alpha.energy[a] + beta.energy[b];
      for (const i of occupiedBy(alpha, a)) value += betaCoulomb[i];
      diagonal[start + a] = value;
    }
  }
  return diagonal;
}

/** Occupied orbitals of all strings in one row, and the energy of each. */
function describeStrings(space: StringSpace, integrals: SameSpinIntegrals) {
  const { count, electrons, words, bits } = space;
  const orbitals = new Int32Array(count * electrons);
  const energy = new Float64Array(count);
  const occupied: number[] = Array(electrons).fill(0);
  for (let string = 0; string < count; string++) {
    let place = 0;
    for (let w = 0; w < words; w++) {
      for (let rest = bits[string * words + w]; rest !== 0; rest &= rest - 1) {
        occupied[place++] = 32 * w + lowestBit(rest);
      }
    }
    orbitals.set(occupied, string * electrons);
    energy[string] = stringEnergy(occupied, integrals);
  }
  return { electrons, orbitals, energy };
}

function occupiedBy({ electrons, orbitals }: ReturnType<typeof describeStrings>, string: number): Int32Array {
  return orbitals.subarray(string * electrons, (string + 1) * electrons);
}

/** Equal-spin exchange of the open shells as it is, against its average. */
function averagingCorrection(
  exchange: Float64Array,
  n: number,
  openAlpha: Int32Array,
  alphaOpen: number,
  openBeta: Int32Array,
  betaOpen: number,
): number {
  const open = alphaOpen + betaOpen;
  if (open < 2) return 0;
  let equal = 0;
  for (let i = 1; i < alphaOpen; i++)
    for (let j = 0; j < i; j++) equal += exchange[openAlpha[i] * n + openAlpha[j]];
  for (let i = 1; i < betaOpen; i++)
    for (let j = 0; j < i; j++) equal += exchange[openBeta[i] * n + openBeta[j]];
  let opposite = 0;
  for (let i = 0; i < alphaOpen; i++) {
    for (let j = 0; j < betaOpen; j++) opposite += exchange[openAlpha[i] * n + openBeta[j]];
  }
  const fraction = (alphaOpen * (alphaOpen - 1) + betaOpen * (betaOpen - 1)) / (open * (open - 1));
  return equal - fraction * (equal + opposite);
}

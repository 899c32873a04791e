import { type OrbitalIntegrals, packedPair } from '../../engine/integrals/orbital-integrals';

/*
 * Electrons by brute force: creation and annihilation operators acting one after another on occupation-number
 * vectors. Shares nothing with the engine but the order of the operators in a determinant: alpha before beta, each
 * by rising orbital. A vector maps occupations (bit p: alpha in orbital p; bit n + p: beta) to coefficients.
 */

export type OccupationVector = Map<bigint, number>;

export interface Occupation {
  readonly alpha: readonly number[];
  readonly beta: readonly number[];
}

export function occupationBits({ alpha, beta }: Occupation, orbitalCount: number): bigint {
  let bits = 0n;
  for (const p of alpha) bits |= 1n << BigInt(p);
  for (const p of beta) bits |= 1n << BigInt(orbitalCount + p);
  return bits;
}

/** Sign of moving an operator past all occupied spin orbitals that stand before it. */
function signBefore(bits: bigint, spinOrbital: number): number {
  let sign = 1;
  for (let below = bits & ((1n << BigInt(spinOrbital)) - 1n); below > 0n; below &= below - 1n) sign = -sign;
  return sign;
}

function act(vector: OccupationVector, spinOrbital: number, create: boolean): OccupationVector {
  const result: OccupationVector = new Map();
  const bit = 1n << BigInt(spinOrbital);
  for (const [bits, coefficient] of vector) {
    if (((bits & bit) !== 0n) === create) continue;
    result.set(bits ^ bit, signBefore(bits, spinOrbital) * coefficient);
  }
  return result;
}

/** Operators written left to right as on paper: the last acts first. */
export function applyOperators(
  operators: readonly { readonly create: boolean; readonly spinOrbital: number }[],
  vector: OccupationVector,
): OccupationVector {
  return operators.reduceRight((state, { create, spinOrbital }) => act(state, spinOrbital, create), vector);
}

/** ⟨left| a†…a |right⟩ of one determinant each. */
function matrixElement(
  left: bigint,
  operators: readonly { readonly create: boolean; readonly spinOrbital: number }[],
  right: bigint,
): number {
  return applyOperators(operators, new Map([[right, 1]])).get(left) ?? 0;
}

const creates = (spinOrbital: number) => ({ create: true, spinOrbital });
const annihilates = (spinOrbital: number) => ({ create: false, spinOrbital });

/** All spin orbitals occupied in a determinant: those that an operator can annihilate, or have created. */
function spinOrbitalsOf({ alpha, beta }: Occupation, n: number): number[] {
  return [...alpha, ...beta.map((p) => n + p)];
}

/** Σ f(pq) a†(pσ) a(qσ); the operator over beta orbitals where they differ. */
export function bruteOneElectron(
  left: Occupation,
  right: Occupation,
  operator: Float64Array,
  n: number,
  ofBeta = operator,
): number {
  let sum = 0;
  for (const p of spinOrbitalsOf(left, n)) {
    for (const q of spinOrbitalsOf(right, n)) {
      if (p < n !== q < n) continue;
      const sign = matrixElement(
        occupationBits(left, n),
        [creates(p), annihilates(q)],
        occupationBits(right, n),
      );
      sum += sign * (p < n ? operator : ofBeta)[(p % n) * n + (q % n)];
    }
  }
  return sum;
}

/** Core energy + Σ h(pq) a†(pσ)a(qσ) + ½ Σ (pq|rs) a†(pσ)a†(rτ)a(sτ)a(qσ). */
export function bruteHamiltonian(left: Occupation, right: Occupation, integrals: OrbitalIntegrals): number {
  const n = integrals.orbitalCount;
  const leftBits = occupationBits(left, n);
  const rightBits = occupationBits(right, n);
  let sum =
    (leftBits === rightBits ? integrals.coreEnergy : 0) +
    bruteOneElectron(left, right, integrals.oneElectron, n, integrals.beta?.oneElectron);
  for (const p of spinOrbitalsOf(left, n)) {
    for (const r of spinOrbitalsOf(left, n)) {
      for (const q of spinOrbitalsOf(right, n)) {
        for (const s of spinOrbitalsOf(right, n)) {
          if (p < n !== q < n || r < n !== s < n) continue;
          const sign = matrixElement(
            leftBits,
            [creates(p), creates(r), annihilates(s), annihilates(q)],
            rightBits,
          );
          if (sign === 0) continue;
          sum += 0.5 * sign * repulsionOf(integrals, p, q, r, s);
        }
      }
    }
  }
  return sum;
}

/** (pq|rs) over spin orbitals. */
function repulsionOf(integrals: OrbitalIntegrals, p: number, q: number, r: number, s: number): number {
  const { orbitalCount: n, twoElectron, beta } = integrals;
  const [bra, ket] = [packedPair(p % n, q % n), packedPair(r % n, s % n)];
  if (!beta || (p < n && r < n)) return twoElectron[packedPair(bra, ket)];
  if (p >= n && r >= n) return beta.twoElectron[packedPair(bra, ket)];
  const pairs = (n * (n + 1)) / 2;
  return p < n ? beta.mixed[bra * pairs + ket] : beta.mixed[ket * pairs + bra];
}

/** H on a vector, operator by operator; for Hamiltonians with few integrals that are not zero. */
export function applyHamiltonian(vector: OccupationVector, integrals: OrbitalIntegrals): OccupationVector {
  const n = integrals.orbitalCount;
  const result: OccupationVector = new Map();
  const add = (factor: number, operators: Parameters<typeof applyOperators>[0]) => {
    for (const [bits, value] of applyOperators(operators, vector)) {
      result.set(bits, (result.get(bits) ?? 0) + factor * value);
    }
  };
  add(integrals.coreEnergy, []);
  for (let p = 0; p < 2 * n; p++) {
    for (let q = 0; q < 2 * n; q++) {
      if (p < n !== q < n) continue;
      const single = integrals.oneElectron[(p % n) * n + (q % n)];
      if (single !== 0) add(single, [creates(p), annihilates(q)]);
      for (let r = 0; r < 2 * n; r++) {
        for (let s = 0; s < 2 * n; s++) {
          if (r < n !== s < n) continue;
          const value = integrals.twoElectron[packedPair(packedPair(p % n, q % n), packedPair(r % n, s % n))];
          if (value !== 0) add(value / 2, [creates(p), creates(r), annihilates(s), annihilates(q)]);
        }
      }
    }
  }
  return result;
}

/** S₋S₊ + S_z(S_z + 1) with S₊ = Σ a†(pα) a(pβ). */
export function bruteSpinSquared(left: Occupation, right: Occupation, n: number): number {
  const leftBits = occupationBits(left, n);
  const rightBits = occupationBits(right, n);
  const projection = (right.alpha.length - right.beta.length) / 2;
  let sum = leftBits === rightBits ? projection * (projection + 1) : 0;
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < n; q++) {
      const operators = [creates(n + p), annihilates(p), creates(q), annihilates(n + q)];
      sum += matrixElement(leftBits, operators, rightBits);
    }
  }
  return sum;
}

/** S₋S₊ + S_z(S_z + 1) with S₊ = Σ ⟨p|r⟩ a†(pα) a(rβ) over orbitals that differ; `overlap` n×n orthogonal. */
export function bruteUnrestrictedSpinSquared(
  left: Occupation,
  right: Occupation,
  overlap: Float64Array,
  n: number,
): number {
  const leftBits = occupationBits(left, n);
  const ket: OccupationVector = new Map([[occupationBits(right, n), 1]]);
  const projection = (right.alpha.length - right.beta.length) / 2;
  let sum = (ket.get(leftBits) ?? 0) * projection * (projection + 1);
  const raised = (vector: OccupationVector): OccupationVector => {
    const result: OccupationVector = new Map();
    for (let p = 0; p < n; p++) {
      for (let r = 0; r < n; r++) {
        for (const [bits, value] of applyOperators([creates(p), annihilates(n + r)], vector)) {
          result.set(bits, (result.get(bits) ?? 0) + overlap[p * n + r] * value);
        }
      }
    }
    return result;
  };
  // ⟨left|S₋S₊|right⟩ = ⟨S₊ left|S₊ right⟩
  const bra = raised(new Map([[leftBits, 1]]));
  for (const [bits, value] of raised(ket)) sum += value * (bra.get(bits) ?? 0);
  return sum;
}

/** Every way to choose k of 0 … n − 1. */
export function choices(n: number, k: number): number[][] {
  if (k === 0) return [[]];
  if (n < k) return [];
  return [...choices(n - 1, k), ...choices(n - 1, k - 1).map((chosen) => [...chosen, n - 1])];
}

/** All determinants up to an excitation rank from the lowest one, in no particular order. */
export function allOccupations(n: number, alpha: number, beta: number, maximumRank: number): Occupation[] {
  const rank = (occupied: readonly number[]) => occupied.filter((p) => p >= occupied.length).length;
  return choices(n, alpha).flatMap((a) =>
    choices(n, beta)
      .filter((b) => rank(a) + rank(b) <= maximumRank)
      .map((b) => ({ alpha: a, beta: b })),
  );
}

/** The matrix of an operator over determinants, row-major. */
export function operatorMatrix(
  determinants: readonly Occupation[],
  element: (left: Occupation, right: Occupation) => number,
): Float64Array {
  return Float64Array.from(determinants.flatMap((left) => determinants.map((right) => element(left, right))));
}

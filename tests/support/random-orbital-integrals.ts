import { type OrbitalIntegrals, packedPair } from '../../engine/integrals/orbital-integrals';
import { symmetricEigen } from '../../engine/linear-algebra/symmetric-eigen';
import { randomArray, randomSymmetric, seededRandom } from './random';

export interface RandomIntegralsOptions {
  /** size of the off-diagonal and two-electron parts; the one-electron diagonal rises by 1 per orbital */
  readonly coupling?: number;
  /** symmetry species of each orbital, multiplied by exclusive or (as in D2h); integrals of others vanish */
  readonly species?: readonly number[];
}

/** Integrals that belong to no molecule, with the eightfold symmetry of real orbitals and a positive repulsion. */
export function randomOrbitalIntegrals(
  orbitalCount: number,
  seed: number,
  { coupling = 0.3, species = [] }: RandomIntegralsOptions = {},
): OrbitalIntegrals {
  const random = seededRandom(seed);
  const n = orbitalCount;
  const speciesOf = (p: number) => species[p] ?? 0;
  const oneElectron = new Float64Array(n * n);
  for (let p = 0; p < n; p++) {
    for (let q = 0; q <= p; q++) {
      const value = p === q ? p - n / 2 + 0.2 * random() : coupling * (2 * random() - 1);
      if (speciesOf(p) !== speciesOf(q)) continue;
      oneElectron[p * n + q] = value;
      oneElectron[q * n + p] = value;
    }
  }
  const pairs = (n * (n + 1)) / 2;
  const twoElectron = new Float64Array((pairs * (pairs + 1)) / 2);
  for (let p = 0; p < n; p++) {
    for (let q = 0; q <= p; q++) {
      for (let r = 0; r < n; r++) {
        for (let s = 0; s <= r; s++) {
          const value = coupling * (2 * random() - 1);
          if ((speciesOf(p) ^ speciesOf(q) ^ speciesOf(r) ^ speciesOf(s)) !== 0) continue;
          const coulomb = p === q && r === s ? 1 : 0;
          twoElectron[packedPair(packedPair(p, q), packedPair(r, s))] = value + coulomb;
        }
      }
    }
  }
  return { orbitalCount, coreEnergy: 0.37, oneElectron, twoElectron };
}

/** Random integrals in which beta electrons have orbitals of their own, `empty` of each spin left out. */
export function randomUnrestrictedIntegrals(
  orbitalCount: number,
  seed: number,
  { frozen = 0, empty = 0 } = {},
): OrbitalIntegrals {
  const { oneElectron, twoElectron } = randomOrbitalIntegrals(orbitalCount, seed + 1);
  const pairs = (orbitalCount * (orbitalCount + 1)) / 2;
  const random = seededRandom(seed + 2);
  return {
    ...randomOrbitalIntegrals(orbitalCount, seed),
    beta: {
      oneElectron,
      twoElectron,
      mixed: randomArray(pairs * pairs, random),
      overlap: randomOrthogonal(frozen + orbitalCount + empty, random),
      frozen,
    },
  };
}

/** m×m. */
export function randomOrthogonal(m: number, random: () => number): Float64Array {
  return symmetricEigen(randomSymmetric(m, random), m).vectors;
}

/** The same Hamiltonian over the orbitals Σ_p |p⟩ C(p, i), C orthogonal, row-major. */
export function rotateOrbitals(integrals: OrbitalIntegrals, orbitals: Float64Array): OrbitalIntegrals {
  const n = integrals.orbitalCount;
  const oneElectron = new Float64Array(n * n);
  let tensor = new Float64Array(n ** 4);
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < n; q++) {
      for (let i = 0; i < n; i++) {
        for (let j = 0; j < n; j++) {
          oneElectron[i * n + j] +=
            orbitals[p * n + i] * orbitals[q * n + j] * integrals.oneElectron[p * n + q];
        }
      }
      for (let r = 0; r < n; r++) {
        for (let s = 0; s < n; s++) {
          tensor[((p * n + q) * n + r) * n + s] =
            integrals.twoElectron[packedPair(packedPair(p, q), packedPair(r, s))];
        }
      }
    }
  }
  // transforms the first index and moves it last; four times brings the order back
  for (let index = 0; index < 4; index++) {
    const next = new Float64Array(n ** 4);
    for (let p = 0; p < n; p++) {
      for (let rest = 0; rest < n ** 3; rest++) {
        for (let i = 0; i < n; i++) next[rest * n + i] += orbitals[p * n + i] * tensor[p * n ** 3 + rest];
      }
    }
    tensor = next;
  }
  const twoElectron = integrals.twoElectron.slice();
  for (let p = 0; p < n; p++) {
    for (let q = 0; q <= p; q++) {
      for (let r = 0; r < n; r++) {
        for (let s = 0; s <= r; s++) {
          twoElectron[packedPair(packedPair(p, q), packedPair(r, s))] = tensor[((p * n + q) * n + r) * n + s];
        }
      }
    }
  }
  return { ...integrals, oneElectron, twoElectron };
}

/** Two systems that know nothing of each other: the orbitals of the first, then of the second. */
export function sideBySide(first: OrbitalIntegrals, second: OrbitalIntegrals): OrbitalIntegrals {
  const n = first.orbitalCount + second.orbitalCount;
  const oneElectron = new Float64Array(n * n);
  const pairs = (n * (n + 1)) / 2;
  const twoElectron = new Float64Array((pairs * (pairs + 1)) / 2);
  let offset = 0;
  for (const part of [first, second]) {
    const m = part.orbitalCount;
    for (let p = 0; p < m; p++) {
      for (let q = 0; q < m; q++) {
        oneElectron[(offset + p) * n + offset + q] = part.oneElectron[p * m + q];
        for (let r = 0; r < m; r++) {
          for (let s = 0; s < m; s++) {
            const target = packedPair(packedPair(offset + p, offset + q), packedPair(offset + r, offset + s));
            twoElectron[target] = part.twoElectron[packedPair(packedPair(p, q), packedPair(r, s))];
          }
        }
      }
    }
    offset += m;
  }
  return { orbitalCount: n, coreEnergy: first.coreEnergy + second.coreEnergy, oneElectron, twoElectron };
}

/** The same Hamiltonian with orbital `order[i]` in place i. */
export function reorderOrbitals(integrals: OrbitalIntegrals, order: readonly number[]): OrbitalIntegrals {
  const n = integrals.orbitalCount;
  const permutation = new Float64Array(n * n);
  order.forEach((p, i) => {
    permutation[p * n + i] = 1;
  });
  return rotateOrbitals(integrals, permutation);
}

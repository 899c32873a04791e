import { describe, expect, it } from 'vitest';
import { closedShellFock, solveSingles } from '../../../engine/configuration-interaction/singles';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { congruence } from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { closedShellOrbitals } from '../../support/closed-shell-orbitals';
import { minimalHydrogens, TEXTBOOK_HYDROGEN } from '../../support/model-hamiltonians';
import { randomSymmetric, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, rotateOrbitals } from '../../support/random-orbital-integrals';

function randomDipole(n: number): Float64Array[] {
  return [1, 2, 3].map((seed) => randomSymmetric(n, seededRandom(seed)));
}

const closedShell = (n: number, occupied: number, seed: number): OrbitalIntegrals =>
  closedShellOrbitals(randomOrbitalIntegrals(n, seed, { coupling: 0.08 }), occupied);

/** Occupied and virtual orbitals mixed, each among themselves. */
function mixing(n: number, occupied: number): Float64Array {
  const generator = randomSymmetric(n, seededRandom(n)).map((value, k) =>
    Math.floor(k / n) < occupied === k % n < occupied ? value : 0,
  );
  // eigenvectors come in order of eigenvalue: a shift keeps the occupied ones first
  for (let i = 0; i < occupied; i++) generator[i * (n + 1)] -= 100;
  return symmetricEigen(generator, n).vectors;
}

describe('solveSingles', () => {
  it('identity: two orbitals: ε2 − ε1 − J12 + 2K12 and ε2 − ε1 − J12; strength 2/3·ω·2·⟨1|r|2⟩²', () => {
    const { h11, J11, e1, e2, J12, K12 } = TEXTBOOK_HYDROGEN;
    const z = Float64Array.from([0, 0.9, 0.9, 0]);
    const none = new Float64Array(4);
    const { states, referenceEnergy } = solveSingles(minimalHydrogens(1), {
      occupied: 1,
      states: 3,
      dipole: [none, none, z],
    });
    expect(referenceEnergy).toBeCloseTo(2 * h11 + J11, 14);
    expect(states.map((state) => state.spin)).toEqual(['triplet', 'singlet']);
    const [triplet, singlet] = states;
    expect(triplet.excitation).toBeCloseTo(e2 - e1 - J12, 14);
    expect(triplet.oscillatorStrength).toBe(0);
    expect(singlet.excitation).toBeCloseTo(e2 - e1 - J12 + 2 * K12, 14);
    expect(singlet.transitionDipole[2]).toBeCloseTo(-Math.SQRT2 * 0.9, 14);
    expect(singlet.oscillatorStrength).toBeCloseTo((2 / 3) * singlet.excitation * 2 * 0.81, 14);
    expect(singlet.leading).toEqual([{ from: 0, to: 1, weight: 1 }]);
  });

  it.each([
    ['singlet', '0.947422'],
    ['triplet', '0.584907'],
  ])('published: H2 at 1.4 bohr in STO-3G, %s excitation energy', (spin, printed) => {
    const none = new Float64Array(4);
    const { states } = solveSingles(minimalHydrogens(1), {
      occupied: 1,
      states: 1,
      dipole: [none, none, none],
    });
    expect(states.find((state) => state.spin === spin)?.excitation).toMatchPublished({
      printed,
      unit: 'hartree',
      source:
        'derived from the orbital energies and integrals of A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, ' +
        'sec. 3.5.2; value from memory',
      tolerance: 4e-4,
      because: 'the integrals used here are printed to four decimals; up to eight of them are added',
    });
  });

  it('independent: the same states as determinant CI with single excitations', () => {
    const integrals = closedShell(7, 3, 41);
    const singles = solveSingles(integrals, { occupied: 3, states: 12, dipole: randomDipole(7) });
    const determinants = solveConfigurationInteraction(integrals, {
      alphaElectrons: 3,
      betaElectrons: 3,
      maximumRank: 1,
      states: 25,
    });
    expect(singles.states).toHaveLength(24);
    const [reference, ...excited] = determinants.states;
    expect(singles.referenceEnergy).toBeCloseTo(reference.energy, 11);
    singles.states.forEach((state, k) => {
      expect(Math.abs(state.energy - excited[k].energy)).toBeLessThan(1e-10);
      expect(state.spin).toBe(excited[k].spin);
    });
  });

  it('identity: nothing depends on the choice of orbitals within the occupied and the virtual ones', () => {
    const n = 7;
    const integrals = closedShell(n, 3, 42);
    const orbitals = mixing(n, 3);
    const dipole = randomDipole(n);
    const plain = solveSingles(integrals, { occupied: 3, states: 5, dipole });
    const rotated = solveSingles(rotateOrbitals(integrals, orbitals), {
      occupied: 3,
      states: 5,
      dipole: dipole.map((matrix) => congruence(matrix, orbitals, n, n)),
    });
    expect(rotated.referenceEnergy).toBeCloseTo(plain.referenceEnergy, 11);
    plain.states.forEach((state, k) => {
      expect(Math.abs(rotated.states[k].excitation - state.excitation)).toBeLessThan(1e-11);
      expect(Math.abs(rotated.states[k].oscillatorStrength - state.oscillatorStrength)).toBeLessThan(1e-9);
    });
  });

  it('independent: Davidson in a space beyond the direct one equals the dense matrix', () => {
    const n = 41;
    const occupied = 10;
    const integrals = randomOrbitalIntegrals(n, 43, { coupling: 0.02 });
    const { states, iterations, termination } = solveSingles(integrals, {
      occupied,
      states: 3,
      dipole: randomDipole(n),
    });
    expect(termination).toEqual({ kind: 'converged' });
    expect(iterations).toBeGreaterThan(1);
    const exact = denseExcitations(integrals, occupied);
    (['singlet', 'triplet'] as const).forEach((spin) => {
      const found = states.filter((state) => state.spin === spin);
      expect(found).toHaveLength(3);
      found.forEach((state, k) => {
        expect(Math.abs(state.excitation - exact[spin][k])).toBeLessThan(1e-10);
      });
    });
  });

  it('identity: amplitudes have norm 1 and their largest is positive', () => {
    const { states } = solveSingles(closedShell(6, 2, 44), {
      occupied: 2,
      states: 4,
      dipole: randomDipole(6),
    });
    for (const { amplitudes, leading } of states) {
      expect(amplitudes.reduce((sum, value) => sum + value ** 2, 0)).toBeCloseTo(1, 12);
      const largest = amplitudes[leading[0].from * 4 + leading[0].to - 2];
      expect(largest).toBeGreaterThan(0);
      expect(leading[0].weight).toBeCloseTo(largest ** 2, 14);
    }
  });

  it('identity: no excitations without occupied or without virtual orbitals; refuses nonsense', () => {
    const integrals = randomOrbitalIntegrals(3, 45);
    expect(solveSingles(integrals, { occupied: 0, states: 1, dipole: randomDipole(3) }).states).toEqual([]);
    expect(solveSingles(integrals, { occupied: 3, states: 1, dipole: randomDipole(3) }).states).toEqual([]);
    expect(() => solveSingles(integrals, { occupied: 4, states: 1, dipole: [] })).toThrow(RangeError);
    expect(() => solveSingles(integrals, { occupied: 1, states: 0, dipole: [] })).toThrow(RangeError);
  });
});

/** All excitation energies from the textbook's matrix over spin-adapted singles. */
function denseExcitations(integrals: OrbitalIntegrals, occupied: number) {
  const n = integrals.orbitalCount;
  const fock = closedShellFock(integrals, occupied);
  const pair = (p: number, q: number) => (p >= q ? (p * (p + 1)) / 2 + q : (q * (q + 1)) / 2 + p);
  const repulsion = (p: number, q: number, r: number, s: number) =>
    integrals.twoElectron[pair(pair(p, q), pair(r, s))];
  const excitations: [number, number][] = [];
  for (let i = 0; i < occupied; i++) for (let a = occupied; a < n; a++) excitations.push([i, a]);
  const energies = (coulomb: number) => {
    const matrix = excitations.flatMap(([i, a]) =>
      excitations.map(
        ([j, b]) =>
          (i === j ? fock[a * n + b] : 0) -
          (a === b ? fock[i * n + j] : 0) +
          coulomb * repulsion(i, a, j, b) -
          repulsion(i, j, a, b),
      ),
    );
    return symmetricEigen(Float64Array.from(matrix), excitations.length).values;
  };
  return { singlet: energies(2), triplet: energies(0) };
}

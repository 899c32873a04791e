import { describe, expect, it } from 'vitest';
import { occupationString } from '../../../engine/configuration-interaction/determinants';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import {
  type ConfigurationInteractionOptions,
  solveConfigurationInteraction,
} from '../../../engine/configuration-interaction/solve';
import { EngineError } from '../../../engine/errors';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { closedShellOrbitals } from '../../support/closed-shell-orbitals';
import { hubbardRing, minimalHydrogens, TEXTBOOK_HYDROGEN } from '../../support/model-hamiltonians';
import {
  allOccupations,
  applyHamiltonian,
  bruteHamiltonian,
  bruteSpinSquared,
  occupationBits,
  operatorMatrix,
} from '../../support/operator-algebra';
import { randomSymmetric, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, rotateOrbitals, sideBySide } from '../../support/random-orbital-integrals';

const FULL = Number.POSITIVE_INFINITY;

function solve(
  integrals: OrbitalIntegrals,
  alphaElectrons: number,
  betaElectrons: number,
  maximumRank: number,
  states = 1,
  options: Partial<ConfigurationInteractionOptions> = {},
) {
  return solveConfigurationInteraction(integrals, {
    alphaElectrons,
    betaElectrons,
    maximumRank,
    states,
    ...options,
  });
}

/** The whole spectrum from the dense matrix of Slater–Condon elements. */
function spectrum(integrals: OrbitalIntegrals, alpha: number, beta: number, rank: number): Float64Array {
  const n = integrals.orbitalCount;
  const determinants = allOccupations(n, alpha, beta, rank).map((occupied) => ({
    alpha: occupationString(n, occupied.alpha),
    beta: occupationString(n, occupied.beta),
  }));
  const matrix = Float64Array.from(
    determinants.flatMap((left) => determinants.map((right) => hamiltonianElement(left, right, integrals))),
  );
  return symmetricEigen(matrix, determinants.length).values;
}

describe('solveConfigurationInteraction: against the dense matrix', () => {
  it.each([
    [6, 3, 3, FULL, 10, 1],
    [6, 3, 3, FULL, 1, 2],
    [6, 4, 3, FULL, 3, 3],
    [8, 3, 3, 2, 6, 4],
    [8, 4, 3, 2, 4, 5],
    [7, 3, 2, 3, 7, 6],
  ])(
    'independent: %i orbitals, %i + %i electrons, rank %d: lowest %i states',
    (n, a, b, rank, states, seed) => {
      const species = seed % 2 === 0 ? [] : [0, 1, 2, 3, 0, 1, 2, 3, 0];
      const integrals = randomOrbitalIntegrals(n, seed, { species, coupling: 0.15 });
      const result = solve(integrals, a, b, rank, states);
      const exact = spectrum(integrals, a, b, rank);
      expect(result.determinants).toBe(exact.length);
      expect(result.termination).toEqual({ kind: 'converged' });
      expect(result.states).toHaveLength(states);
      result.states.forEach((state, k) => {
        expect(Math.abs(state.energy - exact[k])).toBeLessThan(1e-10);
        expect(state.residual).toBeLessThan(1e-6);
      });
      if (result.determinants > 300) expect(result.iterations).toBeGreaterThan(1);
    },
  );

  it('independent: Hubbard ring of 6 sites, half filled, against brute-force operator algebra', () => {
    const ring = hubbardRing(6, 4);
    const determinants = allOccupations(6, 3, 3, FULL);
    const places = determinants.map((determinant) => occupationBits(determinant, 6));
    const matrix = Float64Array.from(
      places.flatMap((right) => {
        const column = applyHamiltonian(new Map([[right, 1]]), ring);
        return places.map((left) => column.get(left) ?? 0);
      }),
    );
    const exact = symmetricEigen(matrix, determinants.length).values;
    const result = solve(ring, 3, 3, FULL, 6);
    expect(result.termination).toEqual({ kind: 'converged' });
    result.states.forEach((state, k) => {
      expect(Math.abs(state.energy - exact[k])).toBeLessThan(1e-10);
    });
  });
});

describe('solveConfigurationInteraction: roots that hide', () => {
  const sites = (repulsion: number) => hubbardRing(6, repulsion);
  const plane = (repulsion: number) =>
    rotateOrbitals(sites(repulsion), symmetricEigen(sites(repulsion).oneElectron, 6).vectors);
  it.each([
    // a degenerate partner in another sector, found by a guard whose residual was larger than its height
    ['delocalised orbitals, U = 12', plane(12), [5]],
    // nothing near the lowest determinants has the symmetry of the ground state
    ['delocalised orbitals, U = 30', plane(30), [1]],
    // lattice symmetries that no single determinant shows
    ['site orbitals, U = 1/2', sites(0.5), [6, 10]],
    ['site orbitals, U = 2', sites(2), [8]],
  ])('independent: half-filled Hubbard ring of 6 sites, %s: equals the dense matrix', (_, ring, counts) => {
    const exact = spectrum(ring, 3, 3, FULL);
    for (const states of counts) {
      const result = solve(ring, 3, 3, FULL, states);
      expect(result.termination).toEqual({ kind: 'converged' });
      expect(result.states).toHaveLength(states);
      result.states.forEach((state, k) => {
        expect(Math.abs(state.energy - exact[k])).toBeLessThan(1e-9);
      });
    }
  });
});

describe('solveConfigurationInteraction: closed forms', () => {
  it('identity: two electrons in two orbitals of different symmetry', () => {
    const { h11, h22, J11, J22, J12, K12 } = TEXTBOOK_HYDROGEN;
    const result = solve(minimalHydrogens(1), 1, 1, FULL, 4);
    const ground = 2 * h11 + J11;
    const doubly = 2 * h22 + J22;
    const mean = (ground + doubly) / 2;
    const split = Math.hypot((doubly - ground) / 2, K12);
    const expected = [
      [mean - split, 'singlet'],
      [h11 + h22 + J12 - K12, 'triplet'],
      [h11 + h22 + J12 + K12, 'singlet'],
      [mean + split, 'singlet'],
    ] as const;
    expected.forEach(([energy, spin], k) => {
      expect(result.states[k].energy).toBeCloseTo(energy, 12);
      expect(result.states[k].spin).toBe(spin);
    });
    // tan of the mixing angle: c(doubly)/c(ground) = (E − ground)/K12
    const ratio = (mean - split - ground) / K12;
    expect(result.states[0].referenceWeight).toBeCloseTo(1 / (1 + ratio ** 2), 12);
    expect(result.states[0].naturalOccupations[1]).toBeCloseTo((2 * ratio ** 2) / (1 + ratio ** 2), 12);
    expect(result.states[0].leading.map(({ alpha, beta }) => [alpha, beta])).toEqual([
      [[0], [0]],
      [[1], [1]],
    ]);
  });

  it.each([
    [1, '-0.020562'],
    [2, '-0.040614'],
    [3, '-0.060192'],
    [5, '-0.098053'],
  ])('published: doubles CI of %i minimal-basis hydrogen molecules far apart', (molecules, printed) => {
    const integrals = minimalHydrogens(molecules);
    const { e1, e2, h11, J11, J22, J12, K12 } = TEXTBOOK_HYDROGEN;
    const result = solve(integrals, molecules, molecules, 2);
    const correlation = result.states[0].energy - molecules * (2 * h11 + J11);
    const half = e2 - e1 + (J11 + J22) / 2 - 2 * J12 + K12;
    const closedForm = half - Math.sqrt(half ** 2 + molecules * K12 ** 2);
    expect(Math.abs(correlation - closedForm)).toBeLessThan(1e-10);
    expect(correlation).toMatchPublished({
      printed,
      unit: 'hartree',
      source:
        'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, sec. 4.6: closed form with the integrals of sec. 3.5.2 for ' +
        'H2 at 1.4 bohr in STO-3G; value from memory',
      tolerance: molecules * 2e-4,
      because: 'the book prints the integrals to four decimals; the closed form itself is checked to 1e-10',
    });
  });

  it('identity: Hubbard model of two sites: (U − √(U² + 16 t²))/2, 0, U, (U + √…)/2', () => {
    for (const repulsion of [0.5, 4, 20]) {
      const result = solve(hubbardRing(2, repulsion), 1, 1, FULL, 4);
      const root = Math.sqrt(repulsion ** 2 + 16);
      [(repulsion - root) / 2, 0, repulsion, (repulsion + root) / 2].forEach((energy, k) => {
        expect(Math.abs(result.states[k].energy - energy)).toBeLessThan(1e-12);
      });
      expect(result.states[1].spin).toBe('triplet');
    }
  });
});

describe('solveConfigurationInteraction: exact laws', () => {
  it('identity: two electrons: CISD is full CI', () => {
    const integrals = randomOrbitalIntegrals(9, 21);
    const doubles = solve(integrals, 1, 1, 2, 3);
    const full = solve(integrals, 1, 1, FULL, 3);
    expect(doubles.determinants).toBe(full.determinants);
    doubles.states.forEach((state, k) => {
      expect(Math.abs(state.energy - full.states[k].energy)).toBeLessThan(1e-11);
    });
  });

  it('identity: full CI does not depend on the orbitals', () => {
    const integrals = randomOrbitalIntegrals(6, 22);
    const { vectors } = symmetricEigen(randomSymmetric(6, seededRandom(1)), 6);
    const rotated = solve(rotateOrbitals(integrals, vectors), 3, 3, FULL, 4);
    const plain = solve(integrals, 3, 3, FULL, 4);
    plain.states.forEach((state, k) => {
      expect(Math.abs(state.energy - rotated.states[k].energy)).toBeLessThan(1e-10);
      state.naturalOccupations.forEach((occupation, p) => {
        expect(Math.abs(occupation - rotated.states[k].naturalOccupations[p])).toBeLessThan(1e-6);
      });
    });
  });

  it('identity: full CI of two systems that know nothing of each other is the sum', () => {
    const first = closedShellOrbitals(randomOrbitalIntegrals(4, 23, { coupling: 0.15 }), 2);
    const second = closedShellOrbitals(randomOrbitalIntegrals(3, 24, { coupling: 0.15 }), 1);
    // one electron more is far above: without attraction between the systems charges do not move
    const together = solve(sideBySide(lift(first, -1), lift(second, -1)), 3, 3, FULL, 12);
    const sum =
      solve(lift(first, -1), 2, 2, FULL).states[0].energy +
      solve(lift(second, -1), 1, 1, FULL).states[0].energy;
    const nearest = Math.min(...together.states.map((state) => Math.abs(state.energy - sum)));
    expect(nearest).toBeLessThan(1e-10);
  });

  it('identity: a higher excitation rank never gives a higher energy, and the highest is full CI', () => {
    for (const [alpha, beta] of [
      [3, 3],
      [4, 2],
    ]) {
      const integrals = randomOrbitalIntegrals(6, 25);
      const energies = [1, 2, 3, 4, 5, 6].map((rank) => solve(integrals, alpha, beta, rank).states[0].energy);
      energies.forEach((energy, k) => {
        if (k > 0) expect(energy).toBeLessThanOrEqual(energies[k - 1] + 1e-11);
      });
      expect(energies[1] - energies[5]).toBeGreaterThan(1e-4);
      expect(Math.abs(energies[5] - solve(integrals, alpha, beta, FULL).states[0].energy)).toBeLessThan(
        1e-11,
      );
    }
  });

  it('identity: Brillouin: singles alone do not lower the energy of optimal closed-shell orbitals', () => {
    const integrals = closedShellOrbitals(randomOrbitalIntegrals(6, 26, { coupling: 0.1 }), 3);
    const result = solve(integrals, 3, 3, 1);
    expect(result.states[0].referenceWeight).toBeCloseTo(1, 12);
    expect(solve(integrals, 3, 3, 2).states[0].energy).toBeLessThan(result.states[0].energy - 1e-4);
  });

  it('identity: ⟨S²⟩ is S(S + 1) throughout the spectrum, and spins come in the numbers that branching gives', () => {
    const integrals = randomOrbitalIntegrals(4, 27);
    const { states } = solve(integrals, 2, 2, FULL, 36);
    const counts = new Map<string, number>();
    for (const state of states) {
      counts.set(state.spin, (counts.get(state.spin) ?? 0) + 1);
      expect(state.density.reduce((sum, value, k) => sum + (k % 5 === 0 ? value : 0), 0)).toBeCloseTo(4, 12);
    }
    // Weyl: 4 electrons in 4 orbitals have 20 singlets, 15 triplets and 1 quintet
    expect(Object.fromEntries(counts)).toEqual({ singlet: 20, triplet: 15, quintet: 1 });
  });

  it('identity: ⟨S²⟩ in a truncated open-shell space is that of the vector by operator algebra', () => {
    const n = 5;
    const integrals = randomOrbitalIntegrals(n, 28);
    const determinants = allOccupations(n, 3, 2, 2);
    const hamiltonian = operatorMatrix(determinants, (left, right) =>
      bruteHamiltonian(left, right, integrals),
    );
    const { values, vectors } = symmetricEigen(hamiltonian, determinants.length);
    const { states } = solve(integrals, 3, 2, 2, 5);
    states.forEach((state, k) => {
      expect(Math.abs(state.energy - values[k])).toBeLessThan(1e-11);
      let expected = 0;
      determinants.forEach((left, i) => {
        determinants.forEach((right, j) => {
          const product = vectors[i * values.length + k] * vectors[j * values.length + k];
          expected += product * bruteSpinSquared(left, right, n);
        });
      });
      expect(state.sSquared).toBeCloseTo(expected, 9);
    });
    expect(states.some((state) => state.spin === 'mixed')).toBe(true);
  });

  it('identity: a triplet has the same energy in the sectors M = 0 and M = 1', () => {
    const integrals = randomOrbitalIntegrals(6, 29);
    const triplet = solve(integrals, 4, 2, FULL).states[0];
    const inZero = solve(integrals, 3, 3, FULL, 6).states.filter((state) => state.spin === 'triplet');
    expect(triplet.spin).toBe('triplet');
    expect(Math.abs(inZero[0].energy - triplet.energy)).toBeLessThan(1e-10);
  });
});

describe('solveConfigurationInteraction: degenerate states', () => {
  /** Orbital pairs like π(x) and π(y). */
  const withPair = () =>
    twofold(randomOrbitalIntegrals(7, 30, { coupling: 0.1, species: [0, 0, 1, 2, 0, 1, 2] }));

  it('identity: both members of a degenerate pair appear, and a cut through it takes the same one each time', () => {
    const integrals = withPair();
    const many = solve(integrals, 3, 3, FULL, 8);
    const pair = many.states.findIndex(
      (state, k) => k > 0 && Math.abs(state.energy - many.states[k - 1].energy) < 1e-8,
    );
    expect(pair).toBeGreaterThan(0);
    const cut = solve(integrals, 3, 3, FULL, pair);
    expect(cut.states).toHaveLength(pair);
    const last = cut.states[pair - 1];
    const first = many.states[pair - 1];
    expect(Math.abs(last.energy - first.energy)).toBeLessThan(1e-10);
    expect(last.spin).toBe(first.spin);
    last.density.forEach((value, k) => {
      expect(Math.abs(value - first.density[k])).toBeLessThan(1e-5);
    });
  });

  it('identity: spins degenerate with one another are told apart', () => {
    // six hydrogen atoms that do not feel each other
    const far = hubbardRing(6, 3);
    const apart = { ...far, oneElectron: far.oneElectron.map(() => 0) };
    const { states } = solve(apart, 3, 3, FULL, 20);
    expect(states.every((state) => Math.abs(state.energy) < 1e-12)).toBe(true);
    const counts: Record<string, number> = {};
    for (const state of states) counts[state.spin] = (counts[state.spin] ?? 0) + 1;
    // six spins one half: 5 singlets, 9 triplets, 5 quintets, 1 septet
    expect(counts).toEqual({ singlet: 5, triplet: 9, quintet: 5, septet: 1 });
  });
});

describe('solveConfigurationInteraction: limits', () => {
  it('identity: says when the iteration was stopped, and reports its progress', () => {
    const integrals = randomOrbitalIntegrals(7, 31);
    const limited = solve(integrals, 3, 3, FULL, 1, { maximumIterations: 2 });
    expect(limited.termination).toEqual({ kind: 'iterationLimit', limit: 2 });
    expect(limited.states[0].residual).toBeGreaterThan(1e-6);
    const residuals: number[] = [];
    const control = {
      isCancelled: () => residuals.length >= 3,
      report: ({ residual }: { residual: number }) => residuals.push(residual),
    };
    expect(solve(integrals, 3, 3, FULL, 1, { control }).termination).toEqual({ kind: 'cancelled' });
    expect(residuals).toHaveLength(3);
    expect(residuals[2]).toBeLessThan(residuals[0]);
    const broken = { ...integrals, oneElectron: integrals.oneElectron.map(() => Number.NaN) };
    expect(solve(broken, 3, 3, FULL).termination).toEqual({ kind: 'notFinite', quantity: 'Hamiltonian' });
  });

  it('identity: refuses what does not fit the memory or the orbitals', () => {
    const integrals = randomOrbitalIntegrals(6, 32);
    let refusal: unknown;
    try {
      solve(integrals, 3, 3, FULL, 1, { memoryLimit: 1000 });
    } catch (error) {
      refusal = error;
    }
    expect(refusal).toBeInstanceOf(EngineError);
    expect((refusal as EngineError).code).toBe('study.tooLarge');
    expect(() => solve(integrals, 7, 3, FULL)).toThrow(RangeError);
    expect(() => solve(integrals, 3, 3, 0)).toThrow(RangeError);
    expect(() => solve(integrals, 3, 3, 2, 0)).toThrow(RangeError);
  });

  it('identity: no electrons, full shells, and more states than determinants', () => {
    const integrals = randomOrbitalIntegrals(3, 33);
    expect(solve(integrals, 0, 0, 2).states[0].energy).toBeCloseTo(integrals.coreEnergy, 14);
    expect(solve(integrals, 3, 3, 2, 4).states).toHaveLength(1);
    const oneElectron = symmetricEigen(integrals.oneElectron, 3).values;
    solve(integrals, 1, 0, 1, 9).states.forEach((state, k) => {
      expect(state.energy).toBeCloseTo(integrals.coreEnergy + oneElectron[k], 12);
      expect(state.spin).toBe('doublet');
    });
  });
});

/** Every orbital lowered by the same amount. */
function lift(integrals: OrbitalIntegrals, shift: number): OrbitalIntegrals {
  const diagonal = integrals.orbitalCount + 1;
  return {
    ...integrals,
    oneElectron: integrals.oneElectron.map((value, k) => value + (k % diagonal === 0 ? shift : 0)),
  };
}

/** Averages the Hamiltonian over a quarter turn of the orbital pairs 2, 3 and 5, 6. */
function twofold(integrals: OrbitalIntegrals): OrbitalIntegrals {
  const n = integrals.orbitalCount;
  const quarterTurn = new Float64Array(n * n);
  const partner = [0, 1, 3, 2, 4, 6, 5];
  partner.forEach((to, from) => {
    quarterTurn[from * n + to] = from === 3 || from === 6 ? -1 : 1;
  });
  const turned = rotateOrbitals(integrals, quarterTurn);
  const mean = (a: Float64Array, b: Float64Array) => a.map((value, k) => (value + b[k]) / 2);
  const averaged = {
    ...integrals,
    oneElectron: mean(integrals.oneElectron, turned.oneElectron),
    twoElectron: mean(integrals.twoElectron, turned.twoElectron),
  };
  return averaged;
}

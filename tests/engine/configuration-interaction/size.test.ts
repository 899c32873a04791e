import { describe, expect, it } from 'vitest';
import {
  configurationInteractionBytes,
  countDeterminants,
} from '../../../engine/configuration-interaction/size';
import { allOccupations } from '../../support/operator-algebra';

const FULL = Number.POSITIVE_INFINITY;

describe('countDeterminants', () => {
  it('identity: equals the number of determinants written out', () => {
    for (const [n, alpha, beta] of [
      [4, 2, 2],
      [5, 3, 1],
      [6, 2, 3],
      [3, 3, 0],
    ]) {
      for (const rank of [1, 2, 3, 4, FULL]) {
        expect(countDeterminants(n, alpha, beta, rank)).toBe(allOccupations(n, alpha, beta, rank).length);
      }
    }
  });

  it('identity: closed forms: C(13, 5)² for full CI; 1 + singles + doubles for CISD', () => {
    expect(countDeterminants(13, 5, 5, FULL)).toBe(1287 ** 2);
    expect(countDeterminants(13, 5, 5, 10)).toBe(1287 ** 2);
    expect(countDeterminants(25, 5, 5, 2)).toBe(1 + 2 * 100 + 2 * 10 * 190 + 100 ** 2);
  });

  it('identity: large counts are exact below 2⁵³ and finite above', () => {
    // C(30, 10)² = 30045015²
    expect(BigInt(countDeterminants(30, 10, 10, FULL))).toBe(30045015n ** 2n);
    // C(100, 50) to sixteen digits, by its logarithm: Σ ln((50 + i)/i)
    let logarithm = 0;
    for (let i = 1; i <= 50; i++) logarithm += Math.log((50 + i) / i);
    expect(Math.log(countDeterminants(100, 50, 50, FULL))).toBeCloseTo(2 * logarithm, 10);
  });
});

describe('configurationInteractionBytes', () => {
  it('identity: grows with determinants and with states, by whole vectors', () => {
    const one = configurationInteractionBytes(12, 4, 4, FULL, 1);
    const two = configurationInteractionBytes(12, 4, 4, FULL, 2);
    const vector = 8 * countDeterminants(12, 4, 4, FULL);
    // two more guesses, and room for four more steps; basis vectors and their products
    expect(two - one).toBe(12 * vector);
    expect(one).toBeGreaterThan(20 * vector);
    expect(configurationInteractionBytes(12, 4, 4, 2, 1)).toBeLessThan(one);
  });

  it('identity: two electrons take a few matrices over orbitals beside the vectors, and no lists', () => {
    const orbitals = 100;
    const taken = configurationInteractionBytes(orbitals, 1, 1, FULL, 1);
    expect(taken).toBe(configurationInteractionBytes(orbitals, 1, 1, 2, 1));
    expect(taken).toBeLessThan(8 * 80 * orbitals ** 2);
  });

  it('identity: CISD of a closed shell takes its integrals beside the vectors, and no lists of elements', () => {
    const [orbitals, pairs] = [40, 4];
    const particles = orbitals - pairs;
    const determinants = countDeterminants(orbitals, pairs, pairs, 2);
    // (ac|bd) by the symmetry of both pairs; matrices over single excitations
    const integrals = 8 * (particles ** 4 / 2 + 9 * (pairs * particles) ** 2);
    const taken = configurationInteractionBytes(orbitals, pairs, pairs, 2, 1);
    expect(taken).toBeGreaterThan(integrals + 8 * 20 * determinants);
    expect(taken).toBeLessThan(2 * integrals + 8 * 80 * determinants);
    // over orbitals of their own the spins go by lists
    expect(configurationInteractionBytes(orbitals, pairs, pairs, 2, 1, true)).toBeGreaterThan(3 * taken);
  });
});

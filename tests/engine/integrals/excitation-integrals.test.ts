import { describe, expect, it } from 'vitest';
import { excitationIntegrals } from '../../../engine/integrals/excitation-integrals';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { transformTwoElectron } from '../../../engine/integrals/orbital-transformation';
import { inForm } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';

describe('excitationIntegrals', () => {
  it.each(['fast', 'plain'] as const)('identity: they are among those of all orbitals, %s form', (form) => {
    const n = 8;
    const [alphaOccupied, betaOccupied] = [3, 2];
    const random = seededRandom(9);
    const repulsion = randomArray((36 * 37) / 2, random);
    const orbitals = randomArray(n * n, random);
    const columns = (first: number, end: number) =>
      Float64Array.from(
        { length: n * (end - first) },
        (_, i) => orbitals[Math.floor(i / (end - first)) * n + first + (i % (end - first))],
      );
    const spin = (occupied: number) => ({ occupied: columns(0, occupied), virtual: columns(occupied, n) });
    const all = transformTwoElectron(repulsion, orbitals, n, n);
    const result = inForm(form, () =>
      excitationIntegrals(repulsion, n, spin(alphaOccupied), spin(betaOccupied)),
    );
    let place = 0;
    for (let i = 0; i < alphaOccupied; i++) {
      for (let a = alphaOccupied; a < n; a++) {
        for (let j = 0; j < betaOccupied; j++) {
          for (let b = betaOccupied; b < n; b++) {
            const expected = all[packedPair(packedPair(i, a), packedPair(j, b))];
            expect(Math.abs(result[place++] - expected)).toBeLessThan(1e-10);
          }
        }
      }
    }
    expect(place).toBe(result.length);
  });
});

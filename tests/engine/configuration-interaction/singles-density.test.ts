import { describe, expect, it } from 'vitest';
import { singlesDensity } from '../../../engine/configuration-interaction/singles-density';
import { bruteOneElectron, type Occupation } from '../../support/operator-algebra';
import { seededRandom } from '../../support/random';

const ORBITALS = 5;
const OCCUPIED = 2;
const VIRTUALS = ORBITALS - OCCUPIED;

function randomAmplitudes(): Float64Array {
  const random = seededRandom(5);
  const raw = Float64Array.from({ length: OCCUPIED * VIRTUALS }, () => random() - 0.5);
  const norm = Math.hypot(...raw);
  return raw.map((value) => value / norm);
}

/** The same state as determinants: an electron of either spin excited, with equal or opposite signs. */
function determinants(amplitudes: Float64Array, sign: 1 | -1) {
  const filled = Array.from({ length: OCCUPIED }, (_, i) => i);
  return Array.from(amplitudes, (amplitude, ia) => {
    const [i, a] = [Math.trunc(ia / VIRTUALS), OCCUPIED + (ia % VIRTUALS)];
    const excited = [...filled.filter((p) => p !== i), a];
    // a†(a) a(i) passes the occupied orbitals between
    const coefficient = (amplitude * (-1) ** (OCCUPIED - 1 - i)) / Math.SQRT2;
    return [
      { coefficient, occupation: { alpha: excited, beta: filled } },
      { coefficient: sign * coefficient, occupation: { alpha: filled, beta: excited } },
    ];
  }).flat() as { readonly coefficient: number; readonly occupation: Occupation }[];
}

describe('singlesDensity', () => {
  const amplitudes = randomAmplitudes();
  const density = singlesDensity(amplitudes, OCCUPIED, ORBITALS);

  it.each([
    ['singlet', 1],
    ['triplet', -1],
  ] as const)(
    'independent: of a %s by creation and annihilation operators on its determinants',
    (_, sign) => {
      const state = determinants(amplitudes, sign);
      for (let p = 0; p < ORBITALS; p++) {
        for (let q = 0; q < ORBITALS; q++) {
          const operator = new Float64Array(ORBITALS ** 2);
          operator[p * ORBITALS + q] = 1;
          let expected = 0;
          for (const left of state) {
            for (const right of state) {
              const element = bruteOneElectron(left.occupation, right.occupation, operator, ORBITALS);
              expected += left.coefficient * right.coefficient * element;
            }
          }
          expect(density[p * ORBITALS + q]).toBeCloseTo(expected, 13);
        }
      }
    },
  );

  it('identity: it counts all electrons', () => {
    let trace = 0;
    for (let p = 0; p < ORBITALS; p++) trace += density[p * ORBITALS + p]!;
    expect(trace).toBeCloseTo(2 * OCCUPIED, 13);
  });
});

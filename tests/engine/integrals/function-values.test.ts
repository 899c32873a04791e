import { describe, expect, it } from 'vitest';
import { placeBasis } from '../../../engine/basis/place-basis';
import { resolveBasis } from '../../../engine/basis/resolve-basis';
import { densityValues, functionValues, orbitalValues } from '../../../engine/integrals/function-values';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import { atom, prepare, study } from '../../support/studies';

/**
 * Cube of points about the origin; the trapezoid rule on it converges as exp(−π²/(αh²)) for a Gaussian of exponent
 * α, so a smooth product of functions is integrated to rounding by a fine enough cube.
 */
function cube(half: number, step: number): Float64Array {
  const axis = Array.from({ length: Math.round((2 * half) / step) + 1 }, (_, i) => -half + i * step);
  return Float64Array.from(axis.flatMap((x) => axis.flatMap((y) => axis.flatMap((z) => [x, y, z]))));
}

function placed(harmonics: 'spherical' | 'cartesian') {
  const shells = [0, 1, 2, 3, 4].map((angularMomentum) => ({
    angularMomentum,
    exponents: [0.9, 0.4],
    coefficients: [0.6, 0.5],
  }));
  const basis = { name: 'smooth', harmonics, shells: { H: shells } };
  const prepared = prepare(study([atom('H', 0.2, -0.1, 0.3), atom('H', -0.4, 0.5, -0.6)], { basis }));
  return placeBasis(resolveBasis(basis, ['H']), prepared.moleculeAt(null));
}

describe('functionValues', () => {
  it.each(['spherical', 'cartesian'] as const)(
    'independent: products summed over a grid give the overlap matrix, s to g, %s',
    (harmonics) => {
      const basis = placed(harmonics);
      const n = basis.functionCount;
      const step = 0.4;
      const values = functionValues(basis, cube(7.2, step));
      const overlap = overlapMatrix(basis);
      const sums = new Float64Array(n * n);
      for (let point = 0; point < values.length; point += n) {
        for (let i = 0; i < n; i++) {
          for (let j = 0; j < n; j++) sums[i * n + j] += step ** 3 * values[point + i] * values[point + j];
        }
      }
      sums.forEach((sum, k) => {
        expect(Math.abs(sum - overlap[k])).toBeLessThan(1e-7);
      });
    },
  );

  it('identity: the density is the sum of its orbitals’ squares', () => {
    const basis = placed('spherical');
    const n = basis.functionCount;
    const values = functionValues(basis, Float64Array.of(0.1, 0.2, 0.3, -1, 0.5, 2));
    const coefficients = Float64Array.from({ length: 2 * n }, (_, k) => Math.sin(k + 1));
    const density = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        density[i * n + j] =
          coefficients[2 * i] * coefficients[2 * j] + coefficients[2 * i + 1] * coefficients[2 * j + 1];
      }
    }
    const orbitals = orbitalValues(values, coefficients, n, 2);
    densityValues(values, density, n).forEach((value, point) => {
      expect(Math.abs(value - orbitals[2 * point] ** 2 - orbitals[2 * point + 1] ** 2)).toBeLessThan(1e-12);
    });
  });
});

import { describe, expect, it } from 'vitest';
import { cartesianComponents } from '../../../engine/integrals/cartesian-components';
import {
  HERMITE_BATCH,
  HermiteCoulombArguments,
  hermiteCoulombInto,
} from '../../../engine/integrals/hermite-coulomb';
import { hermiteStart } from '../../../engine/integrals/hermite-index';
import { gaussLegendre } from '../../support/quadrature';

/** Arguments of different sizes, more than one so that the rows of a batch are told apart. */
function exampleBatch(count: number): HermiteCoulombArguments {
  const batch = new HermiteCoulombArguments();
  for (let k = 0; k < count; k++) {
    batch.exponent[k] = 0.4 + 0.1 * k;
    batch.x[k] = 0.3 + 0.05 * k;
    batch.y[k] = -0.8 + 0.02 * k;
    batch.z[k] = 0.5 - 0.07 * k;
    batch.prefactor[k] = 1.5 - 0.03 * k;
  }
  return batch;
}

/** d^n/dx^n exp(−b x²) */
function gaussianDerivative(n: number, b: number, x: number): number {
  let previous = 0;
  let value = Math.exp(-b * x * x);
  for (let k = 0; k < n; k++) [previous, value] = [value, -2 * b * (x * value + k * previous)];
  return value;
}

describe('hermiteCoulombInto', () => {
  it.each([0, 1, 2, 3, 4, 5, 8, 16])(
    'independent: degree %i by quadrature of ∫₀¹ ∂^t∂^u∂^v exp(−a u² r²) du',
    (degree) => {
      const { nodes, weights } = gaussLegendre(60);
      const count = 5;
      const batch = exampleBatch(count);
      const width = hermiteStart(degree + 1);
      const target = new Float64Array(count * width);
      hermiteCoulombInto(degree, batch, count, target);
      for (let k = 0; k < count; k++) {
        let index = 0;
        for (let total = 0; total <= degree; total++) {
          for (const [t, u, v] of cartesianComponents(total)) {
            let expected = 0;
            let size = 0;
            nodes.forEach((s, i) => {
              const b = batch.exponent[k] * s * s;
              const value =
                gaussianDerivative(t, b, batch.x[k]) *
                gaussianDerivative(u, b, batch.y[k]) *
                gaussianDerivative(v, b, batch.z[k]);
              expected += batch.prefactor[k] * weights[i] * value;
              size += weights[i] * Math.abs(value);
            });
            // relative to what is integrated, since high derivatives grow like factorials
            expect(Math.abs(target[k * width + index] - expected)).toBeLessThan(2e-13 * Math.max(1, size));
            index++;
          }
        }
      }
    },
  );

  it('identity: the closed forms up to degree 4 are the first rows of the recursion of degree 5', () => {
    const batch = exampleBatch(HERMITE_BATCH);
    const low = new Float64Array(HERMITE_BATCH * hermiteStart(5));
    const high = new Float64Array(HERMITE_BATCH * hermiteStart(6));
    hermiteCoulombInto(4, batch, HERMITE_BATCH, low);
    hermiteCoulombInto(5, batch, HERMITE_BATCH, high);
    low.forEach((value, i) => {
      const other = high[Math.floor(i / hermiteStart(5)) * hermiteStart(6) + (i % hermiteStart(5))];
      expect(Math.abs(value - other)).toBeLessThan(1e-12 * (1 + Math.abs(value)));
    });
  });
});

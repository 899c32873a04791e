import type { PlacedBasis } from '../basis/contracted-gaussian';
import type { LineIntegrals } from './line-integrals';
import { type SeparableOperator, separableMatrices } from './separable-operator';

const KINETIC: SeparableOperator = {
  count: 1,
  extraPower: 1,
  highestMoment: 0,
  origin: [0, 0, 0],
  evaluateInto(target, line, [i, j, k], a, [l, m, n], b) {
    const x = line.at(0, i, l);
    const y = line.at(1, j, m);
    const z = line.at(2, k, n);
    target[0] =
      gradientProduct(line, 0, i, a, l, b) * y * z +
      x * gradientProduct(line, 1, j, a, m, b) * z +
      x * y * gradientProduct(line, 2, k, a, n, b);
  },
};

/**
 * Kinetic-energy matrix over contracted Gaussians, T(μ,ν) = ½⟨∇μ|∇ν⟩ (= −½⟨μ|∇²|ν⟩; this form is symmetric and
 * positive term by term).
 *
 * @param basis - n functions; centres in bohr, exponents in bohr⁻²
 * @returns n×n symmetric, row-major Float64Array of length n², in hartree
 *
 * Source: see `LineIntegrals`.   Cost: O(n²); allocates n².
 */
export function kineticMatrix(basis: PlacedBasis): Float64Array {
  return separableMatrices(basis, KINETIC)[0];
}

/** ½ ∫ f′g′ along one axis, from (x^i e^(−ax²))′ = i x^(i−1) e^(−ax²) − 2a x^(i+1) e^(−ax²). */
function gradientProduct(
  line: LineIntegrals,
  axis: number,
  i: number,
  a: number,
  j: number,
  b: number,
): number {
  let sum = 2 * a * b * line.at(axis, i + 1, j + 1);
  if (i > 0) sum -= b * i * line.at(axis, i - 1, j + 1);
  if (j > 0) sum -= a * j * line.at(axis, i + 1, j - 1);
  if (i > 0 && j > 0) sum += 0.5 * i * j * line.at(axis, i - 1, j - 1);
  return sum;
}

import type { PlacedBasis } from '../basis/contracted-gaussian';
import { type SeparableOperator, separableMatrices } from './separable-operator';

const OVERLAP: SeparableOperator = {
  count: 1,
  extraPower: 0,
  highestMoment: 0,
  origin: [0, 0, 0],
  evaluateInto(target, line, [i, j, k], _a, [l, m, n]) {
    target[0] = line.at(0, i, l) * line.at(1, j, m) * line.at(2, k, n);
  },
};

/**
 * Overlap matrix over contracted Gaussians, S(μ,ν) = ⟨μ|ν⟩.
 *
 * @param basis - n functions; centres in bohr, exponents in bohr⁻²
 * @returns n×n symmetric, row-major Float64Array of length n²; diagonal 1 for normalised functions
 *
 * Source: see `LineIntegrals`.   Cost: O(n²); allocates n².
 */
export function overlapMatrix(basis: PlacedBasis): Float64Array {
  return separableMatrices(basis, OVERLAP)[0];
}

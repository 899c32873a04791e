import { dot, multiply, multiplyLeftTransposed } from '../linear-algebra/dense';
import type { OrbitalIntegrals } from './orbital-integrals';
import {
  frozenDensity,
  frozenMeanField,
  type OrbitalTransformationInput,
  selectColumns,
  transformEqualPair,
  transformFirstPair,
  transformOneElectron,
  transformOtherPair,
  transformTwoElectron,
} from './orbital-transformation';

export interface UnrestrictedTransformationInput extends Omit<OrbitalTransformationInput, 'coefficients'> {
  /** of alpha and of beta orbitals, as many of each */
  readonly coefficients: readonly [Float64Array, Float64Array];
  /** over functions, n×n symmetric, row-major */
  readonly overlap: Float64Array;
}

/**
 * Hamiltonian over active alpha and beta orbitals, the mean field of the frozen ones of both spins included:
 * F(σ) = h + J(α) + J(β) − K(σ), and core energy = nuclear repulsion + ½ Σ over spins and frozen f of (h_ff + F_ff).
 *
 * Cost: that of two restricted transformations and half of a third.
 */
export function transformToSpinOrbitals(input: UnrestrictedTransformationInput): OrbitalIntegrals {
  const { oneElectron, repulsion, overlap, coefficients, orbitalCount: m, frozen, active } = input;
  const n = coefficients[0].length / m;
  const densities = coefficients.map((all) => frozenDensity(selectColumns(all, m, 0, frozen), n, frozen));
  const orbitals = coefficients.map((all) => selectColumns(all, m, frozen, active));
  const fields = densities.map((same, spin) =>
    frozen === 0 ? oneElectron : frozenMeanField(oneElectron, repulsion, same, densities[1 - spin], n),
  );
  const coreEnergy = densities.reduce(
    (sum, same, spin) => sum + (dot(same, oneElectron) + dot(same, fields[spin])) / 2,
    input.nuclearRepulsion,
  );
  const [alpha, beta] = orbitals;
  const [alphaPairs, mixed] = transformFirstPair(repulsion, alpha, n, active, (half) => [
    transformEqualPair(half, alpha, n),
    transformOtherPair(half, beta, n),
  ]);
  return {
    orbitalCount: active,
    coreEnergy,
    oneElectron: transformOneElectron(fields[0], alpha, n, active),
    twoElectron: alphaPairs,
    beta: {
      oneElectron: transformOneElectron(fields[1], beta, n, active),
      twoElectron: transformTwoElectron(repulsion, beta, n, active),
      mixed,
      overlap: multiplyLeftTransposed(coefficients[0], multiply(overlap, coefficients[1], n, n, m), m, n, m),
      frozen,
    },
  };
}

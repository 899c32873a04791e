import type { BetaIntegrals } from '../integrals/orbital-integrals';
import { dot } from '../linear-algebra/dense';
import { type DeterminantSpace, determinantAt } from './determinant-space';
import { occupiedOrbitals } from './determinants';
import { leadingConfigurations, type WeightedConfiguration } from './leading-configurations';
import {
  naturalOrbitals,
  type SpinDensities,
  spinDensities,
  spinSummed,
  unrestrictedSpinDensities,
} from './one-particle-density';
import { applySpinSquared, type SpinName, spinName } from './spin';
import { applyUnrestrictedSpinSquared, unrestrictedSpin } from './unrestricted-spin';
import type { VectorSymmetry } from './vector-symmetry';

/** A determinant of a CI vector; active orbitals counted from 0. */
export interface WeightedDeterminant {
  readonly coefficient: number;
  readonly weight: number;
  readonly alpha: readonly number[];
  readonly beta: readonly number[];
}

export interface ConfigurationInteractionState {
  /** hartree, core energy included */
  readonly energy: number;
  /** ‖Hc − Ec‖, hartree */
  readonly residual: number;
  readonly sSquared: number;
  readonly spin: SpinName;
  /** weight of the reference determinant */
  readonly referenceWeight: number;
  /** falling weight: the largest `LEADING_COUNT` above `LEADING_WEIGHT` */
  readonly leading: readonly WeightedDeterminant[];
  /** absent where beta orbitals differ */
  readonly configurations?: readonly WeightedConfiguration[];
  /**
   * spin-summed one-particle density over active orbitals, n×n row-major; where beta orbitals differ, over all alpha
   * ones, frozen electrons included
   */
  readonly density: Float64Array;
  /** the parts of `density` from alpha and from beta electrons */
  readonly spinDensities: SpinDensities;
  /** of every state but the lowest: one-particle transition density from there, symmetric part, the same size */
  readonly transitionDensity?: Float64Array;
  /** eigenvalues of `density`, falling */
  readonly naturalOccupations: readonly number[];
  /** where the symmetry of the orbitals was given */
  readonly symmetry?: VectorSymmetry;
}

export const LEADING_COUNT = 8;
export const LEADING_WEIGHT = 1e-3;

/**
 * What one normalised CI vector says. Coefficients are given the sign that makes the largest positive.
 *
 * @param product - room for a vector, its content lost
 */
export function describeState(
  space: DeterminantSpace,
  vector: Float64Array,
  energy: number,
  residual: number,
  beta: BetaIntegrals | undefined,
  product: Float64Array,
): ConfigurationInteractionState {
  applySpin(space, vector, product, beta);
  const sSquared = dot(vector, product);
  const densities = densitiesBetween(space, vector, vector, beta);
  const density = spinSummed(densities);
  return {
    energy,
    residual,
    sSquared,
    spin: spinName(sSquared),
    referenceWeight: vector[0] ** 2,
    leading: leadingDeterminants(space, vector),
    ...(!beta && { configurations: leadingConfigurations(space, vector) }),
    density,
    spinDensities: densities,
    naturalOccupations: Array.from(naturalOrbitals(density, Math.sqrt(density.length)).values),
  };
}

/** product ← P S² P·vector, over the same orbitals for both spins or not. */
export function applySpin(
  space: DeterminantSpace,
  vector: Float64Array,
  product: Float64Array,
  beta?: BetaIntegrals,
): void {
  if (beta) {
    const electrons = [space.alpha.electrons, space.beta.electrons] as const;
    const spin = unrestrictedSpin(beta, space.orbitalCount, electrons);
    applyUnrestrictedSpinSquared(space, spin, vector, product);
  } else {
    applySpinSquared(space, vector, product);
  }
}

/** As the densities of a state, between two. */
export function densitiesBetween(
  space: DeterminantSpace,
  left: Float64Array,
  right: Float64Array,
  beta?: BetaIntegrals,
): SpinDensities {
  return beta ? unrestrictedSpinDensities(space, left, right, beta) : spinDensities(space, left, right);
}

/** Sign that makes the coefficient of largest weight positive. */
export function leadingSign(vector: Float64Array): 1 | -1 {
  const largest = vector.reduce((best, value) => (value ** 2 > best ** 2 ? value : best), 0);
  return largest < 0 ? -1 : 1;
}

function leadingDeterminants(space: DeterminantSpace, vector: Float64Array): WeightedDeterminant[] {
  const places: number[] = [];
  for (let place = 0; place < vector.length; place++) {
    if (vector[place] ** 2 > LEADING_WEIGHT) places.push(place);
  }
  places.sort((a, b) => vector[b] ** 2 - vector[a] ** 2 || a - b);
  const sign = leadingSign(vector);
  return places.slice(0, LEADING_COUNT).map((place) => {
    const { alpha, beta } = determinantAt(space, place);
    return {
      coefficient: sign * vector[place],
      weight: vector[place] ** 2,
      alpha: occupiedOrbitals(alpha),
      beta: occupiedOrbitals(beta),
    };
  });
}
